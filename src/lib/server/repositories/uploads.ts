import { createHash } from 'node:crypto';
import type { Tx } from '../database';
import { UploadPartRow, UploadRow } from '../models/log';
import { WriteBehind } from './write-behind';

/** Bytes of one stored part: large enough to be few, small enough to hold. */
const PART_BYTES = 1024 * 1024;

export interface Upload {
  readonly id: string;
  readonly runId: string;
  readonly fileName: string;
  readonly bytes: number;
  readonly sha256: string;
}

/**
 * Takes a file as it streams in and keeps it byte for byte. The parts belong to the transaction: a file that breaks off
 * leaves nothing.
 */
export class UploadWriter {
  readonly #hash = createHash('sha256');
  readonly #behind = new WriteBehind();
  #pending: Uint8Array[] = [];
  #pendingBytes = 0;
  #part = 0;
  bytes = 0;

  constructor(
    private readonly key: { studioId: string; uploadId: string },
    private readonly tx: Tx,
  ) {}

  async append(data: Uint8Array): Promise<void> {
    this.#hash.update(data);
    this.bytes += data.byteLength;
    this.#pending.push(data);
    this.#pendingBytes += data.byteLength;
    if (this.#pendingBytes >= PART_BYTES) await this.#write();
  }

  /** Hex SHA-256 of the whole. */
  async finish(): Promise<string> {
    if (this.#pendingBytes > 0) await this.#write();
    await this.#behind.done();
    return this.#hash.digest('hex');
  }

  /** Waits for what is being written, whatever comes of it. */
  settled(): Promise<void> {
    return this.#behind.settled();
  }

  async #write(): Promise<void> {
    const data = Buffer.concat(this.#pending, this.#pendingBytes);
    this.#pending = [];
    this.#pendingBytes = 0;
    const row = { ...this.key, part: this.#part++, data };
    await this.#behind.write(() => UploadPartRow.create(row, { transaction: this.tx, returning: false }));
  }
}

export async function insertUpload(
  row: Upload & { studioId: string; uploadedBy: string },
  tx: Tx,
): Promise<void> {
  await UploadRow.create(row, { transaction: tx });
}

export async function findUpload(
  studioId: string,
  where: { id: string } | { runId: string; sha256: string },
  tx?: Tx,
): Promise<Upload | null> {
  const row = await UploadRow.findOne({ where: { studioId, ...where }, ...(tx ? { transaction: tx } : {}) });
  return row
    ? { id: row.id, runId: row.runId, fileName: row.fileName, bytes: Number(row.bytes), sha256: row.sha256 }
    : null;
}

/** The kept bytes, part by part, never all at once. */
export async function* readUpload(studioId: string, uploadId: string, tx?: Tx): AsyncGenerator<Uint8Array> {
  for (let part = 0; ; part++) {
    const row = await UploadPartRow.findOne({
      where: { studioId, uploadId, part },
      ...(tx ? { transaction: tx } : {}),
    });
    if (!row) return;
    yield row.data;
  }
}
