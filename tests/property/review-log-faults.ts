import type { ReviewChannel } from '~/lib/review/types';
import type { SimulatedFiring } from './review-simulated-firing';

/** Faults of sensor, logger and clock, done to a log after it was made. Times are run time in seconds. */

const indexFrom = (firing: SimulatedFiring, atS: number): number => {
  const times = firing.channels[0]?.timeMs ?? new Float64Array();
  const i = times.findIndex((t) => t >= firing.runStartMs + atS * 1000);
  return i < 0 ? times.length : i;
};

const withChannels = (
  firing: SimulatedFiring,
  change: (channel: ReviewChannel) => ReviewChannel,
): SimulatedFiring => ({
  ...firing,
  channels: firing.channels.map(change),
});

const onChamber = (
  firing: SimulatedFiring,
  change: (value: Float64Array, channel: ReviewChannel) => Partial<ReviewChannel>,
) =>
  withChannels(firing, (channel) => {
    if (channel.id !== 'chamber') return channel;
    const value = channel.value.slice();
    return { ...channel, value, ...change(value, channel) };
  });

/** A spike of so many samples. */
export function spiked(firing: SimulatedFiring, atS: number, byC: number, samples: number): SimulatedFiring {
  const from = indexFrom(firing, atS);
  return onChamber(firing, (value) => {
    for (let i = from; i < Math.min(value.length, from + samples); i++) value[i] = (value[i] ?? 0) + byC;
    return {};
  });
}

export type OpenForm = 'marker' | 'rail' | 'foreign';

/** A sensor that is open for a while: rows with a marker and no value, or a rail, or some other input's temperature. */
export function opened(firing: SimulatedFiring, fromS: number, toS: number, form: OpenForm): SimulatedFiring {
  const from = indexFrom(firing, fromS);
  const to = indexFrom(firing, toS);
  return onChamber(firing, (value) => {
    value.fill(form === 'marker' ? Number.NaN : form === 'rail' ? 1372 : 24.3, from, to);
    return form === 'marker' ? { openIndexes: Array.from({ length: to - from }, (_, k) => from + k) } : {};
  });
}

/** A reading that freezes. */
export function frozen(firing: SimulatedFiring, fromS: number, toS: number): SimulatedFiring {
  const from = indexFrom(firing, fromS);
  return onChamber(firing, (value) => {
    value.fill(value[from] ?? 0, from, indexFrom(firing, toS));
    return {};
  });
}

/** No rows for a while. */
export function silent(firing: SimulatedFiring, fromS: number, toS: number): SimulatedFiring {
  const from = indexFrom(firing, fromS);
  const to = indexFrom(firing, toS);
  const without = (array: Float64Array) =>
    Float64Array.from([...array.subarray(0, from), ...array.subarray(to)]);
  return withChannels(firing, (channel) => ({
    ...channel,
    timeMs: without(channel.timeMs),
    value: without(channel.value),
  }));
}

/** A logger's clock that is set forward. */
export function setForward(firing: SimulatedFiring, atS: number, byS: number): SimulatedFiring {
  const from = indexFrom(firing, atS);
  return withChannels(firing, (channel) => ({
    ...channel,
    timeMs: channel.timeMs.map((t, i) => (i >= from ? t + byS * 1000 : t)),
  }));
}

/** A log that stops. */
export function stopped(firing: SimulatedFiring, atS: number): SimulatedFiring {
  const to = indexFrom(firing, atS);
  return withChannels(firing, (channel) => ({
    ...channel,
    timeMs: channel.timeMs.slice(0, to),
    value: channel.value.slice(0, to),
  }));
}

/** A log that starts late. */
export function startedLate(firing: SimulatedFiring, atS: number): SimulatedFiring {
  const from = indexFrom(firing, atS);
  return withChannels(firing, (channel) => ({
    ...channel,
    timeMs: channel.timeMs.slice(from),
    value: channel.value.slice(from),
  }));
}

/** A second chamber channel that reads `apartC` off between two times, easing in and out over five minutes. */
export function withSecond(
  firing: SimulatedFiring,
  fromS: number,
  toS: number,
  apartC: number,
): SimulatedFiring {
  const chamber = firing.channels[0];
  if (!chamber) return firing;
  const value = chamber.value.map((v, i) => {
    const atS = ((chamber.timeMs[i] ?? 0) - firing.runStartMs) / 1000;
    const ease = Math.max(0, Math.min(1, (atS - fromS) / 300, (toS - atS) / 300));
    return v + 1.5 + apartC * ease;
  });
  return { ...firing, channels: [...firing.channels, { ...chamber, id: 'second', name: 'second', value }] };
}
