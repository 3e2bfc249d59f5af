import { MERIDIEM, OFFSET, readClock, readRest, type ClockShape } from './clock-parts';
import { readDate, WEEKDAY, type DateFound, type DateParts } from './date-parts';

/**
 * One date or time as loggers write them, taken apart without deciding what its numbers mean. Slow and thorough: the reader
 * calls it only when the text in front of the clock changes.
 */
export interface Stamp {
  /** The numbers of the date in the order written, with the digits of each; null for a clock alone. */
  date: DateParts | null;
  /** Clock time in ms from midnight, or elapsed; null for a date alone. */
  clockMs: number | null;
  clock: ClockShape | null;
  /** Minutes ahead of UTC if the text says so (`Z`, `+02:00`, `CET`). */
  offsetMin: number | null;
  /** Index in the text of the first digit of the clock, and of what follows the clock. */
  clockAt: number;
  restAt: number;
  /** The pattern of what is not the date: `'T'HH:mm:ss`, ` hh:mm a`. */
  clockPattern: string;
}

/** Takes a trimmed text apart, or answers null if it is no date or time (a bare number never is, except yyyyMMdd[T]HHmmss). */
export function readStamp(text: string): Stamp | null {
  if (text.length < 4 || text.length > 60 || !/^\D{0,12}\d/.test(text)) return null;
  const skipped = WEEKDAY.exec(text)?.[0].length ?? 0;
  const date = readDate(text.slice(skipped));
  if (!date) return readClockFirst(text);
  let at = skipped + date.length;
  const between = /^(?:\s*[T,;]\s*|\s+|[_-](?=\d))/i.exec(text.slice(at))?.[0] ?? '';
  if (at + between.length >= text.length) return dateOnly(date, text.length);
  at += between.length;
  const clock = readClock(text.slice(at), date.compact || between === '', true);
  if (!clock) {
    const zone = OFFSET.exec(text.slice(at - between.length));
    return zone && at - between.length + zone[0].length === text.length ? dateOnly(date, text.length) : null;
  }
  const rest = readRest(text.slice(at + clock.length), clock);
  if (!rest) return null;
  return {
    date: date.parts,
    clockMs: rest.clockMs,
    clock: rest.shape,
    offsetMin: rest.offsetMin,
    clockAt: at,
    restAt: at + clock.length,
    clockPattern: (/T/i.test(between) ? "'T'" : ' ') + rest.pattern,
  };
}

function dateOnly(date: DateFound, length: number): Stamp {
  return {
    date: date.parts,
    clockMs: null,
    clock: null,
    offsetMin: null,
    clockAt: length,
    restAt: length,
    clockPattern: '',
  };
}

/** `22:15:00`, `10:40 PM`, or a clock in front of its date. */
function readClockFirst(text: string): Stamp | null {
  const clock = readClock(text, false, false);
  if (!clock) return null;
  const rest = readRest(text.slice(clock.length), clock);
  if (rest) {
    return {
      date: null,
      clockMs: rest.clockMs,
      clock: rest.shape,
      offsetMin: rest.offsetMin,
      clockAt: 0,
      restAt: clock.length,
      clockPattern: rest.pattern,
    };
  }
  const meridiem = MERIDIEM.exec(text.slice(clock.length))?.[0] ?? '';
  const gap = /^[\s,]+/.exec(text.slice(clock.length + meridiem.length))?.[0] ?? '';
  const dateText = text.slice(clock.length + meridiem.length + gap.length);
  const date = gap ? readDate(dateText.replace(WEEKDAY, '')) : null;
  const head = readRest(meridiem, clock);
  if (!date || !head || date.length !== dateText.replace(WEEKDAY, '').length) return null;
  return {
    date: date.parts,
    clockMs: head.clockMs,
    clock: head.shape,
    offsetMin: null,
    clockAt: -1,
    restAt: -1,
    clockPattern: ` ${head.pattern}`,
  };
}
