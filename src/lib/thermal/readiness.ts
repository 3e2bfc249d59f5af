import type { Profile } from '../profile/schema';
import type { MouldTrace, Simulation } from './simulation';

/** A mould is ready when its core is this near the casting hold's target, K. */
export const READY_WITHIN_C = 10;

/** Index of the segment a mould is to be ready in: the first casting hold, or the hottest hold, or the hottest target. */
export function readySegment(profile: Profile): number {
  const casting = profile.segments.findIndex(({ stage }) => stage === 'casting-hold');
  if (casting >= 0) return casting;
  const held = profile.segments.some(({ holdS }) => holdS > 0);
  let best = -1;
  profile.segments.forEach(({ toC, holdS }, i) => {
    if (held && holdS <= 0) return;
    if (best < 0 || toC > (profile.segments[best]?.toC ?? -Infinity)) best = i;
  });
  return best;
}

/** First moment, from the begin of that segment on, at which the core is within 10 °C of its target, s; null: never. */
export function readyS(simulation: Simulation, mould: MouldTrace): number | null {
  const index = readySegment(simulation.profile);
  const target = simulation.profile.segments[index];
  const moments = simulation.segments[index];
  if (target === undefined || moments === undefined) return null;
  const { timeS } = simulation;
  const offC = (i: number): number => Math.abs((mould.coreC[i] ?? Infinity) - target.toC) - READY_WITHIN_C;
  for (let i = 0; i < timeS.length; i++) {
    const atS = timeS[i] ?? 0;
    if (atS < moments.startS || offC(i) > 0) continue;
    const beforeS = timeS[i - 1] ?? atS;
    if (i === 0 || beforeS < moments.startS) return atS;
    return beforeS + ((atS - beforeS) * offC(i - 1)) / (offC(i - 1) - offC(i));
  }
  return null;
}

/** Place in `simulation.moulds` of the mould that is ready last (one that never is comes last of all; the first on a tie); null: no mould. */
export function slowestMould(simulation: Simulation): number | null {
  let slowest: number | null = null;
  let latestS = -Infinity;
  simulation.moulds.forEach((mould, i) => {
    const atS = readyS(simulation, mould) ?? Infinity;
    if (atS > latestS) {
      latestS = atS;
      slowest = i;
    }
  });
  return slowest;
}
