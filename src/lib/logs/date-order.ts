import { datePattern, dayMs, type DateParts } from './date-parts';
import { DATE_ORDERS, type DateOrder } from './schema';

const DAY_MS = 86_400_000;
/** No firing lasts longer: an order under which the dates span more, while another keeps them together, is wrong. */
const LONGEST_FIRING_DAYS = 16;

interface Candidate {
  order: DateOrder;
  previousMs: number;
  lowestMs: number;
  highestMs: number;
  /** Steps from one date to the next that are exactly one day. */
  nextDays: number;
}

/**
 * Which of a date's numbers is the day, by the evidence of all dates of a file as they come by: a number that no month has, a year
 * of four digits, points between (always day first), dates that follow each other day by day under one order only.
 */
export class DateOrderEvidence {
  private candidates: Candidate[] | null = null;
  private first: DateParts | null = null;

  /** `nearYear`: the year of the run, which two-digit years are told by. */
  constructor(private readonly nearYear: number | null) {}

  /** Counts a date that stood in `rows` rows running. One that stood in a single row may be damaged, and proves nothing. */
  add(parts: DateParts, rows: number): void {
    if (rows < 2 && this.first) return;
    this.first ??= parts;
    this.candidates ??= this.possible(parts);
    const kept = this.candidates.filter((candidate) => {
      const ms = dayMs(parts, candidate.order);
      if (Number.isNaN(ms)) return false;
      if (ms - candidate.previousMs === DAY_MS) candidate.nextDays++;
      candidate.previousMs = ms;
      candidate.lowestMs = Math.min(candidate.lowestMs, ms);
      candidate.highestMs = Math.max(candidate.highestMs, ms);
      return true;
    });
    if (kept.length > 0) this.candidates = kept;
  }

  private possible(parts: DateParts): Candidate[] {
    if (parts.order) return [startOf(parts.order)];
    const [a, , c] = parts.digits;
    let orders = DATE_ORDERS.filter((order) =>
      order === 'ymd' ? a === 4 || (a === 2 && c <= 2) : a <= 2 && (c === 4 || c === 2),
    );
    if (c !== 4 && a !== 4) orders = this.byYear(parts, orders);
    if (parts.separator === '.' && orders.includes('dmy')) orders = ['dmy'];
    return orders.map(startOf);
  }

  private byYear(parts: DateParts, orders: DateOrder[]): DateOrder[] {
    const { nearYear } = this;
    if (nearYear === null) return orders;
    const near = orders.filter(
      (order) => Math.abs(2000 + (parts.numbers[order.indexOf('y')] ?? 0) - nearYear) <= 2,
    );
    return near.length > 0 ? near : orders;
  }

  /** The orders that are left, the likelier first as far as the dates tell. Empty if there was no date. */
  orders(): DateOrder[] {
    const all = this.candidates ?? [];
    if (all.length < 2) return all.map(({ order }) => order);
    const short = all.filter(
      ({ lowestMs, highestMs }) => highestMs - lowestMs <= LONGEST_FIRING_DAYS * DAY_MS,
    );
    const left = short.length > 0 ? short : all;
    const stepping = left.filter(({ nextDays }) => nextDays > 0);
    const chosen = stepping.length > 0 ? stepping : left;
    const [one] = chosen;
    const same = chosen.every(
      ({ lowestMs, highestMs }) => lowestMs === one?.lowestMs && highestMs === one.highestMs,
    );
    return (same ? chosen.slice(0, 1) : chosen).map(({ order }) => order);
  }

  /** What the first date would be under an order, for people: `3 April 2026`. */
  example(order: DateOrder): string {
    const ms = this.first ? dayMs(this.first, order) : NaN;
    return Number.isNaN(ms) ? order : longDate(ms);
  }

  /** Distance in ms of the first date under an order from an instant. */
  distanceMs(order: DateOrder, instantMs: number): number {
    const ms = this.first ? dayMs(this.first, order) : NaN;
    return Number.isNaN(ms) ? Infinity : Math.abs(ms - instantMs);
  }

  pattern(order: DateOrder): string {
    return this.first ? datePattern(this.first, this.first.order ?? order) : '';
  }
}

const startOf = (order: DateOrder): Candidate => ({
  order,
  previousMs: NaN,
  lowestMs: Infinity,
  highestMs: -Infinity,
  nextDays: 0,
});

const MONTH_NAMES = [
  'January',
  'February',
  'March',
  'April',
  'May',
  'June',
  'July',
  'August',
  'September',
  'October',
  'November',
  'December',
];

/** A day in words, which no reader can take for another. */
export function longDate(ms: number): string {
  const date = new Date(ms);
  return `${date.getUTCDate()} ${MONTH_NAMES[date.getUTCMonth()] ?? ''} ${date.getUTCFullYear()}`;
}
