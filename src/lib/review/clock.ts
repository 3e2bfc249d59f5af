import type { Profile } from '../profile/schema';
import { medianIntervalS, type Noise } from './noise';
import type { Span } from './spans';
import { bandOfC, type Thresholds } from './thresholds';
import type { ClockLeap } from './types';

/** The log's own time, leaps of its clock taken out. */
export interface LogClock {
  /** Seconds from the first sample, ascending, one per sample. */
  readonly timeS: Float64Array;
  readonly leaps: readonly ClockLeap[];
  /** Where no row came for longer than the limit, seconds from the first sample: last before to first after. */
  readonly gaps: readonly Span[];
  /** Last sample before each leap, seconds from the first sample. */
  readonly leapAtS: readonly number[];
  readonly intervalS: number;
  readonly gapLimitS: number;
}

/** How long before and after a silence the slope is read, seconds. */
const BESIDE_S = 600;

/**
 * Walks the rows once: a silence longer than max(`gapMinS`, `gapIntervals` × median interval) is a gap, unless the
 * temperature went on after it as if (almost) no time had passed; then the clock leapt, and later times are moved back.
 */
export function clockOf(
  timeMs: Float64Array,
  value: Float64Array,
  noise: Noise,
  profile: Profile,
  limits: Thresholds,
): LogClock {
  const n = timeMs.length;
  const timeS = new Float64Array(n);
  const intervalS = medianIntervalS(timeMs);
  const gapLimitS = Math.max(limits.gapMinS, limits.gapIntervals * intervalS);
  const leaps: ClockLeap[] = [];
  const leapAtS: number[] = [];
  const gaps: Span[] = [];
  let shiftS = 0;
  const firstMs = n ? timeMs[0]! : 0;
  for (let i = 0; i < n; i++) {
    const loggedS = (timeMs[i]! - firstMs) / 1000;
    const silentS = i ? loggedS - shiftS - timeS[i - 1]! : 0;
    if (silentS > gapLimitS) {
      const leapS = leapOf(timeMs, value, i, silentS, intervalS, noise, profile, limits);
      if (leapS > limits.clockStepMinS) {
        leaps.push({ atMs: timeMs[i - 1]!, shiftS: leapS });
        leapAtS.push(timeS[i - 1]!);
        shiftS += leapS;
      }
      if (silentS - leapS > gapLimitS) gaps.push({ startS: timeS[i - 1]!, endS: loggedS - shiftS });
    }
    timeS[i] = loggedS - shiftS;
  }
  return { timeS, leaps, gaps, leapAtS, intervalS, gapLimitS };
}

/**
 * Seconds that the clock leapt in the silence before sample `after`; 0 if the silence is real. The temperature has to go on
 * at a like rate after it, and to have changed by less than `leapShare` of what that rate would give. Where the rate gives
 * too little to tell (a hold), or a planned hold at that temperature could explain it, the silence is taken at its word.
 */
function leapOf(
  timeMs: Float64Array,
  value: Float64Array,
  after: number,
  silentS: number,
  intervalS: number,
  noise: Noise,
  profile: Profile,
  limits: Thresholds,
): number {
  const before = lineBeside(timeMs, value, after - 1, -1);
  const then = lineBeside(timeMs, value, after, 1);
  if (!before || !then) return 0;
  const alike = before.slopeCPerS * then.slopeCPerS > 0;
  const slopeCPerS = Math.min(Math.abs(before.slopeCPerS), Math.abs(then.slopeCPerS));
  const steeperCPerS = Math.max(Math.abs(before.slopeCPerS), Math.abs(then.slopeCPerS));
  if (!alike || steeperCPerS > 2 * slopeCPerS) return 0;
  const expectedC = slopeCPerS * silentS;
  const errorC = Math.max(0.5, (4 * noise.sigmaC) / Math.sqrt(Math.min(before.count, then.count)));
  const changedC = (then.levelC - before.levelC) * Math.sign(before.slopeCPerS);
  if (expectedC < 5 * errorC || changedC < -errorC || changedC >= limits.leapShare * expectedC) return 0;
  if (passesHold(profile, before.levelC, then.levelC, Math.sign(before.slopeCPerS), errorC, limits)) return 0;
  const meanCPerS = (before.slopeCPerS + then.slopeCPerS) / 2;
  const passedS = Math.max(intervalS, Math.abs(changedC / meanCPerS));
  // A clock that was set forward loses no row: what is left is one interval, unless the curve clearly says more.
  const lostRows = Math.abs(changedC) > errorC + 3 * intervalS * Math.abs(meanCPerS);
  return silentS - (lostRows ? passedS : intervalS);
}

/** Whether a planned hold lies between the temperatures on both sides of a silence, so that it may have passed unseen. */
function passesHold(
  profile: Profile,
  beforeC: number,
  afterC: number,
  direction: number,
  errorC: number,
  limits: Thresholds,
): boolean {
  return profile.segments.some((segment, k) => {
    const fromC = k ? (profile.segments[k - 1]?.toC ?? profile.startC) : profile.startC;
    const sameWay = Math.sign(segment.toC - fromC) === direction;
    const near = Math.abs(beforeC - segment.toC) <= 1.5 * bandOfC(limits, segment.stage);
    const within =
      direction * (beforeC - segment.toC) <= errorC && direction * (afterC - segment.toC) >= -errorC;
    return segment.holdS >= limits.gapMinS && sameWay && near && within;
  });
}

/** Line through the samples beside a silence, and its level at the sample next to it. */
function lineBeside(timeMs: Float64Array, value: Float64Array, start: number, step: 1 | -1) {
  const t0 = timeMs[start]!;
  let count = 0;
  let sumT = 0;
  let sumV = 0;
  let sumTT = 0;
  let sumTV = 0;
  for (let i = start; i >= 0 && i < timeMs.length; i += step) {
    const t = (timeMs[i]! - t0) / 1000;
    if (Math.abs(t) > BESIDE_S && count >= 4) break;
    const v = value[i]!;
    if (v !== v) continue;
    count++;
    sumT += t;
    sumV += v;
    sumTT += t * t;
    sumTV += t * v;
    if (count >= 600) break;
  }
  const spread = count * sumTT - sumT * sumT;
  if (count < 3 || spread <= 0) return null;
  const slopeCPerS = (count * sumTV - sumT * sumV) / spread;
  return { slopeCPerS, levelC: (sumV - slopeCPerS * sumT) / count, count };
}

/** Instants of another channel on the same corrected time: seconds from the control channel's first sample. */
export function correctedTimeS(
  timeMs: Float64Array,
  firstMs: number,
  leaps: readonly ClockLeap[],
): Float64Array {
  const timeS = new Float64Array(timeMs.length);
  let passed = 0;
  let shiftS = 0;
  for (let i = 0; i < timeMs.length; i++) {
    for (let leap = leaps[passed]; leap && timeMs[i]! > leap.atMs; leap = leaps[passed]) {
      shiftS += leap.shiftS;
      passed++;
    }
    timeS[i] = (timeMs[i]! - firstMs) / 1000 - shiftS;
  }
  return timeS;
}
