import { concat } from './bytes';
import { examineColumns } from './columns';
import { joinPairs } from './decimal-pairs';
import { detectEncoding, TextStream } from './encoding';
import { findLayout } from './layout';
import { preambleFacts } from './preamble';
import { NO_TABLE, refusalOf, TOO_WIDE } from './refusal';
import { RowSplitter, MOST_COLUMNS } from './splitter';
import { TableReading } from './table-reading';
import { planTime } from './time-plan';
import type { LogReader, LogReaderOptions, LogReading, Refusal } from './types';

/** How much of a file is looked at before its first row is read. */
const HEAD_BYTES = 262_144;

/**
 * Makes a reader of one log file. It takes bytes, gives blocks of times and values to the sink as they are finished, and ends with
 * a report, with questions, or with a refusal. What it holds does not grow with the file: the head (256 KiB) while it is examined,
 * one decoded piece, and the window in which rows are put in order. The same bytes cut differently give the same reading.
 */
export function createLogReader(options: LogReaderOptions): LogReader {
  return new StreamingReader(options);
}

class StreamingReader implements LogReader {
  refusal: Refusal | null = null;
  private head: Uint8Array[] = [];
  private bytes = 0;
  private text: TextStream | null = null;
  private returnsOnly = false;
  private splitter: RowSplitter | null = null;
  private table: TableReading | null = null;

  constructor(private readonly options: LogReaderOptions) {}

  push(bytes: Uint8Array): void {
    this.bytes += bytes.length;
    if (this.refusal || bytes.length === 0) return;
    if (this.text) this.feed(this.text.push(bytes));
    else {
      this.head.push(bytes.slice());
      if (this.bytes >= HEAD_BYTES) this.begin(false);
    }
  }

  end(): LogReading {
    if (!this.refusal && !this.text) this.begin(true);
    if (this.text && this.splitter && !this.refusal) {
      this.feed(this.text.end());
      this.splitter.end();
    }
    if (this.refusal) return { ok: false, refusal: this.refusal };
    return (
      this.table?.conclude(this.bytes, this.text?.encoding ?? 'utf-8') ?? { ok: false, refusal: NO_TABLE }
    );
  }

  /** Examines the head and reads it. `whole`: it is the file. */
  private begin(whole: boolean): void {
    const all = concat(this.head);
    this.head = [];
    // exactly the same bytes are examined however the file was cut
    const head = all.subarray(0, HEAD_BYTES);
    this.refusal = refusalOf(head, whole);
    if (this.refusal) return;
    const found = detectEncoding(head);
    const text = new TextStream(found);
    this.text = text;
    const decoded = text.push(head.subarray(found.skipBytes));
    this.returnsOnly = decoded.includes('\r') && !decoded.includes('\n');
    this.prepare(this.withLineEnds(decoded), whole);
    if (this.refusal) return;
    this.feed(decoded);
    if (all.length > head.length) this.feed(text.push(all.subarray(head.length)));
  }

  private prepare(text: string, whole: boolean): void {
    const layout = findLayout(text, whole);
    if (!layout) {
      this.refusal = NO_TABLE;
      return;
    }
    if (layout.width > MOST_COLUMNS) {
      this.refusal = TOO_WIDE;
      return;
    }
    const columns = examineColumns(layout);
    const facts = preambleFacts(layout.preamble);
    const plan = planTime(columns, facts, this.options);
    const table = new TableReading(layout, columns, facts, plan, this.options);
    this.table = table;
    if (table.channelCount === 0) this.refusal = NO_TABLE;
    const { pairs } = layout;
    this.splitter = new RowSplitter(layout.delimiter, (row) =>
      table.take(pairs ? joinPairs(row, pairs) : row),
    );
  }

  private feed(text: string): void {
    if (!this.splitter || this.refusal) return;
    this.splitter.push(this.withLineEnds(text));
    if (this.splitter.overlong) this.refusal = TOO_WIDE;
  }

  private withLineEnds(text: string): string {
    return this.returnsOnly ? text.replaceAll('\r', '\n') : text;
  }
}
