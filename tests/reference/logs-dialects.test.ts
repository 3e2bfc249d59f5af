import { describe, expect, it } from 'vitest';
import type { LogQuestion, Mapping, ReadReport } from '~/lib/logs/schema';
import {
  caseBytes,
  caseJson,
  localToUtcMs,
  logCases,
  readLog,
  type ReadOptions,
} from '../helpers/logs-reading';

interface Moment {
  at?: string;
  local?: string;
  clock?: string;
  elapsedS?: number;
  index?: number;
}
interface ExpectedChannel {
  name: string;
  quantity: string;
  unit: string;
  samples: number;
  missing: number;
  firstC: number | null;
  lastC: number | null;
  minC: number | null;
  maxC: number | null;
  toleranceC?: number;
}
interface Expected {
  id: string;
  title: string;
  answer?: string;
  questions?: string[];
  answers?: Record<string, string | number>;
  mapping?: Mapping;
  rows: number;
  acceptedRows: number;
  rejectedRows: number;
  rejected: { line: number }[];
  first: Moment;
  last: Moment;
  spanS: number;
  dialect: { encoding: string; delimiter: string; decimal: string; headerLine: number };
  channels: ExpectedChannel[];
  alternatives?: Partial<Expected>[];
}

/** The labels' names of what is asked, by the fields of the questions. */
const TOPIC: Record<LogQuestion['field'], string> = {
  dateOrder: 'date-order',
  unit: 'unit',
  interval: 'interval',
  timeZone: 'time-zone',
  timeColumn: 'time-column',
  controlColumn: 'column',
  thermocouple: 'thermocouple',
  date: 'date',
};

const ZONES = ['Europe/London', 'America/Chicago', 'Australia/Adelaide'];
const answersOf = (expected: Expected): Record<string, string | number> =>
  Object.assign(
    {},
    expected.answers,
    ...(expected.alternatives ?? []).map((other) => other.answers ?? {}),
  ) as Record<string, string | number>;

/** Reads as a person would: what is asked is answered from the labels; says what was asked. */
function readAnswering(
  expected: Expected,
  bytes: Uint8Array,
  options: ReadOptions,
): { report: ReadReport | null; asked: string[] } {
  let mapping: Mapping = { ...expected.mapping };
  const asked: string[] = [];
  for (let round = 0; round < 3; round++) {
    const { reading } = readLog(bytes, { ...options, mapping });
    if (reading.ok) return { report: reading.report, asked };
    if (!('questions' in reading)) return { report: null, asked };
    for (const question of reading.questions) {
      const topic = TOPIC[question.field];
      asked.push(topic);
      mapping = { ...mapping, [question.field]: answersOf(expected)[topic] ?? question.guess };
    }
  }
  return { report: null, asked };
}

function differences(report: ReadReport, expected: Expected, zone: string): string[] {
  const out: string[] = [];
  const check = (what: string, got: unknown, want: unknown): void => {
    if (JSON.stringify(got) !== JSON.stringify(want))
      out.push(`${what}: ${JSON.stringify(got)} for ${JSON.stringify(want)}`);
  };
  check('rows', report.rows, expected.rows);
  check('accepted', report.acceptedRows, expected.acceptedRows);
  check(
    'rejected',
    report.rejected.map(({ line }) => line),
    expected.rejected.map(({ line }) => line),
  );
  check('sum', report.acceptedRows + report.rejectedRows, report.rows);
  for (const [key, value] of Object.entries(expected.dialect))
    check(key, report.dialect[key as 'encoding'], value);
  const wanted = expected.channels.filter(({ quantity }) => quantity !== 'text');
  check(
    'channels',
    report.channels.map(({ name }) => name),
    wanted.map(({ name }) => name),
  );
  wanted.forEach((want, i) => {
    const got = report.channels[i];
    check(`${want.name} quantity`, got?.quantity, want.quantity);
    check(`${want.name} unit`, got?.unit, want.unit);
    check(`${want.name} samples`, [got?.samples, got?.missing], [want.samples, want.missing]);
    for (const field of ['firstC', 'lastC', 'minC', 'maxC'] as const) {
      const value = want[field];
      const own = got?.[field] ?? null;
      const near =
        value === null ? own === null : own !== null && Math.abs(own - value) <= (want.toleranceC ?? 0.001);
      if (!near) out.push(`${want.name} ${field}: ${own} for ${value}`);
    }
  });
  const [firstMs, lastMs] = [Date.parse(report.firstAt ?? ''), Date.parse(report.lastAt ?? '')];
  if (!(Math.abs((lastMs - firstMs) / 1000 - expected.spanS) < 0.01))
    out.push(`span ${(lastMs - firstMs) / 1000} for ${expected.spanS}`);
  for (const [ms, want] of [[firstMs, expected.first] as const, [lastMs, expected.last] as const]) {
    if (want.at) check('instant', ms, Date.parse(want.at));
    if (want.local)
      check('local', new Date(ms).toISOString(), new Date(localToUtcMs(want.local, zone)).toISOString());
  }
  return out;
}

describe.each(ZONES)('labelled dialects, studio in %s', (zone) => {
  it.each(logCases('expected.json'))('%s is read as it was written', (name) => {
    const expected = caseJson(name, 'expected.json') as Expected;
    const bytes = caseBytes(name, 'input.csv');
    const options: ReadOptions = { studioTimeZone: zone, plannedStartMs: Date.UTC(2026, 1, 14, 7) };
    const { report, asked } = readAnswering(expected, bytes, options);
    if (expected.answer === '4xx') {
      expect(report).toBeNull();
      return;
    }
    expect(asked).toEqual(expected.questions ?? []);
    if (!report) throw new Error('not read');
    const readings = [expected, ...(expected.alternatives ?? []).map((other) => ({ ...expected, ...other }))];
    const best = readings
      .map((reading) => differences(report, reading, zone))
      .sort((a, b) => a.length - b.length)[0];
    expect(best).toEqual([]);
  });

  it.each(logCases('expected.json'))('%s is read the same however the upload is cut', (name) => {
    const expected = caseJson(name, 'expected.json') as Expected;
    const bytes = caseBytes(name, 'input.csv');
    const options: ReadOptions = {
      studioTimeZone: zone,
      ...(expected.mapping ? { mapping: expected.mapping } : {}),
    };
    const whole = readLog(bytes, options);
    for (const pieceBytes of [1, 7, 64, 1000])
      expect(readLog(bytes, { ...options, pieceBytes })).toEqual(whole);
  });
});
