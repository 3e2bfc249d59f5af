/**
 * Reading a log against Papa Parse alone, in step mode, on the same text in the same process: 1,000,000 rows of three columns
 * (time, temperature, power), and the memory that reading takes at its highest, also for five times as many rows.
 * Run: npx tsx tests/bench/import-core.bench.ts [rows]
 */
import Papa from 'papaparse';
import { createLogReader } from '~/lib/logs/reader';
import { RowSplitter } from '~/lib/logs/splitter';

const PIECE_BYTES = 65_536;
const rows = Number(process.argv[2] ?? 1_000_000);

/** A kiln's log of a row a second: climbs, holds, with noise, as its logger would write it. */
function* logText(count: number): Generator<string> {
  yield 'time,chamber C,power %\n';
  const startMs = Date.UTC(2026, 1, 14, 7);
  let noise = 1;
  let lines = '';
  for (let i = 0; i < count; i++) {
    noise = (noise * 16_807) % 2_147_483_647;
    const tempC = 20 + 850 * Math.min(1, (i % 60_000) / 40_000) + (noise % 100) / 100;
    lines += `${new Date(startMs + i * 1000).toISOString().slice(0, 19)}Z,${tempC.toFixed(1)},${noise % 101}\n`;
    if (lines.length > PIECE_BYTES) {
      yield lines;
      lines = '';
    }
  }
  yield lines;
}

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

function* encoded(count: number): Generator<Uint8Array> {
  const encoder = new TextEncoder();
  for (const text of logText(count)) yield encoder.encode(text);
}

// memory first, from a stream that is made as it is read: nothing of the file is held but by the reader
const idle = process.memoryUsage().rss;
for (const count of [rows, 5 * rows]) {
  const { peakBytes } = read(encoded(count));
  console.log(
    `${count.toLocaleString('en')} rows: peak memory ${((peakBytes - idle) / 1e6).toFixed(0)} MB over idle`,
  );
}

const text = [...logText(rows)].join('');
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
