import { KG_PER_LB, M_PER_IN } from './convert';
import { numberAndRest } from './number';
import { notUnderstood, type Parsed, plainText, understood } from './parsed';
import type { UnitPreferences } from './preferences';

const KG: Readonly<Record<string, number>> = {
  kg: 1,
  kilo: 1,
  kilos: 1,
  g: 0.001,
  gram: 0.001,
  grams: 0.001,
  t: 1000,
  lb: KG_PER_LB,
  lbs: KG_PER_LB,
  pound: KG_PER_LB,
  pounds: KG_PER_LB,
  oz: KG_PER_LB / 16,
};

const METRES: Readonly<Record<string, number>> = {
  mm: 0.001,
  cm: 0.01,
  m: 1,
  in: M_PER_IN,
  inch: M_PER_IN,
  inches: M_PER_IN,
  '"': M_PER_IN,
  ft: 12 * M_PER_IN,
  foot: 12 * M_PER_IN,
  feet: 12 * M_PER_IN,
  "'": 12 * M_PER_IN,
};

/** Reads a mass: "2.5 kg", "850 g", "5 lb", "5 lb 8 oz", "12"; gives kg. */
export function parseMass(text: string, assumed: UnitPreferences['mass']): Parsed {
  return parseAmount(text, KG, assumed, 'mass', 'kg, g, lb or oz');
}

/** Reads a length: "8 mm", "1.2 cm", "3/8 in", `1 1/2"`, "450"; gives metres. */
export function parseLength(text: string, assumed: UnitPreferences['length']): Parsed {
  return parseAmount(text, METRES, assumed, 'length', 'mm, cm, m or in');
}

function parseAmount(
  text: string,
  units: Readonly<Record<string, number>>,
  assumed: string,
  what: string,
  examples: string,
): Parsed {
  const plain = plainText(text).toLowerCase();
  const first = leading(plain, units, assumed);
  if (first === null) return notUnderstood(`“${text.trim()}” is not a ${what}: use ${examples}.`);
  if (!first.amount.ok) return first.amount;
  if (first.amount.value < 0) return notUnderstood(`A ${what} cannot be negative.`);
  if (first.rest === '') return understood(first.amount.value * first.factor);
  const second = leading(first.rest, units, '');
  if (second === null || !second.amount.ok || second.rest !== '' || second.factor >= first.factor)
    return notUnderstood(`“${text.trim()}” is not a ${what}: use ${examples}.`);
  return understood(first.amount.value * first.factor + second.amount.value * second.factor);
}

/** The first number with its unit, and what is left of the text. */
function leading(
  text: string,
  units: Readonly<Record<string, number>>,
  assumed: string,
): { amount: Parsed; factor: number; rest: string } | null {
  const split = fractionAndRest(text) ?? numberAndRest(text);
  if (split === null) return null;
  const match = /^([a-z]+|["'])?\s*(.*)$/.exec(split.rest);
  const unit = match?.[1] ?? assumed;
  if (!Object.hasOwn(units, unit)) return null;
  return { amount: split.number, factor: units[unit] ?? NaN, rest: match?.[2] ?? '' };
}

function fractionAndRest(text: string): { number: Parsed; rest: string } | null {
  const match = /^(?:(\d+)[ -])?(\d+)\/(\d+)\s*(.*)$/.exec(text);
  if (match === null || Number(match[3]) === 0) return null;
  const value = Number(match[1] ?? 0) + Number(match[2]) / Number(match[3]);
  return { number: understood(value), rest: match[4] ?? '' };
}
