import { judgeStep, type StepEvidence } from './clock-step';
import { sameReadings, type RawBlock } from './raw-block';
import type { ClockEvent } from './schema';
import { SortingWindow } from './sorting-window';

const BACKWARD_MS = 60_000;
const HISTORY = 64;
const LOOKAHEAD = 40;
const MOST_JUDGED = 50;
const MOST_EVENTS = 10;

export interface OrderOptions {
  channels: number;
  /** Channels whose continuity tells a clock that was set from rows out of order: temperatures, the kiln's own first. */
  continuity: number[];
  /** Times count from a start and may begin again. */
  counter: boolean;
  emit: (block: RawBlock) => void;
  /** A row at `line` says the same as the one at `ofLine`. */
  onDuplicate: (line: number, ofLine: number) => void;
}

/**
 * Puts rows in order of time while they stream by, and keeps what their order in the file says of the logger's clock.
 *
 * One step backwards of more than a minute with the temperature carrying on is a clock that was set back (or a counter that began
 * again): that and every later time is corrected. Rows that return to a stretch left out before, or that repeat what was there, are
 * only out of order. A step is judged with the rows before and the next 40 after it, so one block is always held back.
 */
export class OrderKeeper {
  readonly clockEvents: ClockEvent[] = [];
  readonly window: SortingWindow;
  private held: RawBlock | null = null;
  private shiftMs = 0;
  private lastMs = -Infinity;
  private firstMs = NaN;
  private judged = 0;
  private descending: boolean | null = null;
  private readonly stepsMs: number[] = [];

  constructor(private readonly options: OrderOptions) {
    this.window = new SortingWindow(options);
  }

  accept(block: RawBlock): void {
    const { held } = this;
    this.held = block;
    if (held) this.process(held, block);
  }

  finish(): void {
    if (this.held) this.process(this.held, null);
    this.held = null;
    this.window.finish();
  }

  /** Median ms between rows, NaN if there was no step. */
  medianStepMs(): number {
    const steps = [...this.stepsMs].sort((a, b) => a - b);
    return steps[steps.length >> 1] ?? NaN;
  }

  private process(block: RawBlock, next: RawBlock | null): void {
    if (this.descending === null) {
      this.firstMs = block.timeMs[0] ?? NaN;
      this.descending = isDescending(block);
      this.window.descending = this.descending;
      this.window.coarse = isCoarse(block);
    }
    const { timeMs, rows } = block;
    for (let i = 0; i < rows; i++) {
      let ms = (timeMs[i] ?? NaN) + this.shiftMs;
      if (ms < this.lastMs - BACKWARD_MS && !this.descending) {
        const shiftMs = this.judge(block, i, next, ms);
        this.shiftMs += shiftMs;
        ms += shiftMs;
      }
      timeMs[i] = ms;
      const stepMs = this.descending ? this.lastMs - ms : ms - this.lastMs;
      if (i > 0 && stepMs > 0) this.noteStep(stepMs, i);
      this.lastMs = ms;
    }
    this.window.push(block);
  }

  /** Keeps the first steps and then a thin sample: the median is wanted, not the last value. */
  private noteStep(stepMs: number, row: number): void {
    if (this.stepsMs.length < HISTORY) this.stepsMs.push(stepMs);
    else if (row % 997 === 0) this.stepsMs[(row * 31) % HISTORY] = stepMs;
  }

  /** How much to add to this and every later time, 0 if the clock was not set. */
  private judge(block: RawBlock, row: number, next: RawBlock | null, ms: number): number {
    if (this.judged >= MOST_JUDGED || this.clockEvents.length >= MOST_EVENTS) return 0;
    this.judged++;
    const stepMs = this.medianStepMs();
    if (Number.isNaN(stepMs)) return 0;
    const verdict = judgeStep(this.evidence(block, row, next, ms, stepMs));
    if (verdict === 'unsorted') return 0;
    const atMs = this.lastMs + stepMs;
    this.clockEvents.push({ atMs, shiftS: (atMs - ms) / 1000, kind: verdict });
    return atMs - ms;
  }

  private repeats(block: RawBlock, row: number): boolean {
    const end = Math.min(block.rows, row + LOOKAHEAD);
    let same = 0;
    let changes = 0;
    for (let i = row; i < end; i++) {
      const ms = (block.timeMs[i] ?? NaN) + this.shiftMs;
      if (!repeatsEarlier(block, row, i, ms) && !this.window.holdsSame(block, i, ms)) continue;
      same++;
      if (i > row && !sameReadings(block, i, block, i - 1)) changes++;
    }
    const few = end - row < TELLING_CHANGES + 1;
    return same >= 0.9 * (end - row) && (few || changes >= TELLING_CHANGES);
  }

  private evidence(
    block: RawBlock,
    row: number,
    next: RawBlock | null,
    ms: number,
    stepMs: number,
  ): StepEvidence {
    const afterMs: number[] = [];
    for (let i = row; i < block.rows && afterMs.length < LOOKAHEAD; i++)
      afterMs.push((block.timeMs[i] ?? NaN) + this.shiftMs);
    for (let i = 0; next && i < next.rows && afterMs.length < LOOKAHEAD; i++) {
      afterMs.push((next.timeMs[i] ?? NaN) + this.shiftMs);
    }
    const seen = (fromMs: number, toMs: number): number =>
      this.window.countBetween(fromMs, toMs) + between(block, row, fromMs, toMs);
    return {
      ms,
      lastMs: this.lastMs,
      firstMs: this.firstMs,
      stepMs,
      counter: this.options.counter,
      afterMs,
      seen,
      repeats: this.repeats(block, row),
      jump: this.options.continuity.map((channel) => jumpAt(block, row, channel, this.window.lastBlock())),
    };
  }
}

/** Changes of reading that must be repeated exactly to be no chance: a hold repeats itself anyway. */
const TELLING_CHANGES = 4;

/** Rows before `row` of a block whose times lie in a span. */
function between(block: RawBlock, row: number, fromMs: number, toMs: number): number {
  let count = 0;
  for (let i = 0; i < row; i++) {
    const ms = block.timeMs[i] ?? NaN;
    if (ms >= fromMs && ms <= toMs) count++;
  }
  return count;
}

/** Whether a row before `row` has this time and the readings of row `as`. */
function repeatsEarlier(block: RawBlock, row: number, as: number, ms: number): boolean {
  for (let i = 0; i < row; i++) if (block.timeMs[i] === ms && sameReadings(block, i, block, as)) return true;
  return false;
}

/** The change of a channel at a row, and how much it usually changes from row to row around there. */
export interface Jump {
  change: number;
  usual: number;
}

function jumpAt(block: RawBlock, row: number, channel: number, previous: RawBlock | null): Jump {
  const column = block.values[channel];
  const before: number[] = [];
  for (let i = row - 1; i >= 0 && before.length < 32; i--) pushNumber(before, column?.[i]);
  const earlier = previous?.values[channel];
  for (let i = (previous?.rows ?? 0) - 1; i >= 0 && before.length < 32; i--) pushNumber(before, earlier?.[i]);
  const after: number[] = [];
  for (let i = row; i < block.rows && after.length < 16; i++) pushNumber(after, column?.[i]);
  const changes = [...pairChanges(before), ...pairChanges(after)].sort((a, b) => a - b);
  return {
    change: Math.abs((after[0] ?? NaN) - (before[0] ?? NaN)),
    usual: changes[Math.floor(0.9 * changes.length)] ?? NaN,
  };
}

function pushNumber(list: number[], value: number | undefined): void {
  if (value !== undefined && !Number.isNaN(value)) list.push(value);
}

const pairChanges = (values: number[]): number[] =>
  values.slice(1).map((value, i) => Math.abs(value - (values[i] ?? value)));

function isDescending(block: RawBlock): boolean {
  let down = 0;
  for (let i = 1; i < block.rows; i++) if ((block.timeMs[i] ?? 0) < (block.timeMs[i - 1] ?? 0)) down++;
  return block.rows >= 3 && down >= 0.9 * (block.rows - 1);
}

/** A clock that shows the same time for several rows: equal readings under it are then no duplicates. */
function isCoarse(block: RawBlock): boolean {
  let equal = 0;
  for (let i = 1; i < block.rows; i++) if (block.timeMs[i] === block.timeMs[i - 1]) equal++;
  return block.rows >= 10 && equal > 0.2 * block.rows;
}
