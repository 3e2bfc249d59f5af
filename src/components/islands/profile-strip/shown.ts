import type { Rate, Segment } from '~/lib/profile/schema';
import {
  cIntervalToF,
  cToF,
  formatNumber,
  parseDuration,
  parseRate,
  THIN_SPACE,
  type UnitPreferences,
} from '~/lib/units';
import { PROFILE_LIMITS } from '~/lib/profile/schema';

export { STAGE_NAMES } from '~/components/words/names';

export const STATE_NAMES = {
  draft: 'draft',
  'in-review': 'in review',
  approved: 'approved',
  retired: 'retired',
} as const;

type Scale = UnitPreferences['temperature'];

/** Up to one decimal place, and none where there is none. */
const trimmed = (value: number): string =>
  formatNumber(value, Math.abs(value - Math.round(value)) < 0.05 ? 0 : 1);

export const degreesText = (tempC: number, scale: Scale): string =>
  trimmed(scale === 'F' ? cToF(tempC) : tempC);
export const rateNumber = (rateCPerH: number, scale: Scale): string =>
  trimmed(scale === 'F' ? cIntervalToF(rateCPerH) : rateCPerH);
export const degreeUnit = (scale: Scale): string => `°${scale}`;
export const rateUnit = (scale: Scale): string => `°${scale}/h`;

/** Which way a ramp goes. */
export const rampArrow = (fromC: number, toC: number): string =>
  toC > fromC ? '↗' : toC < fromC ? '↘' : '→';

export const rateText = (rate: Rate, scale: Scale): string =>
  rate === 'flat-out'
    ? 'flat out'
    : rate === 'coast'
      ? 'coast'
      : `${rateNumber(rate, scale)}${THIN_SPACE}${rateUnit(scale)}`;

/** A ramp as people type it: a rate, the time it is to take, or one of the two words. */
export type TypedRamp =
  | { readonly ok: true; readonly value: { readonly rate: Rate } | { readonly rampS: number } }
  | { readonly ok: false; readonly issue: string };

/**
 * Reads what was typed for a ramp. A bare number is a rate, or a time in minutes where ramps are shown as times; what
 * carries a unit is understood for what it is in either case: `120 °C/h`, `2 K/min`, `1:30`, `90 min`, `flat out`.
 */
export function parseRamp(text: string, shownAs: 'rate' | 'time', scale: Scale): TypedRamp {
  const rate = parseRate(text, scale);
  const isBare = /^[\d.,\s]+$/.test(text);
  if (rate.ok && !(isBare && shownAs === 'time')) {
    const { minRateCPerH, maxRateCPerH } = PROFILE_LIMITS;
    if (typeof rate.value === 'number' && (rate.value < minRateCPerH || rate.value > maxRateCPerH))
      return {
        ok: false,
        issue: `A rate lies between ${rateNumber(minRateCPerH, scale)} and ${rateNumber(maxRateCPerH, scale)}${THIN_SPACE}${rateUnit(scale)}.`,
      };
    return { ok: true, value: { rate: rate.value } };
  }
  const time = parseDuration(text, 'min');
  if (time.ok && time.value > 0) return { ok: true, value: { rampS: time.value } };
  return rate.ok ? { ok: false, issue: 'A ramp takes some time.' } : rate;
}

/** What else a segment asks for, in few words. */
export function asksFor(segment: Segment): string[] {
  return [
    segment.drain ? 'drain' : '',
    segment.vent === 'open' ? 'vent open' : '',
    segment.attended ? 'attended' : '',
  ].filter(Boolean);
}
