import type { DateOrder } from './schema';

/** A date as written, before it is decided which of its numbers is the day. */
export interface DateParts {
  numbers: [number, number, number];
  digits: [number, number, number];
  /** Where a month is written as a word its place is known. */
  order: 'dmy' | 'mdy' | 'ymd' | null;
  separator: string;
}

const MONTHS = [
  ['jan', 'janv', 'ene', 'gen'],
  ['feb', 'fev', 'fév', 'fevr', 'févr', 'febbr'],
  ['mar', 'mär', 'mrz', 'mars', 'mrt', 'maa', 'maer'],
  ['apr', 'avr', 'abr'],
  ['may', 'mai', 'mag', 'mei', 'maj'],
  ['jun', 'juin', 'giu'],
  ['jul', 'juil', 'lug'],
  ['aug', 'aoû', 'aou', 'ago'],
  ['sep', 'set', 'sept'],
  ['oct', 'okt', 'ott', 'out'],
  ['nov'],
  ['dec', 'dez', 'déc', 'dic'],
];
const NUMERIC = /^(\d{1,4})([-/.\u2010\u2011])(\d{1,2})\2(\d{1,4})\.?(?!\d)/;
const COMPACT = /^(\d{4})(\d{2})(\d{2})(?=$|[T _-]?\d{6}(?!\d)|[T _-]?\d{4}(?!\d)|[T ]\d{1,2}:)/;
const DAY_WORD_YEAR = /^(\d{1,2})\.?[-/. ]\s?([A-Za-zéûäç]{3,9})\.?,?[-/. ]\s?(\d{4}|\d{2})(?!\d)/;
const WORD_DAY_YEAR = /^([A-Za-zéûäç]{3,9})\.?[-/. ]\s?(\d{1,2}),?[-/. ]\s?(\d{4}|\d{2})(?!\d)/;
const YEAR_WORD_DAY = /^(\d{4})[-/. ]([A-Za-zéûäç]{3,9})\.?[-/. ](\d{1,2})(?!\d)/;
/** A weekday in front of a date. */
export const WEEKDAY =
  /^(?:mon|tue|wed|thu|fri|sat|sun|mo|di|mi|do|fr|sa|so|lun|mar|mer|jeu|ven|sam|dim|mié|jue|vie|sáb|dom|gio|sab)[a-zäéí]*\.?,?\s+(?=\S*\d)/i;
export interface DateFound {
  parts: DateParts;
  length: number;
  compact: boolean;
}

/** A date at the beginning of a text: its three numbers as written, and how many characters it took. */
export function readDate(text: string): DateFound | null {
  const compact = COMPACT.exec(text);
  if (compact) return found(compact[0].length, [compact[1], compact[2], compact[3]], 'ymd', '', true);
  const numeric = NUMERIC.exec(text);
  if (numeric) {
    const [whole, a, separator = '', b, c] = numeric;
    if ((a?.length ?? 0) === 3 || (c?.length ?? 0) === 3) return null;
    const trailing = whole.endsWith('.') && separator !== '.' ? 1 : 0;
    return found(whole.length - trailing, [a, b, c], null, separator, false);
  }
  return readNamedDate(text);
}

function readNamedDate(text: string): DateFound | null {
  const tries: [RegExp, 'dmy' | 'mdy' | 'ymd', number][] = [
    [DAY_WORD_YEAR, 'dmy', 2],
    [WORD_DAY_YEAR, 'mdy', 1],
    [YEAR_WORD_DAY, 'ymd', 2],
  ];
  for (const [form, order, wordAt] of tries) {
    const match = form.exec(text);
    const month = match ? monthOf(match[wordAt] ?? '') : 0;
    if (!match || month === 0) continue;
    const parts = [match[1], match[2], match[3]].map((part, i) => (i + 1 === wordAt ? String(month) : part));
    return found(match[0].length, [parts[0], parts[1], parts[2]], order, ' ', false);
  }
  return null;
}

function monthOf(word: string): number {
  const lower = word.toLowerCase();
  for (let length = 5; length >= 3; length--) {
    const index = MONTHS.findIndex((names) =>
      names.some((name) => name.length === length && lower.startsWith(name)),
    );
    if (index >= 0) return index + 1;
  }
  return 0;
}

function found(
  length: number,
  texts: (string | undefined)[],
  order: DateParts['order'],
  separator: string,
  compact: boolean,
): DateFound {
  const [a = '', b = '', c = ''] = texts;
  const parts: DateParts = {
    numbers: [Number(a), Number(b), Number(c)],
    digits: [a.length, b.length, c.length],
    order,
    separator,
  };
  return { parts, length, compact };
}

/** The pattern of a date for people to read: `dd.MM.yyyy`, `d MMM yyyy`, `yyyyMMdd`. */
export function datePattern(parts: DateParts, order: DateOrder): string {
  const letters = { d: 'd', m: 'M', y: 'y' };
  const pieces = [...order].map((which, i) => {
    if (which === 'm' && parts.order !== null && parts.separator === ' ') return 'MMM';
    const digits = parts.digits[i] ?? 2;
    return letters[which as 'd' | 'm' | 'y'].repeat(which === 'y' ? (digits > 2 ? 4 : 2) : digits);
  });
  return pieces.join(parts.separator);
}

/** Midnight UTC of a date in ms under an order of its numbers, or NaN if there is no such day. Two-digit years are 2000-2099. */
export function dayMs(parts: DateParts, order: DateOrder): number {
  const actual = parts.order ?? order;
  const year = parts.numbers[actual.indexOf('y')] ?? NaN;
  const month = parts.numbers[actual.indexOf('m')] ?? NaN;
  const day = parts.numbers[actual.indexOf('d')] ?? NaN;
  const yearDigits = parts.digits[actual.indexOf('y')] ?? 0;
  if (yearDigits !== 2 && yearDigits !== 4) return NaN;
  if (!(month >= 1 && month <= 12 && day >= 1 && day <= 31)) return NaN;
  const fullYear = yearDigits === 2 ? 2000 + year : year;
  const ms = Date.UTC(fullYear, month - 1, day);
  return new Date(ms).getUTCDate() === day ? ms : NaN;
}
