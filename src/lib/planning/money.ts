/** An amount of money: a decimal string and the ISO 4217 code of its currency. */
export interface Money {
  amount: string;
  currency: string;
}

/** A decimal number held exactly: `units` × 10^−`scale`. */
export interface Decimal {
  units: bigint;
  scale: number;
}

/** ISO 4217: currencies whose smallest coin is not a hundredth (of those in use that have none, or thousandths). */
const OTHER_DIGITS: Readonly<Record<string, number>> = {
  BIF: 0,
  CLP: 0,
  DJF: 0,
  GNF: 0,
  ISK: 0,
  JPY: 0,
  KMF: 0,
  KRW: 0,
  PYG: 0,
  RWF: 0,
  UGX: 0,
  VND: 0,
  VUV: 0,
  XAF: 0,
  XOF: 0,
  XPF: 0,
  BHD: 3,
  IQD: 3,
  JOD: 3,
  KWD: 3,
  LYD: 3,
  OMR: 3,
  TND: 3,
};

/** Decimal places in which a currency is paid. */
export const minorDigits = (currency: string): number =>
  Object.hasOwn(OTHER_DIGITS, currency) ? (OTHER_DIGITS[currency] ?? 2) : 2;

const DECIMAL = /^(-?)(\d+)(?:\.(\d+))?$/;

/** Reads a decimal string exactly. @throws RangeError if it is none */
export function decimal(text: string): Decimal {
  const match = DECIMAL.exec(text);
  if (match === null) throw new RangeError(`not a decimal number: ${text}`);
  const [, sign = '', whole = '0', fraction = ''] = match;
  const units = BigInt(whole + fraction);
  return { units: sign === '-' ? -units : units, scale: fraction.length };
}

/** Quantities are metered to a millionth: finer than any meter, and exact from there on. */
const QUANTITY_SCALE = 6;

/** A measured quantity as a decimal, to a millionth. @throws RangeError if it is not finite */
export function quantity(value: number): Decimal {
  if (!Number.isFinite(value)) throw new RangeError(`not a quantity: ${value}`);
  return { units: BigInt(Math.round(value * 10 ** QUANTITY_SCALE)), scale: QUANTITY_SCALE };
}

export const multiply = (a: Decimal, b: Decimal): Decimal => ({
  units: a.units * b.units,
  scale: a.scale + b.scale,
});

export function add(a: Decimal, b: Decimal): Decimal {
  const scale = Math.max(a.scale, b.scale);
  return { units: scaled(a, scale) + scaled(b, scale), scale };
}

const scaled = ({ units, scale }: Decimal, to: number): bigint => units * 10n ** BigInt(to - scale);

export const ZERO: Decimal = { units: 0n, scale: 0 };

/** Rounds to a number of decimal places, halves away from zero as shops do. */
export function rounded(value: Decimal, scale: number): Decimal {
  if (value.scale <= scale) return { units: scaled(value, scale), scale };
  const divisor = 10n ** BigInt(value.scale - scale);
  const size = value.units < 0n ? -value.units : value.units;
  const up = (size + divisor / 2n) / divisor;
  return { units: value.units < 0n ? -up : up, scale };
}

export function toText({ units, scale }: Decimal): string {
  const digits = (units < 0n ? -units : units).toString().padStart(scale + 1, '0');
  const whole = digits.slice(0, digits.length - scale);
  const sign = units < 0n ? '-' : '';
  return scale === 0 ? sign + whole : `${sign}${whole}.${digits.slice(-scale)}`;
}

/** Money of a decimal, rounded to what the currency is paid in. */
export const money = (value: Decimal, currency: string): Money => ({
  amount: toText(rounded(value, minorDigits(currency))),
  currency,
});

/**
 * Shares an amount out by weights so that the shares add up to it exactly: each gets its part rounded down, what is
 * left goes coin by coin to those that lost most by the rounding.
 *
 * @param total amount to share
 * @param weights one per share, not negative; all zero: shared evenly
 */
export function shareOut({ amount, currency }: Money, weights: readonly number[]): Money[] {
  if (weights.length === 0) return [];
  const { units, scale } = decimal(amount);
  const even = weights.every((weight) => !(weight > 0));
  const shares = weights.map((weight) => (even ? 1n : quantity(Math.max(0, weight)).units));
  const whole = shares.reduce((sum, share) => sum + share, 0n);
  if (whole === 0n)
    return shareOut(
      { amount, currency },
      weights.map(() => 0),
    );
  const sign = units < 0n ? -1n : 1n;
  const parts = shares.map((share, index) => {
    const product = units * sign * share;
    return { index, units: product / whole, rest: product % whole };
  });
  let left = units * sign - parts.reduce((sum, part) => sum + part.units, 0n);
  for (const part of [...parts].sort((a, b) =>
    a.rest === b.rest ? a.index - b.index : a.rest > b.rest ? -1 : 1,
  )) {
    if (left === 0n) break;
    part.units += 1n;
    left -= 1n;
  }
  return parts.map((part) => ({ amount: toText({ units: part.units * sign, scale }), currency }));
}
