import { fIntervalToC, fToC } from './convert';
import { numberAndRest } from './number';
import { notUnderstood, type Parsed, understood } from './parsed';
import type { UnitPreferences } from './preferences';

type Scale = 'C' | 'F' | 'K';

const ABSOLUTE_ZERO_C = -273.15;

/** The scale that a unit text names; null: none named; undefined: not a unit of temperature. */
function scaleOf(unit: string): Scale | null | undefined {
  const bare = unit.toLowerCase().replace(/[°.\s]/g, '');
  if (bare === '' || bare === 'deg' || bare === 'degrees') return null;
  const letter = /^(?:deg|degrees)?(c|f|k|celsius|fahrenheit|kelvin|centigrade)$/.exec(bare)?.[1]?.charAt(0);
  if (letter === 'c') return 'C';
  if (letter === 'f') return 'F';
  return letter === 'k' ? 'K' : undefined;
}

/**
 * Reads a temperature: "500F", "500 °F", "260", "260c", "533 K".
 *
 * @param text what was typed
 * @param assumed the scale of a number that names none
 * @returns the temperature in °C
 */
export function parseTemperature(text: string, assumed: UnitPreferences['temperature']): Parsed {
  const split = numberAndRest(text);
  if (split === null)
    return notUnderstood(`“${text.trim()}” is not a temperature: write it like 260 °C or 500 °F.`);
  if (!split.number.ok) return split.number;
  const scale = scaleOf(split.rest);
  if (scale === undefined)
    return notUnderstood(`“${split.rest}” is not a unit of temperature: use °C or °F.`);
  const value = split.number.value;
  const tempC = toC(value, scale ?? assumed);
  if (tempC < ABSOLUTE_ZERO_C) return notUnderstood(`“${text.trim()}” is below absolute zero.`);
  return understood(tempC);
}

function toC(value: number, scale: Scale): number {
  if (scale === 'F') return fToC(value);
  return scale === 'K' ? value + ABSOLUTE_ZERO_C : value;
}

/** Reads a difference of temperature, "10", "18 °F", "10 K"; gives °C. Nothing is subtracted from a difference. */
export function parseInterval(text: string, assumed: UnitPreferences['temperature']): Parsed {
  const split = numberAndRest(text);
  if (split === null)
    return notUnderstood(`“${text.trim()}” is not a difference of temperature: write it like 10 °C.`);
  if (!split.number.ok) return split.number;
  const scale = scaleOf(split.rest);
  if (scale === undefined)
    return notUnderstood(`“${split.rest}” is not a unit of temperature: use °C or °F.`);
  return understood((scale ?? assumed) === 'F' ? fIntervalToC(split.number.value) : split.number.value);
}

const PER = {
  h: 1,
  hr: 1,
  hour: 1,
  hours: 1,
  min: 60,
  minute: 60,
  m: 60,
  s: 3600,
  sec: 3600,
  second: 3600,
} as const;

/**
 * Reads a rate: "120", "120 °C/h", "216 °F/h", "2 K/min", "150 per hour", or one of the two words.
 *
 * @param assumed the scale of a rate that names none; per hour is assumed where no time is named
 * @returns °C per hour, `flat-out` or `coast`
 */
export function parseRate(
  text: string,
  assumed: UnitPreferences['temperature'],
): Parsed<number | 'flat-out' | 'coast'> {
  const word = text
    .trim()
    .toLowerCase()
    .replace(/[\s-]+/g, '-');
  if (word === 'flat-out' || word === 'coast') return understood(word);
  const split = numberAndRest(text);
  if (split === null)
    return notUnderstood(`“${text.trim()}” is not a rate: write it like 120 °C/h, or flat-out, or coast.`);
  if (!split.number.ok) return split.number;
  const [unit = '', per, ...more] = split.rest.split(/\s*\/\s*|\s+per\s+|^per\s+/i);
  const perHour = per === undefined ? 1 : PER[per.trim().toLowerCase() as keyof typeof PER];
  const scale = scaleOf(unit);
  if (scale === undefined || perHour === undefined || more.length > 0)
    return notUnderstood(`“${split.rest}” is not a unit of rate: use °C/h or °F/h.`);
  const intervalC = (scale ?? assumed) === 'F' ? fIntervalToC(split.number.value) : split.number.value;
  return understood(intervalC * perHour);
}
