import { align } from './alignment';
import type { Bench } from './bench';
import { benchOf, levelWindowS, slopeWindowS } from './bench-of';
import { allCandidates, type StuckBy } from './candidates';
import { carriedPlan } from './carried-plan';
import { sortedByCause } from './causes';
import { actualSegments, figuresOf } from './figures';
import { smoothed, type Grid } from './grid';
import { measured, onGrid, shifted, type Measured } from './measured';
import { legsOf, plannedCurve, readerOf, type Leg } from './plan';
import { withoutStuck } from './sensors';
import { severityOf } from './severity';
import type { Stretch } from './spans';
import { stuckStretches } from './stuck';
import { DEFAULT_THRESHOLDS, type Thresholds } from './thresholds';
import type { ComputedFinding, ReviewInput, ReviewResult } from './types';
import { verdictOf } from './verdict';

/**
 * Reviews one run: lays the log under the plan, works out what was really fired, and finds where it left the plan.
 * Work and memory are linear in the samples. Definitions and their limits: `Thresholds`; what counts as what is said beside
 * each search. Throws only where the control channel is missing or empty.
 * @returns findings with one cause each, in order of time; every time in seconds of run time
 */
export function review(input: ReviewInput): ReviewResult {
  const limits = input.thresholds ?? DEFAULT_THRESHOLDS;
  const legs = legsOf(input.profile, input.predicted, limits);
  const log = measured(input, limits);
  const rough = onGrid(log.control, log.clock);
  const level = smoothed(rough, levelWindowS(log.control.noise, log.clock.intervalS));
  const clockStartS = input.plannedStartMs === null ? null : (input.plannedStartMs - log.firstMs) / 1000;
  const windowS = slopeWindowS(log.control.noise, log.clock.intervalS, limits);
  const alignment = align(level, legs, input.alignment, clockStartS, log.firstMs, windowS);
  const stuckBy = stuckIn(log, legs, alignment.startOffsetS, limits);
  const controlStuck = stuckBy.get(log.control) ?? [];
  const grid = controlStuck.length ? onGrid(withoutStuck(log.control, controlStuck), log.clock) : rough;
  const bench = benchOf(input, limits, log, grid, legs, alignment.startOffsetS);
  const power = log.power ? shifted(log.power, alignment.startOffsetS) : null;
  const sorted = sortedByCause(bench, allCandidates(bench, log, stuckBy, legs, power));
  const findings = sorted.findings.map(judged);
  const segments = actualSegments(bench, power);
  const carried = carriedPlan(legs, bench.fired);
  const planned = plannedCurve(legs, rampsOf(bench));
  return {
    alignment,
    segments,
    carried,
    planned,
    findings,
    consequences: sorted.consequences.map(judged),
    leaps: log.clock.leaps,
    figures: figuresOf(bench, segments, carried, planned, power),
    runEndS: bench.runEndS,
    verdict: verdictOf({
      profile: input.profile,
      findings,
      lastWholeSegment: lastWhole(bench),
      controlName: log.control.channel.name,
      fired: segments.filter((s) => s.arrivedS !== null).length,
    }),
  };
}

const judged = (finding: ComputedFinding): ComputedFinding => ({ ...finding, severity: severityOf(finding) });

/** Measured lengths of ramps, for drawing those that the plan gives no rate. */
function rampsOf(bench: Bench): (number | null)[] {
  return bench.fired.map((one) => (one.arrivedS === null ? null : one.arrivedS - one.startS));
}

function lastWhole(bench: Bench): number {
  return bench.fired.reduce((last, one) => (one.endS === null ? last : one.leg.index), -1);
}

/** Stuck stretches of every channel whose role is watched, judged against the plan and the other chamber channels. */
function stuckIn(log: Measured, legs: readonly Leg[], startOffsetS: number, limits: Thresholds): StuckBy {
  const read = readerOf(plannedCurve(legs));
  const planAt = (logS: number) => read(logS - startOffsetS);
  const chambers = [log.control, ...log.others].filter((s) => s.channel.role === 'chamber');
  const grids = new Map<unknown, Grid>();
  const stuckBy = new Map<Measured['control'], readonly Stretch[]>();
  for (const sensor of [log.control, ...log.others]) {
    const watched = sensor === log.control || limits.stuckRoles.includes(sensor.channel.role);
    if (!watched || sensor.frozen.length === 0) continue;
    const others = chambers.filter((s) => s !== sensor);
    for (const other of others) if (!grids.has(other)) grids.set(other, onGrid(other, log.clock));
    const against = others.flatMap((other) => grids.get(other) ?? []);
    stuckBy.set(sensor, stuckStretches(sensor, planAt, against, limits));
  }
  return stuckBy;
}
