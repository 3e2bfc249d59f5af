import { isMarker, looseNumber } from './numbers';
import { cellOf, RowSplitter } from './splitter';
import { readStamp } from './stamp';

/** A row of the head of a file, as texts. */
export interface HeadRow {
  cells: string[];
  line: number;
  /** Whether a line end closes it; the last line without one may be cut off. */
  terminated: boolean;
}

export type CellKind = 'empty' | 'number' | 'time' | 'marker' | 'text';

/** What a cell is, before its column is known. */
export function cellKind(cell: string): CellKind {
  if (cell === '') return 'empty';
  if (readStamp(cell)) return 'time';
  if (!Number.isNaN(looseNumber(cell, '.')) || !Number.isNaN(looseNumber(cell, ','))) return 'number';
  return isMarker(cell) ? 'marker' : 'text';
}

/** Non-blank rows of a text under a delimiter. `whole`: the text is not cut off behind its last line end. */
export function headRows(text: string, delimiter: string, whole: boolean): HeadRow[] {
  const rows: HeadRow[] = [];
  const splitter = new RowSplitter(delimiter, (row) => {
    const cells: string[] = [];
    for (let i = 0; i < row.count && i < row.starts.length; i++) cells.push(bare(cellOf(row, i)));
    if (cells.some((cell) => cell !== '')) rows.push({ cells, line: row.line, terminated: row.terminated });
  });
  splitter.push(text);
  if (whole) splitter.end();
  return rows;
}

/** A cell without quotation marks that stand around it after a space (`a, "b"`). */
export function bare(cell: string): string {
  return cell.length > 1 && cell.startsWith('"') && cell.endsWith('"') ? cell.slice(1, -1).trim() : cell;
}

export interface RowShape {
  numbers: number;
  times: number;
  gaps: number;
  texts: number;
  cells: number;
}

/** How many cells of a row are what; trailing empty cells count as gaps. */
export function shapeOf(row: HeadRow): RowShape {
  const shape: RowShape = { numbers: 0, times: 0, gaps: 0, texts: 0, cells: row.cells.length };
  for (const cell of row.cells) {
    const kind = cellKind(cell);
    if (kind === 'number') shape.numbers++;
    else if (kind === 'time') shape.times++;
    else if (kind === 'text') shape.texts++;
    else shape.gaps++;
  }
  return shape;
}

/** Whether a row can be one of readings: a time with something beside it, or more numbers than words. */
export function isDataLike(shape: RowShape): boolean {
  if (shape.times > 0) return shape.numbers > 0 || (shape.gaps > 0 && shape.texts <= 1);
  return shape.numbers > shape.texts;
}
