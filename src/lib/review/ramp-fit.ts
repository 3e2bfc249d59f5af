import { lastIndex, timeAt, type Grid } from './grid';
import { median } from './noise';
import type { Leg } from './plan';
import { centredSlopes } from './regress';

/** A start of the run that a stretch of the log speaks for. */
export interface StartFit {
  /** Seconds from the first sample. */
  readonly startS: number;
  /** Share (0-1) of the first ramp that is seen in the log rising as planned. */
  readonly seenShare: number;
}

const BIN_S = 60;
/** A later, larger cluster does not beat an earlier one of this share of it: a kiln that falls behind drags starts later. */
const EARLIER_SHARE = 0.3;

/**
 * Where the run began, by its first ramp. Every node on which the log rises at about the planned rate implies a start, its
 * time − (T − start temperature) / rate; where a programmer leads the kiln these agree, whatever came before or after. The
 * densest agreement wins, an early one before a late one, and its median is the start. Several starts come back when the
 * log holds several firings, in order of time.
 */
export function startsByFirstRamp(grid: Grid, leg: Leg, windowS: number): StartFit[] {
  if (leg.rateCPerH === null || leg.direction === 0) return [];
  const deltaC = Math.abs(leg.toC - leg.fromC);
  const lowC = Math.min(Math.max(5, 0.1 * deltaC), 0.5 * deltaC);
  const highC = deltaC - Math.min(leg.bandC, 0.2 * deltaC);
  const slopes = centredSlopes(grid, windowS);
  const implied: number[] = [];
  for (let i = 0; i <= lastIndex(grid); i++) {
    const risenC = leg.direction * (grid.value[i]! - leg.fromC);
    const ratio = (leg.direction * slopes[i]!) / leg.rateCPerH;
    if (!grid.known[i] || risenC < lowC || risenC > highC || !(ratio > 0.6 && ratio < 1.5)) continue;
    implied.push(timeAt(grid, i) - (risenC / leg.rateCPerH) * 3600);
  }
  const expected = (((highC - lowC) / leg.rateCPerH) * 3600) / grid.stepS;
  return clusters(implied, expected);
}

/** Dense clusters of implied starts, ascending. */
function clusters(implied: readonly number[], expectedCount: number): StartFit[] {
  if (implied.length === 0) return [];
  const counts = new Map<number, number>();
  for (const s of implied) {
    const bin = Math.round(s / BIN_S);
    counts.set(bin, (counts.get(bin) ?? 0) + 1);
  }
  const dense = (bin: number) => [-2, -1, 0, 1, 2].reduce((sum, d) => sum + (counts.get(bin + d) ?? 0), 0);
  let best = 0;
  for (const bin of counts.keys()) best = Math.max(best, dense(bin));
  const strong = [...counts.keys()].filter((bin) => dense(bin) >= EARLIER_SHARE * best).sort((a, b) => a - b);
  const fits: StartFit[] = [];
  let lastBin = -Infinity;
  for (const bin of strong) {
    if (bin - lastBin > 5) {
      // Climb to the local top of density before reading the median there.
      let top = bin;
      while (dense(top + 1) > dense(top)) top++;
      const near = implied.filter((s) => Math.abs(s - top * BIN_S) <= 3 * BIN_S);
      fits.push({ startS: median(near), seenShare: Math.min(1, near.length / Math.max(1, expectedCount)) });
    }
    lastBin = bin;
  }
  return fits;
}
