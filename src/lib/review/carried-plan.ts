import { drawnRampS, type Leg } from './plan';
import type { FiredLeg } from './segments';
import type { Curve } from './types';

/**
 * The carried plan: each leg's own ramp and hold, begun when the leg before it really ended, so that one lateness does not
 * make everything after it late. A `coast` is drawn to where the kiln arrived and anchors the plan anew. What the log does
 * not hold follows as planned.
 */
export function carriedPlan(legs: readonly Leg[], fired: readonly FiredLeg[]): Curve {
  const timeS: number[] = [];
  const valueC: number[] = [];
  const push = (atS: number, atC: number) => {
    timeS.push(Math.max(atS, timeS[timeS.length - 1] ?? -Infinity));
    valueC.push(atC);
  };
  let beginS = 0;
  for (const leg of legs) {
    const one = fired[leg.index];
    const startS = one?.startS ?? beginS;
    const actualRampS = one?.arrivedS != null ? one.arrivedS - one.startS : null;
    const rampS = leg.pace === 'coast' ? (actualRampS ?? drawnRampS(leg)) : drawnRampS(leg, actualRampS);
    const endS = one?.endS ?? startS + Math.max(rampS + leg.holdS, (one?.expectedEndS ?? startS) - startS);
    push(startS, leg.fromC);
    if (startS + rampS <= endS) push(startS + rampS, leg.toC);
    else push(endS, leg.fromC + ((leg.toC - leg.fromC) * (endS - startS)) / rampS);
    push(endS, leg.toC);
    beginS = endS;
  }
  return { timeS: Float64Array.from(timeS), valueC: Float64Array.from(valueC) };
}
