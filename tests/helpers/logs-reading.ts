import { readdirSync, readFileSync } from 'node:fs';
import { createLogReader } from '~/lib/logs/reader';
import type { Mapping, ReadReport } from '~/lib/logs/schema';
import type { LogBlock, LogReading } from '~/lib/logs/types';

export interface Rows {
  timeMs: number[];
  values: number[][];
  codes: number[][];
}

export interface ReadOptions {
  mapping?: Mapping;
  studioTimeZone?: string;
  plannedStartMs?: number;
  /** Bytes per push; all at once if absent. */
  pieceBytes?: number;
}

/** Reads a whole file in memory and gathers its rows. */
export function readLog(bytes: Uint8Array, options: ReadOptions = {}): { reading: LogReading; rows: Rows } {
  const { pieceBytes = bytes.length, ...rest } = options;
  const blocks: LogBlock[] = [];
  const reader = createLogReader({
    studioTimeZone: 'Europe/London',
    ...rest,
    sink: (block) => blocks.push(block),
  });
  for (let at = 0; at < bytes.length; at += pieceBytes) reader.push(bytes.subarray(at, at + pieceBytes));
  const reading = reader.end();
  if (!reading.ok && 'again' in reading) return readLog(bytes, { ...options, mapping: reading.again });
  return { reading, rows: rowsOf(blocks) };
}

export const readText = (text: string, options: ReadOptions = {}): ReturnType<typeof readLog> =>
  readLog(new TextEncoder().encode(text), options);

/** The report of a reading that must have gone well. */
export function reportOf(reading: LogReading): ReadReport {
  if (!reading.ok) throw new Error(`not read: ${JSON.stringify(reading)}`);
  return reading.report;
}

function rowsOf(blocks: LogBlock[]): Rows {
  const channels = blocks[0]?.values.length ?? 0;
  const rows: Rows = {
    timeMs: [],
    values: Array.from({ length: channels }, () => []),
    codes: Array.from({ length: channels }, () => []),
  };
  for (const block of blocks) {
    rows.timeMs.push(...block.timeMs);
    block.values.forEach((column, i) => rows.values[i]?.push(...column));
    block.codes.forEach((column, i) => rows.codes[i]?.push(...(column ?? new Uint8Array(block.rows))));
  }
  return rows;
}

const FOLDER = 'fixtures/logs';

/** Names of the cases that hold a file of that name. */
export function logCases(file: 'expected.json' | 'truth.json'): string[] {
  return readdirSync(FOLDER)
    .filter((name) => readdirSync(`${FOLDER}/${name}`).includes(file))
    .sort();
}

export const caseBytes = (name: string, file: string): Uint8Array =>
  new Uint8Array(readFileSync(`${FOLDER}/${name}/${file}`));
export const caseJson = (name: string, file: string): unknown =>
  JSON.parse(readFileSync(`${FOLDER}/${name}/${file}`, 'utf8'));

/** A wall-clock time as ISO text without zone, in a zone, as ms since 1970. */
export function localToUtcMs(local: string, zone: string): number {
  const naiveMs = Date.parse(`${local.replace(/Z$/, '')}Z`);
  const offset = (ms: number): number => {
    const text = new Intl.DateTimeFormat('sv-SE', {
      timeZone: zone,
      dateStyle: 'short',
      timeStyle: 'medium',
    }).format(new Date(ms));
    return Date.parse(`${text.replace(' ', 'T')}Z`) - Math.floor(ms / 1000) * 1000;
  };
  const guess = naiveMs - offset(naiveMs);
  return naiveMs - offset(guess);
}
