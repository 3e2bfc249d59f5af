import { endIn, type Bench } from './bench';
import { STAGES } from '../profile/schema';
import { indexAt, timeAt, type Grid } from './grid';
import { heatWorkH } from './heat-work';
import { readerOf, type Leg } from './plan';
import { coveredS } from './spans';
import type { ActualSegment, Curve, ReviewFigures, StageFigures } from './types';
import { plannedArrivalS } from './hold-findings';

/** The segments as they were fired, with what a person reads off each. */
export function actualSegments(bench: Bench, power: Grid | null): ActualSegment[] {
  return bench.fired.map((one) => {
    const { leg } = one;
    const endS = endIn(bench, one);
    const rampEndS = one.arrivedS ?? endS;
    const slope = bench.regression.slopeCPerH(
      indexAt(bench.smooth, one.startS),
      indexAt(bench.smooth, rampEndS),
    );
    const holdStartS = one.arrivedS === null ? null : (one.nearS ?? one.arrivedS);
    return {
      segment: leg.index,
      stage: leg.stage,
      targetC: leg.toC,
      startS: one.startS,
      arrivedS: one.arrivedS,
      plannedArrivalS: plannedArrivalS(one),
      holdStartS,
      endS: one.endS,
      rateCPerH: Number.isNaN(slope) ? null : slope,
      plannedRateCPerH: leg.rateCPerH,
      plannedHoldS: leg.holdS,
      holdS: holdStartS === null ? null : endS - holdStartS,
      timeInBandS: one.arrivedS === null ? 0 : inBandS(bench, leg, one.arrivedS, endS),
      peakC: extremeC(bench.smooth, leg.direction < 0 ? -1 : 1, one.startS, endS),
      powerHours: power ? powerHours(power, one.startS, endS) : null,
    };
  });
}

function inBandS(bench: Bench, leg: Leg, fromS: number, toS: number): number {
  let inside = 0;
  const to = indexAt(bench.smooth, toS);
  for (let i = indexAt(bench.smooth, fromS); i < to; i++) {
    if (bench.smooth.known[i] && Math.abs(bench.smooth.value[i]! - leg.toC) <= leg.bandC) inside++;
  }
  return inside * bench.smooth.stepS;
}

function extremeC(grid: Grid, side: 1 | -1, fromS: number, toS: number): number | null {
  let best: number | null = null;
  for (let i = indexAt(grid, fromS); i <= indexAt(grid, toS); i++) {
    if (grid.known[i] && (best === null || side * (grid.value[i]! - best) > 0)) best = grid.value[i]!;
  }
  return best;
}

/** Integral of a power channel in its own unit × hours; what is not known is left out. */
function powerHours(power: Grid, fromS: number, toS: number): number {
  let sum = 0;
  for (let i = indexAt(power, fromS); i < indexAt(power, toS); i++)
    if (power.known[i]) sum += power.value[i]!;
  return (sum * power.stepS) / 3600;
}

/** Figures of the whole run, on the control channel, from its start to its end. */
export function figuresOf(
  bench: Bench,
  segments: readonly ActualSegment[],
  carried: Curve,
  planned: Curve,
  power: Grid | null,
): ReviewFigures {
  const { grid, smooth } = bench;
  const from = indexAt(grid, Math.max(0, -bench.startOffsetS));
  const to = indexAt(grid, bench.runEndS);
  let peakAt = -1;
  for (let i = from; i <= to; i++) {
    if (smooth.known[i] && (peakAt < 0 || smooth.value[i]! > smooth.value[peakAt]!)) peakAt = i;
  }
  const deviations = deviationsOf(bench, carried);
  const all = statistics(deviations.map((d) => d.byC));
  const largest = deviations.reduce<Deviation | null>(
    (a, d) => (a === null || Math.abs(d.byC) > Math.abs(a.byC) ? d : a),
    null,
  );
  const last = segments[segments.length - 1];
  const plannedEndS = planned.timeS[planned.timeS.length - 1]!;
  const isWhole =
    last !== undefined && last.endS !== null && last.segment === bench.input.profile.segments.length - 1;
  const knownTimeS = Float64Array.from({ length: to - from + 1 }, (_, k) => timeAt(grid, from + k));
  return {
    peakC: peakAt < 0 ? null : smooth.value[peakAt]!,
    peakAtS: peakAt < 0 ? null : timeAt(smooth, peakAt),
    largestDeviationC: largest?.byC ?? null,
    largestDeviationAtS: largest?.atS ?? null,
    rmsC: all?.rmsC ?? null,
    p95C: all?.p95C ?? null,
    stages: stageFigures(deviations),
    timeInBandS: segments.reduce((sum, s) => sum + s.timeInBandS, 0),
    plannedHoldS: bench.input.profile.segments.reduce((sum, s) => sum + s.holdS, 0),
    delayS: isWhole ? (last.endS ?? 0) - plannedEndS : null,
    heatWorkH: heatWorkH(knownTimeS, smooth.value.subarray(from, to + 1), 0, bench.runEndS),
    plannedHeatWorkH: heatWorkH(planned.timeS, planned.valueC, 0, plannedEndS),
    powerHours: power ? powerHours(power, 0, bench.runEndS) : null,
    samples: bench.clock.timeS.length,
    medianIntervalS: bench.clock.intervalS,
    noiseC: bench.noise.sigmaC,
  };
}

interface Deviation {
  readonly atS: number;
  readonly byC: number;
  readonly stage: ActualSegment['stage'];
}

/** Measured − carried plan once a minute, over ramps with a rate and holds: a coast has no plan to deviate from. */
function deviationsOf(bench: Bench, carried: Curve): Deviation[] {
  const read = readerOf(carried);
  const out: Deviation[] = [];
  const step = Math.max(1, Math.round(60 / bench.smooth.stepS));
  for (const one of bench.fired) {
    const free = one.leg.pace !== 'rate';
    const fromS = free ? (one.arrivedS ?? Number.POSITIVE_INFINITY) : one.startS;
    const toS = Math.min(endIn(bench, one), bench.runEndS);
    if (fromS > toS) continue;
    for (let i = indexAt(bench.smooth, fromS); i <= indexAt(bench.smooth, toS); i += step) {
      const atS = timeAt(bench.smooth, i);
      const byC = bench.smooth.value[i]! - read(atS);
      const unseen = coveredS({ startS: atS - 1, endS: atS + 1 }, bench.gaps) > 0;
      if (bench.smooth.known[i] && byC === byC && !unseen) out.push({ atS, byC, stage: one.leg.stage });
    }
  }
  return out;
}

function statistics(values: readonly number[]) {
  if (values.length === 0) return null;
  const sizes = values.map(Math.abs).sort((a, b) => a - b);
  return {
    rmsC: Math.sqrt(values.reduce((sum, v) => sum + v * v, 0) / values.length),
    p95C: sizes[Math.min(sizes.length - 1, Math.floor(0.95 * sizes.length))]!,
    largestC: sizes[sizes.length - 1]!,
  };
}

function stageFigures(deviations: readonly Deviation[]): StageFigures[] {
  return STAGES.flatMap((stage) => {
    const found = statistics(deviations.filter((d) => d.stage === stage).map((d) => d.byC));
    return found ? [{ stage, rmsC: found.rmsC, p95C: found.p95C, largestDeviationC: found.largestC }] : [];
  });
}
