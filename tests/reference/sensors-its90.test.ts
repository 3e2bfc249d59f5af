import { readFileSync } from 'node:fs';
import { describe, expect, it } from 'vitest';
import { THERMOCOUPLE_TYPES, type ThermocoupleType } from '~/lib/logs/schema';
import { compensatedC, emfMv, inversePolynomialC, inverseRangeMv, temperatureC } from '~/lib/sensors/its90';
import { REFERENCE_FUNCTIONS } from '~/lib/sensors/its90-coefficients';

interface Published {
  types: Record<
    ThermocoupleType,
    {
      direct: { fromC: number; toC: number; c: string[]; exponential?: string[] }[];
      inverse: {
        fromC: number;
        toC: number;
        fromMv: number;
        toMv: number;
        errMinC: number;
        errMaxC: number;
        d: string[];
      }[];
    }
  >;
}
const published = JSON.parse(readFileSync('fixtures/references/its90.json', 'utf8')) as Published;
/** NIST SRD 60, all.tab: every 10 °C and the ends, to 0.001 mV. */
const table = readFileSync('fixtures/references/its90-table-10C.csv', 'utf8')
  .trim()
  .split('\n')
  .slice(1)
  .map((line) => {
    const [type, tempC, mv] = line.split(',');
    return { type: type as ThermocoupleType, tempC: Number(tempC), mv: Number(mv) };
  });

describe('ITS-90 reference functions', () => {
  it('hold every row of the published table to half its last digit', () => {
    expect(table).toHaveLength(1211);
    const wrong = table.filter((row) => !(Math.abs(emfMv(row.type, row.tempC) - row.mv) <= 0.0005 + 1e-9));
    expect(wrong).toEqual([]);
  });

  it.each(THERMOCOUPLE_TYPES)('type %s has the printed coefficients', (type) => {
    const ours = REFERENCE_FUNCTIONS[type];
    expect(ours.direct.map((range) => [...range.c])).toEqual(
      published.types[type].direct.map((range) => range.c.map(Number)),
    );
    expect(ours.direct.map((range) => range.exponential?.map(Number))).toEqual(
      published.types[type].direct.map((range) => range.exponential?.map(Number)),
    );
    published.types[type].inverse.forEach((range, i) => {
      const digits = range.d.map(Number);
      const own = ours.inverse[i]?.d ?? [];
      expect(digits.map((digit, power) => (own[power] ?? 0) - digit)).toEqual(digits.map(() => 0));
      expect([ours.inverse[i]?.fromMv, ours.inverse[i]?.toMv]).toEqual([range.fromMv, range.toMv]);
    });
  });

  it('turn the table round within the published error of the inverse and the rounding of the table', () => {
    const wrong: string[] = [];
    for (const row of table) {
      const range = published.types[row.type].inverse.filter(
        (r) => row.tempC >= r.fromC && row.tempC <= r.toC,
      );
      const { fromMv, toMv } = inverseRangeMv(row.type);
      if (range.length === 0 || row.mv < fromMv || row.mv > toMv) continue;
      const bound = Math.max(...range.map((r) => Math.max(-r.errMinC, r.errMaxC)));
      const slope = Math.abs(emfMv(row.type, row.tempC + 0.5) - emfMv(row.type, row.tempC - 0.5));
      const rounding = 0.0005 / (slope > 0 ? slope : 0.004);
      for (const found of [temperatureC(row.type, row.mv), inversePolynomialC(row.type, row.mv)]) {
        // NIST's bounds are rounded to their last digit: its own polynomial reaches 0.041 where 0.04 is printed
        if (!(Math.abs(found - row.tempC) <= bound + rounding + 0.001))
          wrong.push(`${row.type} ${row.tempC}: ${found}`);
      }
    }
    expect(wrong).toEqual([]);
  });

  it.each(THERMOCOUPLE_TYPES)('type %s: there and back is the same temperature', (type) => {
    const ranges = published.types[type].inverse;
    const fromC = ranges[0]?.fromC ?? NaN;
    const toC = ranges[ranges.length - 1]?.toC ?? NaN;
    for (let tempC = fromC + 0.1; tempC < toC - 0.1; tempC += 0.37) {
      const mv = emfMv(type, tempC);
      const { fromMv, toMv } = inverseRangeMv(type);
      if (mv < fromMv || mv > toMv) continue;
      expect(Math.abs(temperatureC(type, mv) - tempC)).toBeLessThan(1e-4);
    }
  });
});

describe('traps of the reference functions', () => {
  it('type B has its minimum near 21 °C, is zero again near 42 °C, and has no inverse below 250 °C', () => {
    expect(emfMv('B', 21)).toBeLessThan(emfMv('B', 15));
    expect(emfMv('B', 21)).toBeLessThan(emfMv('B', 27));
    expect(emfMv('B', 21)).toBeCloseTo(-0.0026, 4);
    expect(emfMv('B', 42)).toBeLessThan(0);
    expect(emfMv('B', 42.5)).toBeGreaterThan(0);
    expect(temperatureC('B', emfMv('B', 200))).toBeNaN();
    expect(temperatureC('B', emfMv('B', 260))).toBeCloseTo(260, 3);
  });

  it('types R and S take the tighter of two overlapping inverse ranges between 1064 and 1200 °C', () => {
    for (const type of ['R', 'S'] as const) {
      const tight = published.types[type].inverse[2];
      for (const tempC of [1070, 1100, 1150, 1190]) {
        const error = inversePolynomialC(type, emfMv(type, tempC)) - tempC;
        expect(Math.abs(error)).toBeLessThan(Math.max(-(tight?.errMinC ?? 0), tight?.errMaxC ?? 0) + 1e-4);
      }
    }
  });

  it('type K below zero: a flipped sign of c5, as in one public copy, would break the table by far', () => {
    const row = table.find((entry) => entry.type === 'K' && entry.tempC === -200);
    expect(row?.mv).toBe(-5.891);
    expect(emfMv('K', -200)).toBeCloseTo(-5.891, 3);
    const c5 = REFERENCE_FUNCTIONS.K.direct[0]?.c[5] ?? 0;
    expect(Math.abs(2 * c5 * (-200) ** 5)).toBeGreaterThan(0.1);
  });

  it('type K has its exponential from 0 °C up only', () => {
    expect(REFERENCE_FUNCTIONS.K.direct[0]?.exponential).toBeUndefined();
    expect(emfMv('K', 126.9686)).toBeCloseTo(5.206, 2);
    expect(emfMv('K', 130)).toBeCloseTo(5.328, 3);
  });

  it('gives nothing outside the ranges', () => {
    expect(emfMv('K', 1372.1)).toBeNaN();
    expect(emfMv('T', -271)).toBeNaN();
    expect(temperatureC('K', 54.9)).toBeNaN();
    expect(temperatureC('K', Number.NaN)).toBeNaN();
    expect(temperatureC('J', -8.2)).toBeNaN();
  });

  it('compensates the cold junction in emf: adding degrees would be wrong by degrees', () => {
    // by the table: type S at 1000 °C is 9.587 mV, at 30 °C 0.173 mV
    const mv = 9.587 - 0.173;
    expect(compensatedC('S', mv, 30)).toBeCloseTo(1000, 0);
    expect(Math.abs(temperatureC('S', mv) + 30 - 1000)).toBeGreaterThan(10);
  });
});
