import type { LogBlock } from '~/lib/logs/types';

/** Rows held for the review at most. A firing of 14 days logged every five seconds has 241,920. */
const MAX_ROWS = 400_000;
/** A row with an open sensor is kept before any other. */
const OPEN_WEIGHS = 1e6;

/**
 * Gathers the rows of a log for the review without growing with the file: at the limit every second row goes, and of each two
 * the one stays that differs more from the row before, so that a spike or a step is never what is left out.
 */
export class SeriesBuffer {
  #timeMs: Float64Array;
  #columns: Float64Array[] = [];
  #open: Uint8Array[] = [];
  #rows = 0;
  /** Rows of the file that one held row stands for. */
  stride = 1;
  /** The row of the stride under way that differs most from the last one kept; its distance is −1 where there is none. */
  #held = { timeMs: Number.NaN, values: new Float64Array(0), open: new Uint8Array(0), distance: -1 };
  #inStride = 0;

  constructor(private readonly limit = MAX_ROWS) {
    this.#timeMs = new Float64Array(Math.min(limit, 16384));
  }

  add(block: LogBlock): void {
    for (let row = 0; row < block.rows; row++) {
      if (this.stride === 1) this.#push(block, row);
      else this.#consider(block, row);
    }
  }

  #push(block: LogBlock, row: number): void {
    if (this.#rows === this.limit) {
      this.#halve();
      this.#consider(block, row);
      return;
    }
    this.#reserve(block.values.length);
    this.#timeMs[this.#rows] = block.timeMs[row] ?? Number.NaN;
    for (let channel = 0; channel < block.values.length; channel++) {
      (this.#columns[channel] as Float64Array)[this.#rows] = block.values[channel]?.[row] ?? Number.NaN;
      (this.#open[channel] as Uint8Array)[this.#rows] = block.codes[channel]?.[row] === 2 ? 1 : 0;
    }
    this.#rows += 1;
  }

  #consider(block: LogBlock, row: number): void {
    const channels = block.values.length;
    const last = this.#rows - 1;
    let distance = 0;
    for (let channel = 0; channel < channels; channel++) {
      if (block.codes[channel]?.[row] === 2) distance += OPEN_WEIGHS;
      const kept = last < 0 ? Number.NaN : (this.#columns[channel]?.[last] ?? Number.NaN);
      const difference = Math.abs((block.values[channel]?.[row] ?? Number.NaN) - kept);
      if (difference > distance) distance = difference;
    }
    if (distance > this.#held.distance) this.#hold(block, row, distance);
    this.#inStride += 1;
    if (this.#inStride === this.stride) this.#flush();
  }

  #hold(block: LogBlock, row: number, distance: number): void {
    const channels = block.values.length;
    if (this.#held.values.length !== channels) {
      this.#held.values = new Float64Array(channels);
      this.#held.open = new Uint8Array(channels);
    }
    this.#held.timeMs = block.timeMs[row] ?? Number.NaN;
    this.#held.distance = distance;
    for (let channel = 0; channel < channels; channel++) {
      this.#held.values[channel] = block.values[channel]?.[row] ?? Number.NaN;
      this.#held.open[channel] = block.codes[channel]?.[row] === 2 ? 1 : 0;
    }
  }

  #flush(): void {
    const { timeMs, values, open, distance } = this.#held;
    this.#held.distance = -1;
    this.#inStride = 0;
    if (distance < 0) return;
    if (this.#rows === this.limit) this.#halve();
    this.#reserve(values.length);
    this.#timeMs[this.#rows] = timeMs;
    for (let channel = 0; channel < values.length; channel++) {
      (this.#columns[channel] as Float64Array)[this.#rows] = values[channel] as number;
      (this.#open[channel] as Uint8Array)[this.#rows] = open[channel] as number;
    }
    this.#rows += 1;
  }

  #halve(): void {
    let kept = 0;
    for (let row = 0; row + 1 < this.#rows; row += 2) {
      const take = this.#differs(row + 1, kept) > this.#differs(row, kept) ? row + 1 : row;
      this.#timeMs[kept] = this.#timeMs[take] as number;
      for (const column of [...this.#columns, ...this.#open]) column[kept] = column[take] as number;
      kept += 1;
    }
    this.#rows = kept;
    this.stride *= 2;
  }

  #differs(row: number, kept: number): number {
    if (kept === 0) return 0;
    let most = 0;
    for (const column of this.#columns) {
      const difference = Math.abs((column[row] as number) - (column[kept - 1] as number));
      if (difference > most) most = difference;
    }
    return most;
  }

  #reserve(channels: number): void {
    while (this.#columns.length < channels) {
      this.#columns.push(new Float64Array(this.#timeMs.length).fill(Number.NaN));
      this.#open.push(new Uint8Array(this.#timeMs.length));
    }
    if (this.#rows < this.#timeMs.length) return;
    const size = Math.min(this.limit, this.#timeMs.length * 2);
    this.#timeMs = grown(this.#timeMs, new Float64Array(size));
    this.#columns = this.#columns.map((column) => grown(column, new Float64Array(size)));
    this.#open = this.#open.map((column) => grown(column, new Uint8Array(size)));
  }

  /** The rows held, by column and in order of time. `open`: rows whose text was an open sensor's. */
  finish(): { timeMs: Float64Array; values: Float64Array[]; open: number[][] } {
    if (this.#inStride > 0) this.#flush();
    const order = sortedOrder(this.#timeMs, this.#rows);
    const pick = (column: Float64Array) =>
      order ? Float64Array.from(order, (row) => column[row] as number) : column.slice(0, this.#rows);
    return {
      timeMs: pick(this.#timeMs),
      values: this.#columns.map(pick),
      open: this.#open.map((flags) => {
        const rows: number[] = [];
        for (let row = 0; row < this.#rows; row++)
          if (flags[order ? (order[row] as number) : row]) rows.push(row);
        return rows;
      }),
    };
  }
}

function grown<T extends Float64Array | Uint8Array>(from: T, to: T): T {
  to.set(from);
  return to;
}

/** Row numbers in order of time, or null where they are in order already. */
function sortedOrder(timeMs: Float64Array, rows: number): Uint32Array | null {
  let sorted = true;
  for (let row = 1; row < rows && sorted; row++)
    sorted = (timeMs[row] as number) >= (timeMs[row - 1] as number);
  if (sorted) return null;
  return Uint32Array.from({ length: rows }, (_, row) => row).sort(
    (a, b) => (timeMs[a] as number) - (timeMs[b] as number) || a - b,
  );
}
