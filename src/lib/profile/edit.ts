import { fromCOf, plannedCurve } from './planned';
import { PROFILE_LIMITS, type Profile, type Rate, type Segment } from './schema';

/** What an edit has to keep to besides the limits of every profile. */
export interface EditLimits {
  /** Highest temperature of the kiln, °C; null: no kiln chosen. */
  kilnMaxC?: number | null;
}

const clamp = (value: number, low: number, high: number) => Math.min(high, Math.max(low, value));
const toStep = (value: number, step: number) => Math.round(value / step) * step;

const highestC = ({ kilnMaxC = null }: EditLimits): number =>
  Math.min(PROFILE_LIMITS.maxC, kilnMaxC ?? Infinity);
const clampTarget = (toC: number, limits: EditLimits) => clamp(toC, PROFILE_LIMITS.minC, highestC(limits));
const clampRate = (rateCPerH: number) =>
  clamp(rateCPerH, PROFILE_LIMITS.minRateCPerH, PROFILE_LIMITS.maxRateCPerH);
const clampHold = (holdS: number) => clamp(holdS, 0, PROFILE_LIMITS.maxHoldS);

const withSegments = (profile: Profile, segments: Segment[]): Profile => ({ ...profile, segments });

/** Steps that a drag snaps to: a hand is no finer than this, a keyboard is. */
const DRAG_TARGET_C = 5;
const DRAG_HOLD_S = 300;
const dragRateStep = (rateCPerH: number): number => (rateCPerH < 20 ? 1 : rateCPerH < 100 ? 5 : 10);

/** Sets fields of one segment, clamped to their ranges; the rest is left as it is. */
export function setSegment(
  profile: Profile,
  index: number,
  fields: Partial<Segment>,
  limits: EditLimits = {},
): Profile {
  return withSegments(
    profile,
    profile.segments.map((segment, at) =>
      at === index ? clamped({ ...segment, ...fields }, limits) : segment,
    ),
  );
}

function clamped(segment: Segment, limits: EditLimits): Segment {
  const rateCPerH: Rate =
    typeof segment.rateCPerH === 'number' ? clampRate(segment.rateCPerH) : segment.rateCPerH;
  return {
    ...segment,
    toC: clampTarget(segment.toC, limits),
    rateCPerH,
    holdS: clampHold(segment.holdS),
    instruction: segment.instruction.slice(0, PROFILE_LIMITS.maxInstructionLength),
  };
}

/** Sets the temperature that the profile starts from. */
export function setStart(profile: Profile, startC: number, limits: EditLimits = {}): Profile {
  return { ...profile, startC: clampTarget(startC, limits) };
}

/**
 * A segment to begin with between its neighbours: of the stage before it, half way to the next target, or 100 °C
 * further at the end, at the rate of the one before it.
 */
export function freshSegment(profile: Profile, at: number, limits: EditLimits = {}): Segment {
  const before = profile.segments[at - 1];
  const next = profile.segments[at];
  const fromC = fromCOf(profile, at);
  const toC = next === undefined ? fromC + 100 : toStep((fromC + next.toC) / 2, DRAG_TARGET_C);
  const rateCPerH = typeof before?.rateCPerH === 'number' ? before.rateCPerH : 100;
  return {
    stage: before?.stage ?? next?.stage ?? 'drying',
    toC: clampTarget(toC, limits),
    rateCPerH,
    holdS: 0,
    attended: false,
    drain: false,
    vent: before?.vent ?? 'closed',
    instruction: '',
  };
}

/** Puts a segment in at a place, 0 to the number of segments; without one, a fresh one. Full profiles stay as they are. */
export function insertSegment(
  profile: Profile,
  at: number,
  segment?: Segment,
  limits: EditLimits = {},
): Profile {
  if (profile.segments.length >= PROFILE_LIMITS.maxSegments) return profile;
  const place = clamp(at, 0, profile.segments.length);
  const added = clamped(segment ?? freshSegment(profile, place, limits), limits);
  return withSegments(profile, profile.segments.toSpliced(place, 0, added));
}

/** Takes a segment out. The last one left stays. */
export function removeSegment(profile: Profile, index: number): Profile {
  if (profile.segments.length <= PROFILE_LIMITS.minSegments || profile.segments[index] === undefined)
    return profile;
  return withSegments(profile, profile.segments.toSpliced(index, 1));
}

/** Moves a segment to another place in the order. */
export function moveSegment(profile: Profile, from: number, to: number): Profile {
  const moved = profile.segments[from];
  if (moved === undefined) return profile;
  const place = clamp(to, 0, profile.segments.length - 1);
  if (place === from) return profile;
  return withSegments(profile, profile.segments.toSpliced(from, 1).toSpliced(place, 0, moved));
}

/** Puts a copy of a segment behind it. */
export function duplicateSegment(profile: Profile, index: number): Profile {
  const segment = profile.segments[index];
  return segment === undefined ? profile : insertSegment(profile, index + 1, { ...segment });
}

/** Drags the corner of a segment up or down: its target, to 5 °C. */
export function dragTarget(profile: Profile, index: number, toC: number, limits: EditLimits = {}): Profile {
  return setSegment(profile, index, { toC: toStep(toC, DRAG_TARGET_C) }, limits);
}

/**
 * Drags the corner at the end of a ramp along the time axis: its rate becomes what arrives then, to 1, 5 or 10 °C/h.
 * A level stretch has no rate to change; `flat-out` and `coast` become a rate.
 *
 * @param rampEndS where the corner was let go, seconds from the start of the profile
 * @param kilnRampsS as for {@link plannedCurve}
 */
export function dragCorner(
  profile: Profile,
  index: number,
  rampEndS: number,
  kilnRampsS: readonly (number | null)[] = [],
): Profile {
  const leg = plannedCurve(profile, kilnRampsS).legs[index];
  if (leg === undefined) return profile;
  const deltaC = Math.abs(leg.toC - leg.fromC);
  if (deltaC === 0) return profile;
  const rampS = rampEndS - leg.startS;
  const rateCPerH = rampS > 0 ? (deltaC / rampS) * 3600 : PROFILE_LIMITS.maxRateCPerH;
  return setSegment(profile, index, { rateCPerH: toStep(rateCPerH, dragRateStep(rateCPerH)) });
}

/** Drags the end of a hold along the time axis, to 5 minutes. */
export function dragHoldEnd(
  profile: Profile,
  index: number,
  endS: number,
  kilnRampsS: readonly (number | null)[] = [],
): Profile {
  const leg = plannedCurve(profile, kilnRampsS).legs[index];
  if (leg === undefined) return profile;
  return setSegment(profile, index, { holdS: toStep(Math.max(0, endS - leg.rampEndS), DRAG_HOLD_S) });
}

/** Length of a segment's ramp, s; null for `flat-out` and `coast`, whose length the kiln decides. */
export function rampDurationS(profile: Profile, index: number): number | null {
  const segment = profile.segments[index];
  if (segment === undefined || typeof segment.rateCPerH !== 'number') return null;
  return (Math.abs(segment.toC - fromCOf(profile, index)) / segment.rateCPerH) * 3600;
}

/** Sets how long a ramp takes instead of its rate; a level stretch is left as it is. The rate is kept to 0.01 °C/h. */
export function setRampDuration(profile: Profile, index: number, durationS: number): Profile {
  const segment = profile.segments[index];
  if (segment === undefined) return profile;
  const deltaC = Math.abs(segment.toC - fromCOf(profile, index));
  if (deltaC === 0 || !(durationS > 0)) return profile;
  return setSegment(profile, index, { rateCPerH: Math.round((deltaC / durationS) * 360000) / 100 });
}
