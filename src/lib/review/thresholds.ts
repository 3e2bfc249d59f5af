import type { Stage } from '../profile/schema';
import type { ChannelRole } from './types';

/**
 * The limits that a review judges by, as data: a studio may change any of them. The values are Holdfast's own definitions
 * of its findings; the band of ±10 °C and the times follow common practice for studio kilns.
 */
export interface Thresholds {
  /** Half-width of the band about a held target, °C. */
  readonly bandC: number;
  /** Bands of single stages, where they differ from `bandC`. */
  readonly stageBandC: Readonly<Partial<Record<Stage, number>>>;
  /** How near the target a hold begins to count, °C. */
  readonly holdCountsWithinC: number;
  readonly overshootMinS: number;
  readonly undershootMinS: number;
  readonly lateMinS: number;
  readonly lateShare: number;
  readonly regressionS: number;
  readonly steepFactor: number;
  readonly steepMarginCPerH: number;
  readonly steepMinS: number;
  /** Excess over a material's own limit that counts, as a share of it. */
  readonly materialShare: number;
  readonly stalledShare: number;
  readonly stalledMinS: number;
  readonly holdToleranceS: number;
  readonly holdToleranceShare: number;
  readonly openedFallC: number;
  readonly openedWithinS: number;
  readonly openedBackS: number;
  readonly powerCutMinS: number;
  readonly powerCutMinC: number;
  /** How far the fall may differ from the kiln's own cooling, as a share of it. */
  readonly powerCutShare: number;
  readonly openStepC: number;
  readonly openMinS: number;
  readonly openMinSamples: number;
  readonly spikeMaxSamples: number;
  readonly spikeHalfWindow: number;
  readonly spikeMinC: number;
  readonly spikeMads: number;
  readonly spikeBackC: number;
  readonly stuckMinS: number;
  /** Roles of channels that are watched for a frozen reading. A mould may rest at 100 °C for hours and be sound. */
  readonly stuckRoles: readonly ChannelRole[];
  readonly disagreeBands: number;
  readonly disagreeMinS: number;
  readonly gapMinS: number;
  readonly gapIntervals: number;
  readonly clockStepMinS: number;
  /** A leap in time whose change of temperature is below this share of what the rate would give is the clock's. */
  readonly leapShare: number;
  readonly endedToleranceS: number;
  readonly endedToleranceShare: number;
}

export const DEFAULT_THRESHOLDS: Thresholds = {
  bandC: 10,
  stageBandC: {},
  holdCountsWithinC: 3,
  overshootMinS: 60,
  undershootMinS: 300,
  lateMinS: 600,
  lateShare: 0.1,
  regressionS: 600,
  steepFactor: 1.25,
  steepMarginCPerH: 20,
  steepMinS: 300,
  materialShare: 0.1,
  stalledShare: 0.25,
  stalledMinS: 1200,
  holdToleranceS: 300,
  holdToleranceShare: 0.1,
  openedFallC: 30,
  openedWithinS: 120,
  openedBackS: 5400,
  powerCutMinS: 180,
  powerCutMinC: 10,
  powerCutShare: 0.3,
  openStepC: 150,
  openMinS: 120,
  openMinSamples: 4,
  spikeMaxSamples: 3,
  spikeHalfWindow: 4,
  spikeMinC: 25,
  spikeMads: 6,
  spikeBackC: 5,
  stuckMinS: 600,
  stuckRoles: ['chamber'],
  disagreeBands: 2,
  disagreeMinS: 600,
  gapMinS: 120,
  gapIntervals: 5,
  clockStepMinS: 60,
  leapShare: 0.2,
  endedToleranceS: 300,
  endedToleranceShare: 0.1,
};

/** The band of a stage, °C. */
export function bandOfC(thresholds: Thresholds, stage: Stage): number {
  return thresholds.stageBandC[stage] ?? thresholds.bandC;
}
