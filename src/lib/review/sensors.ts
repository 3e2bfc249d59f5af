import { correctedTimeS, type LogClock } from './clock';
import { spikesOf, type Spike } from './despike';
import { noiseOf, type Noise } from './noise';
import { openStretches } from './sensor-open';
import { frozenStretches } from './sensor-stuck';
import type { Stretch } from './spans';
import type { Thresholds } from './thresholds';
import type { ReviewChannel } from './types';

/** One channel with what is wrong with its readings, in samples; times are seconds from the control channel's first sample. */
export interface Sensor {
  readonly channel: ReviewChannel;
  readonly timeS: Float64Array;
  readonly noise: Noise;
  readonly spikes: readonly Spike[];
  readonly open: readonly Stretch[];
  readonly frozen: readonly Stretch[];
  /** 1 for readings that are no temperature: spiked or open. Frozen ones are judged later, against the plan. */
  readonly dropped: Uint8Array;
}

/** Looks a channel's raw samples through, in time linear in their number. */
export function examined(
  channel: ReviewChannel,
  clock: LogClock,
  firstMs: number,
  limits: Thresholds,
): Sensor {
  const timeS = correctedTimeS(channel.timeMs, firstMs, clock.leaps);
  const noise = noiseOf(channel.value);
  const dropped = new Uint8Array(channel.value.length);
  const spikes = spikesOf(timeS, channel.value, noise, limits);
  for (const spike of spikes) dropped.fill(1, spike.from, spike.to + 1);
  const open = openStretches(channel, timeS, dropped, limits);
  for (const part of open) dropped.fill(1, part.from, part.to + 1);
  return {
    channel,
    timeS,
    noise,
    spikes: spikes.filter(
      (spike) => !open.some((part) => spike.from <= part.to + 1 && spike.to >= part.from - 1),
    ),
    open,
    frozen: frozenStretches(timeS, channel.value, limits),
    dropped,
  };
}

/** The sensor with stretches dropped that turned out to be stuck. */
export function withoutStuck(sensor: Sensor, stuck: readonly Stretch[]): Sensor {
  if (stuck.length === 0) return sensor;
  const dropped = sensor.dropped.slice();
  for (const part of stuck) dropped.fill(1, part.from, part.to + 1);
  return { ...sensor, dropped };
}
