import { stretches, type Stretch } from './spans';
import type { Thresholds } from './thresholds';
import type { ReviewChannel } from './types';

/** What no studio kiln's chamber reads, whatever the sensor: the range taken where a channel's type is not known. */
const ANY_KILN = { minC: -60, maxC: 1500 };
/** Open stretches this near to one another are one loose contact. */
const LOOSE_CONTACT_S = 300;

/**
 * Samples of an open or lost sensor, as stretches of indexes: rows that carry an open marker (or, for long enough, no value
 * while rows came), readings outside the sensor's range, and a step of more than `openStepC` from one sample to the next
 * that stays for `openMinS` and `openMinSamples` before it steps back (or to the end). An opened kiln falls over many
 * samples and comes back gradually; a stuck reading steps only once, when it is released.
 */
export function openStretches(
  channel: ReviewChannel,
  timeS: Float64Array,
  spiky: Uint8Array,
  limits: Thresholds,
): Stretch[] {
  const range = channel.rangeC ?? ANY_KILN;
  const { value } = channel;
  const n = value.length;
  const lost = new Uint8Array(n);
  for (const i of channel.openIndexes ?? []) lost[i] = 1;
  const longEnough = (s: Stretch) =>
    timeS[s.to]! - timeS[s.from]! >= limits.openMinS && s.to - s.from + 1 >= limits.openMinSamples;
  for (const silent of stretches(0, n - 1, (i) => value[i] !== value[i])) {
    const inside = silent.from > 0 && silent.to < n - 1;
    if (inside && longEnough(silent)) lost.fill(1, silent.from, silent.to + 1);
  }
  for (const out of stretches(0, n - 1, (i) => value[i]! < range.minC || value[i]! > range.maxC)) {
    if (out.to - out.from + 1 > limits.spikeMaxSamples) lost.fill(1, out.from, out.to + 1);
  }
  for (const step of steps(timeS, value, lost, spiky, limits)) {
    if (longEnough(step)) lost.fill(1, step.from, step.to + 1);
  }
  return joinedInTime(
    stretches(0, n - 1, (i) => lost[i] === 1),
    timeS,
  );
}

/** Stretches that begin with a step and end with one back to about where it came from. */
function steps(
  timeS: Float64Array,
  value: Float64Array,
  lost: Uint8Array,
  spiky: Uint8Array,
  limits: Thresholds,
): Stretch[] {
  const found: Stretch[] = [];
  const n = value.length;
  let previous = -1;
  for (let i = 0; i < n; i++) {
    if (lost[i] || spiky[i] || value[i] !== value[i]) continue;
    const leapC = previous < 0 ? 0 : value[i]! - value[previous]!;
    const adjacent = previous >= 0 && timeS[i]! - timeS[previous]! <= limits.gapMinS;
    if (adjacent && Math.abs(leapC) > limits.openStepC && !wasStuck(timeS, value, previous, limits)) {
      const back = stepsBack(value, previous, i, leapC, lost, spiky, limits);
      if (back !== null) {
        found.push({ from: i, to: back - 1 });
        i = back;
      }
    }
    previous = i;
  }
  return found;
}

/** Index of the first sample that is back after a step, n if the step lasts to the end, null if it was no such step. */
function stepsBack(
  value: Float64Array,
  before: number,
  from: number,
  leapC: number,
  lost: Uint8Array,
  spiky: Uint8Array,
  limits: Thresholds,
): number | null {
  const halfway = value[before]! + leapC / 2;
  let last = from;
  for (let j = from + 1; j < value.length; j++) {
    if (lost[j] || spiky[j] || value[j] !== value[j]) continue;
    if ((value[j]! - halfway) * Math.sign(leapC) < 0) {
      // Back over the half at one step, or it was a real temperature finding its way.
      return Math.abs(value[j]! - value[last]!) > Math.abs(leapC) * 0.4 ? j : null;
    }
    last = j;
  }
  return Math.abs(leapC) > limits.openStepC ? value.length : null;
}

/** Whether the reading before a step had been frozen: then the step is its release. */
function wasStuck(timeS: Float64Array, value: Float64Array, at: number, limits: Thresholds): boolean {
  let i = at;
  while (i > 0 && value[i - 1] === value[at]) i--;
  return timeS[at]! - timeS[i]! >= limits.stuckMinS;
}

function joinedInTime(parts: readonly Stretch[], timeS: Float64Array): Stretch[] {
  const out: Stretch[] = [];
  for (const part of parts) {
    const last = out[out.length - 1];
    if (last && timeS[part.from]! - timeS[last.to]! <= LOOSE_CONTACT_S)
      out[out.length - 1] = { from: last.from, to: part.to };
    else out.push(part);
  }
  return out;
}
