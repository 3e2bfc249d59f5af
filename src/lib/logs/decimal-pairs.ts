import { cellKind, type HeadRow, type RowShape } from './cells';
import type { RowView } from './splitter';

/** Rows whose numbers a comma delimiter has cut at their decimal commas: from cell `from` on, two cells are one number. */
export interface DecimalPairs {
  from: number;
  /** Cells of a row as split. */
  splitWidth: number;
}

interface Examined {
  row: HeadRow;
  shape: RowShape;
  data: boolean;
}

const FEWEST_ROWS = 20;
const FEWEST_VALUES = 5;

/**
 * Whether comma-separated rows hold decimal commas without quotation marks: the row of names above them has one cell for every two of
 * theirs, and the second of each two is digits alone. Without names, every second number must be of one and the same length and
 * take many values, as a digit behind a decimal mark does and no reading.
 */
export function decimalPairs(rows: readonly Examined[], width: number): DecimalPairs | null {
  const first = rows.findIndex(({ data }) => data);
  const sample = rows.filter(({ data, shape }) => data && shape.cells === width).slice(0, 200);
  const names = rows
    .slice(0, first)
    .reverse()
    .find(({ shape }) => shape.texts > 0 && shape.numbers === 0 && shape.times === 0);
  const named = names ? filledWidth(names.row.cells) : 0;
  const from = named > 1 || width === 2 ? 2 * named - width : timeCells(sample);
  const nameless = named <= 1 && width > 2;
  if (from < 0 || from >= width - 1 || (width - from) % 2 !== 0 || named >= width) return null;
  for (let i = from; i < width; i += 2) if (!isPair(sample, i, nameless)) return null;
  return { from, splitWidth: width };
}

function filledWidth(cells: readonly string[]): number {
  let count = cells.length;
  while (count > 0 && cells[count - 1] === '') count--;
  return count;
}

function timeCells(sample: readonly Examined[]): number {
  const cells = sample[0]?.row.cells ?? [];
  const count = cells.findIndex((cell) => cellKind(cell) !== 'time');
  return count < 0 ? cells.length : count;
}

function isPair(sample: readonly Examined[], index: number, nameless: boolean): boolean {
  const seconds = sample.map(({ row }) => row.cells[index + 1] ?? '');
  const whole =
    sample.every(({ row }) => /^[+-]?\d*$/.test(row.cells[index] ?? '')) &&
    seconds.every((cell) => /^\d*$/.test(cell));
  if (!whole || !nameless) return whole && seconds.some((cell) => cell !== '');
  const lengths = new Set(seconds.map((cell) => cell.length));
  return sample.length >= FEWEST_ROWS && lengths.size === 1 && new Set(seconds).size >= FEWEST_VALUES;
}

/** The row with its pairs made one again; rows of another width stay as they are. */
export function joinHeadRow(row: HeadRow, { from, splitWidth }: DecimalPairs): HeadRow {
  if (row.cells.length !== splitWidth) return row;
  const cells = row.cells.slice(0, from);
  for (let i = from; i < splitWidth; i += 2)
    cells.push([row.cells[i], row.cells[i + 1]].filter(Boolean).join(','));
  return { ...row, cells };
}

/** As `joinHeadRow`, in place: the comma still stands between the two cells in the text. */
export function joinPairs(row: RowView, { from, splitWidth }: DecimalPairs): RowView {
  if (row.count !== splitWidth) return row;
  let to = from;
  for (let i = from; i < splitWidth; i += 2) {
    const empty = row.starts[i + 1] === row.ends[i + 1];
    row.starts[to] = row.starts[i] ?? 0;
    row.ends[to] = (empty ? row.ends[i] : row.ends[i + 1]) ?? 0;
    to++;
  }
  row.count = to;
  return row;
}
