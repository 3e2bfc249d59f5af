import { candidate, endIn, segmentAt, type Bench, type Candidate } from './bench';
import { indexAt, lastIndex, timeAt, type Grid } from './grid';
import type { Span } from './spans';
import { joined, stretches } from './spans';

/** A kiln is back when it is within its band of the former level, and has risen from the turn over at least so long. */
const GRADUAL_S = 60;

/**
 * `opened`: the control channel falls by more than `openedFallC` within `openedWithinS` and is back within the band of its
 * former level within `openedBackS`, gradually. Span: from the fall to the turn; reach: until back.
 */
export function openings(bench: Bench): Candidate[] {
  const { grid, limits } = bench;
  const lag = Math.max(1, Math.round(limits.openedWithinS / grid.stepS));
  const from = indexAt(grid, 0);
  const to = indexAt(grid, bench.runEndS);
  const fallsAt = (i: number) =>
    grid.known[i] === 1 && highestBefore(grid, i, lag, from) - grid.value[i]! > limits.openedFallC;
  const found: Candidate[] = [];
  let doneAt = from;
  for (const part of joined(stretches(from, to, fallsAt), 3)) {
    if (part.from <= doneAt) continue;
    const start = highestIndexBefore(grid, part.from, lag, from);
    const turn = turnAfter(grid, part.from, Math.max(5, 4 * bench.noise.sigmaC));
    const segment = segmentAt(bench.fired, timeAt(grid, start));
    const leg = bench.fired[segment]?.leg;
    const formerC = grid.value[start]!;
    const back = backAt(grid, turn, formerC - (leg?.bandC ?? limits.bandC), limits.openedBackS);
    if (back === null || timeAt(grid, back) - timeAt(grid, turn) < GRADUAL_S || leapsBack(grid, turn, back))
      continue;
    doneAt = back;
    found.push(
      candidate({
        kind: 'opened',
        channelId: bench.input.controlChannelId,
        segment,
        startS: timeAt(grid, start),
        endS: timeAt(grid, turn),
        reachS: timeAt(grid, back),
        peakC: grid.value[turn]!,
        byC: formerC - grid.value[turn]!,
        expected: leg?.opens ?? false,
      }),
    );
  }
  return found;
}

function highestIndexBefore(grid: Grid, i: number, lag: number, from: number): number {
  let best = i;
  for (let j = i - 1; j >= Math.max(from, i - lag); j--) if (grid.value[j]! > grid.value[best]!) best = j;
  return best;
}
const highestBefore = (grid: Grid, i: number, lag: number, from: number) =>
  grid.value[highestIndexBefore(grid, i, lag, from)]!;

/** Lowest node from `from` on before the curve has risen by `riseC`. */
function turnAfter(grid: Grid, from: number, riseC: number): number {
  let lowest = from;
  for (let i = from; i <= lastIndex(grid); i++) {
    if (grid.value[i]! < grid.value[lowest]!) lowest = i;
    else if (grid.value[i]! - grid.value[lowest]! > riseC) break;
  }
  return lowest;
}

function backAt(grid: Grid, from: number, levelC: number, withinS: number): number | null {
  const to = indexAt(grid, timeAt(grid, from) + withinS);
  for (let i = from; i <= to; i++) if (grid.value[i]! >= levelC) return i;
  return null;
}

/** Whether most of the recovery came in one step, as a sensor's does. */
function leapsBack(grid: Grid, turn: number, back: number): boolean {
  const riseC = grid.value[back]! - grid.value[turn]!;
  for (let i = turn + 1; i <= back; i++) if (grid.value[i]! - grid.value[i - 1]! > 0.6 * riseC) return true;
  return false;
}

/** What a fall is taken against where neither the kiln nor the log tells: the chamber's first hour without heat, 1/h. */
const UNKNOWN_COOLING_PER_H = 0.2;
/** A lining that has not soaked yet draws heat inwards: the chamber then falls up to so much faster than a soaked one. */
const UNSOAKED_FACTOR = 3;
/** A fall is judged by its first part: later the lining feeds the chamber, and every kiln cools slowly. */
const JUDGED_S = 900;
/** Output below this share of its usual height is off. */
const OFF_SHARE = 0.06;
/** Heating is back when the curve has risen by so much, and it comes back at full power: within so long of the turn. */
const RESUMES_C = 3;
const RESUMES_S = 360;

/**
 * `power-cut`: where the plan heats or holds, the curve falls as fast as the kiln cools by itself, for at least
 * `powerCutMinS` and by `powerCutMinC` below where it should be, and rises again at once (or the log ends in it). A power
 * channel decides by being at zero; without one the fall is compared with the kiln's own cooling, known or read from the
 * log's own coasts, ± `powerCutShare` and up to three times that for an unsoaked lining.
 */
export function powerCuts(bench: Bench, power: Grid | null, others: readonly Candidate[]): Candidate[] {
  const { smooth } = bench;
  const windowS = fallWindowS(bench);
  const half = Math.round(windowS / 2 / smooth.stepS);
  const sigma = slopeSigmaCPerH(bench, windowS);
  const limitCPerH = Math.max(30, 6 * sigma);
  const falling = (i: number) => -bench.regression.slopeCPerH(i - half, i + half) > limitCPerH;
  const from = indexAt(smooth, 0);
  const to = indexAt(smooth, bench.runEndS);
  const parts = joined(
    stretches(from, to, (i) => heats(bench, timeAt(smooth, i)) && falling(i)),
    Math.ceil(60 / smooth.stepS),
  );
  const found: Candidate[] = [];
  for (const part of parts) {
    const start = onset(smooth, part.from, half, from, Math.max(1, 3 * bench.smoothSigmaC));
    const turn = lowestOf(smooth, part.from, part.to + 2 * half);
    const span: Span = { startS: timeAt(smooth, start), endS: timeAt(smooth, turn) };
    if (others.some((o) => span.startS < o.reachS && o.startS < span.endS)) continue;
    if (found.some((f) => span.startS < f.endS)) continue;
    const cut = cutFrom(bench, power, start, turn);
    if (cut) found.push(cut);
  }
  return found;
}

function cutFrom(bench: Bench, power: Grid | null, start: number, turn: number): Candidate | null {
  const { smooth, limits } = bench;
  const startS = timeAt(smooth, start);
  const openEnded = bench.runEndS === bench.logEndS && !risesAgain(smooth, turn);
  const endS = openEnded ? bench.logEndS : timeAt(smooth, turn);
  const dropC = smooth.value[start]! - smooth.value[turn]!;
  const shouldC = Math.min(bench.setpoint[start]!, smooth.value[start]!);
  const lostC = shouldC - smooth.value[turn]!;
  if (endS - startS < limits.powerCutMinS || !(lostC >= limits.powerCutMinC)) return null;
  if (!openEnded && !(stillFalls(smooth, start, turn) && resumes(smooth, turn))) return null;
  const off = power ? powerIsOff(power, startS, endS, bench.clock.intervalS) : null;
  if (off === false) return null;
  if (off === null && !fallsByItself(bench, startS, Math.min(endS, startS + JUDGED_S))) return null;
  const segment = segmentAt(bench.fired, startS);
  const one = bench.fired[segment];
  const levelC = smooth.value[start]! - (one?.leg.bandC ?? limits.bandC);
  const back = openEnded ? null : backInBand(bench, turn, levelC);
  return candidate({
    kind: 'power-cut',
    channelId: bench.input.controlChannelId,
    segment,
    startS,
    endS,
    reachS: back ?? bench.logEndS,
    peakC: smooth.value[turn]!,
    byC: dropC,
    remarks: openEnded ? ['open-ended'] : [],
  });
}

/** About a planned way down nothing is read as a loss of heat. */
const PLANNED_FALL_S = 300;

/** Whether the plan has the kiln heated or held at a time: not on the way down. */
function heats(bench: Bench, atS: number): boolean {
  const one = bench.fired[segmentAt(bench.fired, atS)];
  if (!one) return false;
  const next = bench.fired[one.leg.index + 1]?.leg;
  const fallsNext = one.endS !== null && (next === undefined || next.direction < 0);
  if (fallsNext && atS > endIn(bench, one) - PLANNED_FALL_S) return false;
  return one.leg.direction >= 0 || (one.arrivedS !== null && atS > one.arrivedS + PLANNED_FALL_S);
}

/** Last node before a fall that still stands at the level from which it fell. */
function onset(grid: Grid, at: number, half: number, from: number, withinC: number): number {
  const first = Math.max(from, at - 2 * half);
  let top = at;
  for (let i = first; i <= Math.min(lastIndex(grid), at + half); i++)
    if (grid.value[i]! > grid.value[top]!) top = i;
  let last = top;
  for (let i = top; i <= at + half; i++) if (grid.value[i]! > grid.value[top]! - withinC) last = i;
  return last;
}

function lowestOf(grid: Grid, from: number, to: number): number {
  let lowest = from;
  for (let i = from; i <= Math.min(lastIndex(grid), to); i++)
    if (grid.value[i]! < grid.value[lowest]!) lowest = i;
  return lowest;
}

/** Whether a curve ever rises again, clear of noise, to the end of the log. */
function risesAgain(grid: Grid, from: number): boolean {
  let lowestC = Infinity;
  for (let i = from; i <= lastIndex(grid); i++) {
    lowestC = Math.min(lowestC, grid.value[i]!);
    if (grid.value[i]! - lowestC > 2 * RESUMES_C) return true;
  }
  return false;
}

/** Without heat a kiln falls until heat returns; one that only gets too little settles at a lower level first. */
const STILL_FALLS_SHARE = 0.25;

function stillFalls(grid: Grid, start: number, turn: number): boolean {
  const late = Math.round(turn - (turn - start) / 3);
  const lateC = (grid.value[late]! - grid.value[turn]!) / Math.max(1, turn - late);
  const meanC = (grid.value[start]! - grid.value[turn]!) / Math.max(1, turn - start);
  return lateC >= STILL_FALLS_SHARE * meanC;
}

function resumes(grid: Grid, turn: number): boolean {
  const to = Math.min(lastIndex(grid), turn + Math.round(RESUMES_S / grid.stepS));
  for (let i = turn; i <= to; i++) if (grid.value[i]! - grid.value[turn]! > RESUMES_C) return true;
  return false;
}

/** Whether the output lay at zero through a fall; null if the channel says nothing there. */
function powerIsOff(power: Grid, startS: number, endS: number, intervalS: number): boolean | null {
  // The edges of the fall are known to no better than a sample and a sheath's lag.
  const edgeS = Math.min(60 + 2 * intervalS, (endS - startS) / 3);
  const from = indexAt(power, startS + edgeS);
  const to = indexAt(power, endS - edgeS);
  let high = 0;
  for (let i = 0; i <= lastIndex(power); i++)
    if (power.known[i] && power.value[i]! > high) high = power.value[i]!;
  let off = 0;
  let seen = 0;
  for (let i = from; i <= to; i++) {
    if (!power.known[i]) continue;
    seen++;
    if (power.value[i]! <= OFF_SHARE * high) off++;
  }
  return seen === 0 || high === 0 ? null : off >= 0.8 * seen;
}

function fallsByItself(bench: Bench, startS: number, endS: number): boolean {
  const ambientC = bench.input.cooling?.ambientC ?? 20;
  const firstC = bench.smooth.value[indexAt(bench.smooth, startS)]!;
  const lastC = bench.smooth.value[indexAt(bench.smooth, endS)]!;
  const dropC = firstC - lastC;
  const meanC = (firstC + lastC) / 2;
  const ownPerH = bench.input.cooling
    ? 3600 / bench.input.cooling.timeConstantS
    : coolingOfLog(bench, endS - startS, ambientC);
  const fallPerH = ((dropC / (endS - startS)) * 3600) / Math.max(20, meanC - ambientC);
  const { powerCutShare } = bench.limits;
  return (
    fallPerH >= ownPerH * (1 - powerCutShare) && fallPerH <= ownPerH * (1 + powerCutShare) * UNSOAKED_FACTOR
  );
}

/** Relative cooling rate in the log's own coasts and after its end, over as long a time as the fall took, 1/h. */
function coolingOfLog(bench: Bench, lastedS: number, ambientC: number): number {
  const starts = bench.fired.filter((o) => o.leg.pace === 'coast').map((o) => o.startS);
  const rates: number[] = [];
  for (const startS of [...starts, bench.runEndS]) {
    const from = indexAt(bench.smooth, startS + 60);
    const to = indexAt(bench.smooth, startS + 60 + lastedS);
    const fellC = bench.smooth.value[from]! - bench.smooth.value[to]!;
    const meanC = (bench.smooth.value[from]! + bench.smooth.value[to]!) / 2;
    const tookS = timeAt(bench.smooth, to) - timeAt(bench.smooth, from);
    if (tookS >= 0.8 * lastedS && fellC > bench.limits.powerCutMinC) {
      rates.push(((fellC / tookS) * 3600) / Math.max(20, meanC - ambientC));
    }
  }
  return rates.length ? Math.min(...rates) : UNKNOWN_COOLING_PER_H;
}

/** When the kiln is back at its former level, or within the band of its programmer's setpoint, whichever is later. */
function backInBand(bench: Bench, turn: number, levelC: number): number {
  const { smooth, setpoint } = bench;
  for (let i = turn; i <= lastIndex(smooth); i++) {
    const target = setpoint[i]!;
    const near = !(target - smooth.value[i]! > bench.limits.bandC);
    if (smooth.value[i]! >= levelC && near) return timeAt(smooth, i);
  }
  return bench.logEndS;
}

/** Window for the slope of a fall: short, but long enough for the noise. */
function fallWindowS(bench: Bench): number {
  return [180, 300, 600].find((w) => 6 * slopeSigmaCPerH(bench, w) <= 60) ?? 600;
}

/** Standard deviation of a least-squares slope over a window: σ √(12/n) / window. */
export function slopeSigmaCPerH(bench: Pick<Bench, 'noise' | 'clock'>, windowS: number): number {
  const n = Math.max(2, windowS / Math.max(1, bench.clock.intervalS));
  return ((bench.noise.sigmaC * Math.sqrt(12 / n)) / windowS) * 3600;
}
