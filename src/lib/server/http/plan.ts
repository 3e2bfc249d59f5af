import { plannedCurve, type PlannedCurve } from '~/lib/profile/planned';
import type { Profile } from '~/lib/profile/schema';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import type { Load } from '~/lib/thermal/load-schema';
import type { Actor } from '../auth/actor';
import { estimateFiring } from '../services/estimates';

interface Firing {
  readonly profile: Profile;
  readonly kilnId: string | null;
  readonly load: Load | null;
}

/** The planned curve with the length of its `flat-out` and `coast` ramps as the kiln will have them. */
export function curveWith(profile: Profile, estimate: Estimate | null): PlannedCurve {
  const rampsS = estimate?.segments.map(
    (segment, index) => segment.plannedEndS - segment.plannedStartS - (profile.segments[index]?.holdS ?? 0),
  );
  return plannedCurve(profile, rampsS);
}

/** What the models say of a firing; null where no kiln is named. */
export async function estimateFor(actor: Actor, { profile, kilnId, load }: Firing): Promise<Estimate | null> {
  if (kilnId === null) return null;
  return estimateFiring(actor, { profile, kilnId, ambientC: 20, ...(load === null ? {} : { load }) }, {});
}

/** The planned curve of a firing, asking the kiln's model only where a ramp has no rate of its own. */
export async function planFor(actor: Actor, firing: Firing): Promise<PlannedCurve> {
  const isAsked = firing.profile.segments.every((segment) => typeof segment.rateCPerH === 'number');
  return isAsked ? plannedCurve(firing.profile) : curveWith(firing.profile, await estimateFor(actor, firing));
}
