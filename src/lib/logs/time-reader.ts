import { looseNumber, plainNumber } from './numbers';
import type { DateParts } from './date-parts';
import type { DateOrder } from './schema';
import { cellOf, type RowView } from './splitter';
import { StampCell } from './stamp-cell';
import type { TimeSource } from './time-choice';
import { LocalClock, ZoneOffsets } from './zone';

const DAY_MS = 86_400_000;

export interface TimeSettings {
  order: DateOrder;
  decimal: '.' | ',';
  /** Zone of wall-clock times. */
  timeZone: string;
  /** Instant that a counter, or a log without times, begins at; also what the first of two readings is chosen by. */
  anchorMs: number | null;
  /** Midnight (as if UTC) of the day of a log that has only clock times. */
  clockDayMs: number;
  /** Seconds from row to row of a log without times. */
  intervalS: number;
  typicalStepMs: number;
  onDate: (parts: DateParts, rows: number) => void;
}

/** Reads the instant of each row, in the order of the file. */
export interface TimeReader {
  /** Instant in ms since 1970, or NaN if the row's time cannot be read. `index` counts the rows of the table from 0. */
  read(row: RowView, index: number): number;
  /** What could not be read, for the list of rejected rows. */
  complaint(row: RowView): string;
  /** Tells the listener of dates about the last one. */
  end(): void;
}

/** Makes the reader for a source of times. */
export function timeReader(source: TimeSource, settings: TimeSettings): TimeReader {
  switch (source.kind) {
    case 'stamp':
      return stampReader(source.column, settings);
    case 'date-and-clock':
      return dateAndClockReader(source, settings);
    case 'clock':
      return clockReader(source.column, settings);
    case 'duration':
      return durationReader(source.column, source.unit, settings);
    case 'row':
      return rowReader(settings);
    default:
      return numberReader(source, settings);
  }
}

/** Wall-clock ms (as if UTC) to an instant, or as the cell's own offset says. */
function toInstant(settings: TimeSettings): (ms: number, offsetMin: number) => number {
  const clock = new LocalClock(new ZoneOffsets(settings.timeZone), settings.anchorMs);
  clock.setTypicalStep(settings.typicalStepMs);
  return (ms, offsetMin) => (Number.isNaN(offsetMin) ? clock.toUtcMs(ms) : ms - offsetMin * 60_000);
}

function complaintOf(column: number): (row: RowView) => string {
  return (row) => {
    const text = cellOf(row, column);
    if (text === '') return `no time in column ${column + 1}`;
    return `not a time in column ${column + 1}: '${text.length > 40 ? `${text.slice(0, 40)}…` : text}'`;
  };
}

function stampReader(column: number, settings: TimeSettings): TimeReader {
  const cell = new StampCell(settings.order, settings.onDate);
  const instant = toInstant(settings);
  return {
    read(row) {
      const from = row.starts[column] ?? 0;
      const to = row.ends[column] ?? 0;
      return to > from && cell.read(row.text, from, to) ? instant(cell.ms, cell.offsetMin) : NaN;
    },
    complaint: complaintOf(column),
    end: () => cell.flush(),
  };
}

/** A date that is left out takes over from the row before, a day on where the clock fell back over midnight. */
function dateAndClockReader(
  { dateColumn, clockColumn, compact }: Extract<TimeSource, { kind: 'date-and-clock' }>,
  settings: TimeSettings,
): TimeReader {
  const date = new StampCell(settings.order, settings.onDate);
  const clock = new StampCell(settings.order, null);
  const instant = toInstant(settings);
  let dateText = '';
  let dateMs = NaN;
  let previousClockMs = NaN;
  const readDate = (row: RowView): boolean => {
    const from = row.starts[dateColumn] ?? 0;
    const to = row.ends[dateColumn] ?? 0;
    if (to === from) {
      if (clock.ms < previousClockMs - DAY_MS / 2) dateMs += DAY_MS;
      return !Number.isNaN(dateMs);
    }
    if (to - from === dateText.length && row.text.startsWith(dateText, from)) {
      date.again();
      return true;
    }
    const text = row.text.slice(from, to);
    if (!date.read(row.text, from, to)) return false;
    dateText = text;
    dateMs = date.ms;
    return true;
  };
  const complainDate = complaintOf(dateColumn);
  const complainClock = complaintOf(clockColumn);
  let clockFailed = false;
  return {
    read(row) {
      const from = row.starts[clockColumn] ?? 0;
      const to = row.ends[clockColumn] ?? 0;
      const read = compact
        ? clock.read(spaced(row.text.slice(from, to)), 0, 8)
        : to > from && clock.read(row.text, from, to);
      clockFailed = !(read && clock.ms <= DAY_MS);
      if (clockFailed || !readDate(row)) return NaN;
      previousClockMs = clock.ms;
      return instant(dateMs + clock.ms, clock.offsetMin);
    },
    complaint: (row) => (clockFailed ? complainClock(row) : complainDate(row)),
    end: () => date.flush(),
  };
}

/** `70000` as `07:00:00`; anything else stays what it is. */
const spaced = (text: string): string =>
  /^\d{1,6}$/.test(text) ? text.padStart(6, '0').replace(/^(..)(..)(..)$/, '$1:$2:$3') : text;

/** A clock without a date: a fall of more than half a day is midnight, a rise of as much a late row from before it. */
function clockReader(column: number, settings: TimeSettings): TimeReader {
  const cell = new StampCell(settings.order, null);
  const instant = toInstant(settings);
  let dayMs = settings.clockDayMs;
  let previousMs = NaN;
  return {
    read(row) {
      const from = row.starts[column] ?? 0;
      const to = row.ends[column] ?? 0;
      if (!(to > from && cell.read(row.text, from, to)) || cell.ms > DAY_MS) return NaN;
      if (cell.ms < previousMs - DAY_MS / 2) dayMs += DAY_MS;
      else if (cell.ms > previousMs + DAY_MS / 2) dayMs -= DAY_MS;
      previousMs = cell.ms;
      return instant(dayMs + cell.ms, cell.offsetMin);
    },
    complaint: complaintOf(column),
    end: () => undefined,
  };
}

/** A counter of h:mm:ss, h:mm or m:ss. One that starts over right after 23:59 goes on counting. */
function durationReader(
  column: number,
  unit: 'h:mm:ss' | 'h:mm' | 'm:ss',
  settings: TimeSettings,
): TimeReader {
  const cell = new StampCell(settings.order, null);
  const scale = unit === 'm:ss' ? 1 / 60 : 1;
  const wrapMs = DAY_MS * scale;
  const baseMs = settings.anchorMs ?? 0;
  let addedMs = 0;
  let previousMs = NaN;
  return {
    read(row) {
      const from = row.starts[column] ?? 0;
      const to = row.ends[column] ?? 0;
      if (!(to > from && cell.read(row.text, from, to))) return NaN;
      const ms = cell.ms * scale;
      if (unit !== 'm:ss' && ms < wrapMs / 24 && previousMs < wrapMs && previousMs >= (wrapMs * 23) / 24)
        addedMs += wrapMs;
      previousMs = ms;
      return baseMs + addedMs + ms;
    },
    complaint: complaintOf(column),
    end: () => undefined,
  };
}

/** Epoch, spreadsheet days, or a counter in one unit. */
function numberReader(
  source: Extract<TimeSource, { kind: 'epoch' | 'serial' | 'elapsed' }>,
  settings: TimeSettings,
): TimeReader {
  const { column } = source;
  const decimalCode = settings.decimal.charCodeAt(0);
  const instant = toInstant(settings);
  const convert = (value: number): number => {
    if (source.kind === 'epoch') return Math.round(value * source.msPerUnit * 1000) / 1000;
    if (source.kind === 'elapsed') {
      const ms = Math.round(value * source.msPerUnit * 1000) / 1000;
      const openMs = source.msPerUnit > 1000 ? source.msPerUnit * 10 ** -source.decimals : 0;
      return (settings.anchorMs ?? 0) + wholeSecond(ms, openMs);
    }
    return instant(serialMs(value, source.resolutionMs), NaN);
  };
  return {
    read(row) {
      const from = row.starts[column] ?? 0;
      const to = row.ends[column] ?? 0;
      let value = plainNumber(row.text, from, to, decimalCode);
      if (Number.isNaN(value)) value = looseNumber(row.text.slice(from, to), settings.decimal);
      if (Number.isNaN(value)) return NaN;
      const ms = convert(value);
      return Math.abs(ms) < 8.64e15 ? ms : NaN;
    },
    complaint: complaintOf(column),
    end: () => undefined,
  };
}

/** Spreadsheet days since 1899-12-30 to wall-clock ms. */
function serialMs(days: number, resolutionMs: number): number {
  return Math.round(wholeSecond((days - 25_569) * DAY_MS, Math.max(1, resolutionMs)));
}

/** The whole second within what the digits of a time leave open, if there is one; else the time itself. */
function wholeSecond(ms: number, openMs: number): number {
  const second = Math.round(ms / 1000) * 1000;
  return Math.abs(ms - second) <= openMs ? second : ms;
}

function rowReader(settings: TimeSettings): TimeReader {
  const baseMs = settings.anchorMs ?? 0;
  return {
    read: (_row, index) => baseMs + index * settings.intervalS * 1000,
    complaint: () => 'no reading',
    end: () => undefined,
  };
}
