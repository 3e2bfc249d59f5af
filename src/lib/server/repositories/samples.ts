import { QueryTypes, type CreationAttributes } from 'sequelize';
import { deflateRawSync, inflateRawSync } from 'node:zlib';
import { decodeBlock, encodeBlock } from '~/lib/logs/codec';
import { ZoomBuilder, zoomColumns, type ZoomRows } from '~/lib/logs/zoom';
import type { LogBlock } from '~/lib/logs/types';
import { database, type Tx } from '../database';
import { SampleChunkRow } from '../models/log';
import { WriteBehind } from './write-behind';

/** Rows of one level that one row of the next stands for. */
export const ZOOM_FACTOR = 16;
const ZOOM_LEVELS = 5;
/** A level with fewer rows than this answers nothing that the level below does not answer as fast. */
const FEWEST_ZOOM_ROWS = 256;
const CHUNK_ROWS = 4096;
/** Chunks written by one statement. */
const CHUNKS_AT_ONCE = 24;

interface LogKey {
  readonly studioId: string;
  readonly logId: string;
}

/** Stores the blocks of a log as they are read: each as measured, and in coarser levels that keep least, greatest and mean. */
export class SampleWriter {
  readonly #next = Array.from({ length: ZOOM_LEVELS + 1 }, () => 0);
  readonly #behind = new WriteBehind();
  #rows: CreationAttributes<SampleChunkRow>[] = [];
  readonly #zoom = Array.from({ length: ZOOM_LEVELS }, () => new ZoomBuilder(ZOOM_FACTOR));

  constructor(
    private readonly key: LogKey,
    private readonly tx: Tx,
  ) {}

  async add(block: LogBlock): Promise<void> {
    await this.#write(
      0,
      block.timeMs.subarray(0, block.rows),
      block.values.map((column) => column.subarray(0, block.rows)),
    );
    this.#zoom[0]?.add(block);
    await this.#passOn((builder) => (builder.rows >= CHUNK_ROWS ? builder.take() : null));
  }

  /** Writes what is left of each level that is worth having. */
  async finish(): Promise<void> {
    await this.#passOn((builder) => builder.takeAll());
    await this.#flush();
    await this.#behind.done();
  }

  /** Waits for what is being written, whatever comes of it. */
  settled(): Promise<void> {
    return this.#behind.settled();
  }

  /** Takes rows from each level in turn, gives them to the next, and stores them. */
  async #passOn(take: (builder: ZoomBuilder) => ZoomRows | null): Promise<void> {
    for (const [index, builder] of this.#zoom.entries()) {
      const rows = take(builder);
      if (!rows || rows.timeMs.length === 0) continue;
      this.#zoom[index + 1]?.addRows(rows);
      const level = index + 1;
      if ((this.#next[level] ?? 0) > 0 || rows.timeMs.length >= FEWEST_ZOOM_ROWS)
        await this.#writeZoom(level, rows);
    }
  }

  #writeZoom(level: number, rows: ZoomRows): Promise<void> {
    return this.#write(level, rows.timeMs, zoomColumns(rows));
  }

  async #write(level: number, timeMs: Float64Array, columns: Float64Array[]): Promise<void> {
    const { fromMs, toMs } = extent(timeMs);
    const chunk = this.#next[level] ?? 0;
    this.#next[level] = chunk + 1;
    const data = deflateRawSync(encodeBlock(timeMs, columns));
    this.#rows.push({ ...this.key, level, chunk, fromMs, toMs, rows: timeMs.length, data });
    if (this.#rows.length >= CHUNKS_AT_ONCE) await this.#flush();
  }

  async #flush(): Promise<void> {
    const rows = this.#rows;
    this.#rows = [];
    if (rows.length === 0) return;
    await this.#behind.write(() =>
      SampleChunkRow.bulkCreate(rows, { transaction: this.tx, returning: false }),
    );
  }
}

function extent(timeMs: Float64Array): { fromMs: number; toMs: number } {
  let [fromMs, toMs] = [Infinity, -Infinity];
  for (const ms of timeMs) {
    if (ms < fromMs) fromMs = ms;
    if (ms > toMs) toMs = ms;
  }
  return { fromMs, toMs };
}

/** Takes back the chunks of a reading that came to nothing. */
export async function discardSamples(studioId: string, logId: string, tx: Tx): Promise<void> {
  await SampleChunkRow.destroy({ where: { studioId, logId }, transaction: tx });
}

/** Every row of a log as measured, chunk by chunk in the order they were read. */
export async function* readAllSamples(studioId: string, logId: string, tx?: Tx): AsyncGenerator<LogBlock> {
  for (let chunk = 0; ; chunk++) {
    const row = await SampleChunkRow.findOne({
      where: { studioId, logId, level: 0, chunk },
      ...(tx ? { transaction: tx } : {}),
    });
    if (!row) return;
    const { timeMs, columns } = decodeBlock(inflateRawSync(row.data));
    yield { rows: timeMs.length, timeMs, values: columns, codes: columns.map(() => null) };
  }
}

/** A stretch of a log at some resolution: per row, and per channel, least, greatest and mean in the file's own unit. */
export interface Window {
  readonly timeMs: Float64Array;
  readonly min: readonly Float64Array[];
  readonly max: readonly Float64Array[];
  readonly mean: readonly Float64Array[];
  /** Rows of the log in the window; at coarse levels its two edges are shared out evenly. */
  readonly rowsInWindow: number;
}

interface WindowSource extends LogKey {
  readonly intervalS: number;
  readonly channels: number;
}

/** The window at about `points` rows, read from the coarsest level that has as many, so that any length costs the same. */
export async function readWindow(
  source: WindowSource,
  fromMs: number,
  toMs: number,
  points: number,
): Promise<Window> {
  const rowsInWindow = await countRows(source, fromMs, toMs);
  let level = Math.min(
    ZOOM_LEVELS,
    Math.max(0, Math.floor(Math.log(Math.max(1, rowsInWindow / points)) / Math.log(ZOOM_FACTOR))),
  );
  let chunks = await readChunks(source, level, fromMs, toMs);
  while (chunks.length === 0 && level > 0) chunks = await readChunks(source, --level, fromMs, toMs);
  return { ...condense(joined(chunks, level, source.channels, fromMs, toMs), points), rowsInWindow };
}

async function countRows(source: LogKey, fromMs: number, toMs: number): Promise<number> {
  const [row] = await database().query<{ rows: number | null }>(
    `select sum(rows * case when to_ms > from_ms then greatest(0, least(to_ms, $toMs) - greatest(from_ms, $fromMs)) / (to_ms - from_ms) else 1 end)::float8 as rows
     from sample_chunks where studio_id = $studioId and log_id = $logId and level = 0 and from_ms <= $toMs and to_ms >= $fromMs`,
    { type: QueryTypes.SELECT, bind: { studioId: source.studioId, logId: source.logId, fromMs, toMs } },
  );
  return Math.round(row?.rows ?? 0);
}

async function readChunks(source: LogKey, level: number, fromMs: number, toMs: number): Promise<Buffer[]> {
  const rows = await database().query<{ data: Buffer }>(
    `select data from sample_chunks where studio_id = $studioId and log_id = $logId and level = $level
       and from_ms <= $toMs and to_ms >= $fromMs order by chunk`,
    {
      type: QueryTypes.SELECT,
      bind: { studioId: source.studioId, logId: source.logId, level, fromMs, toMs },
    },
  );
  return rows.map((row) => row.data);
}

/** The rows of some chunks that lie in the window, in order of time. */
function joined(
  chunks: readonly Buffer[],
  level: number,
  channels: number,
  fromMs: number,
  toMs: number,
): ZoomRows {
  const parts = chunks.map((chunk) => decodeBlock(inflateRawSync(chunk)));
  const picked: { part: number; row: number; ms: number }[] = [];
  parts.forEach(({ timeMs }, part) =>
    timeMs.forEach((ms, row) => ms >= fromMs && ms <= toMs && picked.push({ part, row, ms })),
  );
  picked.sort((a, b) => a.ms - b.ms);
  const column = (index: number) =>
    Float64Array.from(picked, ({ part, row }) => parts[part]?.columns[index]?.[row] ?? Number.NaN);
  const each = (of: (channel: number) => number) =>
    Array.from({ length: channels }, (_, channel) => column(of(channel)));
  const timeMs = Float64Array.from(picked, ({ ms }) => ms);
  if (level === 0) {
    const values = each((channel) => channel);
    return { timeMs, min: values, max: values, mean: values };
  }
  return {
    timeMs,
    min: each((channel) => channel * 3),
    max: each((channel) => channel * 3 + 1),
    mean: each((channel) => channel * 3 + 2),
  };
}

/** Joins neighbouring rows until at most `points` are left; extremes stay. */
function condense(rows: ZoomRows, points: number): ZoomRows {
  const group = Math.ceil(rows.timeMs.length / points);
  if (group <= 1) return rows;
  const builder = new ZoomBuilder(group);
  builder.addRows(rows);
  return builder.takeAll();
}
