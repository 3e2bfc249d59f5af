import { dayMs, type DateParts } from './date-parts';
import type { DateOrder } from './schema';
import { readStamp } from './stamp';

const COLON = 58;
const ZERO = 48;

/**
 * Reads one column's dates and times. What stands before and behind the clock is nearly always what it was in the row before, so
 * both are compared with the last ones taken apart, and only the clock is read anew.
 */
export class StampCell {
  /** Local ms since 1970 of the last cell read (of its date alone, or of its clock alone, in cells of that kind). */
  ms = NaN;
  /** Minutes ahead of UTC that the cell stated, NaN if none. */
  offsetMin = NaN;

  private prefix = '';
  private prefixMs = 0;
  private suffix = '';
  private suffixOffsetMin = NaN;
  private suffixAddsMs = 0;
  private twelve = false;
  private cached = false;
  private runParts: DateParts | null = null;
  private runText = '';
  private runRows = 0;

  /** `onDate` hears of every date with the number of rows running that had it. */
  constructor(
    private readonly order: DateOrder,
    private readonly onDate: ((parts: DateParts, rows: number) => void) | null,
  ) {}

  /** Reads the cell between `from` and `to`; false if it is no time. */
  read(text: string, from: number, to: number): boolean {
    if (this.cached && this.readCached(text, from, to)) {
      this.runRows++;
      return true;
    }
    return this.readAnew(text.slice(from, to));
  }

  /** Counts another row of the date that is running, whose text the caller has compared. */
  again(): void {
    this.runRows++;
  }

  /** Tells of the date that was running. */
  flush(): void {
    if (this.runParts) this.onDate?.(this.runParts, this.runRows);
    this.runParts = null;
    this.runRows = 0;
  }

  private readCached(text: string, from: number, to: number): boolean {
    const { prefix, suffix } = this;
    if (!text.startsWith(prefix, from)) return false;
    let at = from + prefix.length;
    const end = to - suffix.length;
    if (end < at + 4 || !text.startsWith(suffix, end)) return false;
    let hours = text.charCodeAt(at++) - ZERO;
    if (hours < 0 || hours > 9) return false;
    if (text.charCodeAt(at) !== COLON) {
      const digit = text.charCodeAt(at++) - ZERO;
      if (digit < 0 || digit > 9) return false;
      hours = hours * 10 + digit;
    }
    if (text.charCodeAt(at++) !== COLON) return false;
    const minutes = twoDigits(text, at);
    at += 2;
    if (minutes < 0 || minutes > 59 || at > end) return false;
    let seconds = 0;
    let fractionMs = 0;
    if (at < end) {
      if (text.charCodeAt(at++) !== COLON) return false;
      seconds = twoDigits(text, at);
      at += 2;
      if (seconds < 0 || seconds > 59 || at > end) return false;
      if (at < end) {
        fractionMs = fraction(text, at, end);
        if (Number.isNaN(fractionMs)) return false;
      }
    }
    if (this.twelve) {
      if (hours < 1 || hours > 12) return false;
      hours %= 12;
    } else if (hours > 23) return false;
    this.ms =
      this.prefixMs + this.suffixAddsMs + hours * 3_600_000 + minutes * 60_000 + seconds * 1000 + fractionMs;
    this.offsetMin = this.suffixOffsetMin;
    return true;
  }

  private readAnew(text: string): boolean {
    this.cached = false;
    const stamp = readStamp(text);
    if (!stamp) return false;
    const baseMs = stamp.date ? dayMs(stamp.date, this.order) : 0;
    this.countDate(stamp.date, text.slice(0, Math.max(0, stamp.clockAt)) || text);
    if (Number.isNaN(baseMs)) return false;
    const twelve = stamp.clock?.twelve ?? false;
    if (stamp.date && (stamp.clock?.leadingHour ?? 0) > 24) return false;
    this.ms = baseMs + (stamp.clockMs ?? 0);
    this.offsetMin = stamp.offsetMin ?? NaN;
    this.cached = stamp.clockMs !== null && stamp.clockAt >= 0;
    this.prefix = text.slice(0, Math.max(0, stamp.clockAt));
    this.prefixMs = baseMs;
    this.suffix = stamp.restAt >= 0 ? text.slice(stamp.restAt) : '';
    this.suffixOffsetMin = this.offsetMin;
    this.twelve = twelve;
    this.suffixAddsMs = twelve && /p/i.test(this.suffix) ? 43_200_000 : 0;
    return true;
  }

  private countDate(parts: DateParts | null, dateText: string): void {
    if (!parts) return;
    if (this.runParts && dateText === this.runText) {
      this.runRows++;
      return;
    }
    this.flush();
    this.runParts = parts;
    this.runText = dateText;
    this.runRows = 1;
  }
}

function twoDigits(text: string, at: number): number {
  const tens = text.charCodeAt(at) - ZERO;
  const ones = text.charCodeAt(at + 1) - ZERO;
  return tens >= 0 && tens <= 9 && ones >= 0 && ones <= 9 ? tens * 10 + ones : -1;
}

/** `.250` or `,250` as 250 ms; NaN for anything else. */
function fraction(text: string, from: number, end: number): number {
  const mark = text.charCodeAt(from);
  if ((mark !== 46 && mark !== 44) || end - from < 2 || end - from > 10) return NaN;
  let digits = 0;
  let scale = 1;
  for (let i = from + 1; i < end; i++) {
    const digit = text.charCodeAt(i) - ZERO;
    if (digit < 0 || digit > 9) return NaN;
    digits = digits * 10 + digit;
    scale *= 10;
  }
  return (digits * 1000) / scale;
}
