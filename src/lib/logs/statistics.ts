import type { LogBlock } from './types';

const FIRST_VALUES = 5;
const SPARSE = 8;

/** What is kept of one channel while its rows pass: extremes, ends, counts. */
export interface ChannelStatistics {
  samples: number;
  missing: number;
  min: number;
  max: number;
  /** Values of the earliest and the latest row that has one, and their instants. */
  firstValue: number;
  firstMs: number;
  lastValue: number;
  lastMs: number;
  /** The first few values, to see where the log begins. */
  firstValues: number[];
  /** Against each later channel, over every eighth row: rows with both values, and those further apart than `APART`. */
  compared: number[];
  apart: number[];
}

/** Degrees (of whatever unit) by which channels must differ to count as apart. */
const APART = 25;

export class Statistics {
  readonly channels: ChannelStatistics[];
  firstMs = Infinity;
  lastMs = -Infinity;
  rows = 0;

  constructor(count: number) {
    this.channels = Array.from({ length: count }, () => ({
      samples: 0,
      missing: 0,
      min: Infinity,
      max: -Infinity,
      firstValue: NaN,
      firstMs: Infinity,
      lastValue: NaN,
      lastMs: -Infinity,
      firstValues: [],
      compared: Array.from({ length: count }, () => 0),
      apart: Array.from({ length: count }, () => 0),
    }));
  }

  add(block: LogBlock): void {
    const { rows, timeMs } = block;
    if (rows === 0) return;
    this.rows += rows;
    this.firstMs = Math.min(this.firstMs, timeMs[0] ?? Infinity);
    this.lastMs = Math.max(this.lastMs, timeMs[rows - 1] ?? -Infinity);
    this.channels.forEach((channel, index) => {
      const values = block.values[index];
      if (!values) return;
      addColumn(channel, timeMs, values, rows);
      for (let other = index + 1; other < this.channels.length && this.channels.length <= 16; other++) {
        compare(channel, other, values, block.values[other], rows);
      }
    });
  }
}

function addColumn(
  channel: ChannelStatistics,
  timeMs: Float64Array,
  values: Float64Array,
  rows: number,
): void {
  let { min, max, samples } = channel;
  let firstRow = -1;
  let lastRow = -1;
  for (let i = 0; i < rows; i++) {
    const value = values[i] ?? NaN;
    if (value !== value) continue; // NaN alone differs from itself
    samples++;
    if (value < min) min = value;
    if (value > max) max = value;
    if (firstRow < 0) firstRow = i;
    lastRow = i;
  }
  channel.missing += rows - (samples - channel.samples);
  channel.samples = samples;
  channel.min = min;
  channel.max = max;
  if (firstRow < 0) return;
  if ((timeMs[firstRow] ?? NaN) < channel.firstMs) {
    channel.firstMs = timeMs[firstRow] ?? NaN;
    channel.firstValue = values[firstRow] ?? NaN;
    channel.firstValues = firstOf(values, firstRow, rows);
  }
  if ((timeMs[lastRow] ?? NaN) >= channel.lastMs) {
    channel.lastMs = timeMs[lastRow] ?? NaN;
    channel.lastValue = values[lastRow] ?? NaN;
  }
}

function firstOf(values: Float64Array, from: number, rows: number): number[] {
  const found: number[] = [];
  for (let i = from; i < rows && found.length < FIRST_VALUES; i++) {
    const value = values[i] ?? NaN;
    if (!Number.isNaN(value)) found.push(value);
  }
  return found;
}

function compare(
  channel: ChannelStatistics,
  other: number,
  values: Float64Array,
  others: Float64Array | undefined,
  rows: number,
): void {
  let both = 0;
  let apart = 0;
  for (let i = 0; i < rows; i += SPARSE) {
    const gap = Math.abs((values[i] ?? NaN) - (others?.[i] ?? NaN));
    if (gap !== gap) continue;
    both++;
    if (gap > APART) apart++;
  }
  channel.compared[other] = (channel.compared[other] ?? 0) + both;
  channel.apart[other] = (channel.apart[other] ?? 0) + apart;
}

/** Where a channel begins: the least of its first few values, for a log that climbs from its first row on. NaN without any. */
export function startOf(channel: ChannelStatistics): number {
  return channel.firstValues.length === 0 ? NaN : Math.min(...channel.firstValues);
}

/** Share of the compared rows in which two channels are apart; 0 where they were never seen together. */
export function shareApart(all: readonly ChannelStatistics[], a: number, b: number): number {
  const [low, high] = a < b ? [a, b] : [b, a];
  const both = all[low]?.compared[high] ?? 0;
  return both === 0 ? 0 : (all[low]?.apart[high] ?? 0) / both;
}
