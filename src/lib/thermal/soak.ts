import { READY_WITHIN_C } from './readiness';
import { seriesAt } from './series';
import type { MouldTrace, Simulation } from './simulation';

/** Stretch of a hold's end from which the pace of the core is read, s. */
const READ_OVER_S = 600;
/** What takes longer is held back by something else: water that boils, s. */
const LONGEST_S = 7 * 24 * 3600;

/**
 * How much longer a hold would have to last for a mould's core to come within 10 °C of it: late in a hold the core nears the
 * chamber as exp(−t/τ) (the slowest mode of the wall), so τ is read from its last ten minutes.
 *
 * @param index segment
 * @returns s; null where nothing is held, the chamber itself is not there, the core is, or it does not come nearer
 */
export function soakMoreS(simulation: Simulation, mould: MouldTrace, index: number): number | null {
  const segment = simulation.profile.segments[index];
  const moments = simulation.segments[index];
  if (segment === undefined || moments === undefined || segment.holdS <= 0 || !moments.arrived) return null;
  const heldS = moments.endS - moments.rampEndS;
  const overS = Math.min(READ_OVER_S, heldS / 2);
  const endC = Math.abs(segment.toC - seriesAt(simulation.timeS, mould.coreC, moments.endS));
  const beforeC = Math.abs(segment.toC - seriesAt(simulation.timeS, mould.coreC, moments.endS - overS));
  if (!(endC > READY_WITHIN_C) || !(beforeC > endC)) return null;
  const moreS = (overS / Math.log(beforeC / endC)) * Math.log(endC / READY_WITHIN_C);
  return moreS < LONGEST_S ? moreS : null;
}
