import type { TemperatureUnit } from './schema';

/** Where a channel's values begin and how far they reach, and with how many decimals they are written. */
export interface ValueRange {
  start: number;
  min: number;
  max: number;
  decimals: number;
}

export type UnitVerdict = { unit: TemperatureUnit } | { choices: TemperatureUnit[]; guess: TemperatureUnit };

/** Hottest that a kiln's log can show, °C, with room for a sensor that reads high. */
const HOTTEST_C = 1450;

/**
 * The unit of temperatures that nothing names, by where they begin and end. A log begins with a kiln at the temperature of the room
 * (then its first value tells the unit) or with a warm one (then several units may be possible, and it has to be asked).
 * Bands are common practice: a studio is between 5 and 32 °C, a kiln below 1400 °C.
 */
export function unitByEvidence({ start, min, max, decimals }: ValueRange): UnitVerdict {
  if (start >= 5 && start <= 32) return { unit: 'C' };
  const possible = new Set<TemperatureUnit>();
  if (start >= -30 && max <= HOTTEST_C) possible.add('C');
  if (start > 32 && max <= HOTTEST_C * 1.8 + 32) possible.add('F');
  if (min >= 240 && max <= HOTTEST_C + 273) possible.add('K');
  if (Math.abs(start) < 5 && max < 80 && decimals >= 2) possible.add('mV');
  const choices = [...possible];
  const [only] = choices;
  if (only && choices.length === 1) return { unit: only };
  if (choices.length === 0) return { choices: ['C', 'F', 'K'], guess: 'C' };
  return { choices, guess: likelier(start, choices) };
}

/** The unit under which the first value is nearest to a room's temperature. */
function likelier(start: number, choices: TemperatureUnit[]): TemperatureUnit {
  const fromRoomC: Record<TemperatureUnit, number> = {
    C: Math.abs(start - 20),
    F: Math.abs((start - 32) / 1.8 - 20),
    K: Math.abs(start - 293),
    mV: 15,
  };
  return choices.reduce((best, unit) => (fromRoomC[unit] < fromRoomC[best] ? unit : best));
}

/** A value as it would be in each unit, for a question's examples. */
export function inUnit(value: number, unit: TemperatureUnit): string {
  const text = Number(value.toFixed(3)).toString();
  switch (unit) {
    case 'F':
      return `${text} °F is ${Math.round((value - 32) / 1.8)} °C`;
    case 'K':
      return `${text} K is ${Math.round(value - 273.15)} °C`;
    case 'mV':
      return `${text} mV, the voltage of the thermocouple`;
    default:
      return `${text} °C`;
  }
}
