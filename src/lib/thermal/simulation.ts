import type { KilnPlate } from './kiln-schema';
import type { Load } from './load-schema';
import type { Profile, Segment } from '../profile/schema';

/**
 * What the solver saw of one mould of the load. Every array has one value per moment of `Simulation.timeS`;
 * all are for ONE mould of that line of the load (multiply by `count`).
 */
export interface MouldTrace {
  /** Index in `load.moulds`. */
  index: number;
  count: number;
  /** Outer face, °C. */
  surfaceC: Float64Array;
  /** Insulated face of a wall heated from one side, middle of one heated from both, axis of a cylinder, °C. */
  coreC: Float64Array;
  /** Free water left, kg. */
  waterKg: Float64Array;
  /** Share of the pattern's mass left, 0-1; 0 throughout where the mould has no pattern. */
  patternLeftShare: Float64Array;
  /** Gas given off by the pattern, g/min, mean over the step that ends here. */
  gasGPerMin: Float64Array;
  /** Largest |dT/dx| anywhere in the wall, K/m. */
  gradientKPerM: Float64Array;
  /** Of all depths of the wall, the rate of largest size over the step that ends here, °C/h, signed (heating is positive). */
  maxRateCPerH: Float64Array;
  /** Equivalent hours at the reference temperature of heat work, of the core. */
  heatWorkH: Float64Array;
}

/** When a segment was planned and when the kiln did it; seconds from the start of the firing. */
export interface SegmentMoments {
  plannedStartS: number;
  plannedRampEndS: number;
  plannedEndS: number;
  startS: number;
  /** The chamber came to the target (within the programmer's band where it waits); equals `endS` where it never did. */
  rampEndS: number;
  endS: number;
  /** Whether the chamber came to the target before the segment ended. */
  arrived: boolean;
  /** Electricity, or fuel on its higher heating value. */
  energyKWh: number;
  /** A segment with a rate (or a hold) that the kiln could not follow within 2 °C. */
  kilnLimited: boolean;
  /** Largest |set point − chamber| while a rate or a hold was asked for, °C. */
  largestLagC: number;
}

/**
 * Where the energy went between start and end, kWh. `in + pattern = walls + load + losses + vent + reactions`.
 * Stored parts may be negative (a hot kiln that gives heat back).
 */
export interface EnergySplit {
  /** Electricity, or fuel on its higher heating value. */
  inKWh: number;
  /** Stored in lining and chamber at the end. */
  wallsKWh: number;
  /** Stored in moulds and furniture at the end. */
  loadKWh: number;
  /** Given to the room by the outer face, and up the flue. */
  lossesKWh: number;
  ventKWh: number;
  /** Taken by evaporating water, at boiling or below, and by the mould's reactions. */
  reactionsKWh: number;
  /** Released in the chamber by the burning pattern. */
  patternKWh: number;
  /** (in + pattern − stored − lost) / in: the solver's own check, from stored heat read off the final temperatures. */
  imbalance: number;
}

/** One firing as the solver computed it. `timeS` is uneven: steps are short where things change. */
export interface Simulation {
  profile: Profile;
  kiln: KilnPlate;
  load: Load;
  ambientC: number;
  /** Moments, seconds from the start; the first is 0, the last the predicted end. Corners of the profile are among them. */
  timeS: Float64Array;
  plannedC: Float64Array;
  chamberC: Float64Array;
  /** What the kiln's thermocouple shows: first-order lag and offset. */
  thermocoupleC: Float64Array;
  /** Electric power, or fuel on its higher heating value: mean over the step that ends at this moment, kW. */
  powerKW: Float64Array;
  /** The same, summed up since the start, kWh. */
  energyKWh: Float64Array;
  /** The most the kiln can take in, kW (electric: rated x share x voltage ratio squared; gas: burner). */
  fullPowerKW: number;
  /** Heat of the burning pattern over the step that ends here, kW. */
  patternHeatKW: Float64Array;
  /** Air that burning all of the patterns' gas and char takes, and the air that comes in for it, kg/s over the step that ends here. */
  airNeededKgPerS: Float64Array;
  airInKgPerS: Float64Array;
  /** Heat that goes into the lining, kW; negative where it gives heat back. */
  liningKW: Float64Array;
  /** Index of the segment of each moment (the first moment belongs to segment 0). */
  segmentAt: Uint8Array;
  moulds: MouldTrace[];
  segments: SegmentMoments[];
  plannedS: number;
  predictedS: number;
  /** Chamber at the kiln's opening temperature, seconds from the start; null: not within the horizon computed. */
  openableS: number | null;
  energy: EnergySplit;
  /** Steps taken, the cooling after the end included. */
  steps: number;
}

/** Ramp length of each `flat-out` or `coast` segment by the kiln model, s; null for segments with a rate. */
export function modelRampS(simulation: Simulation): (number | null)[] {
  return simulation.profile.segments.map((segment: Segment, index: number) => {
    if (typeof segment.rateCPerH === 'number') return null;
    const moments = simulation.segments[index];
    return moments === undefined ? null : moments.plannedRampEndS - moments.plannedStartS;
  });
}
