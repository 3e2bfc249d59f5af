import type { Profile, Stage } from '../profile/schema';
import type { Thresholds } from './thresholds';

/** The kinds of deviation that a review can find in a log. */
export const FINDING_KINDS = [
  'overshoot',
  'undershoot',
  'late',
  'too-steep',
  'stalled',
  'hold-short',
  'hold-long',
  'cooled-too-fast',
  'opened',
  'power-cut',
  'sensor-open',
  'sensor-spike',
  'sensor-stuck',
  'channels-disagree',
  'gap',
  'clock-jump',
  'ended-early',
] as const;
export type FindingKind = (typeof FINDING_KINDS)[number];

export const SEVERITIES = ['note', 'warn', 'serious'] as const;
export type Severity = (typeof SEVERITIES)[number];

export type ChannelRole = 'chamber' | 'mould' | 'load' | 'junction' | 'room' | 'other';

/** One logged channel. Arrays are parallel, sorted by time, and are never written to. */
export interface ReviewChannel {
  readonly id: string;
  readonly name: string;
  readonly role: ChannelRole;
  readonly quantity: 'temperature' | 'power' | 'other';
  /** Instants in ms since the epoch (or any fixed origin), ascending, already corrected for backward clock steps. */
  readonly timeMs: Float64Array;
  /** °C for temperatures, the file's own unit otherwise; NaN where the row held no value. */
  readonly value: Float64Array;
  /** Indexes of the samples whose row carried a marker for an open sensor (`OL`, `open`, …), ascending. */
  readonly openIndexes?: readonly number[];
  /** Range of the thermocouple's type, °C; a reading outside it comes from an open sensor. */
  readonly rangeC?: { readonly minC: number; readonly maxC: number };
}

/** A fault of the logger's clock that the reader met in file order and has already corrected in `timeMs`. */
export interface ClockEvent {
  /** Corrected instant of the last sample before the fault. */
  readonly atMs: number;
  /** How far the clock went back, seconds, positive. */
  readonly shiftS: number;
  readonly kind: 'backward' | 'restart';
}

export type AlignmentRequest =
  { readonly method: 'auto' } | { readonly method: 'person'; readonly startOffsetS: number };

/** The fastest that a material of the load may be heated or cooled between two temperatures. */
export interface MaterialRateLimit {
  readonly material: string;
  readonly fromC: number;
  readonly toC: number;
  /** Null: no limit in that direction. */
  readonly maxHeatingCPerH: number | null;
  readonly maxCoolingCPerH: number | null;
}

/** What the kiln does by itself with its heating off, as far as it is known. */
export interface KilnCooling {
  /** First-order time constant of the chamber towards the room just after heating stops, seconds. */
  readonly timeConstantS: number;
  readonly ambientC: number;
}

/** A curve in run time: parallel arrays, `timeS` ascending. */
export interface Curve {
  readonly timeS: Float64Array;
  readonly valueC: Float64Array;
}

/** Everything a review needs; times in `channels` are instants, everything else is run time in seconds. */
export interface ReviewInput {
  readonly profile: Profile;
  /** Band within which the programmer's clock runs on, °C; null for a programmer that runs by the clock. */
  readonly waitBandC: number | null;
  readonly openAtC: number;
  readonly channels: readonly ReviewChannel[];
  readonly controlChannelId: string;
  readonly clockEvents: readonly ClockEvent[];
  readonly plannedStartMs: number | null;
  readonly alignment: AlignmentRequest;
  /** The kiln model's chamber temperature in run time: what `flat-out` is compared with. */
  readonly predicted: { readonly timeS: ArrayLike<number>; readonly chamberC: ArrayLike<number> } | null;
  readonly cooling: KilnCooling | null;
  readonly thresholds?: Thresholds;
  readonly materialRateLimits?: readonly MaterialRateLimit[];
}

export interface Alignment {
  readonly method: 'clock' | 'fit' | 'person';
  /** 0-1: how far the log bears the alignment out. */
  readonly confidence: number;
  /** Seconds from the first sample to the run's start; positive if the log begins earlier. */
  readonly startOffsetS: number;
  /** The run's start on the logger's clock: first sample + `startOffsetS`. */
  readonly runStartMs: number;
}

/** One segment of the profile as it was really fired. Run time in seconds; null for what the log does not hold. */
export interface ActualSegment {
  readonly segment: number;
  readonly stage: Stage;
  readonly targetC: number;
  readonly startS: number;
  /** First moment within the band of the target. */
  readonly arrivedS: number | null;
  /** The same moment on the carried plan; null for `coast`, and for `flat-out` without a prediction. */
  readonly plannedArrivalS: number | null;
  /** First moment within 3 °C of the target (or arrival, if it never came so close): where the hold counts from. */
  readonly holdStartS: number | null;
  /** When the next segment began, or, for the last, when the run ended. Null: not within the log. */
  readonly endS: number | null;
  /** Least-squares slope of the measured ramp. */
  readonly rateCPerH: number | null;
  /** As planned; null for `coast` and `flat-out`. */
  readonly plannedRateCPerH: number | null;
  readonly plannedHoldS: number;
  /** From `holdStartS` to `endS`, all of it and the part within the band. */
  readonly holdS: number | null;
  readonly timeInBandS: number;
  /** Highest measured temperature in the segment (lowest, for a segment that goes down), smoothed against noise. */
  readonly peakC: number | null;
  /** Energy by the power channel, in its own unit × hours; null without one. */
  readonly powerHours: number | null;
}

export interface ComputedFinding {
  readonly kind: FindingKind;
  readonly severity: Severity;
  readonly channelId: string;
  /** Index into the profile's segments. */
  readonly segment: number;
  readonly startS: number;
  readonly endS: number;
  /** Extreme temperature reached. */
  readonly peakC: number | null;
  /** Excess over, or drop below, what it is compared with; always positive. */
  readonly byC: number | null;
  /** Seconds late, short (negative) or over (positive), or the length of a clock's leap (negative: backwards). */
  readonly byS: number | null;
  /** Excess of rate over the plan's or the material's. */
  readonly byCPerH: number | null;
  /** Time in the hold's band that this finding cost. */
  readonly holdLostS: number | null;
  /** Index into the review's findings of what caused this; null for a cause of its own. */
  readonly because: number | null;
  /** The plan asks for it (an opening at a segment that says drain). */
  readonly expected: boolean;
  /** `steep-recovery`: heated again fast enough to crack a shell. `pattern-burning`: in the range where a pattern burns. `material-limit`: above a material's limit, whatever the plan asks. `open-ended`: the log ends in it. */
  readonly remarks: readonly FindingRemark[];
}

export type FindingRemark = 'steep-recovery' | 'pattern-burning' | 'material-limit' | 'open-ended';

/** A forward leap of the logger's clock: instants after `atMs` are to be moved back by `shiftS` (earlier leaps likewise). */
export interface ClockLeap {
  /** Instant of the last sample before the leap, as logged. */
  readonly atMs: number;
  readonly shiftS: number;
}

export interface StageFigures {
  readonly stage: Stage;
  /** Of measured − carried plan over the stage, °C. */
  readonly rmsC: number;
  readonly p95C: number;
  readonly largestDeviationC: number;
}

/** Figures of the run on the control channel. Null where the log gives no ground for one. */
export interface ReviewFigures {
  readonly peakC: number | null;
  readonly peakAtS: number | null;
  /** Signed measured − carried plan where it is largest in size, over ramps with a rate and holds. */
  readonly largestDeviationC: number | null;
  readonly largestDeviationAtS: number | null;
  readonly rmsC: number | null;
  readonly p95C: number | null;
  readonly stages: readonly StageFigures[];
  readonly timeInBandS: number;
  readonly plannedHoldS: number;
  /** Actual end of the run − planned end; null if the log does not hold the end. */
  readonly delayS: number | null;
  /** Equivalent hours at 870 °C of the control channel, and of the plan (Ea 300 kJ/mol, a conventional figure). */
  readonly heatWorkH: number;
  readonly plannedHeatWorkH: number;
  readonly powerHours: number | null;
  readonly samples: number;
  readonly medianIntervalS: number;
  readonly noiseC: number;
}

export interface ReviewResult {
  readonly alignment: Alignment;
  readonly segments: readonly ActualSegment[];
  /** The plan carried along with what really happened. */
  readonly carried: Curve;
  /** The plan as it was made. */
  readonly planned: Curve;
  /** One cause, one finding, in order of time. `because` is null on all of them. */
  readonly findings: readonly ComputedFinding[];
  /** What the definitions would also catch but one of `findings` explains: for the record, not to be shown as findings. */
  readonly consequences: readonly ComputedFinding[];
  readonly leaps: readonly ClockLeap[];
  readonly figures: ReviewFigures;
  /** When the run ended (the end of the last actual hold), or the last sample of a log that stopped before. */
  readonly runEndS: number;
  readonly verdict: string;
}
