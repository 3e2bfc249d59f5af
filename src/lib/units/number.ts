import { notUnderstood, type Parsed, plainText, understood } from './parsed';

const PLAIN = /^[+-]?(\d+\.?\d*|\.\d+)$/;
const SPACED = /^[+-]?\d{1,3}( \d{3})+([.,]\d+)?$/;
const COMMA_GROUPS_POINT = /^[+-]?\d{1,3}(,\d{3})+\.\d+$/;
const POINT_GROUPS_COMMA = /^[+-]?\d{1,3}(\.\d{3})+,\d+$/;
const COMMA = /^[+-]?(\d+,\d*|,\d+)$/;
const AMBIGUOUS = /^[+-]?[1-9]\d{0,2},\d{3}$/;

/**
 * Reads a number as people type it: decimal point or decimal comma, thousands set apart by spaces or by the other
 * mark. `1,250` could be either and is refused rather than guessed.
 */
export function parseNumber(text: string): Parsed {
  const plain = plainText(text);
  if (plain === '') return notUnderstood('Nothing entered: a number is expected.');
  if (AMBIGUOUS.test(plain))
    return notUnderstood(
      `“${plain}” can be read in two ways: write ${plain.replace(',', '')} or ${plain.replace(',', '.')}.`,
    );
  const normal = normalised(plain);
  if (normal === null) return notUnderstood(`“${plain}” is not a number.`);
  const value = Number(normal);
  return Number.isFinite(value) ? understood(value) : notUnderstood(`“${plain}” is too large.`);
}

function normalised(text: string): string | null {
  if (PLAIN.test(text)) return text;
  if (SPACED.test(text)) return text.replaceAll(' ', '').replace(',', '.');
  if (COMMA_GROUPS_POINT.test(text)) return text.replaceAll(',', '');
  if (POINT_GROUPS_COMMA.test(text)) return text.replaceAll('.', '').replace(',', '.');
  if (COMMA.test(text)) return text.replace(',', '.');
  return null;
}

/** Splits "12.5 kg" into its number and what follows; null if it does not begin with a number. */
export function numberAndRest(text: string): { number: Parsed; rest: string } | null {
  const match = /^([+-]?[\d.,](?:[\d.,]| (?=\d{3}(?!\d)))*)\s*(.*)$/.exec(plainText(text));
  if (match === null) return null;
  return { number: parseNumber(match[1] ?? ''), rest: (match[2] ?? '').trim() };
}
