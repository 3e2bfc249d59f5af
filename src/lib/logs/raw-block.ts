import { BLOCK_ROWS, type LogBlock } from './types';

/** A block in the order of the file, with the physical line of each row. */
export interface RawBlock extends LogBlock {
  lines: Float64Array;
}

export function emptyBlock(channels: number): RawBlock {
  return {
    rows: 0,
    timeMs: new Float64Array(BLOCK_ROWS),
    lines: new Float64Array(BLOCK_ROWS),
    values: Array.from({ length: channels }, () => new Float64Array(BLOCK_ROWS)),
    codes: Array.from({ length: channels }, () => null),
  };
}

/** Copies one row of a block to the end of another. */
export function copyRow(from: RawBlock, row: number, to: RawBlock): void {
  const at = to.rows++;
  to.timeMs[at] = from.timeMs[row] ?? NaN;
  to.lines[at] = from.lines[row] ?? NaN;
  for (let channel = 0; channel < to.values.length; channel++) {
    const column = to.values[channel];
    if (column) column[at] = from.values[channel]?.[row] ?? NaN;
    const code = from.codes[channel]?.[row] ?? 0;
    if (code !== 0) setCode(to, channel, at, code);
  }
}

export function setCode(block: RawBlock, channel: number, row: number, code: number): void {
  let codes = block.codes[channel];
  if (!codes) {
    codes = new Uint8Array(BLOCK_ROWS);
    block.codes[channel] = codes;
  }
  codes[row] = code;
}

/** Whether two rows say the same in every channel. */
export function sameReadings(a: RawBlock, rowA: number, b: RawBlock, rowB: number): boolean {
  for (let channel = 0; channel < a.values.length; channel++) {
    if (!Object.is(a.values[channel]?.[rowA], b.values[channel]?.[rowB])) return false;
    if ((a.codes[channel]?.[rowA] ?? 0) !== (b.codes[channel]?.[rowB] ?? 0)) return false;
  }
  return true;
}

/** The block with its arrays cut to its rows. */
export function trimmed(block: RawBlock): RawBlock {
  const { rows } = block;
  if (rows === BLOCK_ROWS) return block;
  return {
    rows,
    timeMs: block.timeMs.slice(0, rows),
    lines: block.lines.slice(0, rows),
    values: block.values.map((column) => column.slice(0, rows)),
    codes: block.codes.map((column) => column?.slice(0, rows) ?? null),
  };
}
