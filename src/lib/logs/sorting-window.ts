import { copyRow, emptyBlock, sameReadings, trimmed, type RawBlock } from './raw-block';
import { BLOCK_ROWS } from './types';

const MOST_BLOCKS = 16;
const WINDOW_BYTES = 12_000_000;
/** Rows of one and the same time that are compared with each other. */
const MOST_EQUAL = 16;

export interface WindowOptions {
  channels: number;
  emit: (block: RawBlock) => void;
  onDuplicate: (line: number, ofLine: number) => void;
}

/**
 * The last blocks of a log (at most 65,536 rows, fewer if it is wide), put in order of time before they are passed on. A log that is
 * in order passes through uncopied. Rows later than the window is long come as blocks that overlap earlier ones.
 */
export class SortingWindow {
  descending = false;
  coarse = false;
  blockOrder: 'ascending' | 'descending' | 'overlapping' = 'ascending';
  private blocks: RawBlock[] = [];
  private dirty = false;
  private emitted = 0;
  private lastEmittedMs = -Infinity;
  private firstEmittedMs = Infinity;
  private readonly capacity: number;

  constructor(private readonly options: WindowOptions) {
    const bytes = BLOCK_ROWS * 8 * (options.channels + 2);
    this.capacity = Math.max(2, Math.min(MOST_BLOCKS, Math.floor(WINDOW_BYTES / bytes)));
  }

  push(block: RawBlock): void {
    if (block.rows === 0) return;
    const last = this.lastBlock();
    if (!this.dirty) {
      const inOrder = isAscending(block) && !(last && first(block) < lastMs(last));
      if (!inOrder) this.dirty = true;
      else if (!this.coarse && hasEqualTimes(block, last)) this.dirty = true;
    }
    this.blocks.push(block);
    if (this.blocks.length > this.capacity) this.pass(this.dirty ? Math.ceil(this.capacity / 2) : 1);
  }

  finish(): void {
    this.settle();
    if (this.descending && this.emitted > 0) this.blocks.reverse();
    for (const block of this.blocks) this.emit(block);
    this.blocks = [];
  }

  lastBlock(): RawBlock | null {
    return this.blocks[this.blocks.length - 1] ?? null;
  }

  /** Rows held whose times lie in a span; where the span begins before what is held, that part counts as full of rows. */
  countBetween(fromMs: number, toMs: number): number {
    let count = this.emitted > 0 && fromMs < this.lastEmittedMs ? 1000 : 0;
    for (const { timeMs, rows } of this.blocks) {
      for (let i = 0; i < rows; i++) {
        const ms = timeMs[i] ?? NaN;
        if (ms >= fromMs && ms <= toMs) count++;
      }
    }
    return count;
  }

  /** Whether a row held has this time and the readings of row `row` of `block`. */
  holdsSame(block: RawBlock, row: number, ms: number): boolean {
    return this.blocks.some((held) => {
      for (let i = 0; i < held.rows; i++)
        if (held.timeMs[i] === ms && sameReadings(held, i, block, row)) return true;
      return false;
    });
  }

  /** Passes on `count` blocks from the end of the window that the rest of the file will not reach. */
  private pass(count: number): void {
    this.settle();
    for (let i = 0; i < count; i++) {
      const block = this.descending ? this.blocks.pop() : this.blocks.shift();
      if (block) this.emit(block);
    }
  }

  private emit(block: RawBlock): void {
    if (block.rows === 0) return;
    if (this.emitted > 0) this.noteOrder(block);
    this.emitted++;
    this.lastEmittedMs = Math.max(this.lastEmittedMs, lastMs(block));
    this.firstEmittedMs = Math.min(this.firstEmittedMs, first(block));
    this.options.emit(trimmed(block));
  }

  private noteOrder(block: RawBlock): void {
    const after = first(block) >= this.lastEmittedMs;
    const before = lastMs(block) <= this.firstEmittedMs;
    if (this.emitted === 1 && before && !after) this.blockOrder = 'descending';
    else if (!(this.blockOrder === 'ascending' ? after : before)) this.blockOrder = 'overlapping';
  }

  /** Sorts what is held, if it has to be, and takes out rows that repeat others. */
  private settle(): void {
    if (!this.dirty) return;
    this.dirty = false;
    const { blocks } = this;
    const order: number[] = [];
    blocks.forEach((block, b) => {
      for (let i = 0; i < block.rows; i++) order.push(b * BLOCK_ROWS + i);
    });
    const timeOf = (key: number): number =>
      blocks[Math.floor(key / BLOCK_ROWS)]?.timeMs[key % BLOCK_ROWS] ?? NaN;
    order.sort((a, b) => timeOf(a) - timeOf(b) || a - b);
    const sorted: RawBlock[] = [];
    let target = emptyBlock(this.options.channels);
    for (const key of this.withoutDuplicates(order, timeOf)) {
      const source = blocks[Math.floor(key / BLOCK_ROWS)];
      if (!source) continue;
      if (target.rows === BLOCK_ROWS) {
        sorted.push(target);
        target = emptyBlock(this.options.channels);
      }
      copyRow(source, key % BLOCK_ROWS, target);
    }
    sorted.push(target);
    this.blocks = sorted;
  }

  private withoutDuplicates(order: number[], timeOf: (key: number) => number): number[] {
    if (this.coarse) return order;
    const kept: number[] = [];
    const { blocks } = this;
    let groupStart = 0;
    for (const key of order) {
      const ms = timeOf(key);
      if (groupStart < kept.length && timeOf(kept[groupStart] ?? -1) !== ms) groupStart = kept.length;
      const block = blocks[Math.floor(key / BLOCK_ROWS)];
      const twin = kept.slice(groupStart, groupStart + MOST_EQUAL).find((other) => {
        const otherBlock = blocks[Math.floor(other / BLOCK_ROWS)];
        return block && otherBlock && sameReadings(block, key % BLOCK_ROWS, otherBlock, other % BLOCK_ROWS);
      });
      if (twin === undefined) kept.push(key);
      else {
        const lineOf = (k: number): number =>
          blocks[Math.floor(k / BLOCK_ROWS)]?.lines[k % BLOCK_ROWS] ?? NaN;
        this.options.onDuplicate(lineOf(key), lineOf(twin));
      }
    }
    return kept;
  }
}

const first = (block: RawBlock): number => block.timeMs[0] ?? NaN;
const lastMs = (block: RawBlock): number => block.timeMs[block.rows - 1] ?? NaN;

function isAscending({ timeMs, rows }: RawBlock): boolean {
  for (let i = 1; i < rows; i++) if ((timeMs[i] ?? NaN) < (timeMs[i - 1] ?? NaN)) return false;
  return true;
}

function hasEqualTimes(block: RawBlock, previous: RawBlock | null): boolean {
  const { timeMs, rows } = block;
  if (previous && lastMs(previous) === first(block)) return true;
  for (let i = 1; i < rows; i++) if (timeMs[i] === timeMs[i - 1]) return true;
  return false;
}
