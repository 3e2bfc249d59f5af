import { HoldfastError } from '../errors';

export const MAX_JSON_BYTES = 1024 * 1024;

/** Whether the database can keep a text as it is: no NUL, no half of a surrogate pair. */
export const isStorable = (text: string): boolean => !text.includes('\0') && !/\p{Surrogate}/u.test(text);

/**
 * Reads a JSON body, counting bytes as they stream, so that a large body is refused before it is held in memory.
 *
 * @param mayBeLeftOut a call without a body, and with no content type but JSON's, is one with `{}`
 */
export async function readJson(
  request: Request,
  mayBeLeftOut = false,
  maxBytes = MAX_JSON_BYTES,
): Promise<unknown> {
  const type = request.headers.get('content-type') ?? '';
  if (mayBeLeftOut && type === '' && (await readText(request, maxBytes)) === '') return {};
  if (!/^application\/json(\s*;|$)/i.test(type)) {
    throw new HoldfastError(
      'wrong-type',
      `Expected application/json, found ${type ? `'${type.slice(0, 80)}'` : 'no content type'}.`,
    );
  }
  const text = await readText(request, maxBytes);
  if (text === '' && mayBeLeftOut) return {};
  if (text.trim() === '') throw new HoldfastError('malformed', 'The body is empty; expected a JSON object.');
  try {
    return JSON.parse(text, (key, value: unknown) => {
      if (key === '__proto__') throw new SyntaxError("a member named '__proto__'");
      if (!isStorable(key) || (typeof value === 'string' && !isStorable(value)))
        throw new SyntaxError('a text holds a NUL or half a surrogate pair');
      return value;
    });
  } catch (error) {
    throw new HoldfastError(
      'malformed',
      `The body is not JSON: ${error instanceof Error ? error.message.slice(0, 120) : 'unreadable'}.`,
    );
  }
}

async function readText(request: Request, maxBytes: number): Promise<string> {
  const tooLarge = () => new HoldfastError('too-large', `A JSON body may hold ${maxBytes} bytes here.`);
  if (Number(request.headers.get('content-length') ?? 0) > maxBytes) throw tooLarge();
  if (!request.body) return '';
  const decoder = new TextDecoder('utf-8', { fatal: true });
  const parts: string[] = [];
  let bytes = 0;
  const reader = request.body.getReader();
  try {
    for (;;) {
      const { done, value } = await reader.read();
      if (done) break;
      bytes += value.byteLength;
      if (bytes > maxBytes) throw tooLarge();
      parts.push(decoder.decode(value, { stream: true }));
    }
    parts.push(decoder.decode());
  } catch (error) {
    await drain(reader);
    if (error instanceof HoldfastError) throw error;
    throw new HoldfastError('malformed', 'The body is not UTF-8 text, or it broke off.');
  }
  return parts.join('');
}

/** To break off a body breaks off the connection, and the refusal with it: what is left of a moderate one is let run out. */
async function drain(
  reader: ReadableStreamDefaultReader<Uint8Array>,
  maxBytes = 32 * MAX_JSON_BYTES,
): Promise<void> {
  try {
    for (let left = maxBytes; left > 0;) {
      const { done, value } = await reader.read();
      if (done) return;
      left -= value.byteLength;
    }
    await reader.cancel();
  } catch {
    // It broke off by itself.
  }
}
