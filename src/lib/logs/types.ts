import type { LogQuestion, Mapping, ReadReport } from './schema';

/** Rows of one block at most. */
export const BLOCK_ROWS = 4096;

/** Why a value is missing: 0 it is not, 1 nothing stood there, 2 a marker of an open sensor, 3 any other text. */
export const VALUE_CODES = { value: 0, empty: 1, open: 2, text: 3 } as const;

/** A stretch of rows by column, ascending in time. Its arrays belong to who receives it. */
export interface LogBlock {
  rows: number;
  /** Instant of each row, ms since 1970-01-01T00:00Z. A log with only a counter is anchored at the planned start. */
  timeMs: Float64Array;
  /** Per channel, in the order of the report's channels: values in the file's own unit, NaN where missing. */
  values: Float64Array[];
  /** Per channel, VALUE_CODES of each row; null where no value of the block is missing. */
  codes: (Uint8Array | null)[];
}

/** Takes each block as it is finished; what it throws is thrown by `push` or `end`. */
export type BlockSink = (block: LogBlock) => void;

export interface LogReaderOptions {
  /** What a person has answered, or what is saved for files of this shape. */
  mapping?: Mapping;
  /** IANA zone for local times; without it such a file is a question. */
  studioTimeZone?: string;
  /** The run's planned start, ms since 1970: dates a clock-only log, anchors a counter. */
  plannedStartMs?: number;
  sink: BlockSink;
}

export type RefusalCode =
  | 'empty'
  | 'not-text'
  | 'spreadsheet'
  | 'image'
  | 'archive'
  | 'document'
  | 'no-table'
  | 'no-rows'
  | 'too-wide'
  | 'bad-mapping';

/** A file that is no log: why, and what to do, in plain sentences. */
export interface Refusal {
  code: RefusalCode;
  detail: string;
}

/**
 * What came of reading a whole file. Unless `ok`, discard what the sink received: it was read on a guess.
 * `again`: evidence late in the file settles what its beginning left open; read the same bytes once more with this mapping.
 */
export type LogReading =
  | { ok: true; report: ReadReport }
  | { ok: false; questions: LogQuestion[] }
  | { ok: false; again: Mapping }
  | { ok: false; refusal: Refusal };

export interface LogReader {
  /** Takes the next bytes, cut anywhere. After a refusal it does nothing. */
  push(bytes: Uint8Array): void;
  /** Set as soon as it is certain that the file is none that can be read, so that an upload may stop. */
  readonly refusal: Refusal | null;
  /** Ends the file; call once. */
  end(): LogReading;
}
