import { formatNumber, parseNumber, THIN_SPACE } from '~/lib/units';

type Read = { readonly ok: true; readonly value: number } | { readonly ok: false; readonly issue: string };

/** Holds a reader to a range; `text` writes its ends in the issue. */
export const between =
  (parse: (typed: string) => Read, low: number, high: number, text: (value: number) => string) =>
  (typed: string): Read => {
    const found = parse(typed);
    if (!found.ok || (found.value >= low && found.value <= high)) return found;
    return { ok: false, issue: `This lies between ${text(low)} and ${text(high)}.` };
  };

export const percentText = (share: number): string =>
  `${formatNumber(share * 100, share * 100 < 10 && share > 0 ? 1 : 0)}${THIN_SPACE}%`;

/** "85 %", "85" or "0.85" would be 85 % and 0.85 %: a percentage is always taken as one. */
export function parsePercent(typed: string): Read {
  const found = parseNumber(typed.replace(/%\s*$/, ''));
  if (!found.ok) return found;
  if (found.value < 0 || found.value > 100) return { ok: false, issue: 'A share lies between 0 and 100 %.' };
  return { ok: true, value: found.value / 100 };
}

export function parseCount(typed: string): Read {
  const found = parseNumber(typed);
  if (!found.ok) return found;
  if (!Number.isInteger(found.value)) return { ok: false, issue: 'A whole number is expected.' };
  return found;
}

/** A figure of the materials table: four digits, powers of ten where it is very small or large. */
export function figureText(value: number): string {
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e6 || size < 1e-3) {
    const [digits = '', power = '0'] = value.toExponential(3).split('e');
    return `${String(Number(digits))}e${Number(power)}`;
  }
  return String(Number(value.toPrecision(4)));
}

/** Also takes powers of ten, `2e-14`, as the table writes them. */
export function parseFigure(typed: string): Read {
  const plain = typed.trim().replace('−', '-');
  if (/^[+-]?\d+(\.\d+)?e[+-]?\d+$/i.test(plain)) {
    const value = Number(plain);
    return Number.isFinite(value) && Math.abs(value) <= 1e9
      ? { ok: true, value }
      : { ok: false, issue: 'This number is too large.' };
  }
  return parseNumber(typed);
}
