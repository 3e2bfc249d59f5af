import type { Grid } from './grid';
import type { LogClock } from './clock';
import type { Noise } from './noise';
import type { Regression } from './regress';
import type { FiredLeg } from './segments';
import type { Span } from './spans';
import type { Thresholds } from './thresholds';
import type { ComputedFinding, ReviewInput } from './types';

/** Everything that the searches for findings read: the measured curve, what was fired, and the limits. Run time throughout. */
export interface Bench {
  readonly input: ReviewInput;
  readonly limits: Thresholds;
  readonly clock: LogClock;
  readonly noise: Noise;
  /** Control channel, spikes and lost readings taken out. */
  readonly grid: Grid;
  /** The same, smoothed as far as its noise demands. */
  readonly smooth: Grid;
  /** Standard deviation left in `smooth`, °C. */
  readonly smoothSigmaC: number;
  readonly regression: Regression;
  /** Centred slopes over `regressionS`, or longer where noise demands it, °C/h. */
  readonly slopes: Float64Array;
  readonly slopeWindowS: number;
  readonly fired: readonly FiredLeg[];
  readonly setpoint: Float64Array;
  readonly startOffsetS: number;
  /** End of the last actual hold, or of the log. */
  readonly runEndS: number;
  readonly logEndS: number;
  /** Silences of the log in run time. */
  readonly gaps: readonly Span[];
}

/** A finding before causes are sorted out: `reachS` is how far its effect goes beyond its own span. */
export interface Candidate extends ComputedFinding {
  readonly reachS: number;
}

/** A finding with everything empty that its kind does not fill. */
export function candidate(
  fields: Pick<ComputedFinding, 'kind' | 'channelId' | 'segment' | 'startS' | 'endS'> & Partial<Candidate>,
): Candidate {
  return {
    severity: 'warn',
    peakC: null,
    byC: null,
    byS: null,
    byCPerH: null,
    holdLostS: null,
    because: null,
    expected: false,
    remarks: [],
    reachS: fields.endS,
    ...fields,
  };
}

/** Segment that was being fired at a run time. */
export function segmentAt(fired: readonly FiredLeg[], atS: number): number {
  let segment = 0;
  for (const one of fired) if (one.startS <= atS) segment = one.leg.index;
  return segment;
}

/** End of a fired leg, or of the log where it did not end in it. */
export const endIn = (bench: Bench, one: FiredLeg): number => one.endS ?? bench.logEndS;
