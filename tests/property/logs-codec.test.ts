import { deflateRawSync } from 'node:zlib';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { decodeBlock, encodeBlock } from '~/lib/logs/codec';
import { ZoomBuilder } from '~/lib/logs/zoom';

const anyNumber = fc.oneof(
  fc.double(),
  fc.constant(Number.NaN),
  fc.integer({ min: -2000, max: 20000 }).map((tenths) => tenths / 10),
  fc.integer({ min: -99999, max: 999999 }).map((thousandths) => thousandths / 1000),
);
const block = fc.integer({ min: 0, max: 200 }).chain((rows) =>
  fc.record({
    timeMs: fc.array(fc.oneof(fc.integer({ min: 0, max: 2e12 }), fc.double({ noNaN: true })), {
      minLength: rows,
      maxLength: rows,
    }),
    columns: fc.array(fc.array(anyNumber, { minLength: rows, maxLength: rows }), { maxLength: 4 }),
  }),
);

describe('the codec of sample chunks', () => {
  it('gives back every number bit for bit, missing values included', () => {
    fc.assert(
      fc.property(block, ({ timeMs, columns }) => {
        const back = decodeBlock(
          encodeBlock(
            Float64Array.from(timeMs),
            columns.map((column) => Float64Array.from(column)),
          ),
        );
        const same = (a: number, b: number) => Object.is(a, b) || (Number.isNaN(a) && Number.isNaN(b));
        expect([...back.timeMs].every((value, row) => same(value, timeMs[row] as number))).toBe(true);
        back.columns.forEach((column, index) =>
          expect([...column].every((value, row) => same(value, columns[index]?.[row] as number))).toBe(true),
        );
        expect(back.columns.length).toBe(columns.length);
      }),
      { numRuns: 300 },
    );
  });

  it('refuses bytes that break off', () => {
    const bytes = encodeBlock(Float64Array.of(1, 2, 3), [Float64Array.of(20.1, 20.2, Number.NaN)]);
    for (let cut = 0; cut < bytes.length; cut++)
      expect(() => decodeBlock(bytes.subarray(0, cut))).toThrow(RangeError);
  });

  it('stores a sample of a jittering clock in under four bytes', () => {
    // Definition of the bar: one sample is one value of one channel; the clock jitters by ±20 % of its interval.
    let state = 1;
    const random = () => (state = (Math.imul(state, 1664525) + 1013904223) >>> 0) / 2 ** 32;
    const rows = 4096;
    const timeMs = Float64Array.from({ length: rows }, (_, row) =>
      Math.round(1000 * (row + 0.4 * (random() - 0.5))),
    );
    const column = () =>
      Float64Array.from(
        { length: rows },
        (_, row) => Math.round(10 * (20 + row / 20 + 1.2 * (random() - 0.5))) / 10,
      );
    const bytes = deflateRawSync(encodeBlock(timeMs, [column(), column()])).length;
    expect(bytes / (2 * rows)).toBeLessThan(4);
  });
});

describe('zoom levels', () => {
  it('keep the extremes of whatever they condense', () => {
    fc.assert(
      fc.property(
        fc.array(fc.double({ min: -50, max: 1400, noNaN: true }), { minLength: 1, maxLength: 300 }),
        fc.integer({ min: 1, max: 40 }),
        (values, group) => {
          const builder = new ZoomBuilder(group);
          const column = Float64Array.from(values);
          builder.add({
            rows: values.length,
            timeMs: Float64Array.from(values, (_, row) => row),
            values: [column],
            codes: [null],
          });
          const rows = builder.takeAll();
          expect(Math.min(...(rows.min[0] ?? []))).toBe(Math.min(...values));
          expect(Math.max(...(rows.max[0] ?? []))).toBe(Math.max(...values));
          expect(rows.timeMs.length).toBe(Math.ceil(values.length / group));
        },
      ),
    );
  });
});
