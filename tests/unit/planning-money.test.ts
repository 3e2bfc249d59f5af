import { describe, expect, it } from 'vitest';
import {
  add,
  decimal,
  minorDigits,
  money,
  multiply,
  quantity,
  rounded,
  shareOut,
  toText,
  ZERO,
} from '~/lib/planning/money';

describe('money', () => {
  it('adds a dime ten times to a whole, which floating point does not', () => {
    const sum = Array.from({ length: 10 }, () => decimal('0.1')).reduce(add, ZERO);
    expect(toText(rounded(sum, 2))).toBe('1.00');
  });

  it('multiplies a price by a quantity exactly', () => {
    expect(toText(multiply(decimal('0.3125'), quantity(40)))).toBe('12.5000000000');
    expect(money(multiply(decimal('0.3125'), quantity(39.68)), 'EUR')).toEqual({
      amount: '12.40',
      currency: 'EUR',
    });
  });

  it.each([
    ['1.005', 2, '1.01'],
    ['1.004999', 2, '1.00'],
    ['-1.005', 2, '-1.01'],
    ['0.5', 0, '1'],
    ['7', 3, '7.000'],
    ['0.05', 1, '0.1'],
  ])('rounds %s to %d places as a shop does', (text, scale, expected) => {
    expect(toText(rounded(decimal(text), scale))).toBe(expected);
  });

  it('is paid in the currency’s own coins', () => {
    expect(money(decimal('1234.567'), 'JPY').amount).toBe('1235');
    expect(money(decimal('1234.5675'), 'KWD').amount).toBe('1234.568');
    expect(minorDigits('EUR')).toBe(2);
    expect(minorDigits('constructor')).toBe(2);
  });

  it.each(['', '1e3', '1,5', 'NaN', '.5'])('does not take “%s” for a number', (text) => {
    expect(() => decimal(text)).toThrow(RangeError);
  });

  it('cannot be measured in NaN', () => {
    expect(() => quantity(Number.NaN)).toThrow(RangeError);
  });
});

describe('sharing out an amount', () => {
  const amounts = (amount: string, weights: number[]) =>
    shareOut({ amount, currency: 'EUR' }, weights).map((share) => share.amount);

  it('loses no cent', () => {
    expect(amounts('10.00', [1, 1, 1])).toEqual(['3.34', '3.33', '3.33']);
    expect(amounts('0.02', [1, 1, 1])).toEqual(['0.01', '0.01', '0.00']);
  });

  it('goes by weight', () => {
    expect(amounts('12.00', [3, 1, 2])).toEqual(['6.00', '2.00', '4.00']);
    expect(amounts('10.00', [0, 5])).toEqual(['0.00', '10.00']);
  });

  it('is even where nothing has a weight', () => {
    expect(amounts('1.00', [0, 0])).toEqual(['0.50', '0.50']);
    expect(amounts('1.00', [])).toEqual([]);
  });
});
