import { statedUnit, type Column } from './columns';

export interface ElapsedUnit {
  name: 'ms' | 's' | 'min' | 'h' | 'd';
  msPerUnit: number;
}

const UNITS: ElapsedUnit[] = [
  { name: 'ms', msPerUnit: 1 },
  { name: 's', msPerUnit: 1000 },
  { name: 'min', msPerUnit: 60_000 },
  { name: 'h', msPerUnit: 3_600_000 },
  { name: 'd', msPerUnit: 86_400_000 },
];
const NAMES: [RegExp, ElapsedUnit['name']][] = [
  [/(?:^|[^a-z])(?:ms|msec|millis\w*|millisek\w*)(?![a-z])/i, 'ms'],
  [/(?:^|[^a-z])(?:s|secs?|seconds?|sek|sekunden?|secondes?|segundos?|secondi|seconden)(?![a-z])/i, 's'],
  [/(?:^|[^a-z])(?:m|mins?|minutes?|minuten?|minutos?|minuti)(?![a-z])/i, 'min'],
  [/(?:^|[^a-z])(?:h|hrs?|hours?|std|stunden?|heures?|horas?|ore|uur|uren)(?![a-z])/i, 'h'],
  [/(?:^|[^a-z])(?:d|days?|tage?|jours?|d[íi]as?|giorni)(?![a-z])/i, 'd'],
];
/** Fastest climb that a kiln's log shows over a twentieth of it, and the slowest that its fastest is, °C/h (common practice); longest firing. */
const FASTEST_PER_H = 4000;
const SLOWEST_PER_H = 20;
const LONGEST_MS = 16 * 86_400_000;

/**
 * What one unit of a counter is: as its name or its units row says, or else the only one under which the log is neither longer than
 * a firing nor climbs faster or slower than a kiln does. `open` holds the units left where that does not settle it.
 */
export function elapsedUnit(
  column: Column,
  columns: readonly Column[],
): { msPerUnit: number; open: ElapsedUnit[] } {
  const stated = `${statedUnit(column)?.other ?? ''} ${column.name.replaceAll('_', ' ')}`;
  const named = NAMES.find(([form]) => form.test(stated));
  const unit = named ? UNITS.find(({ name }) => name === named[1]) : undefined;
  if (unit) return { msPerUnit: unit.msPerUnit, open: [] };
  const counts = column.values.filter((value) => !Number.isNaN(value));
  const span = (counts[counts.length - 1] ?? 0) - (counts[0] ?? 0);
  const climb = steepest(column, columns);
  const possible = UNITS.filter(({ name, msPerUnit }) => {
    const perHour = (climb * 3_600_000) / msPerUnit;
    return (
      name !== 'd' && span * msPerUnit <= LONGEST_MS && perHour <= FASTEST_PER_H && perHour >= SLOWEST_PER_H
    );
  });
  const seconds = possible.find(({ name }) => name === 's') ?? possible[0];
  return { msPerUnit: seconds?.msPerUnit ?? 1000, open: possible.length === 1 ? [] : possible };
}

/** Largest rise of any reading over a twentieth of the rows, per unit of the counter. */
function steepest(counter: Column, columns: readonly Column[]): number {
  let best = 0;
  const stride = Math.max(1, Math.floor(counter.values.length / 20));
  for (const column of columns) {
    if (column === counter || column.words.power || column.numbers < 2) continue;
    for (let i = stride; i < column.values.length; i++) {
      const rise = (column.values[i] ?? NaN) - (column.values[i - stride] ?? NaN);
      const time = (counter.values[i] ?? NaN) - (counter.values[i - stride] ?? NaN);
      if (time > 0 && rise / time > best) best = rise / time;
    }
  }
  return best;
}
