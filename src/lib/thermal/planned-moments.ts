import { type PlannedCurve, plannedAt, plannedCurve } from '../profile/planned';
import type { Profile } from '../profile/schema';
import type { SegmentMoments } from './simulation';

function curveOf(profile: Profile, modelRampS: readonly number[]): PlannedCurve {
  return plannedCurve(
    profile,
    profile.segments.map(({ rateCPerH }, i) =>
      typeof rateCPerH === 'number' ? null : (modelRampS[i] ?? null),
    ),
  );
}

/** Fills in when each segment was planned; segments without a rate take the length the simulation gave them. */
export function plannedMoments(profile: Profile, recorded: readonly SegmentMoments[]): SegmentMoments[] {
  const { legs } = curveOf(
    profile,
    recorded.map(({ plannedRampEndS }) => plannedRampEndS),
  );
  return recorded.map((moments, i) => {
    const leg = legs[i];
    if (leg === undefined) return moments;
    return {
      ...moments,
      plannedStartS: leg.startS,
      plannedRampEndS: leg.rampEndS,
      plannedEndS: leg.endS,
    };
  });
}

/** Planned temperature at each moment, °C. */
export function plannedSeries(
  profile: Profile,
  segments: readonly SegmentMoments[],
  timeS: Float64Array,
): Float64Array {
  const curve = curveOf(
    profile,
    segments.map(({ plannedStartS, plannedRampEndS }) => plannedRampEndS - plannedStartS),
  );
  return timeS.map((atS) => plannedAt(curve, atS));
}
