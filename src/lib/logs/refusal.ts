import type { Refusal } from './types';

const SAVE_AS_CSV =
  'This is a spreadsheet workbook, not a text file. Open it, choose “Save as” or “Export”, take CSV (comma or semicolon separated), and upload that file.';

interface Signature {
  at: number;
  bytes: readonly number[];
  refusal: Refusal;
}

const ascii = (text: string): number[] => [...text].map((char) => char.charCodeAt(0));
const image = (kind: string): Refusal => ({
  code: 'image',
  detail: `This is a ${kind} picture, not a logger file. Upload the file that the logger or its program exports as text or CSV.`,
});
const archive: Refusal = {
  code: 'archive',
  detail: 'This is a packed archive. Unpack it and upload the text or CSV file inside.',
};
const workbook: Refusal = { code: 'spreadsheet', detail: SAVE_AS_CSV };
const document: Refusal = {
  code: 'document',
  detail:
    'This is a document, not a logger file. Upload the file that the logger or its program exports as text or CSV.',
};

const SIGNATURES: readonly Signature[] = [
  { at: 0, bytes: [0x89, 0x50, 0x4e, 0x47], refusal: image('PNG') },
  { at: 0, bytes: [0xff, 0xd8, 0xff], refusal: image('JPEG') },
  { at: 0, bytes: ascii('GIF8'), refusal: image('GIF') },
  { at: 8, bytes: ascii('WEBP'), refusal: image('WebP') },
  { at: 0, bytes: [0x49, 0x49, 0x2a, 0x00], refusal: image('TIFF') },
  { at: 0, bytes: [0x4d, 0x4d, 0x00, 0x2a], refusal: image('TIFF') },
  { at: 4, bytes: ascii('ftyp'), refusal: image('video or HEIC') },
  { at: 0, bytes: ascii('%PDF'), refusal: document },
  { at: 0, bytes: ascii('{\\rtf'), refusal: document },
  { at: 0, bytes: [0xd0, 0xcf, 0x11, 0xe0], refusal: workbook },
  { at: 0, bytes: [0x1f, 0x8b], refusal: archive },
  { at: 0, bytes: [0x37, 0x7a, 0xbc, 0xaf], refusal: archive },
  { at: 0, bytes: ascii('Rar!'), refusal: archive },
];

/** Says why the beginning of a file (all of it if `whole`) cannot be a log of text, or null if it can. */
export function refusalOf(head: Uint8Array, whole: boolean): Refusal | null {
  for (const { at, bytes, refusal } of SIGNATURES) {
    if (bytes.every((byte, i) => head[at + i] === byte)) return refusal;
  }
  if (head[0] === 0x50 && head[1] === 0x4b && head[2] === 3 && head[3] === 4) return zipRefusal(head);
  if (whole && head.every(isBlank)) {
    return { code: 'empty', detail: 'The file is empty. Export the log again and check that it has rows.' };
  }
  return isBinary(head) ? NOT_TEXT : null;
}

const NOT_TEXT: Refusal = {
  code: 'not-text',
  detail:
    'The file holds binary data, not text. Export the log as text or CSV from the logger or its program and upload that.',
};

function zipRefusal(head: Uint8Array): Refusal {
  const text = new TextDecoder('windows-1252').decode(head.subarray(0, 65536));
  return /\[Content_Types\]\.xml|xl\/|opendocument\.spreadsheet|Index\/Tables/.test(text)
    ? workbook
    : archive;
}

const isBlank = (byte: number): boolean => byte === 0x20 || (byte >= 0x09 && byte <= 0x0d);

/** More than 2 % control characters, outside UTF-16 (whose zero bytes stand at one parity only). */
function isBinary(head: Uint8Array): boolean {
  const length = Math.min(head.length, 65536);
  if (length === 0) return false;
  let control = 0;
  const zeros = [0, 0];
  for (let i = 0; i < length; i++) {
    const byte = head[i] ?? 0;
    if (byte === 0) zeros[i & 1] = (zeros[i & 1] ?? 0) + 1;
    else if (byte < 0x20 && !isBlank(byte) && byte !== 0x1a && byte !== 0x1b) control++;
  }
  const [even = 0, odd = 0] = zeros;
  const wide = Math.max(even, odd) > 0.25 * length && Math.min(even, odd) < 0.03 * length;
  const bad = control + (wide ? 0 : even + odd);
  return bad > Math.max(2, 0.02 * length);
}

/** The refusals that come of looking at the text rather than at the bytes. */
export const NO_TABLE: Refusal = {
  code: 'no-table',
  detail:
    'No table of times and readings was found. A log needs one row per reading, its columns separated by commas, semicolons, tabs or bars.',
};
export const NO_ROWS: Refusal = {
  code: 'no-rows',
  detail:
    'Not one row could be read as a time with readings. Check that the file was exported whole and is the log of a firing.',
};
export const TOO_WIDE: Refusal = {
  code: 'too-wide',
  detail:
    'The file has more than 200 columns or lines of more than a million characters. Export only the channels of this kiln.',
};
