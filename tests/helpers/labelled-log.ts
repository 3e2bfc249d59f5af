import { readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import type { ReviewChannel } from '~/lib/review/types';

/** A label of a simulated firing: what a review has to find. */
export interface Label {
  kind: string;
  segment?: number;
  startS: number;
  endS: number;
  peakC?: number;
  alt?: [number, number][];
  point?: boolean;
  excludedByName?: boolean;
}

export interface Truth {
  id: string;
  clean: boolean;
  profile: {
    startC: number;
    segments: { stage: string; toC: number; rateCPerH: number | string; holdS: number }[];
  };
  controller: 'wait' | 'clock';
  sampling: { unit: 'C' | 'F' };
  runStart: { local: string; zone: string };
  dateOrder: 'dmy' | 'mdy';
  startOffsetS: number;
  clockErrorS: number;
  controlChannel: string;
  channels: { name: string; role: string; unit: string | null }[];
  segments: { startS: number; arrivedS: number; endS: number }[];
  findings: Label[];
  secondary: Label[];
  nearMisses: (Omit<Label, 'kind'> & { like: string })[];
}

const FOLDER = new URL('../../fixtures/logs/', import.meta.url);

/** Names of the labelled firings among the fixtures. */
export function labelledCases(folder: string | URL = FOLDER): string[] {
  return readdirSync(folder)
    .filter((name) => /^p\d\d-/.test(name))
    .sort();
}

export function readTruth(name: string, folder: string | URL = FOLDER): Truth {
  return JSON.parse(readFileSync(join(asPath(folder), name, 'truth.json'), 'utf8')) as Truth;
}

const asPath = (folder: string | URL) => (typeof folder === 'string' ? folder : folder.pathname);

/** Instants in ms; a time of day without zone is taken as UTC. */
function timeOf(text: string, order: 'dmy' | 'mdy'): number {
  const iso = /^(\d{4}-\d\d-\d\d)[ T](\d\d:\d\d:\d\d)(Z|[+-]\d\d:\d\d)?$/.exec(text);
  if (iso) return Date.parse(`${iso[1]}T${iso[2]}${iso[3] ?? 'Z'}`);
  const local = /^(\d+)[./](\d+)[./](\d{4})[ ;,]+(\d+):(\d\d):(\d\d)(?: (AM|PM))?$/.exec(text);
  if (local) {
    const [day, month] =
      order === 'mdy' ? [Number(local[2]), Number(local[1])] : [Number(local[1]), Number(local[2])];
    const hour = local[7] ? (Number(local[4]) % 12) + (local[7] === 'PM' ? 12 : 0) : Number(local[4]);
    return Date.UTC(Number(local[3]), month - 1, day, hour, Number(local[5]), Number(local[6]));
  }
  const clock = /^(\d+):(\d\d):(\d\d)$/.exec(text);
  if (clock) return (Number(clock[1]) * 3600 + Number(clock[2]) * 60 + Number(clock[3])) * 1000;
  return Number(text) * 1000;
}

/**
 * Reads the log of a labelled firing with the label's help. It is a reader for these files only: what any file says about
 * itself is the business of the product's own reader, which is tested apart.
 */
export function readLabelledLog(name: string, folder: string | URL = FOLDER) {
  const truth = readTruth(name, folder);
  const bytes = readFileSync(join(asPath(folder), name, 'log.csv'));
  const utf8 = new TextDecoder('utf-8').decode(bytes);
  const text = utf8.includes('\ufffd') ? new TextDecoder('windows-1252').decode(bytes) : utf8;
  const lines = text.replace(/^\ufeff/, '').split(/\r?\n/);
  const delimiter = [';', '\t', '|', ','].find((mark) =>
    lines.some((line) => line.split(mark).includes(truth.controlChannel)),
  );
  if (delimiter === undefined) throw new Error(`no header in ${name}`);
  const headerAt = lines.findIndex((line) => line.split(delimiter).includes(truth.controlChannel));
  const header = (lines[headerAt] ?? '').split(delimiter);
  const timeColumns = header.length > 1 && /uhrzeit|^time of day$/i.test(header[1] ?? '') ? 2 : 1;
  const number = (cell: string) => (/^-?[\d.,]+$/.test(cell) ? Number(cell.replace(',', '.')) : Number.NaN);
  const timeMs: number[] = [];
  const cells: string[][] = [];
  for (const line of lines.slice(headerAt + 1)) {
    const parts = line.split(delimiter);
    const at = timeOf(parts.slice(0, timeColumns).join(' ').trim(), truth.dateOrder);
    if (parts.length < header.length || !Number.isFinite(at) || (parts[0] ?? '') === '') continue;
    timeMs.push(at);
    cells.push(parts);
  }
  const channels: ReviewChannel[] = [];
  header.forEach((title, column) => {
    const label = truth.channels.find((channel) => channel.name === title);
    if (!label || label.role === 'text') return;
    const value = Float64Array.from(cells, (row) => number(row[column] ?? ''));
    if (label.unit === 'F') value.forEach((v, i) => (value[i] = ((v - 32) * 5) / 9));
    channels.push({
      id: title,
      name: title,
      role:
        label.role === 'second'
          ? 'chamber'
          : label.role === 'power'
            ? 'other'
            : (label.role as ReviewChannel['role']),
      quantity: label.role === 'power' ? 'power' : 'temperature',
      timeMs: Float64Array.from(timeMs),
      value,
      openIndexes: cells.flatMap((row, i) => (Number.isNaN(number(row[column] ?? '')) ? [i] : [])),
    });
  });
  return { truth, channels };
}
