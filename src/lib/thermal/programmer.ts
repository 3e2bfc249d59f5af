import type { Profile, Segment } from '../profile/schema';

/** What the programmer is doing: a ramp by its clock, heating or cooling without a rate, or a hold. */
export type Doing = 'rate' | 'flat-out' | 'coast' | 'hold';

/** The kiln's programmer on its way through a profile. Temperatures are what its thermocouple shows, °C. */
export interface Programmer {
  readonly profile: Profile;
  /** Its clock stops while the kiln is further than this from the set point, K; null: it never stops. */
  readonly bandC: number | null;
  index: number;
  doing: Doing;
  /** Set point at the beginning of the ramp. */
  fromC: number;
  /** Time on its own clock since the ramp or hold began, s. */
  clockS: number;
  /** The kiln cannot get there: the band is ignored until the segment ends. */
  gaveUp: boolean;
}

export function programmerOf(profile: Profile, bandC: number | null): Programmer {
  const first = profile.segments[0];
  if (first === undefined) throw new RangeError('a profile has at least one segment');
  return {
    profile,
    bandC,
    index: 0,
    doing: doingOf(first),
    fromC: profile.startC,
    clockS: 0,
    gaveUp: false,
  };
}

const doingOf = (segment: Segment): Doing =>
  typeof segment.rateCPerH === 'number' ? 'rate' : segment.rateCPerH;

/** The segment under way. */
export function segmentOf(programmer: Programmer): Segment {
  const segment = programmer.profile.segments[programmer.index];
  if (segment === undefined) throw new RangeError('the programme has ended');
  return segment;
}

/** Signed rate of the set point, K/s; 0 in a hold and where there is no rate. */
export function setRateCPerS(programmer: Programmer): number {
  const segment = segmentOf(programmer);
  if (programmer.doing !== 'rate' || typeof segment.rateCPerH !== 'number') return 0;
  return (Math.sign(segment.toC - programmer.fromC) * segment.rateCPerH) / 3600;
}

/** Length of what it is doing on its own clock, s; Infinity where the clock does not end it. */
export function lengthS(programmer: Programmer): number {
  const segment = segmentOf(programmer);
  if (programmer.doing === 'hold') return segment.holdS;
  if (typeof segment.rateCPerH !== 'number') return Infinity;
  return (Math.abs(segment.toC - programmer.fromC) / segment.rateCPerH) * 3600;
}

/** Set point when its clock stands at a time, °C. */
export function setPointC(programmer: Programmer, clockS: number): number {
  const segment = segmentOf(programmer);
  if (programmer.doing !== 'rate' || clockS >= lengthS(programmer)) return segment.toC;
  return programmer.fromC + setRateCPerS(programmer) * clockS;
}

/**
 * Where its clock stands after a step of time that ended at a temperature: on by the step, but no further than the
 * band allows, and never back.
 */
export function clockAfterS(programmer: Programmer, stepS: number, endC: number): number {
  const { bandC, clockS, doing } = programmer;
  const onS = clockS + stepS;
  if (bandC === null || programmer.gaveUp) return onS;
  const rate = setRateCPerS(programmer);
  if (doing === 'hold') return Math.abs(segmentOf(programmer).toC - endC) > bandC + 1e-3 ? clockS : onS;
  if (rate === 0) return onS;
  const allowedS = (endC + Math.sign(rate) * bandC - programmer.fromC) / rate;
  const otherSideS = (endC - Math.sign(rate) * bandC - programmer.fromC) / rate;
  if (otherSideS > onS) return clockS;
  return Math.max(clockS, Math.min(onS, allowedS));
}

/** On to the hold of the segment, or to the next segment's ramp; false once the programme has ended. */
export function nextPhase(programmer: Programmer): boolean {
  programmer.clockS = 0;
  if (programmer.doing !== 'hold') {
    programmer.doing = 'hold';
    return true;
  }
  programmer.fromC = segmentOf(programmer).toC;
  programmer.gaveUp = false;
  programmer.index++;
  const next = programmer.profile.segments[programmer.index];
  if (next === undefined) return false;
  programmer.doing = doingOf(next);
  return true;
}
