import { describe, expect, it } from 'vitest';
import { readLog, readText, reportOf, type ReadOptions } from '../helpers/logs-reading';

const ROWS = 60;
const range = (count: number): number[] => Array.from({ length: count }, (_, i) => i);
const pad = (value: number, width = 2): string => String(value).padStart(width, '0');
const clock = (s: number): string =>
  `${pad(Math.floor(s / 3600) % 24)}:${pad(Math.floor(s / 60) % 60)}:${pad(s % 60)}`;
/** Row i of every table here: 07:00 on 14 February 2026 and 30 s for each row; 20.5 °C and 2.3 °C for each row. */
const at = (i: number): string => clock(25_200 + 30 * i);
const tempC = (i: number): string => (20.5 + 2.3 * i).toFixed(1);
const comma = (text: string): string => text.replace('.', ',');
const table = (header: string, row: (i: number) => string): string =>
  `${header}${range(ROWS).map(row).join('\n')}\n`;

const FIRST = '2026-02-14T07:00:00.000Z';
const LAST = '2026-02-14T07:29:30.000Z';
const CASES: [name: string, text: string, options?: ReadOptions][] = [
  [
    'a first line that names the separator',
    table('sep=;\nZeit;T °C\n', (i) => `14.02.2026 ${at(i)};${comma(tempC(i))}`),
  ],
  ['no header', table('', (i) => `2026-02-14 ${at(i)},${tempC(i)}`)],
  ['names that are numbers', table('time,1\n', (i) => `2026-02-14T${at(i)}Z,${tempC(i)}`)],
  ['a commented header', table('# kiln 3\n#time,T °C\n', (i) => `2026-02-14T${at(i)}Z,${tempC(i)}`)],
  ['a month in words', table('time,T °C\n', (i) => `14-Feb-2026 ${at(i)},${tempC(i)}`)],
  ['a month in French', table('date;four °C\n', (i) => `14 févr. 2026 ${at(i)};${tempC(i)}`)],
  ['a quoted American date', table('time,T °C\n', (i) => `"Feb 14, 2026 ${at(i)}",${tempC(i)}`)],
  ['compact ISO', table('time,T °C\n', (i) => `20260214T${at(i).replaceAll(':', '')},${tempC(i)}`)],
  [
    'compact date and time apart',
    table('date,time,T °C\n', (i) => `20260214,${at(i).replaceAll(':', '')},${tempC(i)}`),
  ],
  [
    'a clock with points',
    table('Zeit;T °C\n', (i) => `14.02.2026 ${at(i).replaceAll(':', '.')};${comma(tempC(i))}`),
  ],
  ['years of two digits', table('Zeit;T °C\n', (i) => `14.02.26 ${at(i)};${comma(tempC(i))}`)],
  ['the time before the date', table('time;T °C\n', (i) => `${at(i)} 14.02.2026;${tempC(i)}`)],
  ['a zone in letters', table('time,T °C\n', (i) => `2026-02-14 ${clock(28_800 + 30 * i)} CET,${tempC(i)}`)],
  [
    'UTC in the name of the column',
    table('Time (UTC),T °C\n', (i) => `2026-02-14 ${at(i)},${tempC(i)}`),
    { studioTimeZone: 'America/Chicago' },
  ],
  [
    'an offset in the name of the column',
    table('Time (UTC+2),T °C\n', (i) => `2026-02-14 ${clock(32_400 + 30 * i)},${tempC(i)}`),
    { studioTimeZone: 'America/Chicago' },
  ],
  ['epoch in ms', table('ts;Ofen\n', (i) => `${1_771_052_400_000 + 30_000 * i};${comma(tempC(i))}`)],
  [
    'spreadsheet days with a comma',
    table('Datum;T °C\n', (i) => `${comma((46_067.29166667 + i / 2880).toFixed(8))};${comma(tempC(i))}`),
  ],
  ['elapsed h:mm:ss', table('Laufzeit;T °C\n', (i) => `${clock(30 * i)};${comma(tempC(i))}`)],
  ['elapsed m:ss', table('mm:ss,T °C\n', (i) => `${Math.floor(i / 2)}:${i % 2 ? '30' : '00'},${tempC(i)}`)],
  ['elapsed hours', table('t [h],T [°C]\n', (i) => `${(i / 120).toFixed(6)},${tempC(i)}`)],
  [
    'a start that stays the same beside a counter',
    table('start,elapsed_s,T °C\n', (i) => `2026-02-14 07:00:00,${30 * i},${tempC(i)}`),
  ],
  [
    'a date in the first row only',
    table('Datum;Zeit;T °C\n', (i) => `${i === 0 ? '14.02.2026' : ''};${at(i)};${comma(tempC(i))}`),
  ],
  [
    'decimal commas between commas, with names',
    table('time,T °C\n', (i) => `2026-02-14 ${at(i)},${comma(tempC(i))}`),
  ],
  ['decimal commas between commas, without', table('', (i) => `2026-02-14 ${at(i)},${comma(tempC(i))}`)],
  ['the unit behind each value', table('time,oven\n', (i) => `2026-02-14T${at(i)}Z,${tempC(i)} °C`)],
  [
    'the unit in its own column',
    table('Time\tTemperature\tUnit\n', (i) => `2026-02-14 ${at(i)}\t${tempC(i)}\tC`),
  ],
  [
    'the unit above the table',
    table('Einheit: °C\nZeit;Kanal 1\n', (i) => `14.02.2026 ${at(i)};${comma(tempC(i))}`),
  ],
  [
    'names and bracketed units',
    table('time;temperature\n[UTC];[°C]\n', (i) => `2026-02-14 ${at(i)};${tempC(i)}`),
  ],
  [
    'a type K column that says (K)',
    table('time,Thermocouple (K)\n', (i) => `2026-02-14T${at(i)}Z,${tempC(i)}`),
  ],
  ['kelvin', table('time,T (K)\n', (i) => `2026-02-14T${at(i)}Z,${(Number(tempC(i)) + 273.15).toFixed(2)}`)],
  [
    'a quotation mark that is an inch',
    table('time,T °C,probe\n', (i) => `2026-02-14T${at(i)}Z,${tempC(i)},6" probe`),
  ],
  [
    'line ends of an old computer',
    table('time,T °C\n', (i) => `2026-02-14T${at(i)}Z,${tempC(i)}`).replaceAll('\n', '\r'),
  ],
  [
    'newest first',
    `time,T °C\n${range(ROWS)
      .reverse()
      .map((i) => `2026-02-14T${at(i)}Z,${tempC(i)}`)
      .join('\n')}\n`,
  ],
];

describe('dialects beyond the labelled ones', () => {
  it.each(CASES)('%s', (_, text, options) => {
    const { reading, rows } = readText(text, {
      studioTimeZone: 'Europe/London',
      plannedStartMs: Date.parse(FIRST),
      ...options,
    });
    const report = reportOf(reading);
    expect(report).toMatchObject({
      rows: ROWS,
      acceptedRows: ROWS,
      rejected: [],
      firstAt: FIRST,
      lastAt: LAST,
      controlChannel: 0,
    });
    const [channel] = report.channels;
    expect(channel).toMatchObject({ quantity: 'temperature', role: 'chamber', samples: ROWS, missing: 0 });
    expect(channel?.firstC).toBeCloseTo(20.5, 6);
    expect(channel?.lastC).toBeCloseTo(156.2, 6);
    expect(rows.timeMs).toEqual(range(ROWS).map((i) => Date.parse(FIRST) + 30_000 * i));
  });

  it.each([true, false])('UTF-16 without a byte-order mark (little endian: %s)', (little) => {
    const text = table('time\tT °C\n', (i) => `2026-02-14T${at(i)}Z\t${tempC(i)}`);
    const bytes = new Uint8Array(text.length * 2);
    const view = new DataView(bytes.buffer);
    range(text.length).forEach((i) => view.setUint16(2 * i, text.charCodeAt(i), little));
    expect(reportOf(readLog(bytes).reading)).toMatchObject({ acceptedRows: ROWS, lastAt: LAST });
  });

  it('thousands by point, space and apostrophe, each with its decimal mark', () => {
    for (const [mark, decimal] of [
      ['.', ','],
      ['\u00a0', ','],
      ["'", '.'],
      [',', '.'],
    ] as const) {
      const text = table('Zeit;T °F\n', (i) => {
        const [whole = '', rest = ''] = (900 + 7.35 * i).toFixed(1).split('.');
        return `14.02.2026 ${at(i)};${whole.length > 3 ? `${whole[0]}${mark}${whole.slice(1)}` : whole}${decimal}${rest}`;
      });
      const { rows } = readText(text);
      expect(rows.values[0]).toEqual(range(ROWS).map((i) => Number((900 + 7.35 * i).toFixed(1))));
    }
  });

  it('setpoint, power, humidity and current are told from the kiln’s temperature', () => {
    const text = table(
      'time,SP,PV,Power kW,Current A,Humidity %,Raumtemperatur\n',
      (i) => `2026-02-14T${at(i)}Z,${Number(tempC(i)) + 5},${tempC(i)},2.5,11,45,21.0`,
    );
    const report = reportOf(readText(text).reading);
    expect(report.channels.map(({ quantity, role }) => `${quantity} ${role}`)).toEqual([
      'temperature other',
      'temperature chamber',
      'power other',
      'other other',
      'other other',
      'temperature room',
    ]);
    expect(report.controlChannel).toBe(1);
  });

  it('markers leave the row accepted, the value missing and the marker told', () => {
    const text = table(
      'time,TC1\n',
      (i) => `2026-02-14T${at(i)}Z,${i === 10 || i === 11 ? 'OL' : i === 20 ? '---' : tempC(i)}`,
    );
    const { reading, rows } = readText(text);
    expect(reportOf(reading).channels[0]).toMatchObject({
      samples: 57,
      missing: 3,
      markers: [
        { text: 'OL', count: 2, kind: 'open' },
        { text: '---', count: 1, kind: 'missing' },
      ],
    });
    expect([rows.codes[0]?.[10], rows.codes[0]?.[20], rows.codes[0]?.[30]]).toEqual([2, 3, 0]);
  });

  it('footers, notes and blank readings are rejected by line, nothing in silence', () => {
    const text = `${table('time;A °C\n', (i) => (i === 9 ? ';' : `2026-02-14 ${at(i)};${comma(tempC(i))}`))}\nMittelwert;300,5\nEnde\n`;
    expect(reportOf(readText(text).reading)).toMatchObject({
      rows: 62,
      acceptedRows: 59,
      rejected: [
        { line: 11, reason: 'no time in column 1' },
        { line: 63, reason: "not a time in column 1: 'Mittelwert'" },
        { line: 64, reason: '1 column where 2 were expected' },
      ],
    });
  });
});
