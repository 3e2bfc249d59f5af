import { describe, expect, it } from 'vitest';
import { parseMapping, type LogQuestion } from '~/lib/logs/schema';
import { readText, reportOf, type ReadOptions } from '../helpers/logs-reading';

const range = (count: number): number[] => Array.from({ length: count }, (_, i) => i);
const clock = (s: number): string => new Date(s * 1000).toISOString().slice(11, 19);
/** 60 rows of a climb: a time text and a value text each. */
const table = (header: string, row: (i: number, tempC: number) => string): string =>
  `${header}\n${range(60)
    .map((i) => row(i, 20 + i * 10))
    .join('\n')}\n`;

function asked(text: string, options: ReadOptions = {}): LogQuestion[] {
  const { reading } = readText(text, options);
  return !reading.ok && 'questions' in reading ? reading.questions : [];
}
const fields = (text: string, options: ReadOptions = {}): string[] =>
  asked(text, options).map(({ field }) => field);

describe('what a file leaves open is asked', () => {
  it('the order of a date that both orders make a day of, with both days as examples', () => {
    const text = table('time,chamber °C', (i, tempC) => `03/04/2026 ${clock(36_000 + 30 * i)},${tempC}`);
    expect(asked(text, { plannedStartMs: Date.UTC(2026, 3, 3, 9) })).toEqual([
      {
        field: 'dateOrder',
        choices: [
          { value: 'dmy', example: '3 April 2026' },
          { value: 'mdy', example: '4 March 2026' },
        ],
        guess: 'dmy',
      },
    ]);
    const { reading } = readText(text, { mapping: { dateOrder: 'mdy' } });
    expect(reportOf(reading)).toMatchObject({
      firstAt: '2026-03-04T10:00:00.000Z',
      dialect: { time: 'MM/dd/yyyy HH:mm:ss' },
    });
  });

  it('not the order of a date that its midnight tells', () => {
    const text = table('time,chamber °C', (i, tempC) => {
      const s = 85_500 + 30 * i;
      return `${s < 86_400 ? '03/04/2026' : '04/04/2026'} ${clock(s)},${tempC}`;
    });
    expect(reportOf(readText(text).reading).lastAt).toBe('2026-04-03T23:14:30.000Z');
  });

  it('evidence far down in the file settles the order without a question', () => {
    const rows = range(40_000).map((i) => {
      const at = new Date(Date.UTC(2026, 3, 3, 9) + i * 4000).toISOString();
      return `${at.slice(8, 10)}/${at.slice(5, 7)}/${at.slice(0, 4)} ${at.slice(11, 19)},${(20 + i / 50).toFixed(1)}`;
    });
    const { reading } = readText(`time,chamber °C\n${rows.join('\n')}\n`, {
      plannedStartMs: Date.UTC(2026, 2, 4, 9),
      studioTimeZone: 'UTC',
    });
    expect(reportOf(reading)).toMatchObject({ firstAt: '2026-04-03T09:00:00.000Z', rejectedRows: 0 });
  });

  it('a single damaged date proves nothing', () => {
    const rows = range(60).map(
      (i) => `03/${i === 30 ? '14' : '04'}/2026 ${clock(36_000 + 30 * i)},${20 + i}`,
    );
    expect(fields(`time,chamber °C\n${rows.join('\n')}\n`)).toEqual(['dateOrder']);
  });

  it('the unit where several are possible, never where the room tells it', () => {
    const warm = (from: number, to: number): string =>
      table(
        'time,kiln',
        (i) => `2026-02-14T${clock(25_200 + 30 * i)}Z,${(from + ((to - from) * i) / 59).toFixed(1)}`,
      );
    expect(fields(warm(190, 900))).toEqual(['unit']);
    expect(asked(warm(68, 1300))[0]?.guess).toBe('F');
    expect(asked(warm(294, 1170))[0]).toMatchObject({
      guess: 'K',
      choices: [{ value: 'C' }, { value: 'F' }, { value: 'K' }],
    });
    expect(reportOf(readText(warm(21, 905)).reading).channels[0]).toMatchObject({ unit: 'C', maxC: 905 });
    expect(reportOf(readText(warm(70, 1650)).reading).channels[0]?.unit).toBe('F');
    expect(reportOf(readText(warm(190, 900), { mapping: { unit: 'K' } }).reading).channels[0]).toMatchObject({
      unit: 'K',
      max: 900,
      maxC: 626.85,
    });
  });

  it('the interval of a log without times, which then carries on from the planned start', () => {
    const text = table('chamber °C', (_, tempC) => String(tempC));
    expect(asked(text)).toEqual([{ field: 'interval', choices: [], guess: null }]);
    const plannedStartMs = Date.UTC(2026, 1, 14, 7);
    const { reading } = readText(text, { mapping: { interval: 10 }, plannedStartMs });
    expect(reportOf(reading)).toMatchObject({
      firstAt: '2026-02-14T07:00:00.000Z',
      lastAt: '2026-02-14T07:09:50.000Z',
    });
  });

  it('a counter whose unit neither name nor speed tells', () => {
    const text = table('elapsed,chamber °C', (i, tempC) => `${i * 30},${tempC}`);
    const [question] = asked(text);
    expect(question).toMatchObject({
      field: 'interval',
      choices: [{ value: 30 }, { value: 1800 }],
      guess: 30,
    });
    expect(reportOf(readText(text, { mapping: { interval: 1800 } }).reading).dialect.time).toBe(
      'elapsed min',
    );
  });

  it('which of two clocks, where they disagree, and not where one is the other in UTC', () => {
    const two = (names: string, offsetS: number): string =>
      table(
        `${names},chamber °C`,
        (i, tempC) =>
          `2026-02-14 ${clock(25_200 + 30 * i)},2026-02-14 ${clock(25_200 + offsetS + 30 * i)},${tempC}`,
      );
    expect(asked(two('logger time,receiver time', 437))[0]).toMatchObject({
      field: 'timeColumn',
      guess: 'logger time',
    });
    expect(fields(two('time utc,time local', 3600))).toEqual([]);
    const chosen = readText(two('logger time,receiver time', 437), {
      mapping: { timeColumn: 'receiver time' },
    });
    expect(reportOf(chosen.reading).firstAt).toBe('2026-02-14T07:07:17.000Z');
  });

  it('the type of a thermocouple that is logged in mV and not named', () => {
    const text = table(
      'time,kiln mV',
      (i) => `2026-02-14T${clock(25_200 + 30 * i)}Z,${(0.8 + i * 0.4).toFixed(3)}`,
    );
    expect(asked(text)[0]).toMatchObject({ field: 'thermocouple', guess: 'K' });
    const report = reportOf(readText(text, { mapping: { thermocouple: 'K' } }).reading);
    // type K by the table: 0.798 mV is 20 °C, 24.4 mV is 588 °C
    expect(report.channels[0]?.firstC).toBeCloseTo(20, 0);
    expect(report.channels[0]?.maxC).toBeCloseTo(588, 0);
    expect(report.channels[0]?.junction).toEqual({ tempC: 0 });
  });

  it('which of two nameless thermocouples leads the kiln, if they go far apart', () => {
    const text = table(
      'time,T1,T2',
      (i, tempC) => `2026-02-14T${clock(25_200 + 30 * i)}Z,${tempC},${(20 + i * 3).toFixed(1)}`,
    );
    expect(asked(text)[0]).toMatchObject({
      field: 'controlColumn',
      guess: 'T1',
      choices: [{ value: 'T1' }, { value: 'T2' }],
    });
    expect(reportOf(readText(text, { mapping: { controlColumn: 'T2' } }).reading).controlChannel).toBe(1);
  });

  it('the date of a log of clock times only without a run, and the zone only without a studio', () => {
    const text = table('time,chamber °C', (i, tempC) => `${clock(80_000 + 300 * i)},${tempC}`);
    expect(fields(text)).toEqual(['date']);
    expect(reportOf(readText(text, { mapping: { date: '2026-02-14' } }).reading).lastAt).toBe(
      '2026-02-15T03:08:20.000Z',
    );
    expect(reportOf(readText(text, { plannedStartMs: Date.UTC(2026, 1, 14, 22) }).reading).firstAt).toBe(
      '2026-02-14T22:13:20.000Z',
    );
    const local = table('time,chamber °C', (i, tempC) => `2026-02-14 ${clock(25_200 + 30 * i)},${tempC}`);
    expect(fields(local, { studioTimeZone: undefined })).toEqual(['timeZone']);
  });
});

describe('a mapping', () => {
  it('is JSON text or an object, by the names of the questions', () => {
    expect(parseMapping('{"dateOrder":"dmy","interval":"10","timeZone":"Europe/Berlin"}')).toEqual({
      ok: true,
      mapping: { dateOrder: 'dmy', interval: 10, timeZone: 'Europe/Berlin' },
    });
    expect(parseMapping(undefined)).toEqual({ ok: true, mapping: {} });
    expect(parseMapping('')).toEqual({ ok: true, mapping: {} });
  });

  it.each([
    '{',
    '[]',
    '"dmy"',
    '{"dateOrder":"dym"}',
    '{"interval":0}',
    '{"interval":1e999}',
    '{"timeZone":"Mars/Olympus"}',
    '{"unit":"R"}',
    '{"date":"2026-02-30"}',
    '{"speed":3}',
    '{"__proto__":{"unit":"C"},"constructor":1}',
  ])('%s is refused with the field named', (text) => {
    const parsed = parseMapping(text);
    expect(parsed.ok).toBe(false);
    expect(parsed.ok ? [] : parsed.issues.every(({ path }) => path.startsWith('mapping'))).toBe(true);
  });
});
