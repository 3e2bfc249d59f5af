import { cellKind, headRows, isDataLike, shapeOf, type CellKind, type HeadRow, type RowShape } from './cells';
import { decimalPairs, joinHeadRow, type DecimalPairs } from './decimal-pairs';
import { unitCell } from './header-words';
import { DELIMITERS, type Delimiter } from './schema';

/** Where a file's table stands and what is written over it. */
export interface Layout {
  delimiter: Delimiter;
  /** Physical line of the header, null without one. */
  headerLine: number | null;
  /** Last physical line before the rows: of the header, the units row, or whatever precedes a table without header. */
  lastHeadLine: number;
  headerCells: string[];
  /** The cells of the units row, empty without one. */
  unitCells: string[];
  /** Cells of a usual row. */
  width: number;
  /** Rows of readings among the first ones, and what stood before the header. */
  dataRows: HeadRow[];
  /** Set where decimal commas were split like delimiters. */
  pairs: DecimalPairs | null;
  preamble: HeadRow[];
}

interface Examined {
  row: HeadRow;
  shape: RowShape;
  data: boolean;
}

const SCORED_CHARS = 65_536;
const SCORED_ROWS = 400;
const KIND_ROWS = 100;

/** Finds the table in the first text of a file, or null if there is none. */
export function findLayout(text: string, whole: boolean): Layout | null {
  const delimiter = bestDelimiter(text, whole);
  if (!delimiter) return null;
  const split = examine(headRows(text, delimiter, whole));
  const splitWidth = usualWidth(split);
  if (splitWidth === 0) return null;
  const pairs = delimiter === ',' ? decimalPairs(split, splitWidth) : null;
  const rows = pairs ? examine(split.map(({ row }) => joinHeadRow(row, pairs))) : split;
  const width = pairs ? (splitWidth + pairs.from) / 2 : splitWidth;
  const header = findHeader(rows, width);
  const first = header === null ? firstDataRow(rows, width) : header + 1;
  const unitsAt = header !== null && isUnitsRow(rows[first]) ? first : null;
  const from = unitsAt === null ? first : unitsAt + 1;
  const lastHead = header === null ? rows[first - 1] : rows[from - 1];
  return {
    delimiter,
    headerLine: header === null ? null : (rows[header]?.row.line ?? null),
    lastHeadLine: lastHead?.row.line ?? 0,
    headerCells: header === null ? [] : cleanHeader(rows[header]?.row.cells ?? []),
    unitCells: unitsAt === null ? [] : (rows[unitsAt]?.row.cells ?? []),
    width,
    pairs,
    dataRows: rows.slice(from).flatMap(({ row, data }) => (data ? [row] : [])),
    preamble: rows.slice(0, header ?? first).map(({ row }) => row),
  };
}

function examine(rows: HeadRow[]): Examined[] {
  return rows.map((row) => {
    const shape = shapeOf(row);
    return { row, shape, data: isDataLike(shape) };
  });
}

/**
 * The delimiter under which most rows are rows of readings with one and the same number of cells, most of them understood. A
 * decimal comma under a comma delimiter shows as a header with half as many cells as its rows.
 */
function bestDelimiter(text: string, whole: boolean): Delimiter | null {
  const sample = text.slice(0, SCORED_CHARS);
  let best: { delimiter: Delimiter; score: number } | null = null;
  for (const delimiter of DELIMITERS) {
    if (delimiter !== ',' && !sample.includes(delimiter)) continue;
    const rows = examine(
      headRows(sample, delimiter, whole && sample.length === text.length).slice(0, SCORED_ROWS),
    );
    const width = usualWidth(rows);
    if (width === 0) continue;
    let score = 0;
    for (const { shape, data } of rows) {
      if (data && shape.cells === width) score += 1 - shape.texts / shape.cells;
    }
    score /= rows.length;
    const header = findHeader(rows, width) ?? findHeader(rows, 1);
    const headerCells = header === null ? width : (rows[header]?.row.cells.length ?? width);
    if (width > 1 && headerCells * 2 === width) score *= 0.5;
    if (width > 1) score *= 1.2;
    if (!best || score > best.score * 1.0001) best = { delimiter, score };
  }
  return best && best.score > 0 ? best.delimiter : null;
}

/** The number of cells that most rows of readings have; the larger on a tie; 0 if no row is one. */
function usualWidth(rows: Examined[]): number {
  const counts = new Map<number, number>();
  for (const { shape, data } of rows) if (data) counts.set(shape.cells, (counts.get(shape.cells) ?? 0) + 1);
  let width = 0;
  for (const [cells, count] of counts) {
    const most = counts.get(width) ?? 0;
    if (count > most || (count === most && cells > width)) width = cells;
  }
  return width;
}

/** Rows of readings under a later header, by those under the first, that make the first a table of its own. */
const MUCH_MORE = 4;

/**
 * Index of the header: a row of words as wide as the table, right above rows of readings (a units row may lie between), the first
 * such, unless many more rows follow a later one. A repetition of itself further down does not end them.
 */
function findHeader(rows: Examined[], width: number): number | null {
  const kinds = columnKinds(rows, width);
  let best: number | null = null;
  let bestCount = 0;
  let count = 0;
  let candidate: number | null = null;
  const settle = (): void => {
    if (candidate !== null && count > MUCH_MORE * bestCount) {
      best = candidate;
      bestCount = count;
    }
  };
  rows.forEach((examined, i) => {
    const unitsOfCandidate = candidate === i - 1 && isUnitsRow(examined);
    // names may be numbers, but among rows of readings such a row is one of them that is damaged
    const named =
      candidate === null && count === 0
        ? isHeaderLike({ ...examined, data: false }, width, kinds)
        : isHeaderLike(examined, width, kinds);
    if (!unitsOfCandidate && named && followedByData(rows, i, width)) {
      const same = candidate !== null && rows[candidate]?.row.cells.join() === examined.row.cells.join();
      if (!same) {
        settle();
        candidate = i;
        count = 0;
      }
    } else if (examined.data && Math.abs(examined.shape.cells - width) <= 1) count++;
  });
  settle();
  return best;
}

/**
 * A row that has a name, and no number or time, in the column that tells the time (or the first that holds numbers), and some name in
 * every other column of numbers. A first cell may be without.
 */
function isHeaderLike({ shape, row, data }: Examined, width: number, kinds: (CellKind | null)[]): boolean {
  if (data || shape.times > 0 || shape.texts === 0 || Math.abs(shape.cells - width) > 1) return false;
  const times = kinds.indexOf('time');
  const leading = times >= 0 ? times : kinds.indexOf('number');
  const nameless = kinds.some((kind, i) => kind !== null && i > 0 && (row.cells[i] ?? '') === '');
  const first = row.cells[leading] ?? '';
  return !nameless && (first === '' ? leading === 0 : cellKind(first) !== 'number');
}

/** What most rows of readings hold in each column: numbers or times; null for words and columns that are mostly empty. */
function columnKinds(rows: Examined[], width: number): (CellKind | null)[] {
  const sample = rows.filter(({ data, shape }) => data && shape.cells === width).slice(0, KIND_ROWS);
  return Array.from({ length: width }, (_, i) => {
    const kinds = sample.map(({ row }) => cellKind(row.cells[i] ?? ''));
    const most = (kind: CellKind): boolean =>
      kinds.filter((found) => found === kind).length * 2 > kinds.length;
    return most('time') ? 'time' : most('number') ? 'number' : null;
  });
}

function followedByData(rows: Examined[], at: number, width: number): boolean {
  const next = rows[at + 1];
  if (!next) return false;
  if (next.data && Math.abs(next.shape.cells - width) <= 1) return true;
  const afterUnits = rows[at + 2];
  return isUnitsRow(next) && afterUnits !== undefined && afterUnits.data;
}

/** Every cell is a unit or nothing, and at least one is a unit. */
function isUnitsRow(examined: Examined | undefined): boolean {
  if (!examined) return false;
  const units = examined.row.cells.map(unitCell);
  return units.every((unit) => unit !== null) && units.some((unit) => unit?.temperature ?? unit?.other);
}

/** In a table without header: the first row of readings that most of the next rows follow in kind. */
function firstDataRow(rows: Examined[], width: number): number {
  const fits = ({ data, shape }: Examined): boolean => data && shape.cells === width;
  const index = rows.findIndex((examined, i) => {
    if (!fits(examined)) return false;
    const next = rows.slice(i, i + 10);
    return next.filter(fits).length >= 0.8 * next.length;
  });
  return Math.max(0, index);
}

function cleanHeader(cells: string[]): string[] {
  return cells.map((cell, i) => (i === 0 ? cell.replace(/^[#;%/]+\s*/, '') : cell).replace(/\s+/g, ' '));
}
