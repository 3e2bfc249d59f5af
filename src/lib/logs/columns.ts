import type { HeadRow } from './cells';
import { headerWords, unitCell, type HeaderWords } from './header-words';
import type { Layout } from './layout';
import { isMarker, looseNumber, unitSuffix, writtenDecimals } from './numbers';
import { readStamp, type Stamp } from './stamp';

/** One column of the first rows of readings, looked at whole. */
export interface Column {
  index: number;
  /** Unique among the columns. */
  name: string;
  words: HeaderWords;
  /** Unit in the units row, or behind the values. */
  unitText: string;
  numbers: number;
  empty: number;
  markers: number;
  texts: number;
  /** Whether any marker was more than an empty cell. */
  spokenMarkers: number;
  /** Numbers of the sampled rows, NaN where there is none. */
  values: number[];
  /** Dates and times of the sampled rows. */
  stamps: (Stamp | null)[];
  stampCount: number;
  /** Fewest and most digits behind the decimal mark. */
  minDecimals: number;
  maxDecimals: number;
  /** The only word in a column of words, such as the `F` of a column of units. */
  constantText: string | null;
}

export interface Columns {
  columns: Column[];
  decimal: '.' | ',';
  /** False while no number with a decimal mark was seen. */
  decimalKnown: boolean;
}

const SAMPLED_ROWS = 4000;

/** Looks at the first rows of readings column by column. */
export function examineColumns(layout: Layout): Columns {
  const sound = layout.dataRows.filter(({ terminated }) => terminated);
  const rows = sampleOf(sound.length > 0 ? sound : layout.dataRows);
  const { decimal, known } = decimalMark(rows, layout.delimiter);
  const names = columnNames(layout);
  const columns = names.map((name, index) => examineColumn(index, name, layout, rows, decimal));
  return { columns, decimal, decimalKnown: known };
}

/** The first half of what is sampled from the beginning in full, the rest spread over what follows. */
function sampleOf(rows: readonly HeadRow[]): HeadRow[] {
  if (rows.length <= SAMPLED_ROWS) return [...rows];
  const half = SAMPLED_ROWS / 2;
  const stride = (rows.length - half) / half;
  const spread = Array.from({ length: half }, (_, i) => rows[half + Math.floor(i * stride)]);
  return [...rows.slice(0, half), ...spread.flatMap((row) => (row ? [row] : []))];
}

function columnNames(layout: Layout): string[] {
  const used = new Map<string, number>();
  return Array.from({ length: Math.max(layout.width, layout.headerCells.length) }, (_, i) => {
    const given = (layout.headerCells[i] ?? '').slice(0, 200);
    const name = given === '' ? `column ${i + 1}` : given;
    const times = (used.get(name) ?? 0) + 1;
    used.set(name, times);
    return times === 1 ? name : `${name} (${times})`;
  });
}

function examineColumn(
  index: number,
  name: string,
  layout: Layout,
  rows: readonly HeadRow[],
  decimal: '.' | ',',
): Column {
  const words = headerWords(layout.headerCells[index] ?? '');
  const column: Column = {
    index,
    name,
    words,
    unitText: layout.unitCells[index] ?? '',
    numbers: 0,
    empty: 0,
    markers: 0,
    texts: 0,
    spokenMarkers: 0,
    values: [],
    stamps: [],
    stampCount: 0,
    minDecimals: Infinity,
    maxDecimals: 0,
    constantText: null,
  };
  const suffixes = new Map<string, number>();
  const texts = new Set<string>();
  for (const row of rows) addCell(column, row.cells[index] ?? '', decimal, suffixes, texts);
  const [suffix] = [...suffixes].sort((a, b) => b[1] - a[1]);
  if (column.unitText === '' && suffix && suffix[1] >= 0.8 * column.numbers) column.unitText = suffix[0];
  column.constantText = texts.size === 1 && column.numbers === 0 ? ([...texts][0] ?? null) : null;
  return column;
}

function addCell(
  column: Column,
  cell: string,
  decimal: '.' | ',',
  suffixes: Map<string, number>,
  texts: Set<string>,
): void {
  const value = cell === '' ? NaN : looseNumber(cell, decimal);
  const stamp = Number.isNaN(value) || /^\d{8}$|^\d{14}$/.test(cell) ? readStamp(cell) : null;
  column.values.push(value);
  column.stamps.push(stamp);
  if (stamp) column.stampCount++;
  if (!Number.isNaN(value)) {
    column.numbers++;
    const decimals = writtenDecimals(cell, decimal);
    if (decimals >= 0) {
      column.minDecimals = Math.min(column.minDecimals, decimals);
      column.maxDecimals = Math.max(column.maxDecimals, decimals);
    } else column.minDecimals = -1;
    const suffix = unitSuffix(cell);
    if (suffix) suffixes.set(suffix, (suffixes.get(suffix) ?? 0) + 1);
  } else if (cell === '') column.empty++;
  else if (stamp) return;
  else if (isMarker(cell)) {
    column.markers++;
    column.spokenMarkers++;
  } else {
    column.texts++;
    if (texts.size < 5) texts.add(cell);
  }
}

/**
 * The decimal mark. A comma or point with one, two, four or more digits behind it, or with a zero before it, can be nothing else;
 * with exactly three it may part thousands, and is the decimal mark only where whole numbers without it are rare.
 */
function decimalMark(rows: readonly HeadRow[], delimiter: string): { decimal: '.' | ','; known: boolean } {
  let comma = 0;
  let point = 0;
  let threes = 0;
  let commaThrees = 0;
  let whole = 0;
  for (const row of rows.slice(0, 1000)) {
    for (const cell of row.cells) {
      const text = cell.replace(/\s*(?:°?[CFK]|%|mV|k?W)$/, '');
      if (/^[+-]?\d+$/.test(text)) whole++;
      const found = /^[+-]?(\d{0,9})([.,])(\d+)$/.exec(text);
      if (/^[+-]?\d{1,3}(?:,\d{3})+\.\d+$/.test(text)) point += 5;
      if (/^[+-]?\d{1,3}(?:\.\d{3})+,\d+$/.test(text)) comma += 5;
      if (!found) continue;
      const [, before = '', mark, after = ''] = found;
      const sure = after.length !== 3 || before === '' || before === '0' || before.length > 3;
      if (sure && mark === ',') comma++;
      else if (sure) point++;
      else {
        threes++;
        if (mark === ',') commaThrees++;
      }
    }
  }
  if (comma !== point) return { decimal: comma > point ? ',' : '.', known: true };
  if (threes > 2 * whole) return { decimal: commaThrees * 2 > threes ? ',' : '.', known: true };
  if (threes > 0 && delimiter !== ';') return { decimal: commaThrees * 2 > threes ? '.' : '.', known: true };
  if (threes > 0) return { decimal: commaThrees * 2 > threes ? '.' : ',', known: true };
  return { decimal: '.', known: false };
}

/** The unit a column states, in its name, its units row or behind its values. */
export function statedUnit(column: Column): ReturnType<typeof unitCell> {
  const own = column.words.temperatureUnit;
  if (own) return { temperature: own, other: null };
  const below = column.unitText === '' ? null : unitCell(column.unitText);
  if (below && (below.temperature ?? below.other)) return below;
  return column.words.otherUnit ? { temperature: null, other: column.words.otherUnit } : null;
}

/** Whether a column holds readings: numbers, or nothing but gaps under a name that says a temperature would be measured. */
export function isReading(column: Column): boolean {
  if (column.numbers > 0) return column.numbers >= column.texts && column.stampCount < column.numbers;
  if (column.texts > 0 || column.stampCount > 0) return false;
  return (
    column.words.temperature ||
    column.words.temperatureUnit !== null ||
    statedUnit(column)?.temperature != null
  );
}
