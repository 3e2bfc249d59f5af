import { median, type Noise } from './noise';
import type { Thresholds } from './thresholds';

/** A few wild readings between sound ones: indexes of the first and last, and how far off the worst was. */
export interface Spike {
  readonly from: number;
  readonly to: number;
  readonly byC: number;
}

/**
 * Sensor spikes among raw samples: at most `spikeMaxSamples` readings in a row, each off the median of its neighbours
 * (± `spikeHalfWindow`) by more than max(`spikeMinC`, `spikeMads` · MAD, MAD being at least one quantum), after which the
 * reading is back at the former level at once: within `spikeBackC`, on a ramp of where the ramp would have brought it.
 * Linear: a window is only sorted where one reading leaps away from the last.
 */
export function spikesOf(
  timeS: Float64Array,
  value: Float64Array,
  noise: Noise,
  limits: Thresholds,
): Spike[] {
  const spikes: Spike[] = [];
  const leapC = limits.spikeMinC * 0.4;
  const n = value.length;
  let before = Number.NaN;
  for (let i = 0; i < n; i++) {
    const v = value[i]!;
    if (v !== v) continue;
    if (Math.abs(v - before) <= leapC || before !== before) {
      before = v;
      continue;
    }
    const spike = spikeAt(timeS, value, i, noise, limits);
    if (spike) {
      spikes.push(spike);
      i = spike.to;
      continue;
    }
    before = v;
  }
  return spikes;
}

function spikeAt(
  timeS: Float64Array,
  value: Float64Array,
  from: number,
  noise: Noise,
  limits: Thresholds,
): Spike | null {
  const isOff = (i: number) => offBy(value, i, noise, limits);
  if (!isOff(from)) return null;
  let to = from;
  while (to + 1 < value.length && to - from < limits.spikeMaxSamples && isOff(to + 1)) to++;
  if (to - from + 1 > limits.spikeMaxSamples) return null;
  const levels = besides(timeS, value, from, to);
  if (levels === null) return null;
  const allowedC = Math.max(limits.spikeBackC, 4 * noise.sigmaC);
  if (Math.abs(levels.afterC - levels.expectedC) > allowedC) return null;
  let byC = 0;
  for (let i = from; i <= to; i++) {
    const d = value[i]! - levels.beforeC;
    if (Math.abs(d) > Math.abs(byC)) byC = d;
  }
  return { from, to, byC };
}

/** Whether a reading is off the median of its neighbours by more than the limit. */
function offBy(value: Float64Array, i: number, noise: Noise, limits: Thresholds): boolean {
  const near: number[] = [];
  for (let j = i - limits.spikeHalfWindow; j <= i + limits.spikeHalfWindow; j++) {
    const v = value[j];
    if (v !== undefined && v === v) near.push(v);
  }
  const middle = median(near);
  const mad = Math.max(median(near.map((v) => Math.abs(v - middle))), noise.quantumC);
  return Math.abs(value[i]! - middle) > Math.max(limits.spikeMinC, limits.spikeMads * mad);
}

/** The level just before and just after a suspect, and the level to be expected after it by the slope on both sides. */
function besides(timeS: Float64Array, value: Float64Array, from: number, to: number) {
  const before = soundIndexes(value, from - 1, -1);
  const after = soundIndexes(value, to + 1, 1);
  if (before.length === 0 || after.length === 0) return null;
  const level = (indexes: number[]) => ({
    timeS: indexes.reduce((sum, i) => sum + timeS[i]!, 0) / indexes.length,
    valueC: indexes.reduce((sum, i) => sum + value[i]!, 0) / indexes.length,
  });
  const b = level(before.slice(0, 2));
  const a = level(after.slice(0, 2));
  const slope = (indexes: number[]) => {
    const first = indexes[0]!;
    const last = indexes[indexes.length - 1]!;
    return first === last ? 0 : (value[last]! - value[first]!) / (timeS[last]! - timeS[first]!);
  };
  const slopeCPerS = (slope(before) + slope(after)) / 2;
  return { beforeC: b.valueC, afterC: a.valueC, expectedC: b.valueC + slopeCPerS * (a.timeS - b.timeS) };
}

/** Up to four sound indexes from `start` on in one direction. */
function soundIndexes(value: Float64Array, start: number, step: 1 | -1): number[] {
  const out: number[] = [];
  for (let i = start; i >= 0 && i < value.length && out.length < 4; i += step) {
    if (value[i] === value[i]) out.push(i);
  }
  return out;
}
