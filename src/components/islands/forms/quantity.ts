import {
  cIntervalToF,
  cToF,
  formatInterval,
  formatLength,
  formatMass,
  formatNumber,
  formatRate,
  formatTemperature,
  KG_PER_LB,
  M_PER_IN,
  parseInterval,
  parseLength,
  parseMass,
  parseNumber,
  parseRate,
  parseTemperature,
  type Parsed,
  type UnitPreferences,
} from '~/lib/units';
import { z } from '~/lib/zod';

/** What a field holds. Whatever is typed, the form keeps °C, metres, °C/h, seconds and shares of one. */
export type Kind = 'length' | 'mass' | 'temperature' | 'interval' | 'rate' | 'percent' | 'number';

const asNumber = (parsed: Parsed<number | 'flat-out' | 'coast'>): Parsed =>
  !parsed.ok || typeof parsed.value === 'number'
    ? (parsed as Parsed)
    : { ok: false, issue: 'A number is expected here.' };

/** Reads a field as its person types: in their units unless another is named. */
export function readQuantity(text: string, kind: Kind, units: UnitPreferences): Parsed {
  switch (kind) {
    case 'length':
      return parseLength(text, units.length);
    case 'mass':
      return parseMass(text, units.mass);
    case 'temperature':
      return parseTemperature(text, units.temperature);
    case 'interval':
      return parseInterval(text, units.temperature);
    case 'rate':
      return asNumber(parseRate(text, units.temperature));
    case 'percent': {
      const parsed = parseNumber(text.replace(/\s*%\s*$/, ''));
      return parsed.ok ? { ok: true, value: parsed.value / 100 } : parsed;
    }
    case 'number':
      return parseNumber(text);
  }
}

/** The unit a bare number is taken to be in, shown at the end of the field. */
export function assumedUnit(kind: Kind, units: UnitPreferences): string {
  switch (kind) {
    case 'length':
      return units.length;
    case 'mass':
      return units.mass;
    case 'temperature':
    case 'interval':
      return `°${units.temperature}`;
    case 'rate':
      return `°${units.temperature}/h`;
    case 'percent':
      return '%';
    case 'number':
      return '';
  }
}

const tidy = (value: number, decimals: number): string => String(Number(value.toFixed(decimals)));

/** What stands in the field for a kept value: the number alone, in the person's units. */
export function fieldText(value: number | null | undefined, kind: Kind, units: UnitPreferences): string {
  if (value === null || value === undefined) return '';
  switch (kind) {
    case 'length':
      return units.length === 'in' ? tidy(value / M_PER_IN, 3) : tidy(value * 1000, 2);
    case 'mass':
      return tidy(units.mass === 'lb' ? value / KG_PER_LB : value, 3);
    case 'temperature':
      return tidy(units.temperature === 'F' ? cToF(value) : value, 1);
    case 'interval':
    case 'rate':
      return tidy(units.temperature === 'F' ? cIntervalToF(value) : value, 1);
    case 'percent':
      return tidy(value * 100, 2);
    case 'number':
      return tidy(value, 4);
  }
}

/** What was understood, in words, where a person typed another unit than their own; else nothing. */
export function understoodAs(text: string, kind: Kind, units: UnitPreferences): string | null {
  if (text.trim() === '' || parseNumber(text).ok) return null;
  const read = readQuantity(text, kind, units);
  if (!read.ok) return null;
  switch (kind) {
    case 'length':
      return formatLength(read.value, units.length);
    case 'mass':
      return formatMass(read.value, units.mass);
    case 'temperature':
      return formatTemperature(read.value, units.temperature);
    case 'interval':
      return formatInterval(read.value, units.temperature);
    case 'rate':
      return formatRate(read.value, units.temperature);
    case 'percent':
      return `${formatNumber(read.value * 100, 1)} %`;
    case 'number':
      return null;
  }
}

/** A range in the person's units, for a message. */
function inWords(value: number, kind: Kind, units: UnitPreferences): string {
  return `${fieldText(value, kind, units)} ${assumedUnit(kind, units)}`.trim();
}

interface Range {
  readonly min: number;
  readonly max: number;
}

/** A field that must hold a quantity within a range; gives the kept value. */
export const quantity = (kind: Kind, units: UnitPreferences, range: Range) =>
  z.string().transform((text, context) => {
    const read = readQuantity(text, kind, units);
    if (!read.ok) {
      context.addIssue(read.issue);
      return z.NEVER;
    }
    if (read.value < range.min || read.value > range.max) {
      context.addIssue(
        `Between ${inWords(range.min, kind, units)} and ${inWords(range.max, kind, units)} is expected.`,
      );
      return z.NEVER;
    }
    return read.value;
  });

/** As `quantity`, or null where the field is left empty. */
export const quantityOrNull = (kind: Kind, units: UnitPreferences, range: Range) => {
  const filled = quantity(kind, units, range);
  return z.string().transform((text, context) => {
    if (text.trim() === '') return null;
    const result = filled.safeParse(text);
    if (result.success) return result.data;
    for (const issue of result.error.issues) context.addIssue(issue.message);
    return z.NEVER;
  });
};

interface Wrapped {
  unwrap(): unknown;
}
const isWrapped = (schema: unknown): schema is Wrapped =>
  schema instanceof z.ZodDefault || schema instanceof z.ZodNullable || schema instanceof z.ZodOptional;

/** The range that the contract itself sets for a number, so that a form never states another. */
export function rangeOf(schema: z.ZodType): Range {
  let inner: unknown = schema;
  while (isWrapped(inner)) inner = inner.unwrap();
  if (!(inner instanceof z.ZodNumber)) throw new TypeError('a range is asked of something that is no number');
  return { min: inner.minValue ?? -Infinity, max: inner.maxValue ?? Infinity };
}
