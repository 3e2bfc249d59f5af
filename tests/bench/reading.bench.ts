/**
 * Reading a log against Papa Parse alone, in step mode, on the same text in the same process: 1,000,000 rows of three columns
 * (time, temperature, power), and the memory that reading takes at its highest, also for five times as many rows.
 * Run: npx tsx tests/bench/reading.bench.ts [rows]
 */
import Papa from 'papaparse';

import { createLogReader } from '~/lib/logs/reader';
import { RowSplitter } from '~/lib/logs/splitter';
import { kilnLog, kilnLogBytes } from './kiln-log';

const PIECE_BYTES = 65_536;
const rows = Number(process.argv[2] ?? 1_000_000);

const median = (values: number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1] ?? NaN;

function timeMs(work: () => void): number {
  const start = process.hrtime.bigint();
  work();
  return Number(process.hrtime.bigint() - start) / 1e6;
}

function read(pieces: Iterable<Uint8Array>): { rows: number; peakBytes: number } {
  let peak = 0;
  const reader = createLogReader({
    studioTimeZone: 'Europe/London',
    sink: () => {
      peak = Math.max(peak, process.memoryUsage().rss);
    },
  });
  for (const piece of pieces) reader.push(piece);
  const reading = reader.end();
  if (!reading.ok) throw new Error(JSON.stringify(reading));
  return { rows: reading.report.acceptedRows, peakBytes: peak };
}

// memory first, from a stream that is made as it is read: nothing of the file is held but by the reader
const idle = process.memoryUsage().rss;
for (const count of [rows, 5 * rows]) {
  const { peakBytes } = read(kilnLogBytes({ rows: count, jitterShare: 0 }));
  console.log(
    `${count.toLocaleString('en')} rows: peak memory ${((peakBytes - idle) / 1e6).toFixed(0)} MB over idle`,
  );
}

const text = [...kilnLog({ rows, jitterShare: 0 })].join('');
const bytes = new TextEncoder().encode(text);
const pieces: Uint8Array[] = [];
for (let at = 0; at < bytes.length; at += PIECE_BYTES) pieces.push(bytes.subarray(at, at + PIECE_BYTES));
console.log(`${(bytes.length / 1e6).toFixed(1)} MB of text`);

const split = (way: 'either' | 'papa'): void => {
  const splitter = new RowSplitter(',', () => undefined, way);
  for (let at = 0; at < text.length; at += PIECE_BYTES) splitter.push(text.slice(at, at + PIECE_BYTES));
  splitter.end();
};
const works: [string, () => void][] = [
  ['Papa Parse in step mode, alone', () => void Papa.parse(text, { step: () => undefined })],
  ['rows split by Papa Parse, fed with pieces', () => split('papa')],
  ['rows split in place', () => split('either')],
  ['read: rows split, times and values to blocks (bar of the whole import: 2.00)', () => void read(pieces)],
];
const times = works.map(([, work]) => median([timeMs(work), timeMs(work), timeMs(work)]));
works.forEach(([name], i) => {
  const ms = times[i] ?? NaN;
  console.log(`${name}: ${ms.toFixed(0)} ms, ${(ms / (times[0] ?? NaN)).toFixed(2)} of Papa alone`);
});
