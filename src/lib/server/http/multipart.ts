import { Readable } from 'node:stream';
import { pipeline } from 'node:stream/promises';
import type { ReadableStream as NodeReadableStream } from 'node:stream/web';
import busboy from 'busboy';
import { HoldfastError } from '../errors';

/** Room for the parts' own headers and the small fields beside the file. */
const OVERHEAD_BYTES = 64 * 1024;
const MAX_FIELD_BYTES = 16 * 1024;
const IDLE_MS = 120_000;

/** Takes the file's bytes as they arrive; what it throws ends the upload. */
export type TakeFile = (fileName: string, bytes: AsyncIterable<Uint8Array>) => Promise<void>;

/**
 * Reads one `file` part as a stream, and the small fields beside it, in whatever order they come. The file is never held
 * whole. A body that breaks off, is too large or holds no file is refused.
 */
export async function receiveFile(
  request: Request,
  maxBytes: number,
  take: TakeFile,
): Promise<Map<string, string>> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^multipart\/form-data\s*;/i.test(type)) {
    throw new HoldfastError(
      'wrong-type',
      `Expected multipart/form-data with a part named 'file', found '${type.slice(0, 80)}'.`,
    );
  }
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes + OVERHEAD_BYTES)
    throw tooLarge(maxBytes);
  if (!request.body) throw new HoldfastError('malformed', "The body is empty; expected a part named 'file'.");

  const parser = openParser(type, maxBytes);
  const fields = new Map<string, string>();
  const state: { taken: Promise<void> | null; failure: unknown } = { taken: null, failure: null };
  parser.on('field', (name, value, info) => {
    if (info.valueTruncated)
      state.failure ??= new HoldfastError(
        'too-large',
        `The field '${name.slice(0, 40)}' may hold ${MAX_FIELD_BYTES} bytes.`,
      );
    fields.set(name, value);
  });
  parser.on('file', (name, stream, info) => {
    // Without a listener of its own a file that breaks off would end the process.
    stream.on('error', () => undefined);
    if (name !== 'file' || state.taken) {
      stream.resume();
      return;
    }
    stream.on('limit', () => (state.failure ??= tooLarge(maxBytes)));
    state.taken = take(plainFileName(info.filename), stream as AsyncIterable<Uint8Array>).catch(
      (error: unknown) => {
        state.failure ??= error;
        // The rest is read and dropped, so that the answer can be sent on this connection.
        stream.resume();
      },
    );
  });

  try {
    await pipeline(endedWhenIdle(Readable.fromWeb(request.body as NodeReadableStream)), parser);
  } catch (error) {
    await state.taken;
    if (state.failure instanceof HoldfastError) throw state.failure;
    throw new HoldfastError(
      'malformed',
      'The upload broke off before its end; nothing of it was kept. Send it again.',
      { cause: error },
    );
  }
  await state.taken;
  if (state.failure !== null) throw asError(state.failure);
  if (!state.taken) throw new HoldfastError('malformed', "The upload holds no part named 'file'.");
  return fields;
}

/** Breaks a stream off when nothing comes for a while: what it holds open is wanted by others. */
function endedWhenIdle(source: Readable): Readable {
  let timer: NodeJS.Timeout | undefined;
  const again = () => {
    clearTimeout(timer);
    timer = setTimeout(() => source.destroy(new Error('no byte came')), IDLE_MS);
    timer.unref();
  };
  again();
  source.on('data', again).once('close', () => clearTimeout(timer));
  return source;
}

function openParser(type: string, maxBytes: number): busboy.Busboy {
  try {
    return busboy({
      headers: { 'content-type': type },
      defParamCharset: 'utf8',
      limits: {
        files: 4,
        fields: 8,
        parts: 12,
        fileSize: maxBytes,
        fieldSize: MAX_FIELD_BYTES,
        fieldNameSize: 100,
      },
    });
  } catch (error) {
    throw new HoldfastError('malformed', 'The multipart body has no usable boundary.', { cause: error });
  }
}

const tooLarge = (maxBytes: number) =>
  new HoldfastError(
    'too-large',
    `The file is larger than the ${Math.floor(maxBytes / 1024 / 1024)} MiB taken here. Split it, or export it at a longer interval.`,
  );

/** What is caught may be anything; what is thrown on is an error. */
const asError = (caught: unknown): Error =>
  caught instanceof Error ? caught : new Error('an upload failed', { cause: caught });

/** The last part of the name, without control characters: kept for people to recognise, never used as a path. */
function plainFileName(name: string | undefined): string {
  const last = (name ?? '').split(/[\\/]/).at(-1) ?? '';
  const clean = last
    .replace(/[\p{Cc}\u202a-\u202e\u2066-\u2069]/gu, '')
    .trim()
    .slice(0, 200);
  return clean === '' ? 'log.csv' : clean;
}
