import { describe, expect, it } from 'vitest';
import type { Refusal } from '~/lib/logs/types';
import { readLog, readText } from '../helpers/logs-reading';

const bytesOf = (...parts: (number[] | string)[]): Uint8Array =>
  Uint8Array.from(
    parts.flatMap((part) => (typeof part === 'string' ? [...part].map((char) => char.charCodeAt(0)) : part)),
  );
const noise = (count: number): number[] => Array.from({ length: count }, (_, i) => (i * 7919 + 13) & 255);

function refusalOf(bytes: Uint8Array): Refusal | null {
  const { reading } = readLog(bytes, { pieceBytes: 512 });
  return !reading.ok && 'refusal' in reading ? reading.refusal : null;
}

describe('what is no log', () => {
  it.each([
    ['nothing at all', bytesOf(), 'empty'],
    ['only blank lines', bytesOf(' \r\n\r\n\t\n'), 'empty'],
    ['a PNG picture', bytesOf([0x89], 'PNG\r\n\u001a\n', noise(2000)), 'image'],
    ['a JPEG picture', bytesOf([0xff, 0xd8, 0xff, 0xe0], noise(2000)), 'image'],
    ['a PDF', bytesOf('%PDF-1.7\n', noise(2000)), 'document'],
    ['a workbook', bytesOf('PK', [3, 4, 20, 0], '[Content_Types].xml', noise(2000)), 'spreadsheet'],
    ['an old workbook', bytesOf([0xd0, 0xcf, 0x11, 0xe0, 0xa1, 0xb1], noise(2000)), 'spreadsheet'],
    ['an archive', bytesOf('PK', [3, 4, 20, 0], 'log.csv', noise(2000)), 'archive'],
    ['a gzip', bytesOf([0x1f, 0x8b, 8], noise(2000)), 'archive'],
    ['noise', bytesOf(noise(100_000)), 'not-text'],
    ['zeros', new Uint8Array(5000), 'not-text'],
    ['a letter', bytesOf('Dear all,\nthe kiln, as agreed, is yours.\nPlease, be careful.\n'), 'no-table'],
    ['JSON', bytesOf('{"rows":[{"t":1,"c":20.5}]}'), 'no-table'],
    ['a header alone', bytesOf('time,chamber °C\n'), 'no-table'],
    ['a line without end', bytesOf('time,chamber\n1,20\n2,21\n', 'x'.repeat(1_500_000)), 'too-wide'],
  ])('%s is refused with what to do', (_, bytes, code) => {
    const refusal = refusalOf(bytes);
    expect(refusal?.code).toBe(code);
    expect(refusal?.detail).toMatch(/^[A-Z].*\.$/);
  });

  it('a workbook is told how to become CSV', () => {
    expect(refusalOf(bytesOf('PK', [3, 4], 'xl/workbook.xml', noise(100)))?.detail).toMatch(/CSV/);
  });

  it('a file whose rows are nearly all unreadable is no log', () => {
    const rows = Array.from({ length: 200 }, (_, i) =>
      i < 5 ? `2026-02-14T07:00:0${i}Z,20` : `row ${i},was lost`,
    );
    const { reading } = readText(`time,chamber °C\n${rows.join('\n')}\n`);
    expect(reading).toMatchObject({ ok: false, refusal: { code: 'no-rows' } });
  });
});
