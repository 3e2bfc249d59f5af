import fc from 'fast-check';
import Papa from 'papaparse';
import { describe, expect, it } from 'vitest';
import { cellOf, RowSplitter } from '~/lib/logs/splitter';

interface Row {
  cells: string[];
  line: number;
}

function split(text: string, delimiter: string, pieceChars: number, way: 'either' | 'papa'): Row[] {
  const rows: Row[] = [];
  const splitter = new RowSplitter(
    delimiter,
    (row) =>
      rows.push({ cells: Array.from({ length: row.count }, (_, i) => cellOf(row, i)), line: row.line }),
    way,
  );
  for (let at = 0; at < text.length; at += pieceChars) splitter.push(text.slice(at, at + pieceChars));
  splitter.end();
  return rows;
}

const cell = fc.oneof(
  fc.constantFrom('', '23.4', '-1,5', '2026-02-14 07:00:00', 'OL', 'µ °C'),
  fc.string({ maxLength: 8 }).map((text) => text.replace(/[\n\r",;\t|]/g, '_').trim()),
);
const table = fc.array(fc.array(cell, { minLength: 1, maxLength: 6 }), { minLength: 1, maxLength: 40 });

describe('splitting rows', () => {
  it('in place and by Papa Parse give the same cells and lines for text without quotation marks', () => {
    fc.assert(
      fc.property(
        table,
        fc.constantFrom(',', ';', '\t', '|'),
        fc.constantFrom('\n', '\r\n'),
        fc.boolean(),
        fc.integer({ min: 1, max: 200 }),
        (rows, delimiter, newline, final, pieceChars) => {
          const text = rows.map((cells) => cells.join(delimiter)).join(newline) + (final ? newline : '');
          expect(split(text, delimiter, pieceChars, 'either')).toEqual(
            split(text, delimiter, pieceChars, 'papa'),
          );
        },
      ),
      { numRuns: 400 },
    );
  });

  it('gives what Papa Parse gives of the whole text, quoted delimiters and line breaks included, cut anywhere', () => {
    const quoted = fc.array(
      fc.string({ unit: fc.constantFrom('a', '"', ',', '\n', '7', ' '), maxLength: 6 }),
      {
        minLength: 1,
        maxLength: 5,
      },
    );
    fc.assert(
      fc.property(
        fc.array(quoted, { minLength: 1, maxLength: 20 }),
        fc.integer({ min: 1, max: 100 }),
        (rows, pieceChars) => {
          const text = Papa.unparse(rows, { quotes: true, newline: '\n' }) + '\n';
          const own = split(text, ',', pieceChars, 'either').map(({ cells }) => cells);
          expect(own).toEqual(rows.map((cells) => cells.map((value) => value.replace(/^ +| +$/g, ''))));
        },
      ),
      { numRuns: 400 },
    );
  });

  it('counts physical lines through quoted line breaks', () => {
    expect(split('a,b\n1,"x\ny\nz"\n2,w\n', ',', 3, 'either')).toEqual([
      { cells: ['a', 'b'], line: 1 },
      { cells: ['1', 'x\ny\nz'], line: 2 },
      { cells: ['2', 'w'], line: 5 },
    ]);
  });

  it('does not let a quotation mark that nothing closes swallow the rows behind it', () => {
    const rows = Array.from({ length: 300 }, (_, i) => `${i},${i / 2}`);
    const text = [...rows.slice(0, 10), '10,"5 inch', ...rows.slice(11)].join('\n') + '\n';
    for (const pieceChars of [17, 100_000]) {
      const own = split(text, ',', pieceChars, 'either');
      expect(own).toHaveLength(300);
      expect(own[299]).toEqual({ cells: ['299', '149.5'], line: 300 });
    }
  });
});
