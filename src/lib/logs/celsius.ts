import { emfMv, temperatureC } from '../sensors/its90';
import type { ReadChannel } from './schema';

/** What of a channel decides how its values become °C. */
export type Convertible = Pick<ReadChannel, 'quantity' | 'unit' | 'thermocouple' | 'junction'>;

/** One value in °C from a channel's own unit; emf with its junction's °C. NaN for other quantities and outside a thermocouple's range. */
export function celsiusOf(channel: Convertible, value: number, junctionC: number): number {
  if (channel.quantity === 'emf') {
    if (channel.thermocouple === null) return NaN;
    return temperatureC(channel.thermocouple, value + emfMv(channel.thermocouple, junctionC));
  }
  return channel.quantity === 'temperature' ? degreesOf(channel.unit, value) : NaN;
}

function degreesOf(unit: string, value: number): number {
  switch (unit) {
    case 'F':
      return ((value - 32) * 5) / 9;
    case 'K':
      return value - 273.15;
    default:
      return value;
  }
}

/** The fixed °C of a channel's reference junction, or NaN if it is another channel's. */
function fixedJunctionC(channel: Convertible): number {
  return channel.junction && 'tempC' in channel.junction ? channel.junction.tempC : NaN;
}

/**
 * Columns of equal length, one per channel in the file's units, to °C; null for channels that are no temperature.
 * Emf is compensated row by row with the junction channel of the same row. The input is not changed.
 */
export function toCelsius(
  channels: readonly Convertible[],
  values: readonly Float64Array[],
): (Float64Array | null)[] {
  return channels.map((channel, index) => {
    const column = values[index];
    if (!column || (channel.quantity !== 'temperature' && channel.quantity !== 'emf')) return null;
    const out = new Float64Array(column.length);
    const junction = junctionColumn(channels, values, channel);
    const fixedC = fixedJunctionC(channel);
    for (let i = 0; i < column.length; i++) {
      out[i] = celsiusOf(channel, column[i] ?? NaN, junction ? (junction[i] ?? NaN) : fixedC);
    }
    return out;
  });
}

/** The °C of the junction channel, row by row, or null where the junction is fixed or there is none. */
export function junctionColumn(
  channels: readonly Convertible[],
  values: readonly Float64Array[],
  channel: Convertible,
): Float64Array | null {
  if (!channel.junction || !('channel' in channel.junction)) return null;
  const source = channels[channel.junction.channel];
  const column = values[channel.junction.channel];
  if (!source || !column || source.quantity !== 'temperature') return null;
  return column.map((value) => degreesOf(source.unit, value));
}
