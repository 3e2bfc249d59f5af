import type { Column, Columns } from './columns';
import { statedUnit } from './columns';
import { DateOrderEvidence } from './date-order';
import type { DateParts } from './date-parts';
import type { PreambleFacts } from './preamble';
import type { DateOrder, LogQuestion, Mapping, TimeKind } from './schema';
import { chooseTime, type TimeChoice } from './time-choice';
import type { TimeSettings } from './time-reader';
import type { LogReaderOptions } from './types';
import { ZoneOffsets } from './zone';

const DAY_MS = 86_400_000;

/** How a file's times are going to be read, and what of that has to be asked. */
export interface TimePlan {
  choice: TimeChoice;
  settings: TimeSettings;
  kind: TimeKind;
  pattern: string;
  timeZone: string | null;
  evidence: DateOrderEvidence;
  questions: LogQuestion[];
  assumptions: string[];
}

/** Plans the reading of times from the first rows, the lines above them, the answers and the run. */
export function planTime(columns: Columns, facts: PreambleFacts, options: LogReaderOptions): TimePlan {
  const mapping = options.mapping ?? {};
  const plannedMs = options.plannedStartMs ?? null;
  const choice = chooseTime(columns.columns, mapping);
  const questions: LogQuestion[] = [];
  const assumptions: string[] = [];
  const evidence = new DateOrderEvidence(plannedMs === null ? null : new Date(plannedMs).getUTCFullYear());
  const dated = datedColumn(columns.columns, choice);
  if (dated) addRuns(evidence, dated);
  const order = mapping.dateOrder ?? guessOrder(evidence, plannedMs, options.studioTimeZone);
  const kind = kindOf(columns.columns, choice);
  const zone = mapping.timeZone ?? statedZone(columns.columns, choice, facts) ?? options.studioTimeZone;
  const needsZone = kind === 'local' || kind === 'clock';
  if (needsZone && zone === undefined) questions.push({ field: 'timeZone', choices: [], guess: 'UTC' });
  askTimeColumn(columns.columns, choice, questions);
  const timeZone = zone ?? 'UTC';
  const settings: TimeSettings = {
    order,
    decimal: columns.decimal,
    timeZone,
    anchorMs: plannedMs,
    clockDayMs:
      kind === 'clock'
        ? clockDay(columns.columns, choice, facts, options, timeZone, questions, assumptions)
        : 0,
    intervalS: choice.source.kind === 'row' ? intervalOf(facts, mapping, questions, assumptions) : 1,
    typicalStepMs: typicalStep(columns.columns, choice),
    onDate: (parts: DateParts, rows: number) => evidence.add(parts, rows),
  };
  settleCounter(columns.columns, choice, mapping, questions);
  const named = columns.columns.find(
    (column) => 'column' in choice.source && column.index === choice.source.column,
  );
  return {
    choice,
    settings,
    kind,
    pattern: patternOf(columns.columns, choice, evidence, order, named),
    timeZone: needsZone ? timeZone : null,
    evidence,
    questions,
    assumptions,
  };
}

function datedColumn(columns: readonly Column[], { source }: TimeChoice): Column | undefined {
  if (source.kind === 'stamp') return columns[source.column];
  return source.kind === 'date-and-clock' ? columns[source.dateColumn] : undefined;
}

function addRuns(evidence: DateOrderEvidence, column: Column): void {
  let run: DateParts | null = null;
  let rows = 0;
  for (const stamp of column.stamps) {
    if (!stamp?.date) continue;
    if (run && run.numbers.join() === stamp.date.numbers.join()) rows++;
    else {
      if (run) evidence.add(run, rows);
      run = stamp.date;
      rows = 1;
    }
  }
  if (run) evidence.add(run, rows);
}

/** The order that the dates themselves leave, the one nearer to the planned start first, then the habit of the studio's part of the world. */
function guessOrder(
  evidence: DateOrderEvidence,
  plannedMs: number | null,
  zone: string | undefined,
): DateOrder {
  const orders = evidence.orders();
  const [first] = orders;
  if (first === undefined) return 'ymd';
  if (orders.length === 1) return first;
  if (plannedMs !== null) {
    return orders.reduce((best, order) =>
      evidence.distanceMs(order, plannedMs) < evidence.distanceMs(best, plannedMs) ? order : best,
    );
  }
  const american =
    /^America\/(?:New_York|Chicago|Denver|Los_Angeles|Phoenix|Anchorage|Detroit|Boise|Indiana)/.test(
      zone ?? '',
    );
  return american && orders.includes('mdy') ? 'mdy' : first;
}

function kindOf(columns: readonly Column[], { source }: TimeChoice): TimeKind {
  switch (source.kind) {
    case 'epoch':
      return 'instant';
    case 'elapsed':
    case 'duration':
      return 'elapsed';
    case 'row':
      return 'none';
    case 'clock':
      return 'clock';
    case 'stamp': {
      const stamps = columns[source.column]?.stamps.filter((stamp) => stamp !== null) ?? [];
      return stamps.filter((stamp) => stamp.offsetMin !== null).length > 0.9 * stamps.length
        ? 'instant'
        : 'local';
    }
    default:
      return 'local';
  }
}

/** `Time (UTC)`, `time_utc`, `UTC+1`, or a zone named above the table. */
function statedZone(
  columns: readonly Column[],
  { source }: TimeChoice,
  facts: PreambleFacts,
): string | undefined {
  const index =
    'column' in source ? source.column : source.kind === 'date-and-clock' ? source.clockColumn : -1;
  const column = columns[index];
  const text = column ? `${column.name} ${column.unitText}` : '';
  const found = /(?:^|[^a-z])(?:utc|gmt)\s*(?:([+-])\s*(\d{1,2})(?::?00)?)?(?![a-z])/i.exec(text);
  if (!found) return facts.timeZone ?? undefined;
  const hours = Number(found[2] ?? 0);
  return hours === 0 || hours > 12 ? 'UTC' : `Etc/GMT${found[1] === '+' ? '-' : '+'}${hours}`;
}

function askTimeColumn(columns: readonly Column[], choice: TimeChoice, questions: LogQuestion[]): void {
  if (choice.rivals.length === 0) return;
  const names = choice.rivals.flatMap((index) => columns[index] ?? []);
  questions.push({
    field: 'timeColumn',
    choices: names.map((column) => ({ value: column.name, example: firstText(column) })),
    guess: names[0]?.name ?? null,
  });
}

function firstText(column: Column): string {
  const value = column.values.find((number) => !Number.isNaN(number));
  const clock = column.stamps.find((stamp) => stamp !== null)?.clockMs ?? null;
  if (clock !== null) return `${column.name}: first row at ${new Date(clock).toISOString().slice(11, 19)}`;
  return value === undefined ? column.name : `${column.name}: begins with ${value}`;
}

/** The day of a log of clock times: as answered, as stated above the table, or the run's; the day before if it begins late that evening. */
function clockDay(
  columns: readonly Column[],
  { source }: TimeChoice,
  facts: PreambleFacts,
  options: LogReaderOptions,
  timeZone: string,
  questions: LogQuestion[],
  assumptions: string[],
): number {
  const stated = options.mapping?.date ?? facts.date;
  if (stated) return Date.parse(`${stated}T00:00:00Z`);
  if (options.plannedStartMs === undefined) {
    questions.push({ field: 'date', choices: [], guess: null });
    return 0;
  }
  const localMs = options.plannedStartMs + new ZoneOffsets(timeZone).at(options.plannedStartMs);
  const dayMs = Math.floor(localMs / DAY_MS) * DAY_MS;
  const column = source.kind === 'clock' ? columns[source.column] : undefined;
  const firstClockMs = column?.stamps.find((stamp) => stamp !== null)?.clockMs ?? 0;
  const eveningBefore = firstClockMs - DAY_MS - (localMs - dayMs) > -3 * 3_600_000;
  assumptions.push('The file holds clock times without a date; the date is the run’s.');
  return eveningBefore ? dayMs - DAY_MS : dayMs;
}

function intervalOf(
  facts: PreambleFacts,
  mapping: Mapping,
  questions: LogQuestion[],
  assumptions: string[],
): number {
  if (mapping.interval !== undefined) return mapping.interval;
  if (facts.intervalS !== null) {
    assumptions.push(`The file has no times; it states ${facts.intervalS} s between rows.`);
    return facts.intervalS;
  }
  questions.push({ field: 'interval', choices: [], guess: facts.intervalGuessS });
  return 1;
}

/** A counter in an unknown unit: the answer to “how long from row to row” gives it. */
function settleCounter(
  columns: readonly Column[],
  choice: TimeChoice,
  mapping: Mapping,
  questions: LogQuestion[],
): void {
  const { source, openUnits } = choice;
  if (source.kind !== 'elapsed' || openUnits.length === 0) return;
  const step = medianStep(columns[source.column]?.values ?? []);
  if (mapping.interval !== undefined) {
    const wantedMs = mapping.interval * 1000;
    const off = (msPerUnit: number): number => Math.abs(Math.log((step * msPerUnit) / wantedMs));
    source.msPerUnit = openUnits.reduce((best, unit) =>
      off(unit.msPerUnit) < off(best.msPerUnit) ? unit : best,
    ).msPerUnit;
    return;
  }
  const choices = openUnits.map(({ name, msPerUnit }) => ({
    value: Number(((step * msPerUnit) / 1000).toPrecision(6)),
    example: `the counter is in ${name}: a row every ${Number(((step * msPerUnit) / 1000).toPrecision(4))} s`,
  }));
  questions.push({ field: 'interval', choices, guess: choices[0]?.value ?? null });
}

function typicalStep(columns: readonly Column[], { source }: TimeChoice): number {
  if (source.kind === 'serial') return medianStep(columns[source.column]?.values ?? []) * DAY_MS;
  const index =
    source.kind === 'date-and-clock' ? source.clockColumn : 'column' in source ? source.column : -1;
  return (
    medianStep(columns[index]?.stamps.slice(0, 1000).map((stamp) => stamp?.clockMs ?? NaN) ?? []) || 60_000
  );
}

function medianStep(values: readonly number[]): number {
  const steps = values
    .slice(1, 1000)
    .map((value, i) => value - (values[i] ?? NaN))
    .filter((step) => step > 0)
    .sort((a, b) => a - b);
  return steps[steps.length >> 1] ?? NaN;
}

function patternOf(
  columns: readonly Column[],
  { source }: TimeChoice,
  evidence: DateOrderEvidence,
  order: DateOrder,
  named: Column | undefined,
): string {
  const stamp = (index: number) => columns[index]?.stamps.find((found) => found !== null);
  switch (source.kind) {
    case 'stamp':
      return evidence.pattern(order) + (stamp(source.column)?.clockPattern ?? '');
    case 'date-and-clock':
      return `${evidence.pattern(order)} ${stamp(source.clockColumn)?.clockPattern ?? ''}`;
    case 'clock':
      return stamp(source.column)?.clockPattern ?? 'HH:mm:ss';
    case 'duration':
      return `elapsed ${source.unit}`;
    case 'epoch':
      return source.msPerUnit === 1000 ? 'epoch s' : source.msPerUnit === 1 ? 'epoch ms' : 'epoch µs';
    case 'serial':
      return 'spreadsheet days';
    case 'elapsed':
      return `elapsed ${COUNTER_NAMES[source.msPerUnit] ?? (named ? (statedUnit(named)?.other ?? '') : '')}`.trim();
    case 'row':
      return 'none';
  }
}
const COUNTER_NAMES: Record<number, string> = {
  1: 'ms',
  1000: 's',
  60_000: 'min',
  3_600_000: 'h',
  86_400_000: 'days',
};
