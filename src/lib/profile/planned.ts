import type { Profile, Segment } from './schema';

/** One segment of the planned curve: a straight ramp, then a hold. Seconds from the start. */
export interface PlannedLeg {
  index: number;
  fromC: number;
  toC: number;
  startS: number;
  rampEndS: number;
  endS: number;
  /** Slope of the ramp, °C/h, signed; 0 where it is level. */
  slopeCPerH: number;
  /** Whether the slope is asked for, taken from the kiln's prediction, or assumed for want of one. */
  slopeFrom: 'profile' | 'kiln' | 'assumption';
}

/** The planned curve, exact: straight lines between its corners. */
export interface PlannedCurve {
  /** Corners: start, end of each ramp, end of each hold; never two at the same place in a row. */
  timeS: number[];
  valueC: number[];
  legs: PlannedLeg[];
  durationS: number;
}

/** At which `flat-out` and `coast` are drawn before a kiln has been chosen that could say. */
export const ASSUMED_RATE_C_PER_H = 200;

/** Temperature that a segment's ramp starts from. */
export function fromCOf(profile: Profile, index: number): number {
  return index === 0 ? profile.startC : (profile.segments[index - 1]?.toC ?? profile.startC);
}

/**
 * The planned curve of a profile.
 *
 * @param profile a valid profile
 * @param kilnRampsS for each segment the length of its ramp in seconds as the kiln model gives it; read only for
 *   `flat-out` and `coast`. Null or missing: drawn at 200 °C/h and marked as an assumption
 * @returns corners in time order from (0, startC) and one leg per segment
 */
export function plannedCurve(profile: Profile, kilnRampsS: readonly (number | null)[] = []): PlannedCurve {
  const timeS = [0];
  const valueC = [profile.startC];
  const legs: PlannedLeg[] = [];
  let atS = 0;
  profile.segments.forEach((segment, index) => {
    const leg = legOf(segment, index, fromCOf(profile, index), atS, kilnRampsS[index] ?? null);
    legs.push(leg);
    for (const cornerS of [leg.rampEndS, leg.endS]) {
      if (cornerS <= atS && valueC[valueC.length - 1] === leg.toC) continue;
      timeS.push(cornerS);
      valueC.push(leg.toC);
      atS = cornerS;
    }
  });
  return { timeS, valueC, legs, durationS: atS };
}

function legOf(
  segment: Segment,
  index: number,
  fromC: number,
  startS: number,
  kilnRampS: number | null,
): PlannedLeg {
  const deltaC = segment.toC - fromC;
  const asked = typeof segment.rateCPerH === 'number';
  const slopeFrom = asked ? 'profile' : kilnRampS === null ? 'assumption' : 'kiln';
  const rateCPerH = typeof segment.rateCPerH === 'number' ? segment.rateCPerH : ASSUMED_RATE_C_PER_H;
  const rampS =
    slopeFrom === 'kiln' && kilnRampS !== null ? kilnRampS : (Math.abs(deltaC) / rateCPerH) * 3600;
  const rampEndS = startS + rampS;
  const slopeCPerH = rampS > 0 ? (deltaC / rampS) * 3600 : 0;
  return {
    index,
    fromC,
    toC: segment.toC,
    startS,
    rampEndS,
    endS: rampEndS + segment.holdS,
    slopeCPerH,
    slopeFrom,
  };
}

/**
 * Planned temperature at a moment; the start before it begins, the last target after it ends.
 *
 * @param curve from {@link plannedCurve}
 * @param atS seconds from the start
 * @returns °C
 */
export function plannedAt(curve: PlannedCurve, atS: number): number {
  const { timeS, valueC } = curve;
  const last = timeS.length - 1;
  if (!(atS > 0)) return valueC[0] ?? NaN;
  if (atS >= curve.durationS) return valueC[last] ?? NaN;
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((timeS[middle] ?? Infinity) <= atS) low = middle;
    else high = middle;
  }
  const [t0 = 0, t1 = 0, v0 = NaN, v1 = NaN] = [timeS[low], timeS[high], valueC[low], valueC[high]];
  return v0 + ((v1 - v0) * (atS - t0)) / (t1 - t0);
}

/** Segment that a moment of the plan lies in; the last one after the end. */
export function segmentAt(curve: PlannedCurve, atS: number): number {
  const found = curve.legs.findIndex((leg) => atS < leg.endS);
  return found === -1 ? curve.legs.length - 1 : found;
}
