import { cIntervalToF, cToF, KG_PER_LB, M_PER_IN } from './convert';
import type { UnitPreferences } from './preferences';

/** Narrow no-break space: between a number and its unit, and between groups of thousands. */
export const THIN_SPACE = '\u202f';
const MINUS = '\u2212';

/** A number and its unit apart, so that a page may set the unit smaller. */
export type Quantity = { number: string; unit: string };

/** Joins a number and its unit with a thin space. */
export const joined = ({ number, unit }: Quantity): string =>
  unit === '' ? number : number + THIN_SPACE + unit;

/**
 * Writes a number the same way everywhere: decimal point, thin space between thousands from 10 000 on, a true minus.
 *
 * @param decimals decimal places, 0-6
 */
export function formatNumber(value: number, decimals = 0): string {
  if (!Number.isFinite(value)) return '–';
  const fixed = Math.abs(value).toFixed(decimals);
  const negative = value < 0 && Number(fixed) !== 0;
  const [whole = '0', fraction] = fixed.split('.');
  const grouped = whole.length > 4 ? whole.replace(/\B(?=(\d{3})+$)/g, THIN_SPACE) : whole;
  return (negative ? MINUS : '') + grouped + (fraction === undefined ? '' : `.${fraction}`);
}

export function temperature(tempC: number, scale: UnitPreferences['temperature'], decimals = 0): Quantity {
  return { number: formatNumber(scale === 'F' ? cToF(tempC) : tempC, decimals), unit: `°${scale}` };
}

/** A difference of temperature: never shifted by 32. */
export function interval(intervalC: number, scale: UnitPreferences['temperature'], decimals = 0): Quantity {
  return {
    number: formatNumber(scale === 'F' ? cIntervalToF(intervalC) : intervalC, decimals),
    unit: `°${scale}`,
  };
}

export function rate(
  rateCPerH: number | 'flat-out' | 'coast',
  scale: UnitPreferences['temperature'],
  decimals = 0,
): Quantity {
  if (typeof rateCPerH === 'string') return { number: rateCPerH, unit: '' };
  const value = scale === 'F' ? cIntervalToF(rateCPerH) : rateCPerH;
  return { number: formatNumber(value, decimals), unit: `°${scale}/h` };
}

/** Kilograms (grams below 1 kg) or pounds. */
export function mass(massKg: number, unit: UnitPreferences['mass']): Quantity {
  if (unit === 'lb') return { number: formatNumber(massKg / KG_PER_LB, massKg < 5 ? 2 : 1), unit: 'lb' };
  if (Math.abs(massKg) < 0.9995) return { number: formatNumber(massKg * 1000), unit: 'g' };
  return { number: formatNumber(massKg, massKg < 10 ? 2 : 1), unit: 'kg' };
}

/** Millimetres or inches. */
export function length(lengthM: number, unit: UnitPreferences['length']): Quantity {
  if (unit === 'in') return { number: formatNumber(lengthM / M_PER_IN, 2), unit: 'in' };
  const lengthMm = lengthM * 1000;
  return {
    number: formatNumber(lengthMm, Math.abs(lengthMm) < 20 && !Number.isInteger(lengthMm) ? 1 : 0),
    unit: 'mm',
  };
}

export const energy = (energyKWh: number): Quantity => ({
  number: formatNumber(energyKWh, Math.abs(energyKWh) < 100 ? 1 : 0),
  unit: 'kWh',
});

export const formatTemperature = (...of: Parameters<typeof temperature>): string =>
  joined(temperature(...of));
export const formatInterval = (...of: Parameters<typeof interval>): string => joined(interval(...of));
export const formatRate = (...of: Parameters<typeof rate>): string => joined(rate(...of));
export const formatMass = (...of: Parameters<typeof mass>): string => joined(mass(...of));
export const formatLength = (...of: Parameters<typeof length>): string => joined(length(...of));
export const formatEnergy = (...of: Parameters<typeof energy>): string => joined(energy(...of));

/** "45 s", "20 min", "6 h", "1 h 30 min", "2 d 4 h"; days from 72 h on. Rounded to the smaller unit shown. */
export function formatDuration(durationS: number): string {
  if (!Number.isFinite(durationS)) return '–';
  const sign = durationS < 0 ? MINUS : '';
  const totalS = Math.round(Math.abs(durationS));
  if (totalS < 60) return (totalS === 0 ? '' : sign) + `${totalS}${THIN_SPACE}s`;
  const minutes = Math.round(totalS / 60);
  if (minutes < 72 * 60) return sign + two(Math.floor(minutes / 60), 'h', minutes % 60, 'min');
  const hours = Math.round(minutes / 60);
  return sign + two(Math.floor(hours / 24), 'd', hours % 24, 'h');
}

function two(large: number, largeUnit: string, small: number, smallUnit: string): string {
  const parts = [];
  if (large > 0) parts.push(`${large}${THIN_SPACE}${largeUnit}`);
  if (small > 0 || large === 0) parts.push(`${small}${THIN_SPACE}${smallUnit}`);
  return parts.join(' ');
}

/** Run time as hours and minutes, "0:05", "13:30". */
export function formatClock(timeS: number): string {
  const minutes = Math.round(Math.abs(timeS) / 60);
  const text = `${Math.floor(minutes / 60)}:${String(minutes % 60).padStart(2, '0')}`;
  return timeS < 0 && minutes > 0 ? MINUS + text : text;
}
