import { concat } from './bytes';
import type { LogEncoding } from './schema';

export interface EncodingFound {
  encoding: LogEncoding;
  /** Bytes of the byte-order mark to leave out. */
  skipBytes: number;
}

/** Which encoding a file is in, by the evidence of its first bytes: byte-order mark, zero bytes, valid UTF-8, else Windows-1252. */
export function detectEncoding(head: Uint8Array): EncodingFound {
  if (head[0] === 0xef && head[1] === 0xbb && head[2] === 0xbf)
    return { encoding: 'utf-8-bom', skipBytes: 3 };
  if (head[0] === 0xff && head[1] === 0xfe) return { encoding: 'utf-16le', skipBytes: 2 };
  if (head[0] === 0xfe && head[1] === 0xff) return { encoding: 'utf-16be', skipBytes: 2 };
  const sixteen = zeroBytePattern(head);
  if (sixteen) return { encoding: sixteen, skipBytes: 0 };
  return { encoding: isUtf8(head) ? 'utf-8' : 'windows-1252', skipBytes: 0 };
}

/** UTF-16 without a mark: Latin text has a zero in every other byte. */
function zeroBytePattern(head: Uint8Array): 'utf-16le' | 'utf-16be' | null {
  const length = Math.min(head.length, 4096) & ~1;
  if (length < 4) return null;
  let even = 0;
  let odd = 0;
  for (let i = 0; i < length; i += 2) {
    if (head[i] === 0) even++;
    if (head[i + 1] === 0) odd++;
  }
  const pairs = length / 2;
  if (odd > 0.6 * pairs && even < 0.05 * pairs) return 'utf-16le';
  if (even > 0.6 * pairs && odd < 0.05 * pairs) return 'utf-16be';
  return null;
}

/** Whether more of what is not ASCII reads as UTF-8 than does not; a single damaged byte does not turn the verdict. */
function isUtf8(head: Uint8Array): boolean {
  const text = new TextDecoder('utf-8').decode(head, { stream: true });
  let broken = 0;
  let sound = 0;
  for (let i = 0; i < text.length; i++) {
    const code = text.charCodeAt(i);
    if (code === 0xfffd) broken++;
    else if (code > 0x7f) sound++;
  }
  return broken <= sound;
}

/**
 * Bytes, cut anywhere, to text. A file that was ASCII so far and then holds a byte that is no UTF-8 goes on as Windows-1252:
 * its first such character may come long after the first rows.
 */
export class TextStream {
  private decoder: TextDecoder;
  private switchable: boolean;
  /** Bytes of a UTF-8 character that the last piece broke off in. */
  private begun = NONE;

  constructor(private found: EncodingFound) {
    const label = found.encoding === 'utf-8-bom' ? 'utf-8' : found.encoding;
    this.decoder = new TextDecoder(label, { ignoreBOM: true });
    this.switchable = found.encoding === 'utf-8';
  }

  get encoding(): LogEncoding {
    return this.found.encoding;
  }

  push(bytes: Uint8Array): string {
    if (this.decoder.encoding !== 'utf-8') return this.streamed(bytes);
    const all = this.begun.length > 0 ? concat([this.begun, bytes]) : bytes;
    const text = this.utf8(all);
    if (!this.switchable || !NOT_ASCII.test(text)) return text;
    this.switchable = false;
    if (!text.includes('\uFFFD') || isUtf8(all)) return text;
    this.found = { ...this.found, encoding: 'windows-1252' };
    this.decoder = new TextDecoder('windows-1252');
    this.begun = NONE;
    return this.streamed(all);
  }

  end(): string {
    return this.begun.length > 0 ? this.decoder.decode(this.begun) : this.decoder.decode();
  }

  private streamed(bytes: Uint8Array): string {
    return this.decoder.decode(bytes, { stream: true });
  }

  /** Whole characters at a time: engines decode these several times faster than a stream, into text of half the size. */
  private utf8(all: Uint8Array): string {
    const whole = all.length - begunBytes(all);
    this.begun = whole < all.length ? all.slice(whole) : NONE;
    return this.decoder.decode(all.subarray(0, whole));
  }
}

const NONE = new Uint8Array(0);

/** How many bytes at the end begin a UTF-8 character that goes on: 0 to 3. */
function begunBytes(bytes: Uint8Array): number {
  for (let back = 1; back <= Math.min(3, bytes.length); back++) {
    const byte = bytes[bytes.length - back] as number;
    if (byte < 0x80) return 0;
    if (byte >= 0xc0) return back < (byte >= 0xf0 ? 4 : byte >= 0xe0 ? 3 : 2) ? back : 0;
  }
  return 0;
}

const NOT_ASCII = /\P{ASCII}/u;
