import fc from 'fast-check';

/** How a log is written down. */
export interface Dialect {
  encoding: 'utf-8' | 'utf-8-bom' | 'utf-16le' | 'utf-16be' | 'windows-1252';
  delimiter: ',' | ';' | '\t' | '|';
  decimal: '.' | ',';
  newline: '\n' | '\r\n';
  finalNewline: boolean;
  time:
    | 'iso-z'
    | 'iso-offset'
    | 'iso-local'
    | 'dmy-dots'
    | 'mdy-12h'
    | 'ymd-slash'
    | 'split'
    | 'epoch-s'
    | 'epoch-ms'
    | 'serial'
    | 'elapsed-s'
    | 'elapsed-min'
    | 'elapsed-hms';
  quoteAll: boolean;
  padding: boolean;
  preambleLines: number;
  unitsRow: boolean;
  missing: '' | 'NaN' | '---' | 'OL' | 'n/a';
  thousands: boolean;
  remark: boolean;
  unit: 'C' | 'F' | 'K';
}

export interface Series {
  startMs: number;
  stepS: number;
  /** Per channel and row, in the dialect's unit, of at most `decimals` decimals; NaN is missing. */
  values: number[][];
  decimals: number;
}

const pad = (value: number, width = 2): string => String(value).padStart(width, '0');

/** Dialects that this writer can write; a decimal comma never stands in comma-separated text without quotes. */
export const dialectArbitrary: fc.Arbitrary<Dialect> = fc
  .record({
    encoding: fc.constantFrom('utf-8', 'utf-8-bom', 'utf-16le', 'utf-16be', 'windows-1252'),
    delimiter: fc.constantFrom(',', ';', '\t', '|'),
    decimal: fc.constantFrom('.', ','),
    newline: fc.constantFrom('\n', '\r\n'),
    finalNewline: fc.boolean(),
    time: fc.constantFrom(
      'iso-z', 'iso-offset', 'iso-local', 'dmy-dots', 'mdy-12h', 'ymd-slash', 'split', 'epoch-s', 'epoch-ms', 'serial', 'elapsed-s', 'elapsed-min',
      'elapsed-hms',
    ), // prettier-ignore
    quoteAll: fc.boolean(),
    padding: fc.boolean(),
    preambleLines: fc.nat(6),
    unitsRow: fc.boolean(),
    missing: fc.constantFrom('', 'NaN', '---', 'OL', 'n/a'),
    thousands: fc.boolean(),
    remark: fc.boolean(),
    unit: fc.constantFrom('C', 'F', 'K'),
  } satisfies { [Key in keyof Dialect]: fc.Arbitrary<Dialect[Key]> })
  .map((dialect) => ({
    ...dialect,
    quoteAll: dialect.quoteAll || (dialect.delimiter === ',' && dialect.decimal === ','),
  }))
  .map((dialect) => ({
    ...dialect,
    // quoted cells stand flush: a space before a quotation mark makes it an ordinary character
    padding: dialect.padding && !dialect.quoteAll,
    thousands:
      dialect.thousands && !(dialect.delimiter === ',' && dialect.decimal === '.' && !dialect.quoteAll),
  }));

/** A climb from the room, a hold and a cooling, with noise and gaps, as whole steps of the last decimal. */
export const seriesArbitrary: fc.Arbitrary<Series> = fc
  .record({
    startMs: fc
      .integer({ min: Date.UTC(2015, 0, 1), max: Date.UTC(2035, 0, 1) })
      .map((ms) => Math.round(ms / 1000) * 1000),
    stepS: fc.constantFrom(1, 5, 10, 30, 60, 120),
    rows: fc.integer({ min: 30, max: 200 }),
    channels: fc.integer({ min: 1, max: 4 }),
    decimals: fc.integer({ min: 1, max: 2 }),
    peak: fc.integer({ min: 300, max: 1250 }),
    noise: fc.array(fc.integer({ min: -9, max: 9 }), { minLength: 1, maxLength: 20 }),
    gaps: fc.array(fc.nat(199), { maxLength: 6 }),
  })
  .map(({ startMs, stepS, rows, channels, decimals, peak, noise, gaps }) => {
    const scale = 10 ** decimals;
    const values = Array.from({ length: channels }, (_, channel) =>
      Array.from({ length: rows }, (__, row) => {
        if (gaps.includes(row) && row > 4 && row % channels === channel) return NaN;
        const shape = Math.min(1, row / (rows * 0.6));
        const value = 20 + (peak - 20) * shape + (noise[(row + channel) % noise.length] ?? 0) * 0.1;
        return Math.round(value * scale) / scale;
      }),
    );
    return { startMs, stepS, values, decimals };
  });

/** The file. Local times are written as UTC: read them with the studio in UTC. */
export function writeLog(series: Series, dialect: Dialect): Uint8Array {
  const { delimiter, newline } = dialect;
  const lines: string[] = [];
  for (let i = 0; i < dialect.preambleLines; i++)
    lines.push(['Bericht 7', '# made for a test', '', 'Größe: 3', 'channel list', '-----'][i] ?? '');
  const timeNames = dialect.time === 'split' ? ['Datum', 'Zeit'] : [timeName(dialect.time)];
  const sign = dialect.unit === 'K' ? 'K' : `°${dialect.unit}`;
  const names = series.values.map((_, i) => (dialect.unitsRow ? `TC${i + 1}` : `TC${i + 1} (${sign})`));
  lines.push(joined([...timeNames, ...names, ...(dialect.remark ? ['remark'] : [])], dialect));
  if (dialect.unitsRow) {
    const timeUnits = timeNames.map(() => '');
    lines.push(joined([...timeUnits, ...names.map(() => sign), ...(dialect.remark ? [''] : [])], dialect));
  }
  const rows = series.values[0]?.length ?? 0;
  for (let row = 0; row < rows; row++) {
    const numbers = series.values.map((column) => numberText(column[row] ?? NaN, series.decimals, dialect));
    const remark = dialect.remark ? [row % 7 === 3 ? 'door checked' : ''] : [];
    lines.push(joined([...timeTexts(series, row, dialect), ...numbers, ...remark], dialect));
  }
  // behind an empty last cell a file must close its line: without that nobody could tell it from one cut off there
  const openEnd =
    !dialect.finalNewline && delimiter !== '\t' && !(lines.at(-1) ?? '').endsWith(emptyEnd(dialect));
  const text = lines.join(newline) + (openEnd ? '' : newline);
  return encoded(text, dialect.encoding);
}

/** How a line ends whose last cell is empty. */
function emptyEnd({ delimiter, quoteAll, padding }: Dialect): string {
  if (quoteAll) return `${delimiter}""`;
  return padding ? `${delimiter}  ` : delimiter;
}

function timeName(time: Dialect['time']): string {
  if (time === 'elapsed-s') return 'elapsed_s';
  if (time === 'elapsed-min') return 'elapsed min';
  return time === 'elapsed-hms' ? 'elapsed' : 'time';
}

function joined(cells: string[], dialect: Dialect): string {
  const quoted = dialect.quoteAll ? cells.map((cell) => `"${cell}"`) : cells;
  return dialect.padding
    ? quoted.map((cell) => ` ${cell} `).join(dialect.delimiter)
    : quoted.join(dialect.delimiter);
}

function numberText(value: number, decimals: number, dialect: Dialect): string {
  if (Number.isNaN(value)) return dialect.missing;
  const [whole = '', rest = ''] = Math.abs(value).toFixed(decimals).split('.');
  const grouped =
    dialect.thousands && whole.length > 3
      ? `${whole.slice(0, -3)}${dialect.decimal === '.' ? ',' : '.'}${whole.slice(-3)}`
      : whole;
  return `${value < 0 ? '-' : ''}${grouped}${dialect.decimal}${rest}`;
}

function timeTexts(series: Series, row: number, dialect: Dialect): string[] {
  const elapsedS = row * series.stepS;
  const date = new Date(series.startMs + elapsedS * 1000);
  const iso = date.toISOString().slice(0, 19);
  const [day = '', clock = ''] = iso.split('T');
  const [year = '', month = '', monthDay = ''] = day.split('-');
  const mark = (text: string): string => (dialect.decimal === ',' ? text.replace('.', ',') : text);
  switch (dialect.time) {
    case 'iso-z':
      return [`${iso}Z`];
    case 'iso-offset':
      return [`${new Date(date.getTime() + 5_400_000).toISOString().slice(0, 19)}+01:30`];
    case 'iso-local':
      return [iso.replace('T', ' ')];
    case 'dmy-dots':
      return [`${monthDay}.${month}.${year} ${clock}`];
    case 'mdy-12h': {
      const hour = date.getUTCHours();
      return [
        `${Number(month)}/${Number(monthDay)}/${year} ${hour % 12 || 12}${clock.slice(2)} ${hour < 12 ? 'AM' : 'PM'}`,
      ];
    }
    case 'ymd-slash':
      return [`${year}/${month}/${monthDay} ${clock}`];
    case 'split':
      return [`${monthDay}.${month}.${year}`, clock];
    case 'epoch-s':
      return [String(date.getTime() / 1000)];
    case 'epoch-ms':
      return [String(date.getTime())];
    case 'serial':
      return [mark((date.getTime() / 86_400_000 + 25_569).toFixed(8))];
    case 'elapsed-s':
      return [String(elapsedS)];
    case 'elapsed-min':
      return [mark((elapsedS / 60).toFixed(4))];
    case 'elapsed-hms':
      return [`${Math.floor(elapsedS / 3600)}:${pad(Math.floor(elapsedS / 60) % 60)}:${pad(elapsedS % 60)}`];
  }
}

function encoded(text: string, encoding: Dialect['encoding']): Uint8Array {
  if (encoding === 'utf-8') return new TextEncoder().encode(text);
  if (encoding === 'utf-8-bom') return new TextEncoder().encode(`\uFEFF${text}`);
  if (encoding === 'windows-1252') return Uint8Array.from(text, (char) => char.charCodeAt(0));
  const units = `\uFEFF${text}`;
  const bytes = new Uint8Array(units.length * 2);
  const view = new DataView(bytes.buffer);
  for (let i = 0; i < units.length; i++) view.setUint16(2 * i, units.charCodeAt(i), encoding === 'utf-16le');
  return bytes;
}
