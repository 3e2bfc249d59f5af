import type { Profile, Stage } from '../profile/schema';
import { bandOfC, type Thresholds } from './thresholds';
import type { Curve, ReviewInput } from './types';

/** One segment of the plan with what a review asks of it. */
export interface Leg {
  readonly index: number;
  readonly stage: Stage;
  readonly fromC: number;
  readonly toC: number;
  /** 1 up, −1 down, 0 level. */
  readonly direction: -1 | 0 | 1;
  /** Null for `coast` and `flat-out`. */
  readonly rateCPerH: number | null;
  readonly pace: 'rate' | 'flat-out' | 'coast';
  /** Planned length of the ramp; null where neither a rate nor a prediction gives one. */
  readonly rampS: number | null;
  readonly holdS: number;
  readonly bandC: number;
  /** The plan has the kiln opened in this segment. */
  readonly opens: boolean;
}

/** The legs of a profile; `flat-out` and `coast` get their length from the kiln model's curve where there is one. */
export function legsOf(profile: Profile, predicted: ReviewInput['predicted'], limits: Thresholds): Leg[] {
  const predictedRampS = predicted ? rampsOfPrediction(profile, predicted) : [];
  let fromC = profile.startC;
  return profile.segments.map((segment, index) => {
    const deltaC = segment.toC - fromC;
    const rate = segment.rateCPerH;
    const leg: Leg = {
      index,
      stage: segment.stage,
      fromC,
      toC: segment.toC,
      direction: deltaC > 0 ? 1 : deltaC < 0 ? -1 : 0,
      rateCPerH: typeof rate === 'number' ? rate : null,
      pace: typeof rate === 'number' ? 'rate' : rate,
      rampS: typeof rate === 'number' ? (Math.abs(deltaC) / rate) * 3600 : (predictedRampS[index] ?? null),
      holdS: segment.holdS,
      bandC: bandOfC(limits, segment.stage),
      opens: segment.drain || /\bopen(s|ed|ing)?\b/i.test(segment.instruction),
    };
    fromC = segment.toC;
    return leg;
  });
}

/** How near its target a predicted curve counts as there: it approaches a limit asymptotically. */
const PREDICTED_THERE_C = 2;

/** Length of each ramp on the predicted curve, null from the first target on that it never reaches. */
function rampsOfPrediction(
  profile: Profile,
  predicted: NonNullable<ReviewInput['predicted']>,
): (number | null)[] {
  const { timeS, chamberC } = predicted;
  const ramps: (number | null)[] = [];
  let i = 0;
  let beginS = timeS[0] ?? 0;
  let fromC = profile.startC;
  for (const segment of profile.segments) {
    const direction = Math.sign(segment.toC - fromC);
    while (i < timeS.length && direction * (chamberC[i]! - segment.toC) < -PREDICTED_THERE_C) i++;
    if (i >= timeS.length) break;
    ramps.push(Math.max(0, timeS[i]! - beginS));
    beginS = Math.max(beginS, timeS[i]!) + segment.holdS;
    while (i < timeS.length && timeS[i]! < beginS) i++;
    fromC = segment.toC;
  }
  return ramps;
}

/** Where nothing is known of a kiln: a rate at which `flat-out` and `coast` are drawn before a log has told better. */
const UNKNOWN_RATE_C_PER_H = 200;

/** Length that a leg's ramp is drawn with. */
export function drawnRampS(leg: Leg, actualRampS: number | null = null): number {
  return leg.rampS ?? actualRampS ?? (Math.abs(leg.toC - leg.fromC) / UNKNOWN_RATE_C_PER_H) * 3600;
}

/** The plan as it was made, a polyline from run time 0. `actualRampS` lends lengths to ramps that have no rate. */
export function plannedCurve(legs: readonly Leg[], actualRampS: readonly (number | null)[] = []): Curve {
  const timeS = [0];
  const valueC = [legs[0]?.fromC ?? 0];
  let atS = 0;
  for (const leg of legs) {
    atS += drawnRampS(leg, actualRampS[leg.index] ?? null);
    timeS.push(atS);
    valueC.push(leg.toC);
    if (leg.holdS > 0) {
      atS += leg.holdS;
      timeS.push(atS);
      valueC.push(leg.toC);
    }
  }
  return { timeS: Float64Array.from(timeS), valueC: Float64Array.from(valueC) };
}

/** Reads curves at ascending times in constant time each; NaN outside the curve. */
export function readerOf(curve: Curve): (atS: number) => number {
  const { timeS, valueC } = curve;
  const last = timeS.length - 1;
  let i = 0;
  return (atS) => {
    if (last < 0 || atS < timeS[0]! || atS > timeS[last]!) return Number.NaN;
    if (atS < timeS[i]!) i = 0;
    while (i < last - 1 && timeS[i + 1]! <= atS) i++;
    if (last === 0) return valueC[0]!;
    const spanS = timeS[i + 1]! - timeS[i]!;
    const share = spanS > 0 ? (atS - timeS[i]!) / spanS : 1;
    return valueC[i]! + share * (valueC[i + 1]! - valueC[i]!);
  };
}
