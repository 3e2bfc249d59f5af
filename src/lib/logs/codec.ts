/**
 * Columns of a block of samples as bytes, lossless, in a form that a general compressor then makes small. Thermocouple logs
 * are short decimals that change little from row to row: each column is scaled to whole numbers by the fewest decimals that
 * give back every value exactly, and the first or second differences are written as zigzag variable-length integers. A column
 * that no such scale fits is kept as IEEE 754 doubles.
 */
const MAX_DECIMALS = 6;
/** Beyond this a scaled value could not be told from its neighbour. */
const MAX_WHOLE = 2 ** 50;
const KIND_WHOLE = 0;
const KIND_DOUBLE = 1;

export interface DecodedBlock {
  readonly timeMs: Float64Array;
  readonly columns: Float64Array[];
}

/**
 * @param timeMs instants of the rows, ms
 * @param columns per channel one value a row; NaN where missing
 * @returns bytes for `decodeBlock`
 */
export function encodeBlock(timeMs: Float64Array, columns: readonly Float64Array[]): Uint8Array {
  const out = new ByteWriter();
  out.varint(timeMs.length);
  out.varint(columns.length);
  for (const column of [timeMs, ...columns]) writeColumn(out, column);
  return out.finish();
}

/** The inverse of `encodeBlock`: the same numbers, bit for bit (every NaN as the one NaN). Throws on bytes of another origin. */
export function decodeBlock(bytes: Uint8Array): DecodedBlock {
  const input = new ByteReader(bytes);
  const rows = input.varint();
  const count = input.varint();
  if (rows > 10_000_000 || count > 10_000) throw new RangeError('not a block of samples');
  const [timeMs, ...columns] = Array.from({ length: count + 1 }, () => readColumn(input, rows));
  return { timeMs: timeMs as Float64Array, columns };
}

function writeColumn(out: ByteWriter, column: Float64Array): void {
  const decimals = decimalsOf(column);
  if (decimals === null) {
    out.byte(KIND_DOUBLE);
    for (const value of column) out.double(value);
    return;
  }
  const whole = wholeNumbers(column, 10 ** decimals);
  const order = cheaperOrder(whole);
  out.byte(KIND_WHOLE);
  out.byte(decimals);
  out.byte(order);
  writeMissing(out, column);
  let [previous, slope] = [0, 0];
  for (let row = 0; row < whole.length; row++) {
    const value = whole[row] as number;
    const difference = value - previous;
    out.signed(order === 2 ? difference - slope : difference);
    slope = row === 0 ? 0 : difference;
    previous = value;
  }
}

function readColumn(input: ByteReader, rows: number): Float64Array {
  const column = new Float64Array(rows);
  const kind = input.byte();
  if (kind === KIND_DOUBLE) {
    for (let row = 0; row < rows; row++) column[row] = input.double();
    return column;
  }
  if (kind !== KIND_WHOLE) throw new RangeError('not a column of samples');
  const scale = 10 ** input.byte();
  const order = input.byte();
  const missing = readMissing(input);
  let [previous, slope] = [0, 0];
  for (let row = 0; row < rows; row++) {
    const difference = input.signed() + (order === 2 ? slope : 0);
    previous += difference;
    slope = row === 0 ? 0 : difference;
    column[row] = previous / scale;
  }
  for (const row of missing) column[row] = Number.NaN;
  return column;
}

/** The fewest decimals that give back every value exactly, or null. −0 is no whole number: it would come back as 0. */
function decimalsOf(column: Float64Array): number | null {
  let decimals = 0;
  let scale = 1;
  for (const value of column) {
    if (Number.isNaN(value)) continue;
    while (Math.round(value * scale) / scale !== value) {
      decimals += 1;
      scale *= 10;
      if (decimals > MAX_DECIMALS) return null;
    }
    if (Math.abs(value * scale) > MAX_WHOLE || Object.is(value, -0)) return null;
  }
  // A later value may have raised the scale beyond what an earlier one comes back from.
  return column.every((value) => Number.isNaN(value) || Math.round(value * scale) / scale === value)
    ? decimals
    : null;
}

/** Scaled values; a missing one repeats the last, which costs nothing. */
function wholeNumbers(column: Float64Array, scale: number): Float64Array {
  const whole = new Float64Array(column.length);
  let last = 0;
  for (let row = 0; row < column.length; row++) {
    const value = column[row] as number;
    if (!Number.isNaN(value)) last = Math.round(value * scale);
    whole[row] = last;
  }
  return whole;
}

/** Whether first or second differences are the smaller numbers. */
function cheaperOrder(whole: Float64Array): 1 | 2 {
  let [first, second, slope] = [0, 0, 0];
  for (let row = 1; row < whole.length; row++) {
    const difference = (whole[row] as number) - (whole[row - 1] as number);
    first += Math.abs(difference);
    second += Math.abs(difference - slope);
    slope = difference;
  }
  return second < first ? 2 : 1;
}

/** Rows without a value, as runs: rows to skip, rows missing. */
function writeMissing(out: ByteWriter, column: Float64Array): void {
  const runs: number[] = [];
  let [row, after] = [0, 0];
  while (row < column.length) {
    if (!Number.isNaN(column[row])) {
      row += 1;
      continue;
    }
    const start = row;
    while (row < column.length && Number.isNaN(column[row])) row += 1;
    runs.push(start - after, row - start);
    after = row;
  }
  out.varint(runs.length / 2);
  for (const run of runs) out.varint(run);
}

function readMissing(input: ByteReader): number[] {
  const rows: number[] = [];
  let row = 0;
  for (let run = input.varint(); run > 0; run--) {
    row += input.varint();
    for (let length = input.varint(); length > 0; length--) rows.push(row++);
  }
  return rows;
}

class ByteWriter {
  #bytes = new Uint8Array(16 * 1024);
  #length = 0;
  readonly #scratch = new DataView(new ArrayBuffer(8));

  byte(value: number): void {
    if (this.#length === this.#bytes.length) {
      const larger = new Uint8Array(this.#bytes.length * 2);
      larger.set(this.#bytes);
      this.#bytes = larger;
    }
    this.#bytes[this.#length++] = value;
  }

  /** A whole number from 0, seven bits a byte, low bits first. */
  varint(value: number): void {
    let rest = value;
    while (rest >= 128) {
      this.byte((rest % 128) + 128);
      rest = Math.floor(rest / 128);
    }
    this.byte(rest);
  }

  /** 0, −1, 1, −2, … as 0, 1, 2, 3, … */
  signed(value: number): void {
    this.varint(value < 0 ? -2 * value - 1 : 2 * value);
  }

  double(value: number): void {
    this.#scratch.setFloat64(0, value, true);
    for (let index = 0; index < 8; index++) this.byte(this.#scratch.getUint8(index));
  }

  finish(): Uint8Array {
    return this.#bytes.subarray(0, this.#length);
  }
}

class ByteReader {
  #at = 0;
  readonly #view: DataView;

  constructor(private readonly bytes: Uint8Array) {
    this.#view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength);
  }

  byte(): number {
    const value = this.bytes[this.#at++];
    if (value === undefined) throw new RangeError('a block of samples breaks off');
    return value;
  }

  varint(): number {
    let [value, factor] = [0, 1];
    for (;;) {
      const byte = this.byte();
      value += (byte & 127) * factor;
      if (byte < 128) return value;
      factor *= 128;
      if (factor > 2 ** 56) throw new RangeError('not a block of samples');
    }
  }

  signed(): number {
    const value = this.varint();
    return value % 2 === 1 ? -(value + 1) / 2 : value / 2;
  }

  double(): number {
    const value = this.#view.getFloat64(this.#at, true);
    this.#at += 8;
    return value;
  }
}
