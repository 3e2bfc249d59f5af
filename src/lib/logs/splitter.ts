import Papa from 'papaparse';

/** Columns that are kept of a line; what stands beyond them only counts. */
export const MOST_COLUMNS = 200;
const LONGEST_LINE = 1_000_000;
const LONGEST_QUOTED = 65_536;
const MOST_QUOTED_LINES = 50;
const SPACE = 32;
const NEWLINE = 10;
const RETURN = 13;

/** A row as bounds in a text, so that no string is made for a cell. The arrays are reused: read them before returning. */
export interface RowView {
  text: string;
  /** Where each cell begins and ends, spaces around it left out. */
  starts: Int32Array;
  ends: Int32Array;
  /** Cells of the row; may exceed what `starts` holds. */
  count: number;
  /** Physical line in the file on which the row begins, from 1. */
  line: number;
  /** False for a last line that no line end closes: it may be cut off. */
  terminated: boolean;
}

/** The text of a cell. */
export function cellOf(row: RowView, column: number): string {
  return column < row.count ? row.text.slice(row.starts[column], row.ends[column]) : '';
}

/**
 * Splits text that arrives in pieces, cut anywhere, into rows of cells.
 *
 * Papa Parse splits whatever holds a quotation mark. Text without one needs no more than its delimiters found. Finding them in
 * place, without a string per cell and an array per row, takes about 0.1 of the time of Papa's step mode on a million rows of three
 * columns, against 0.3 to 0.4 for Papa fed with pieces (tests/bench/reading.bench.ts prints both). The two ways give the same
 * rows, which a property test holds.
 */
export class RowSplitter {
  private carry = '';
  private line = 1;
  private readonly view: RowView = {
    text: '',
    starts: new Int32Array(MOST_COLUMNS),
    ends: new Int32Array(MOST_COLUMNS),
    count: 0,
    line: 1,
    terminated: true,
  };
  private readonly delimiterCode: number;
  /** Set once a line is longer than any row of a log. */
  overlong = false;

  constructor(
    private readonly delimiter: string,
    private readonly onRow: (row: RowView) => void,
    private readonly always: 'either' | 'papa' = 'either',
  ) {
    this.delimiterCode = delimiter.charCodeAt(0);
  }

  push(piece: string): void {
    if (this.overlong || piece === '') return;
    const lineEnd = piece.indexOf('\n');
    if (lineEnd < 0) {
      this.carry += piece;
      this.overlong = this.carry.length > LONGEST_LINE;
      return;
    }
    const { carry } = this;
    this.carry = '';
    if (this.always === 'papa' || piece.includes('"') || carry.includes('"')) {
      const text = carry + piece;
      this.splitQuoted(text.includes('\r\n') ? holdReturn(text) : text);
    } else {
      // Only the line that was begun is joined: a joined text is read far more slowly than one that came whole.
      const begun = carry === '' ? 0 : lineEnd + 1;
      if (begun > 0) this.splitPlain(carry + piece.slice(0, begun), 0, carry.length + begun);
      const end = piece.lastIndexOf('\n') + 1;
      this.splitPlain(piece, begun, end);
      this.carry = piece.slice(end);
    }
    if (this.carry.length > LONGEST_LINE) this.overlong = true;
  }

  end(): void {
    const last = this.carry;
    this.carry = '';
    if (last === '' || this.overlong) return;
    this.view.terminated = false;
    if (last.includes('"') || this.always === 'papa') this.splitCarefully(last, true);
    else this.splitPlain(`${last}\n`, 0, last.length + 1);
  }

  /** Rows of `text` between `begin` and `end`, both behind a line end; no quotation mark means anything. */
  private splitPlain(text: string, begin: number, end: number): void {
    const { view, delimiterCode } = this;
    const { starts, ends } = view;
    view.text = text;
    let at = begin;
    while (at < end) {
      let count = 0;
      let from = at;
      for (;;) {
        const code = text.charCodeAt(at);
        if (code === delimiterCode || code === NEWLINE) {
          if (count < MOST_COLUMNS) {
            let first = from;
            let past = at;
            while (first < past && isPadding(text.charCodeAt(first))) first++;
            while (past > first && isPadding(text.charCodeAt(past - 1))) past--;
            starts[count] = first;
            ends[count] = past;
          }
          count++;
          from = at + 1;
          if (code === NEWLINE) break;
        }
        at++;
      }
      at++;
      view.count = count;
      view.line = this.line++;
      this.onRow(view);
    }
  }

  private splitQuoted(text: string): void {
    const { data, errors, cursor } = papaRows(text, this.delimiter, true);
    if (errors > 0) {
      this.splitCarefully(text, false);
      return;
    }
    for (const cells of data) this.emitCells(cells);
    this.carry = cursor === 0 ? text : text.slice(cursor);
    if (this.carry.length > LONGEST_QUOTED && this.carry.includes('"'))
      this.splitCarefully(this.carry, false);
  }

  /**
   * Line by line, for text with quotation marks that do not pair as they should: a mark that nothing closes within 50 lines is
   * an ordinary character, so that it cannot swallow the rows behind it.
   */
  private splitCarefully(text: string, whole: boolean): void {
    this.carry = '';
    let at = 0;
    while (at < text.length) {
      let end = lineEnd(text, at);
      let closed = false;
      for (let lines = 1; lines <= MOST_QUOTED_LINES && end - at <= LONGEST_QUOTED; lines++) {
        const atEnd = end >= text.length;
        if (atEnd && !whole && !text.endsWith('\n')) break;
        const { data, errors } = papaRows(
          text.slice(at, atEnd && text[end - 1] !== '\n' ? end : end - 1),
          this.delimiter,
          false,
        );
        if (errors === 0) {
          for (const cells of data.length === 0 ? [['']] : data) this.emitCells(cells);
          closed = true;
          break;
        }
        if (atEnd) break;
        end = lineEnd(text, end);
      }
      if (!closed) {
        if (!whole && end >= text.length && text.length - at <= LONGEST_QUOTED) {
          this.carry = text.slice(at);
          return;
        }
        end = lineEnd(text, at);
        const line = text.slice(at, end);
        if (!whole && !line.endsWith('\n')) {
          this.carry = line;
          return;
        }
        this.splitPlain(
          line.endsWith('\n') ? line : `${line}\n`,
          0,
          line.endsWith('\n') ? line.length : line.length + 1,
        );
      }
      at = end;
    }
  }

  private emitCells(cells: string[]): void {
    const { view } = this;
    const text = cells.join(this.delimiter);
    let at = 0;
    for (let i = 0; i < cells.length; i++) {
      const length = cells[i]?.length ?? 0;
      if (i < MOST_COLUMNS) {
        let first = at;
        let past = at + length;
        while (first < past && isPadding(text.charCodeAt(first))) first++;
        while (past > first && isPadding(text.charCodeAt(past - 1))) past--;
        view.starts[i] = first;
        view.ends[i] = past;
      }
      at += length + 1;
    }
    view.text = text;
    view.count = cells.length;
    view.line = this.line;
    this.line++;
    for (let i = text.indexOf('\n'); i >= 0; i = text.indexOf('\n', i + 1)) this.line++;
    this.onRow(view);
  }
}

const isPadding = (code: number): boolean => code === SPACE || code === RETURN;

const lineEnd = (text: string, from: number): number => {
  const found = text.indexOf('\n', from);
  return found < 0 ? text.length : found + 1;
};

/** Line ends as one character; a return at the very end stays, for its newline may be in the next piece. */
const holdReturn = (text: string): string => text.replaceAll('\r\n', '\n');

/** Rows by Papa Parse; `partial` leaves out the last, which may go on, and `cursor` is where it begins. */
export function papaRows(
  text: string,
  delimiter: string,
  partial: boolean,
): { data: string[][]; errors: number; cursor: number } {
  const parser = new Papa.Parser({ delimiter, newline: '\n', quoteChar: '"' });
  const result = parser.parse(text, 0, partial) as {
    data: string[][];
    errors: unknown[];
    meta: { cursor: number };
  };
  return { data: result.data, errors: result.errors.length, cursor: result.meta.cursor };
}
