import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Mapping } from '~/lib/logs/schema';
import { caseBytes, logCases, readLog, type Rows } from '../helpers/logs-reading';
import {
  dialectArbitrary,
  seriesArbitrary,
  writeLog,
  type Dialect,
  type Series,
} from '../helpers/logs-writer';

const LONG = process.env['HOLDFAST_LONG'] ? 20 : 1;

/** What the file leaves open, answered as it was written. */
function answers(series: Series, dialect: Dialect): Mapping {
  return {
    ...(dialect.time === 'mdy-12h' ? { dateOrder: 'mdy' as const } : {}),
    controlColumn: 1,
    ...(series.values.length === 0 ? { unit: dialect.unit } : {}),
  };
}

const anchored = (dialect: Dialect): boolean => dialect.time.startsWith('elapsed');

function expectSame(rows: Rows, series: Series, dialect: Dialect, count: number): void {
  const times = Array.from({ length: count }, (_, row) => series.startMs + row * series.stepS * 1000);
  expect(rows.timeMs.length).toBe(count);
  const worst = Math.max(0, ...rows.timeMs.map((ms, i) => Math.abs(ms - (times[i] ?? NaN))));
  // minutes to four decimals are 6 ms
  expect(worst).toBeLessThanOrEqual(dialect.time === 'elapsed-min' ? 3.001 : 0);
  expect(rows.values).toEqual(series.values.map((column) => column.slice(0, count)));
}

describe('reading what was written', () => {
  it('gives back every time and value of a random series in a random dialect', () => {
    fc.assert(
      fc.property(
        seriesArbitrary,
        dialectArbitrary,
        fc.integer({ min: 40, max: 5000 }),
        (series, dialect, pieceBytes) => {
          const bytes = writeLog(series, dialect);
          const { reading, rows } = readLog(bytes, {
            studioTimeZone: 'UTC',
            plannedStartMs: anchored(dialect) ? series.startMs : series.startMs + 86_400_000,
            mapping: answers(series, dialect),
            pieceBytes,
          });
          if (!reading.ok) throw new Error(JSON.stringify(reading));
          expectSame(rows, series, dialect, series.values[0]?.length ?? 0);
          expect(reading.report.rejected).toEqual([]);
          expect(reading.report.dialect).toMatchObject({
            // without a single character beyond ASCII it is as good as UTF-8
            encoding:
              dialect.encoding === 'windows-1252' && bytes.every((byte) => byte < 128)
                ? 'utf-8'
                : dialect.encoding,
            delimiter: dialect.delimiter,
            decimal: dialect.decimal,
          });
          expect(reading.report.channels.map(({ unit }) => unit)).toEqual(
            series.values.map(() => dialect.unit),
          );
        },
      ),
      { numRuns: 120 * LONG },
    );
  });

  it('gives whole rows or a refusal wherever the file is cut off', () => {
    fc.assert(
      fc.property(
        seriesArbitrary,
        dialectArbitrary,
        fc.double({ min: 0, max: 1, noNaN: true }),
        (series, dialect, share) => {
          const bytes = writeLog(series, dialect);
          const cut = bytes.subarray(0, Math.floor(share * bytes.length));
          const { reading, rows } = readLog(cut, {
            studioTimeZone: 'UTC',
            plannedStartMs: series.startMs,
            mapping: { ...answers(series, dialect), unit: dialect.unit },
          });
          if (!reading.ok) return;
          expectSame(rows, series, dialect, rows.timeMs.length);
          expect(reading.report.rejectedRows).toBeLessThanOrEqual(1);
        },
      ),
      { numRuns: 120 * LONG },
    );
  });

  it('never crashes nor hangs on damaged files', () => {
    const originals = [
      ...logCases('expected.json').map((name) => caseBytes(name, 'input.csv')),
      caseBytes('p03-short-of-power', 'log.csv'),
    ];
    fc.assert(
      fc.property(
        fc.nat(originals.length - 1),
        fc.array(
          fc.record({
            at: fc.double({ min: 0, max: 1, noNaN: true }),
            kind: fc.nat(4),
            byte: fc.nat(255),
            length: fc.nat(200),
          }),
          {
            minLength: 1,
            maxLength: 12,
          },
        ),
        (which, damages) => {
          let bytes = originals[which] ?? new Uint8Array(0);
          for (const damage of damages) bytes = damaged(bytes, damage);
          const { reading } = readLog(bytes, { plannedStartMs: Date.UTC(2026, 1, 14) });
          if (!reading.ok) return;
          const { report } = reading;
          expect(report.rows).toBe(report.acceptedRows + report.rejectedRows);
          for (const channel of report.channels)
            expect(channel.samples + channel.missing).toBe(report.acceptedRows);
        },
      ),
      { numRuns: 500 * LONG },
    );
  });
});

function damaged(
  bytes: Uint8Array,
  { at, kind, byte, length }: { at: number; kind: number; byte: number; length: number },
): Uint8Array {
  const from = Math.floor(at * bytes.length);
  const before = bytes.subarray(0, from);
  const after = bytes.subarray(Math.min(bytes.length, from + length));
  switch (kind) {
    case 0: // a byte turned into another
      return Uint8Array.from(bytes, (value, i) => (i === from ? byte : value));
    case 1: // a stretch lost
      return Uint8Array.from([...before, ...after]);
    case 2: // a stretch twice
      return Uint8Array.from([...before, ...bytes.subarray(from, from + length), ...bytes.subarray(from)]);
    case 3: // a quotation mark that nothing closes
      return Uint8Array.from([...before, 0x22, ...bytes.subarray(from)]);
    default: // noise
      return Uint8Array.from([
        ...before,
        ...Array.from({ length: length % 20 }, (_, i) => (byte * (i + 7)) & 255),
        ...bytes.subarray(from),
      ]);
  }
}
