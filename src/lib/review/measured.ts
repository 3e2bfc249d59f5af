import { clockOf, correctedTimeS, type LogClock } from './clock';
import { gridOf, type Grid } from './grid';
import { noiseOf } from './noise';
import { examined, type Sensor } from './sensors';
import type { Thresholds } from './thresholds';
import type { ReviewChannel, ReviewInput } from './types';

/** The log as read, before it is laid under the plan: everything in seconds from the control channel's first sample. */
export interface Measured {
  readonly clock: LogClock;
  readonly firstMs: number;
  readonly control: Sensor;
  /** Other temperature channels of the kiln and its load. */
  readonly others: readonly Sensor[];
  readonly power: Grid | null;
}

/** Roles whose readings are looked through: a room or a cold junction says nothing about the firing. */
const FIRED_ROLES: readonly ReviewChannel['role'][] = ['chamber', 'mould', 'load', 'other'];

/** Reads clock, sensors and power channel. Throws if the control channel is not there or holds no sample. */
export function measured(input: ReviewInput, limits: Thresholds): Measured {
  const channel = input.channels.find((c) => c.id === input.controlChannelId);
  if (!channel) throw new Error(`no channel ${input.controlChannelId} to review`);
  if (channel.timeMs.length === 0) throw new Error(`channel ${channel.name} holds no sample`);
  const firstMs = channel.timeMs[0]!;
  const clock = clockOf(channel.timeMs, channel.value, noiseOf(channel.value), input.profile, limits);
  const sensor = (c: ReviewChannel) => examined(c, clock, firstMs, limits);
  const others = input.channels.filter(
    (c) =>
      c !== channel && c.quantity === 'temperature' && c.timeMs.length > 2 && FIRED_ROLES.includes(c.role),
  );
  const power = input.channels.find((c) => c.quantity === 'power' && c.timeMs.length > 2);
  return {
    clock,
    firstMs,
    control: sensor(channel),
    others: others.map(sensor),
    power: power ? gridOn(correctedTimeS(power.timeMs, firstMs, clock.leaps), power, null, clock) : null,
  };
}

/** A sensor's sound readings on a grid whose origin is the control channel's first sample. */
export const onGrid = ({ timeS, channel, dropped }: Sensor, clock: LogClock): Grid =>
  gridOn(timeS, channel, dropped, clock);

function gridOn(
  timeS: Float64Array,
  { value }: ReviewChannel,
  dropped: Uint8Array | null,
  clock: LogClock,
): Grid {
  const firstS = timeS.length ? timeS[0]! : 0;
  const fromFirst = firstS === 0 ? timeS : timeS.map((t) => t - firstS);
  return { ...gridOf(fromFirst, value, dropped, clock.gapLimitS), originS: firstS };
}

/** The same grid on another clock: times less `offsetS`. */
export const shifted = (grid: Grid, offsetS: number): Grid => ({ ...grid, originS: grid.originS - offsetS });
