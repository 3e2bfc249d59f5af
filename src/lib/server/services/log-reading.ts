import { randomUUID } from 'node:crypto';
import { createLogReader } from '~/lib/logs/reader';
import type { Mapping } from '~/lib/logs/schema';
import type { LogBlock, LogReader, LogReading, Refusal } from '~/lib/logs/types';
import type { Tx } from '../database';
import { SampleWriter } from '../repositories/samples';
import type { LogSeries } from './log-review';
import { SeriesBuffer } from './series-buffer';

/** One reading of one file: bytes in, sample chunks stored on the way, a report and the series for the review at the end. */
export class LogReadingSession {
  readonly logId = randomUUID();
  readonly #reader: LogReader;
  readonly #samples: SampleWriter;
  readonly #buffer = new SeriesBuffer();
  #blocks: LogBlock[] = [];

  constructor(key: { studioId: string; timeZone: string; plannedStartMs: number }, mapping: Mapping, tx: Tx) {
    this.#samples = new SampleWriter({ studioId: key.studioId, logId: this.logId }, tx);
    this.#reader = createLogReader({
      mapping,
      studioTimeZone: key.timeZone,
      plannedStartMs: key.plannedStartMs,
      sink: (block) => this.#blocks.push(block),
    });
  }

  get refusal(): Refusal | null {
    return this.#reader.refusal;
  }

  async push(bytes: Uint8Array): Promise<void> {
    this.#reader.push(bytes);
    await this.#store();
  }

  async end(): Promise<LogReading> {
    const reading = this.#reader.end();
    await this.#store();
    if (reading.ok) await this.#samples.finish();
    return reading;
  }

  /** Waits for what is being stored, whatever comes of it. */
  settled(): Promise<void> {
    return this.#samples.settled();
  }

  series(): LogSeries {
    return this.#buffer.finish();
  }

  async #store(): Promise<void> {
    const blocks = this.#blocks;
    this.#blocks = [];
    for (const block of blocks) {
      this.#buffer.add(block);
      await this.#samples.add(block);
    }
  }
}
