import type { Column } from './columns';
import { bare } from './cells';
import type { Layout } from './layout';
import { Markers } from './markers';
import { isMarker, looseNumber, plainNumber, writtenDecimals } from './numbers';
import { emptyBlock, setCode, type RawBlock } from './raw-block';
import type { Rejects } from './rejects';
import { cellOf, type RowView } from './splitter';
import type { TimeReader } from './time-reader';
import { BLOCK_ROWS, VALUE_CODES } from './types';

export interface RowReaderOptions {
  layout: Layout;
  /** Columns that are channels, in the order of the file. */
  channels: Column[];
  timeColumns: number[];
  time: TimeReader;
  /** A log without times: a row without any number is no reading at all. */
  timeless: boolean;
  decimal: '.' | ',';
  decimalKnown: boolean;
  rejects: Rejects;
  emit: (block: RawBlock) => void;
}

/** Turns rows of cells into blocks of times and values, and rows that are none into entries of the list of rejects. */
export class RowReader {
  rows = 0;
  readonly markers: Markers[];
  decimal: '.' | ',';
  private decimalKnown: boolean;
  private block: RawBlock;
  private readonly indexes: Int32Array;
  private readonly fewestCells: number;
  private readonly mostCells: number;

  constructor(private readonly options: RowReaderOptions) {
    const { layout, channels, timeColumns } = options;
    this.indexes = Int32Array.from(channels, ({ index }) => index);
    this.markers = channels.map(() => new Markers());
    this.decimal = options.decimal;
    this.decimalKnown = options.decimalKnown;
    this.block = emptyBlock(channels.length);
    this.mostCells = Math.max(layout.width, layout.headerCells.length);
    this.fewestCells = fewestCells(layout, Math.max(...timeColumns, ...this.indexes) + 1, timeColumns);
  }

  /** Takes a row of the file; rows above the table and blank ones are none. */
  take(row: RowView): void {
    if (row.line <= this.options.layout.lastHeadLine) return;
    if (row.count === 1 && row.starts[0] === row.ends[0]) return;
    const index = this.rows++;
    const ms = this.shapeFits(row) ? this.options.time.read(row, index) : NaN;
    if (Number.isNaN(ms)) {
      this.options.rejects.add(row.line, this.complaint(row));
      return;
    }
    const { block } = this;
    const at = block.rows;
    if (!this.readValues(row, block, at) && this.options.timeless) {
      this.options.rejects.add(
        row.line,
        this.headComplaint(row) ?? `not a number: '${cellOf(row, this.indexes[0] ?? 0).slice(0, 40)}'`,
      );
      this.clearCodes(at);
      return;
    }
    if (!row.terminated && this.mayBeCut(row, block, at)) {
      this.options.rejects.add(row.line, 'the file ends inside this line: its last number may be cut off');
      this.clearCodes(at);
      return;
    }
    block.timeMs[at] = ms;
    block.lines[at] = row.line;
    block.rows = at + 1;
    if (block.rows === BLOCK_ROWS) this.pass();
  }

  end(): void {
    this.options.time.end();
    if (this.block.rows > 0) this.pass();
  }

  private pass(): void {
    const { block } = this;
    this.block = emptyBlock(this.indexes.length);
    this.options.emit(block);
  }

  private shapeFits(row: RowView): boolean {
    if (row.count < this.fewestCells) return false;
    if (!row.terminated && row.count < this.options.layout.width) return false;
    for (let i = this.mostCells; i < row.count && i < row.starts.length; i++)
      if (row.starts[i] !== row.ends[i]) return false;
    return true;
  }

  /** Whether any cell held a number. */
  private readValues(row: RowView, block: RawBlock, at: number): boolean {
    const { text, starts, ends } = row;
    const { indexes } = this;
    const decimalCode = this.decimal.charCodeAt(0);
    let any = false;
    for (let channel = 0; channel < indexes.length; channel++) {
      const column = indexes[channel] ?? 0;
      const from = column < row.count ? (starts[column] ?? 0) : 0;
      const to = column < row.count ? (ends[column] ?? 0) : 0;
      let value = to > from ? plainNumber(text, from, to, decimalCode) : NaN;
      if (Number.isNaN(value)) value = this.unusual(text.slice(from, to), channel, block, at);
      else any = true;
      const values = block.values[channel];
      if (values) values[at] = value;
    }
    return any || block.values.some((values) => !Number.isNaN(values[at]));
  }

  private unusual(text: string, channel: number, block: RawBlock, at: number): number {
    if (text === '') {
      setCode(block, channel, at, VALUE_CODES.empty);
      return NaN;
    }
    const cell = bare(text);
    let value = looseNumber(cell, this.decimal);
    if (Number.isNaN(value) && !this.decimalKnown) {
      const other = this.decimal === '.' ? ',' : '.';
      value = looseNumber(cell, other);
      if (!Number.isNaN(value)) {
        this.decimal = other;
        this.decimalKnown = true;
      }
    }
    if (Number.isNaN(value))
      setCode(block, channel, at, this.markers[channel]?.add(cell) ?? VALUE_CODES.text);
    return value;
  }

  private clearCodes(at: number): void {
    for (const codes of this.block.codes) if (codes) codes[at] = VALUE_CODES.value;
  }

  private complaint(row: RowView): string {
    const head = this.headComplaint(row);
    if (head) return head;
    if (!this.shapeFits(row)) {
      const expected = this.mostCells;
      return `${row.count} ${row.count === 1 ? 'column' : 'columns'} where ${expected} were expected`;
    }
    return this.options.time.complaint(row);
  }

  /** The header or its units again, further down. */
  private headComplaint(row: RowView): string | null {
    const { headerCells, unitCells } = this.options.layout;
    const same = (cells: string[]): boolean =>
      cells.length > 0 &&
      cells.every(
        (cell, i) =>
          bare(cellOf(row, i))
            .replace(/^[#;%/]+\s*/, '')
            .replace(/\s+/g, ' ') === cell,
      );
    if (same(headerCells)) return 'repeats the header';
    return same(unitCells) ? 'repeats the units row' : null;
  }

  /**
   * Whether the last number of a line that no line end closes may lack digits: it has fewer decimals than its column always has,
   * or, in a column without fixed decimals, is shorter and elsewhere than the number before it.
   */
  private mayBeCut(row: RowView, block: RawBlock, at: number): boolean {
    const lastCell = row.count - 1;
    const channel = this.indexes.indexOf(lastCell);
    const text = cellOf(row, lastCell);
    if (channel < 0) return this.options.timeColumns.includes(lastCell) && row.count > 1;
    const column = this.options.channels[channel];
    const value = block.values[channel]?.[at] ?? NaN;
    if (Number.isNaN(value)) return text === '' || /^[+-]$/.test(text) || !isMarker(text);
    const decimals = writtenDecimals(text, this.decimal);
    if (!column || decimals < 0) return decimals < 0 && /[.,+-]$/.test(text);
    if (column.minDecimals === column.maxDecimals && column.maxDecimals > 0)
      return decimals < column.maxDecimals;
    if (/[.,]$/.test(text)) return true;
    const before = at > 0 ? (block.values[channel]?.[at - 1] ?? NaN) : NaN;
    return (
      value !== before &&
      Math.abs(value - before) > 0.1 * Math.abs(before) &&
      Math.abs(value) < Math.abs(before)
    );
  }
}

/** Fewest cells a row must have: all that are read, unless a good part of the first rows does without the last of them. */
function fewestCells(layout: Layout, read: number, timeColumns: number[]): number {
  const counts = new Map<number, number>();
  for (const { cells } of layout.dataRows) counts.set(cells.length, (counts.get(cells.length) ?? 0) + 1);
  const usual = [...counts]
    .filter(([, count]) => count >= 0.1 * layout.dataRows.length)
    .map(([cells]) => cells);
  const shortest = Math.min(...usual);
  return Math.min(read, Math.max(shortest, Math.max(0, ...timeColumns) + 1));
}
