import type { Bench } from './bench';
import { lastIndex, smoothed, timeAt, type Grid } from './grid';
import { shifted, type Measured } from './measured';
import type { Noise } from './noise';
import { plannedCurve, readerOf, type Leg } from './plan';
import { centredSlopes, regressionOf } from './regress';
import { firedLegs } from './segments';
import type { Thresholds } from './thresholds';
import type { ReviewInput } from './types';

/** Levels are read off a curve smoothed to this standard deviation, over no less and no more than so long. */
const LEVEL_SIGMA_C = 0.35;
const LEVEL_LEAST_S = 30;
const LEVEL_MOST_S = 300;
/** Slopes are read over windows in which noise alone stays this far inside the margin of a finding. */
const SLOPE_SIGMAS = 4.5;
const SLOPE_MOST_S = 1800;

/** How far a channel is smoothed for reading levels off it: as far as its noise demands, no further. */
export function levelWindowS(noise: Noise, intervalS: number): number {
  const samples = Math.ceil((noise.sigmaC / LEVEL_SIGMA_C) ** 2);
  if (samples <= 1 && intervalS >= LEVEL_LEAST_S) return 0;
  return Math.min(LEVEL_MOST_S, Math.max(LEVEL_LEAST_S, samples * intervalS));
}

/** Window of the regression: the definition's, longer for a log too noisy for it (σ_slope falls with its power 3/2). */
export function slopeWindowS(noise: Noise, intervalS: number, limits: Thresholds): number {
  const n = Math.max(2, limits.regressionS / Math.max(1, intervalS));
  const sigmaCPerH = ((noise.sigmaC * Math.sqrt(12 / n)) / limits.regressionS) * 3600;
  const ratio = (sigmaCPerH * SLOPE_SIGMAS) / limits.steepMarginCPerH;
  return ratio <= 1 ? limits.regressionS : Math.min(SLOPE_MOST_S, limits.regressionS * ratio ** (2 / 3));
}

/** A log that begins after the run did: what it does not show is taken to have gone by the plan, and marked unknown. */
function fromTheStart(grid: Grid, legs: readonly Leg[]): Grid {
  const missing = Math.ceil(grid.originS / grid.stepS);
  if (missing <= 0) return grid;
  const originS = grid.originS - missing * grid.stepS;
  const value = new Float64Array(missing + grid.value.length);
  const known = new Uint8Array(value.length);
  value.set(grid.value, missing);
  known.set(grid.known, missing);
  const read = readerOf(plannedCurve(legs));
  for (let i = 0; i < missing; i++) {
    const planC = read(Math.max(0, originS + i * grid.stepS));
    value[i] = planC === planC ? planC : grid.value[0]!;
  }
  return { ...grid, originS, value, known };
}

/** Lays the log under the plan and works out what was fired. */
export function benchOf(
  input: ReviewInput,
  limits: Thresholds,
  log: Measured,
  logGrid: Grid,
  legs: readonly Leg[],
  startOffsetS: number,
): Bench {
  const grid = fromTheStart(shifted(logGrid, startOffsetS), legs);
  const { noise } = log.control;
  const windowS = levelWindowS(noise, log.clock.intervalS);
  const smooth = smoothed(grid, windowS);
  const regression = regressionOf(grid);
  const slopeS = slopeWindowS(noise, log.clock.intervalS, limits);
  const { legs: fired, setpoint } = firedLegs(smooth, legs, input.waitBandC, limits.holdCountsWithinC);
  const logEndS = timeAt(grid, lastIndex(grid));
  const last = fired[fired.length - 1];
  const whole = last !== undefined && last.leg.index === legs.length - 1;
  return {
    input,
    limits,
    clock: log.clock,
    noise,
    grid,
    smooth,
    smoothSigmaC: noise.sigmaC / Math.sqrt(Math.max(1, windowS / Math.max(1, log.clock.intervalS))),
    regression,
    slopes: centredSlopes(grid, slopeS, regression),
    slopeWindowS: slopeS,
    fired,
    setpoint,
    startOffsetS,
    runEndS: whole && last.endS !== null ? last.endS : logEndS,
    logEndS,
    gaps: log.clock.gaps.map((g) => ({ startS: g.startS - startOffsetS, endS: g.endS - startOffsetS })),
  };
}
