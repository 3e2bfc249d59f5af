import type { LogBlock } from './types';

/** Rows of a zoom level: each stands for several samples and keeps, per channel, their least, greatest and mean value. */
export interface ZoomRows {
  /** Instant of the first sample that a row stands for, ms. */
  timeMs: Float64Array;
  min: Float64Array[];
  max: Float64Array[];
  mean: Float64Array[];
}

/** Digits kept of a mean: it is shown, never computed with, and short numbers store small. */
const MEAN_STEP = 1000;

/**
 * Condenses rows as they come, `group` into one. A spike of a single sample stays visible at every level, since extremes are
 * kept; missing values (NaN) are left out, and a row of nothing but those stays NaN.
 */
export class ZoomBuilder {
  #times: number[] = [];
  #columns: { min: number[]; max: number[]; mean: number[] }[] = [];
  /** Samples of the row that is being made, and what it is so far by channel: least, greatest, sum, values that count. */
  #samples = 0;
  #timeMs = 0;
  #open = new Float64Array(0);

  constructor(private readonly group: number) {}

  /** Rows that are complete. */
  get rows(): number {
    return this.#times.length;
  }

  /** Takes samples as measured. */
  add(block: LogBlock): void {
    this.addRows({
      timeMs: block.timeMs.subarray(0, block.rows),
      min: block.values,
      max: block.values,
      mean: block.values,
    });
  }

  /** Takes rows of a finer level; each counts as one. */
  addRows(rows: ZoomRows): void {
    const channels = rows.min.length;
    let row = 0;
    while (row < rows.timeMs.length) {
      if (this.#samples === 0) this.#begin(rows.timeMs[row] as number, channels);
      const to = Math.min(rows.timeMs.length, row + this.group - this.#samples);
      for (let channel = 0; channel < channels; channel++) this.#gather(rows, channel, row, to);
      this.#samples += to - row;
      row = to;
      if (this.#samples >= this.group) this.#close();
    }
  }

  #begin(timeMs: number, channels: number): void {
    this.#timeMs = timeMs;
    if (this.#open.length !== channels * PARTS) this.#open = new Float64Array(channels * PARTS);
    for (let at = 0; at < this.#open.length; at += PARTS) {
      this.#open[at] = Infinity;
      this.#open[at + 1] = -Infinity;
      this.#open[at + 2] = 0;
      this.#open[at + 3] = 0;
    }
  }

  #gather(rows: ZoomRows, channel: number, from: number, to: number): void {
    const mins = rows.min[channel] as Float64Array;
    const maxs = rows.max[channel] as Float64Array;
    const means = rows.mean[channel] as Float64Array;
    const at = channel * PARTS;
    let min = this.#open[at] as number;
    let max = this.#open[at + 1] as number;
    let sum = this.#open[at + 2] as number;
    let count = this.#open[at + 3] as number;
    for (let row = from; row < to; row++) {
      const mean = means[row] as number;
      if (mean !== mean) continue;
      if ((mins[row] as number) < min) min = mins[row] as number;
      if ((maxs[row] as number) > max) max = maxs[row] as number;
      sum += mean;
      count++;
    }
    this.#open[at] = min;
    this.#open[at + 1] = max;
    this.#open[at + 2] = sum;
    this.#open[at + 3] = count;
  }

  #close(): void {
    if (this.#samples === 0) return;
    this.#samples = 0;
    this.#times.push(this.#timeMs);
    for (let at = 0; at < this.#open.length; at += PARTS) {
      const column = (this.#columns[at / PARTS] ??= { min: [], max: [], mean: [] });
      const count = this.#open[at + 3] as number;
      column.min.push(count > 0 ? (this.#open[at] as number) : Number.NaN);
      column.max.push(count > 0 ? (this.#open[at + 1] as number) : Number.NaN);
      column.mean.push(
        count > 0 ? Math.round(((this.#open[at + 2] as number) / count) * MEAN_STEP) / MEAN_STEP : Number.NaN,
      );
    }
  }

  /** The complete rows so far, which are then forgotten. */
  take(): ZoomRows {
    const rows = {
      timeMs: Float64Array.from(this.#times),
      min: this.#columns.map((column) => Float64Array.from(column.min)),
      max: this.#columns.map((column) => Float64Array.from(column.max)),
      mean: this.#columns.map((column) => Float64Array.from(column.mean)),
    };
    this.#times = [];
    this.#columns = [];
    return rows;
  }

  /** As `take`, with the last, incomplete row. */
  takeAll(): ZoomRows {
    this.#close();
    return this.take();
  }
}

/** Figures kept of each channel of the row that is being made. */
const PARTS = 4;

/** A level's columns in the order they are stored: least, greatest and mean of the first channel, then of the next. */
export const zoomColumns = (rows: ZoomRows): Float64Array[] =>
  rows.min.flatMap((min, channel) => [
    min,
    rows.max[channel] as Float64Array,
    rows.mean[channel] as Float64Array,
  ]);
