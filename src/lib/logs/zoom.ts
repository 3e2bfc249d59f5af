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
  #open: {
    timeMs: number;
    samples: number;
    min: number[];
    max: number[];
    sum: number[];
    count: number[];
  } | null = null;

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
    for (let row = 0; row < rows.timeMs.length; row++) {
      const open = (this.#open ??= emptyRow(rows.timeMs[row] as number, channels));
      for (let channel = 0; channel < channels; channel++) {
        const [min, max, mean] = [
          rows.min[channel]?.[row] as number,
          rows.max[channel]?.[row] as number,
          rows.mean[channel]?.[row] as number,
        ];
        if (Number.isNaN(mean)) continue;
        if (min < (open.min[channel] as number)) open.min[channel] = min;
        if (max > (open.max[channel] as number)) open.max[channel] = max;
        open.sum[channel] = (open.sum[channel] as number) + mean;
        open.count[channel] = (open.count[channel] as number) + 1;
      }
      open.samples += 1;
      if (open.samples >= this.group) this.#close();
    }
  }

  #close(): void {
    const open = this.#open;
    this.#open = null;
    if (!open) return;
    this.#times.push(open.timeMs);
    open.count.forEach((count, channel) => {
      const column = (this.#columns[channel] ??= { min: [], max: [], mean: [] });
      column.min.push(count > 0 ? (open.min[channel] as number) : Number.NaN);
      column.max.push(count > 0 ? (open.max[channel] as number) : Number.NaN);
      column.mean.push(
        count > 0 ? Math.round(((open.sum[channel] as number) / count) * MEAN_STEP) / MEAN_STEP : Number.NaN,
      );
    });
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

function emptyRow(timeMs: number, channels: number) {
  const filled = (value: number) => Array.from({ length: channels }, () => value);
  return {
    timeMs,
    samples: 0,
    min: filled(Infinity),
    max: filled(-Infinity),
    sum: filled(0),
    count: filled(0),
  };
}

/** A level's columns in the order they are stored: least, greatest and mean of the first channel, then of the next. */
export const zoomColumns = (rows: ZoomRows): Float64Array[] =>
  rows.min.flatMap((min, channel) => [
    min,
    rows.max[channel] as Float64Array,
    rows.mean[channel] as Float64Array,
  ]);
