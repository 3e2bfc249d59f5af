import { candidate, endIn, type Bench, type Candidate } from './bench';
import { indexAt, smoothed, timeAt } from './grid';
import type { FiredLeg } from './segments';
import { joined, stretches, type Stretch } from './spans';

/** Excursions parted by less than this are one. */
const SAME_EXCURSION_S = 120;
/** An excursion that is still on when the next ramp begins the same way has to have begun so long before it. */
const RAMP_BEGINS_S = 300;
/** Where patterns burn, common practice: between about 250 and 600 °C a chamber can run away on its own load. */
const BURNING = { minC: 250, maxC: 600 };

/** `overshoot`: above the held target by more than the band for `overshootMinS`, between arrival and the end of the hold. */
export function overshoots(bench: Bench): Candidate[] {
  return bench.fired.flatMap((one) => excursions(bench, one, 1, bench.limits.overshootMinS));
}

/** `undershoot`: below the held target by more than the band for `undershootMinS`, between arrival and the end of the hold. */
export function undershoots(bench: Bench): Candidate[] {
  return bench.fired.flatMap((one) => excursions(bench, one, -1, bench.limits.undershootMinS));
}

function excursions(bench: Bench, one: FiredLeg, side: 1 | -1, leastS: number): Candidate[] {
  const { smooth } = bench;
  const { leg } = one;
  if (one.arrivedS === null || leg.holdS <= 0) return [];
  const from = indexAt(smooth, one.arrivedS);
  const to = indexAt(smooth, endIn(bench, one));
  const over = (i: number) => side * (smooth.value[i]! - leg.toC) - leg.bandC;
  const parts = joined(
    stretches(from, to, (i) => smooth.known[i] === 1 && over(i) > 0),
    Math.round(SAME_EXCURSION_S / smooth.stepS),
  );
  return parts
    .filter((part) => outsideS(bench, part, over) >= leastS && !isNextRamp(bench, one, side, part, to))
    .map((part) => excursion(bench, one, side, part))
    .filter(
      (found) =>
        (found.byC ?? 0) - leg.bandC >= 1.5 * bench.smoothSigmaC * (bench.smoothSigmaC > 0.5 ? 1 : 0),
    );
}

/** Time outside the band, with both crossings placed between nodes. */
function outsideS(bench: Bench, part: Stretch, over: (i: number) => number): number {
  const { smooth } = bench;
  const edge = (inside: number, outside: number) => {
    if (outside < 0 || outside >= smooth.value.length) return 0;
    const a = over(inside);
    const b = over(outside);
    return b < 0 ? (a / (a - b)) * smooth.stepS : 0;
  };
  return (part.to - part.from) * smooth.stepS + edge(part.from, part.from - 1) + edge(part.to, part.to + 1);
}

function isNextRamp(bench: Bench, one: FiredLeg, side: 1 | -1, part: Stretch, to: number): boolean {
  const next = bench.fired[one.leg.index + 1]?.leg;
  const wayOn = next ? next.direction : -1;
  if (one.endS === null || part.to < to - 1 || wayOn !== side) return false;
  return timeAt(bench.smooth, to) - timeAt(bench.smooth, part.from) < RAMP_BEGINS_S;
}

function excursion(bench: Bench, one: FiredLeg, side: 1 | -1, part: Stretch): Candidate {
  const { smooth } = bench;
  const startS = timeAt(smooth, part.from);
  const endS = timeAt(smooth, part.to);
  const peakC = extremeC(bench, part, side);
  const burning = side > 0 && one.leg.stage === 'burnout' && peakC >= BURNING.minC && peakC <= BURNING.maxC;
  return candidate({
    kind: side > 0 ? 'overshoot' : 'undershoot',
    channelId: bench.input.controlChannelId,
    segment: one.leg.index,
    startS,
    endS,
    peakC,
    byC: side * (peakC - one.leg.toC),
    holdLostS: endS - startS,
    remarks: burning ? ['pattern-burning'] : [],
  });
}

/** Extreme over an excursion, from a mean over at most a quarter of it so that noise does not make the peak. */
function extremeC(bench: Bench, part: Stretch, side: 1 | -1): number {
  const lastsS = (part.to - part.from) * bench.smooth.stepS;
  const noisyS = bench.noise.sigmaC > 0.3 ? Math.min(240, lastsS / 4) : 0;
  const quiet = smoothedPart(bench, part, noisyS);
  let bestC = -Infinity;
  for (const value of quiet) bestC = Math.max(bestC, side * value);
  return side * bestC;
}

function smoothedPart(bench: Bench, part: Stretch, windowS: number): Float64Array {
  const pad = Math.ceil(windowS / bench.grid.stepS);
  const a = Math.max(0, part.from - pad);
  const b = Math.min(bench.grid.value.length, part.to + 1 + pad);
  const source = windowS * 1.01 > 30 ? bench.grid : bench.smooth;
  const cut = { ...source, value: source.value.slice(a, b), known: source.known.slice(a, b) };
  return smoothed(cut, windowS).value.subarray(part.from - a, part.from - a + part.to - part.from + 1);
}
