import { VALUE_CODES } from './types';

const POWERS = Array.from({ length: 23 }, (_, i) => 10 ** i);
const ZERO = 48;
const NINE = 57;

/**
 * Plain number between `from` and `to` of `text` (sign, digits, one decimal mark, digits), or NaN for anything else.
 * Exact as `Number()` is: the digits form an integer below 2^53, divided once by a power of ten.
 */
export function plainNumber(text: string, from: number, to: number, decimalCode: number): number {
  let i = from;
  let negative = false;
  const first = text.charCodeAt(i);
  if (first === 45 || first === 43) {
    negative = first === 45;
    i++;
  }
  let mantissa = 0;
  let digits = 0;
  let decimals = -1;
  for (; i < to; i++) {
    const code = text.charCodeAt(i);
    if (code >= ZERO && code <= NINE) {
      mantissa = mantissa * 10 + (code - ZERO);
      digits++;
      if (decimals >= 0) decimals++;
    } else if (code === decimalCode && decimals < 0) decimals = 0;
    else return NaN;
  }
  if (digits === 0 || digits > 15) return NaN;
  if (decimals > 0) mantissa /= POWERS[decimals] ?? NaN;
  return negative ? -mantissa : mantissa;
}

const SUFFIX = /\s*(?:°\s*[CFK]?|º\s*[CFK]|℃|℉|\u00c2°[CF]|deg\s?[CF]|[CFK]|mV|%|k?W|V|A)$/;
const GROUPED_BY_COMMA = /^[+-]?\d{1,3}(?:[,\u00a0\u202f\u2009 '’]\d{3})+(?:\.\d+)?$/;
const GROUPED_BY_POINT = /^[+-]?\d{1,3}(?:[.\u00a0\u202f\u2009 '’]\d{3})+(?:,\d+)?$/;
const WITH_POINT = /^[+-]?(?:\d+\.?\d*|\.\d+)(?:[eE][+-]?\d{1,3})?$/;
const WITH_COMMA = /^[+-]?(?:\d+,?\d*|,\d+)(?:[eE][+-]?\d{1,3})?$/;

/**
 * Any number that loggers write: thousands separators (by the decimal mark they go with), an exponent, a true minus sign, the
 * unit behind it. NaN for anything else.
 */
export function looseNumber(text: string, decimal: '.' | ','): number {
  const bare = text
    .trim()
    .replace(SUFFIX, '')
    .replace(/^[−–]/, '-')
    .replace(/^([+-])\s+/, '$1');
  if (decimal === '.') {
    if (WITH_POINT.test(bare)) return Number(bare);
    return GROUPED_BY_COMMA.test(bare) ? Number(bare.replace(/[,\u00a0\u202f\u2009 '’]/g, '')) : NaN;
  }
  if (WITH_COMMA.test(bare)) return Number(bare.replace(',', '.'));
  if (GROUPED_BY_POINT.test(bare))
    return Number(bare.replace(/[.\u00a0\u202f\u2009 '’]/g, '').replace(',', '.'));
  return NaN;
}

/** The unit that a value carries behind its digits (`23.4 °C`), or an empty string. */
export function unitSuffix(text: string): string {
  const found = SUFFIX.exec(text.trim());
  return found && /\d\s*$/.test(text.trim().slice(0, found.index)) ? found[0].trim() : '';
}

const OPEN =
  /^[+-]?\s*(?:1?\.?o\.?l\.?|open\b.*|.*\bopen|over.*|ovr.*|ovf.*|burn.?out|b\.?out|.*bruch.*|.*\bbreak.*|s\.?br|h{3,}|l{3,}|.*rupture.*|ouvert.*|abiert.*|apert.*|disconnected|no tc|unplugged)$/i;
const BLANK_MARKER =
  /^(?:[-–—_.*?x/\\]+|\(?[+-]?nan\)?|n\.?[/.]?a\.?n?\.?|#n\/?[av]!?|#wert!|#value!|null|none|nil|na|n\/d|missing|[+-]?inf(?:inity)?|[+-]?∞|fehlt|leer|vide|vacío|err(?:or)?\.?|fehler|fault|invalid|bad|off|aus)$/i;

/** Which of VALUE_CODES a cell without a number has, by its trimmed text. */
export function markerCode(trimmed: string): number {
  if (trimmed === '') return VALUE_CODES.empty;
  return OPEN.test(trimmed) ? VALUE_CODES.open : VALUE_CODES.text;
}

/** Whether a cell's text is one of the usual ways of writing that there is no value. */
export function isMarker(trimmed: string): boolean {
  return trimmed === '' || OPEN.test(trimmed) || BLANK_MARKER.test(trimmed);
}

/** Digits behind the decimal mark as written, 0 for a whole number, −1 if it is no plain number. */
export function writtenDecimals(trimmed: string, decimal: '.' | ','): number {
  const found = /^[+-]?\d*(?:[.,](\d*))?$/.exec(trimmed);
  if (!found || !/\d/.test(trimmed)) return -1;
  return trimmed.includes(decimal) ? (found[1]?.length ?? 0) : 0;
}
