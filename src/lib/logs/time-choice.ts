import type { Column } from './columns';
import { statedUnit } from './columns';
import { elapsedUnit, type ElapsedUnit } from './elapsed-unit';
import type { DateParts } from './date-parts';
import type { Mapping } from './schema';

/** Where the time of a row comes from. */
export type TimeSource =
  | { kind: 'stamp'; column: number }
  | { kind: 'date-and-clock'; dateColumn: number; clockColumn: number; compact: boolean }
  | { kind: 'clock'; column: number }
  | { kind: 'duration'; column: number; unit: 'h:mm:ss' | 'h:mm' | 'm:ss' }
  | { kind: 'epoch'; column: number; msPerUnit: number }
  | { kind: 'serial'; column: number; resolutionMs: number }
  | { kind: 'elapsed'; column: number; msPerUnit: number; decimals: number }
  | { kind: 'row' };

export interface TimeChoice {
  source: TimeSource;
  /** Columns that were time too: they are no channels. */
  timeColumns: number[];
  /** Two columns disagree about the time; these are they. */
  rivals: number[];
  /** A counter whose unit is open: what one unit may be. */
  openUnits: ElapsedUnit[];
}

const INDEX_NAME =
  /^(?:no|nr|n°|n|#|idx|index|id|row|line|rec(?:ord)?|samples?|scan|count(?:er)?|seq(?:uence)?|lfd\.?\s?(?:nr)?|zeile|pos(?:ition)?|reading|point|messung|nummer|number|num)\.?(?:\s?(?:no|nr|#)\.?)?$/i;
const ELAPSED_NAME =
  /elapsed|time|^t$|^t[ _/([]|^t\d?_?s$|\bsec|\bsek|\bmin(?!imum)|hour|stunde|zeit|dauer|laufzeit|run.?time|dur[ée]e|temps|tiempo|tempo|duration|^s$|^h$|^ms$|seconds?|minutes?/i;
const SECOND_HAND =
  /upload|receiv|server|import|sync|export|created|modified|empfang|end\b|ende\b|stop|finish/i;
/** 1998 to 2043 in the unit. */
const EPOCHS: [low: number, high: number, msPerUnit: number][] = [
  [9e8, 2.3e9, 1000],
  [9e11, 2.3e12, 1],
  [9e14, 2.3e15, 1e-3],
];
/** 1981 to 2064 in days since 1899-12-30. */
const SERIAL_DAYS = [29_600, 60_300] as const;

/** Chooses the column, or pair of columns, that a file's rows are timed by. */
export function chooseTime(columns: readonly Column[], mapping: Mapping): TimeChoice {
  const asked = columnOf(columns, mapping.timeColumn);
  const within = asked ? columns.filter((column) => column === asked || isDateOnly(column)) : columns;
  const stamps = within.filter((column) => isFullStamp(column) && (!isConstant(column) || column === asked));
  const dates = within.filter(isDateOnly);
  const clocks = within.filter(isClockOnly);
  const epochs = within.flatMap((column) => epochOf(column) ?? []);
  const serials = within.flatMap((column) => serialOf(column) ?? []);
  const all = [
    ...columns.filter((c) => isFullStamp(c) || isDateOnly(c) || isClockOnly(c)),
    ...epochs,
    ...serials,
  ].map((found) => ('index' in found ? found.index : found.column));
  const chosen = (source: TimeSource, rivals: number[] = []): TimeChoice => ({
    source,
    timeColumns: [...new Set(all)],
    rivals: asked ? [] : rivals,
    openUnits: [],
  });
  const absolute: TimeSource[] = [
    ...stamps.map((column): TimeSource => ({ kind: 'stamp', column: column.index })),
    ...epochs,
    ...serials,
  ];
  if (absolute.length > 0) {
    const ordered = [...absolute].sort((a, b) => rank(columns, a) - rank(columns, b));
    const [first] = ordered;
    if (first) return chosen(first, rivalsOf(columns, ordered));
  }
  const [date] = dates;
  const clock = clocks.find((column) => !isDuration(column)) ?? clocks[0];
  if (date && clock)
    return chosen({
      kind: 'date-and-clock',
      dateColumn: date.index,
      clockColumn: clock.index,
      compact: false,
    });
  const tight = date ? within.find(isCompactClock) : undefined;
  if (date && tight) {
    const pair = chosen({
      kind: 'date-and-clock',
      dateColumn: date.index,
      clockColumn: tight.index,
      compact: true,
    });
    return { ...pair, timeColumns: [...pair.timeColumns, tight.index] };
  }
  if (clock) return chosen(clockOrDuration(clock));
  return chooseCounter(within, columns, asked, chosen);
}

function chooseCounter(
  within: readonly Column[],
  columns: readonly Column[],
  asked: Column | null,
  chosen: (source: TimeSource) => TimeChoice,
): TimeChoice {
  const counters = within.filter((column) => isCounter(column, column === asked));
  const named = counters.find((column) => elapsedNamed(column)) ?? asked;
  if (named && counters.includes(named)) return withUnit(named, columns, chosen);
  const [first] = counters;
  // a nameless first column that only goes up is a counter of time, unless it counts the rows
  if (first && first.index === 0 && !isRowIndex(first) && !INDEX_NAME.test(first.name))
    return withUnit(first, columns, chosen);
  return chosen({ kind: 'row' });
}

function withUnit(
  column: Column,
  columns: readonly Column[],
  chosen: (source: TimeSource) => TimeChoice,
): TimeChoice {
  const { msPerUnit, open } = elapsedUnit(column, columns);
  const choice = chosen({ kind: 'elapsed', column: column.index, msPerUnit, decimals: column.maxDecimals });
  return { ...choice, timeColumns: [...choice.timeColumns, column.index], openUnits: open };
}

/** A column by what a person answered: its name, or its index. */
export function columnOf(columns: readonly Column[], answer: string | number | undefined): Column | null {
  if (answer === undefined) return null;
  const plain = (text: string): string => text.trim().toLowerCase();
  return (
    columns.find(({ name }) => plain(name) === plain(String(answer))) ??
    columns.find(({ index }) => String(index) === String(answer).trim()) ??
    null
  );
}

const most = (column: Column): number => 0.8 * (column.values.length - column.empty);
const filled = (column: Column): boolean => column.values.length > column.empty;
/** The same moment in every row: when something began, not when the row was read. */
const isConstant = (column: Column): boolean =>
  column.stamps.length > 2 &&
  new Set(column.stamps.map((stamp) => `${stamp?.date?.numbers.join()} ${stamp?.clockMs}`)).size === 1;
const isFullStamp = (column: Column): boolean =>
  filled(column) &&
  column.stamps.filter((s) => s?.date && s.clockMs !== null).length >= Math.max(1, most(column));
const isDateOnly = (column: Column): boolean =>
  filled(column) &&
  column.stamps.filter((s) => s?.date && s.clockMs === null).length >= Math.max(1, most(column));
const isClockOnly = (column: Column): boolean =>
  filled(column) && column.stamps.filter((s) => s && !s.date).length >= Math.max(1, most(column));

/** `070000` beside a date: six digits, each pair of which a clock can show. */
function isCompactClock(column: Column): boolean {
  if (column.maxDecimals > 0 || !/time|zeit|heure|hora|\bora\b|clock|uhr|tijd/i.test(column.name))
    return false;
  const values = column.values.filter((value) => !Number.isNaN(value));
  const fits = (value: number): boolean =>
    value < 240_000 && value % 100 < 60 && Math.floor(value / 100) % 100 < 60;
  return (
    values.length >= Math.max(1, most(column)) && values.every(fits) && values.some((value) => value > 2400)
  );
}

/** Whether a column of h:mm:ss counts from the start rather than telling the time of day. */
function isDuration(column: Column): boolean {
  if (/h+:mm|m+:ss|elapsed|laufzeit|dauer|dur[ée]e|duraci|run.?time|since|seit/i.test(column.name))
    return true;
  const first = column.stamps.find((stamp) => stamp !== null);
  const beyondDay = column.stamps.some((stamp) => (stamp?.clock?.leadingHour ?? 0) > 24);
  const meridiem = column.stamps.some((stamp) => stamp?.clock?.twelve);
  return !meridiem && (beyondDay || first?.clockMs === 0);
}

function clockOrDuration(column: Column): TimeSource {
  if (!isDuration(column)) return { kind: 'clock', column: column.index };
  const seconds = column.stamps.some((stamp) => stamp?.clock?.seconds);
  if (seconds) return { kind: 'duration', column: column.index, unit: 'h:mm:ss' };
  const minutesFirst =
    /m+:ss/i.test(column.name) ||
    (!/h/i.test(column.name) && !/h+:mm/i.test(column.name) && fastTwoPart(column));
  return { kind: 'duration', column: column.index, unit: minutesFirst ? 'm:ss' : 'h:mm' };
}

/** Two parts that advance by less than a minute's worth of rows each, up to more hours than a firing has, are m:ss. */
function fastTwoPart(column: Column): boolean {
  return column.stamps.some((stamp) => (stamp?.clock?.leadingHour ?? 0) > 400);
}

const increasing = (values: readonly number[]): boolean => {
  let up = 0;
  let down = 0;
  let previous = NaN;
  for (const value of values) {
    if (Number.isNaN(value)) continue;
    if (value > previous) up++;
    else if (value < previous) down++;
    previous = value;
  }
  return up > 0 && down <= Math.max(2, 0.1 * up);
};

function epochOf(column: Column): { kind: 'epoch'; column: number; msPerUnit: number } | null {
  const values = column.values.filter((value) => !Number.isNaN(value));
  if (values.length < 1 || values.length < most(column)) return null;
  for (const [low, high, msPerUnit] of EPOCHS) {
    const inside = values.filter((value) => value >= low && value <= high).length;
    if (inside >= 0.9 * values.length && (values.length < 2 || increasing(values))) {
      return { kind: 'epoch', column: column.index, msPerUnit };
    }
  }
  return null;
}

function serialOf(column: Column): { kind: 'serial'; column: number; resolutionMs: number } | null {
  const values = column.values.filter((value) => !Number.isNaN(value));
  const [low, high] = SERIAL_DAYS;
  const inside = values.filter((value) => value >= low && value <= high).length;
  if (values.length < 2 || inside < 0.9 * values.length || !increasing(values)) return null;
  const span = Math.max(...values.slice(0, 2000)) - Math.min(...values.slice(0, 2000));
  const dayNamed = /day|date|tag\b|datum|jour|fecha|data|time|zeit|serial/i.test(column.name);
  if (column.maxDecimals < 3 || (span > 60 && !dayNamed)) return null;
  return { kind: 'serial', column: column.index, resolutionMs: 86_400_000 * 10 ** -column.maxDecimals };
}

/** Numbers that never fall but to begin again, and are no readings by their name. */
function isCounter(column: Column, asked: boolean): boolean {
  const values = column.values.filter((value) => !Number.isNaN(value));
  if (values.length < 2 || values.length < most(column) || (values[0] ?? 0) < 0)
    return asked && values.length > 1;
  if (asked) return true;
  const { words } = column;
  if (words.temperatureUnit || words.power || (words.temperature && !elapsedNamed(column))) return false;
  return increasing(values);
}

function elapsedNamed(column: Column): boolean {
  const unit = statedUnit(column)?.other ?? '';
  return ELAPSED_NAME.test(column.name) || /^(?:s|sec\w*|sek\w*|min\w*|h|hours?|stunden|ms)$/i.test(unit);
}

/** Whole numbers one apart: as likely the number of the row. */
function isRowIndex(column: Column): boolean {
  const values = column.values.slice(0, 500);
  return values.every((value, i) => i === 0 || value - (values[i - 1] ?? NaN) === 1);
}

/** Moments with a zone before those without, names of the reading before names of what was done with it later. */
function rank(columns: readonly Column[], source: TimeSource): number {
  const column = 'column' in source ? columns[source.column] : undefined;
  const second = column && SECOND_HAND.test(column.name) ? 100 : 0;
  const fixed =
    source.kind === 'epoch' || column?.stamps.some((stamp) => stamp?.offsetMin !== null && stamp) ? 0 : 10;
  return second + fixed + (column?.index ?? 0) / 1000;
}

/**
 * Columns of absolute time that disagree: their difference is neither nothing nor a whole number of quarter hours that stays the
 * same, as between a local time and the same in UTC.
 */
function rivalsOf(columns: readonly Column[], sources: readonly TimeSource[]): number[] {
  const [first, ...others] = sources;
  if (!first || !('column' in first)) return [];
  const base = momentsOf(columns, first);
  const rivals = others.filter((source) => {
    const moments = momentsOf(columns, source);
    const gaps = base.map((ms, i) => (moments[i] ?? NaN) - ms).filter((gap) => !Number.isNaN(gap));
    if (gaps.length === 0) return false;
    const low = Math.min(...gaps.slice(0, 2000));
    const high = Math.max(...gaps.slice(0, 2000));
    const offset = Math.round((low + high) / 2 / 900_000) * 900_000;
    const sameZone =
      offset === 0 || (Math.abs(offset) <= 14 * 3600_000 && fixedDiffers(columns, first, source));
    return !(sameZone && Math.abs(low - offset) <= 2000 && Math.abs(high - offset) <= 2000);
  });
  return rivals.length === 0
    ? []
    : [first.column, ...rivals.flatMap((source) => ('column' in source ? [source.column] : []))];
}

/** Whether one of two sources fixes its moments and the other is a wall clock. */
function fixedDiffers(columns: readonly Column[], a: TimeSource, b: TimeSource): boolean {
  const fixed = (source: TimeSource): boolean =>
    source.kind === 'epoch' ||
    ('column' in source &&
      (/utc|gmt/i.test(columns[source.column]?.name ?? '') ||
        (columns[source.column]?.stamps.some((stamp) => stamp !== null && stamp.offsetMin !== null) ??
          false)));
  return fixed(a) !== fixed(b);
}

function momentsOf(columns: readonly Column[], source: TimeSource): number[] {
  const column = 'column' in source ? columns[source.column] : undefined;
  if (!column) return [];
  if (source.kind === 'epoch') return column.values.map((value) => value * source.msPerUnit);
  if (source.kind === 'serial') return column.values.map((value) => (value - 25_569) * 86_400_000);
  return column.stamps.map((stamp) => {
    if (!stamp?.date || stamp.clockMs === null) return NaN;
    return anyDayMs(stamp.date) + stamp.clockMs - (stamp.offsetMin ?? 0) * 60_000;
  });
}

/** A day number good enough to compare two columns of the same form, whatever the order of its numbers. */
function anyDayMs(parts: DateParts): number {
  const [a, b, c] = parts.numbers;
  const yearFirst = parts.digits[0] === 4;
  return yearFirst
    ? Date.UTC(a, b - 1, c)
    : Date.UTC(c < 100 ? 2000 + c : c, 0, 1) + (a * 31 + b * 31) * 86_400_000;
}
