import { describe, expect, it } from 'vitest';
import { readText, reportOf } from '../helpers/logs-reading';

const START_MS = Date.UTC(2026, 1, 14, 7);
const stamp = (ms: number): string => `${new Date(ms).toISOString().slice(0, 19)}Z`;
/** 0 to 9, the same for a row each time, without a period. */
const noise = (row: number): number => Math.floor(Math.abs(Math.sin(row * row + 1)) * 10_000) % 10;
/** A ramp of 300 °C/h from 20 to 870 °C and a hold, a row every 10 s, with a little noise. */
const tempC = (row: number): number => 20 + Math.min(850, row * (300 / 360)) + noise(row) * 0.1;
const line = (row: number, ms = START_MS + row * 10_000): string => `${stamp(ms)},${tempC(row).toFixed(1)}`;
const file = (lines: string[]): string => `time,chamber °C\n${lines.join('\n')}\n`;
const range = (from: number, to: number): number[] => Array.from({ length: to - from }, (_, i) => from + i);

/** All rows in time order, one every 10 s from the start, with the temperature that belongs to each. */
function expectWhole(text: string, count: number): ReturnType<typeof readText> {
  const result = readText(text);
  expect(result.rows.timeMs).toEqual(range(0, count).map((row) => START_MS + row * 10_000));
  expect(result.rows.values[0]).toEqual(range(0, count).map((row) => Number(tempC(row).toFixed(1))));
  return result;
}

describe('rows out of order', () => {
  it('a stretch that stands too early is put in its place; the clock was not set', () => {
    for (const [from, to] of [
      [400, 500],
      [4050, 4200],
      [9000, 9500],
    ] as const) {
      const rows = [...range(0, from), ...range(to, to + 60), ...range(from, to), ...range(to + 60, 10_000)];
      const { reading } = expectWhole(file(rows.map((row) => line(row))), 10_000);
      expect(reportOf(reading)).toMatchObject({ clockEvents: [], rejectedRows: 0, blockOrder: 'ascending' });
    }
  });

  it('single late rows are put in their place', () => {
    const rows = range(0, 9000);
    for (const at of [100, 2000, 4095, 4096, 8000]) {
      const [late = 0] = rows.splice(at, 1);
      rows.splice(at + 30, 0, late);
    }
    const { reading } = expectWhole(file(rows.map((row) => line(row))), 9000);
    expect(reportOf(reading).clockEvents).toEqual([]);
  });

  it('a file written newest first is read oldest first', () => {
    const { reading } = expectWhole(
      file(
        range(0, 9000)
          .reverse()
          .map((row) => line(row)),
      ),
      9000,
    );
    expect(reportOf(reading)).toMatchObject({ clockEvents: [], blockOrder: 'ascending', intervalS: 10 });
  });

  it('a long file written newest first comes in blocks that follow each other downwards', () => {
    const { reading, rows } = readText(
      file(
        range(0, 100_000)
          .reverse()
          .map((row) => line(row)),
      ),
    );
    expect(reportOf(reading)).toMatchObject({ blockOrder: 'descending', acceptedRows: 100_000 });
    expect(new Set(rows.timeMs).size).toBe(100_000);
    expect(reportOf(reading).firstAt).toBe(new Date(START_MS).toISOString());
    expect(reportOf(reading).channels[0]?.firstC).toBeCloseTo(tempC(0), 6);
  });

  it('a stretch exported twice is taken once, each second copy listed by its line', () => {
    const rows = [...range(0, 5000), ...range(4500, 6000)];
    const { reading } = expectWhole(file(rows.map((row) => line(row))), 6000);
    const report = reportOf(reading);
    expect(report).toMatchObject({ rows: 6500, acceptedRows: 6000, rejectedRows: 500, clockEvents: [] });
    expect(report.rejected[0]).toEqual({ line: 5002, reason: 'repeats line 4502' });
  });

  it('rows of the same second with other readings are no duplicates', () => {
    const lines = range(0, 100).flatMap((row) => [
      line(row),
      `${stamp(START_MS + row * 10_000)},${(tempC(row) + 0.5).toFixed(1)}`,
    ]);
    expect(reportOf(readText(file(lines)).reading)).toMatchObject({ acceptedRows: 200, rejectedRows: 0 });
  });

  it('a clock of whole minutes makes no duplicates of equal readings', () => {
    const lines = range(0, 120).map(
      (row) => `${new Date(START_MS + row * 10_000).toISOString().slice(0, 16)}Z,500`,
    );
    expect(reportOf(readText(file(lines)).reading)).toMatchObject({ acceptedRows: 120, rejectedRows: 0 });
  });
});

describe('a clock that was set back', () => {
  it.each([
    ['on the ramp', 600, 3600],
    ['on the ramp, by two minutes', 700, 120],
    ['in the hold', 2000, 3600],
    ['at the end of a block', 4095, 1800],
    ['at the beginning of a block', 4096, 1800],
    ['to a time before the log began', 900, 86_400],
  ])('%s: later times are corrected, and the step is told', (_, at, backS) => {
    const lines = range(0, 6000).map((row) =>
      line(row, START_MS + row * 10_000 - (row >= at ? backS * 1000 : 0)),
    );
    const { reading } = expectWhole(file(lines), 6000);
    expect(reportOf(reading).clockEvents).toEqual([
      { atMs: START_MS + at * 10_000, shiftS: backS, kind: 'backward' },
    ]);
  });

  it('a step of less than a minute is no clock event', () => {
    const lines = range(0, 600).map((row) => line(row, START_MS + row * 10_000 - (row >= 300 ? 50_000 : 0)));
    expect(reportOf(readText(file(lines)).reading).clockEvents).toEqual([]);
  });

  it('a counter that begins again goes on', () => {
    const counter = (unit: number): string =>
      `elapsed s,chamber °C\n${range(0, 3000)
        .map((row) => `${(row >= 1000 ? row - 1000 : row) * unit},${tempC(row).toFixed(1)}`)
        .join('\n')}\n`;
    const { reading, rows } = readText(counter(10), { plannedStartMs: START_MS });
    expect(reportOf(reading).clockEvents).toEqual([
      { atMs: START_MS + 10_000_000, shiftS: 10_000, kind: 'restart' },
    ]);
    expect(rows.timeMs).toEqual(range(0, 3000).map((row) => START_MS + row * 10_000));
  });

  it('the hour that comes twice is none', () => {
    const first = Date.UTC(2026, 9, 24, 22);
    const local = (ms: number): string => {
      const offsetMs = ms < Date.UTC(2026, 9, 25, 1) ? 7_200_000 : 3_600_000;
      return new Date(ms + offsetMs).toISOString().slice(0, 19).replace('T', ' ');
    };
    const lines = range(0, 2000).map((row) => `${local(first + row * 10_000)},${tempC(row).toFixed(1)}`);
    const { reading, rows } = readText(file(lines), { studioTimeZone: 'Europe/Berlin' });
    expect(reportOf(reading).clockEvents).toEqual([]);
    expect(rows.timeMs).toEqual(range(0, 2000).map((row) => first + row * 10_000));
  });
});
