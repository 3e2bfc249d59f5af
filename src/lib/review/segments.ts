import { indexAt, lastIndex, timeAt, type Grid } from './grid';
import { holdExit } from './hold-exit';
import type { Leg } from './plan';
import { followProgrammer } from './programmer';
import { regressionOf, type Regression } from './regress';

/** One leg as fired, in run time. */
export interface FiredLeg {
  readonly leg: Leg;
  readonly startS: number;
  /** First moment within the band; null if not before the leg ended or the log did. */
  readonly arrivedS: number | null;
  /** First moment as near as a hold counts from; null likewise. */
  readonly nearS: number | null;
  /** When the setpoint reached the target. */
  readonly rampEndS: number;
  readonly endS: number | null;
  /** When the programmer would have ended it by itself. */
  readonly expectedEndS: number;
}

export interface FiredPlan {
  readonly legs: readonly FiredLeg[];
  /** The programmer's setpoint at every node of the grid, NaN outside the run. */
  readonly setpoint: Float64Array;
}

/** Departure and expectation this near to each other are the same moment, and the programmer's clock is the sharper. */
const SAME_MOMENT_S = 180;

/** A slow ramp's beginning is read off a curve less sharply: by so many °C, but never by what would be a hold's fault. */
const SAME_MOMENT_C = 5;
const SAME_MOMENT_MOST_S = 280;

function sameMomentS(next: Leg | null): number {
  const byRateS = next?.rateCPerH ? (SAME_MOMENT_C / next.rateCPerH) * 3600 : 0;
  return Math.max(SAME_MOMENT_S, Math.min(SAME_MOMENT_MOST_S, byRateS));
}

/**
 * The segments of the actual: leg after leg, from when the last one really ended. The programmer is followed along the
 * curve to where it would have moved on; where the curve clearly shows another moment (a hold cut short or drawn out, a
 * ramp pushed on by hand), the curve is right.
 * @param grid the control channel, smoothed against noise, in run time
 */
export function firedLegs(
  grid: Grid,
  legs: readonly Leg[],
  waitBandC: number | null,
  holdCountsWithinC: number,
): FiredPlan {
  const regression = regressionOf(grid);
  const setpoint = new Float64Array(grid.value.length).fill(Number.NaN);
  const fired: FiredLeg[] = [];
  let startS = 0;
  for (const leg of legs) {
    if (startS > timeAt(grid, lastIndex(grid))) break;
    const expected = followProgrammer(grid, leg, startS, waitBandC, setpoint);
    const before = fired[fired.length - 1];
    // After a target that was never reached the kiln may lie within the next band by chance: it waits for the setpoint.
    const lostWay = before !== undefined && before.arrivedS === null && leg.rateCPerH !== null;
    const fromS = lostWay
      ? Math.max(startS, expected.rampEndS - (leg.bandC / (leg.rateCPerH ?? 1)) * 3600)
      : startS;
    const one = firedLeg(
      { grid, regression, legs, waitBandC, holdCountsWithinC },
      leg,
      startS,
      fromS,
      expected,
    );
    fired.push(one);
    const paintedToS = one.endS ?? timeAt(grid, lastIndex(grid));
    if (paintedToS > expected.endS)
      setpoint.fill(leg.toC, indexAt(grid, expected.endS), indexAt(grid, paintedToS) + 1);
    if (one.endS === null) break;
    startS = one.endS;
  }
  return { legs: fired, setpoint };
}

/** What stays the same from leg to leg. */
interface Firing {
  readonly grid: Grid;
  readonly regression: Regression;
  readonly legs: readonly Leg[];
  readonly waitBandC: number | null;
  readonly holdCountsWithinC: number;
}

/** One leg from `startS`; its arrival is looked for from `fromS` on. */
function firedLeg(
  firing: Firing,
  leg: Leg,
  startS: number,
  fromS: number,
  expected: { rampEndS: number; endS: number },
): FiredLeg {
  const { grid, legs, waitBandC } = firing;
  const logEndS = timeAt(grid, lastIndex(grid));
  const reached = (withinC: number) => firstWithin(grid, leg, fromS, withinC);
  let arrivedS = reached(leg.bandC);
  const base = { leg, startS, rampEndS: expected.rampEndS, expectedEndS: expected.endS };
  const movedOn = waitBandC === null && expected.endS <= logEndS && leg.pace !== 'coast';
  // A programmer that runs by the clock has moved on, unless the kiln then came and stayed: so it waited after all.
  if (movedOn && (arrivedS === null || (arrivedS > expected.endS && !stays(grid, leg, arrivedS)))) {
    return { ...base, arrivedS: null, nearS: null, endS: expected.endS };
  }
  if (arrivedS === null) return { ...base, ...abandoned(grid, legs, leg, startS), nearS: null };
  const endS = endOf(firing, leg, arrivedS, expected);
  const beforeEnd = (atS: number | null) => (atS !== null && (endS === null || atS <= endS) ? atS : null);
  arrivedS = endS === null ? arrivedS : Math.min(arrivedS, endS);
  return { ...base, arrivedS, nearS: beforeEnd(reached(firing.holdCountsWithinC)), endS };
}

/** First time from the leg's start on within so many °C of its target, seen from where it comes. */
function firstWithin(grid: Grid, leg: Leg, startS: number, withinC: number): number | null {
  for (let i = indexAt(grid, startS); i <= lastIndex(grid); i++) {
    const shortC =
      leg.direction === 0 ? Math.abs(leg.toC - grid.value[i]!) : leg.direction * (leg.toC - grid.value[i]!);
    if (shortC <= withinC) return Math.max(startS, timeAt(grid, i));
  }
  return null;
}

/** Whether the kiln, once there, stays for half of the hold. */
function stays(grid: Grid, leg: Leg, arrivedS: number): boolean {
  if (leg.holdS < 600) return false;
  const from = indexAt(grid, arrivedS);
  const to = indexAt(grid, arrivedS + leg.holdS / 2);
  if (to === lastIndex(grid)) return false;
  for (let i = from; i <= to; i++) if (Math.abs(grid.value[i]! - leg.toC) > 1.5 * leg.bandC) return false;
  return true;
}

function endOf(
  firing: Firing,
  leg: Leg,
  arrivedS: number,
  expected: { rampEndS: number; endS: number },
): number | null {
  const { grid, regression, legs, waitBandC } = firing;
  const logEndS = timeAt(grid, lastIndex(grid));
  const next = legs[leg.index + 1] ?? null;
  const inLog = (atS: number) => (atS <= logEndS ? atS : null);
  // Two targets within each other's bands cannot be told apart by the curve.
  if (next && Math.abs(next.toC - leg.toC) <= 1.5 * leg.bandC)
    return inLog(Math.max(expected.endS, arrivedS));
  if (leg.holdS < SAME_MOMENT_S && next && next.direction === leg.direction) {
    return inLog(passedTarget(grid, leg, arrivedS, expected.endS, waitBandC));
  }
  if (leg.holdS < SAME_MOMENT_S && !next) return inLog(Math.max(arrivedS, expected.endS));
  const leftS = holdExit(
    grid,
    regression,
    leg,
    next,
    arrivedS,
    expected.endS,
    planReturnsS(legs, leg, expected.endS),
  );
  if (leftS === null) return null;
  const same = Math.abs(leftS - expected.endS) <= sameMomentS(next) && expected.endS >= arrivedS;
  return same ? inLog(expected.endS) : leftS;
}

/** A ramp that goes on beyond a target without a hold: the setpoint passed there, or the kiln did if it was pushed. */
function passedTarget(
  grid: Grid,
  leg: Leg,
  arrivedS: number,
  expectedS: number,
  waitBandC: number | null,
): number {
  const passedS = firstWithin(grid, leg, arrivedS, 0) ?? expectedS;
  if (waitBandC === null && passedS > expectedS) return expectedS;
  return passedS < expectedS - SAME_MOMENT_S ? passedS : Math.max(expectedS, arrivedS);
}

/** Until when the plan stays below this leg's band after it, by planned lengths: a curve that is back before fell by fault. */
function planReturnsS(legs: readonly Leg[], leg: Leg, endS: number): number {
  let atS = endS;
  for (const later of legs.slice(leg.index + 1)) {
    if (later.toC >= leg.toC - leg.bandC) return atS;
    atS += (later.rampS ?? 0) + later.holdS;
  }
  return Number.POSITIVE_INFINITY;
}

/** A leg whose target was never reached: if the next goes the other way and was reached, it ended at its furthest point. */
function abandoned(
  grid: Grid,
  legs: readonly Leg[],
  leg: Leg,
  startS: number,
): { arrivedS: null; endS: number | null } {
  const next = legs[leg.index + 1];
  if (!next || next.direction !== -leg.direction) return { arrivedS: null, endS: null };
  const nextAt = firstWithin(grid, { ...next, bandC: leg.bandC }, startS + 60, leg.bandC);
  let furthest = indexAt(grid, startS);
  for (let i = furthest; i <= lastIndex(grid); i++) {
    if (leg.direction * (grid.value[i]! - grid.value[furthest]!) > 0) furthest = i;
  }
  const turnedC = leg.direction * (grid.value[furthest]! - grid.value[lastIndex(grid)]!);
  const gone = nextAt !== null && turnedC > 3 * leg.bandC;
  return { arrivedS: null, endS: gone ? timeAt(grid, furthest) : null };
}
