import type { HeadRow } from './cells';
import { unitCell } from './header-words';
import { dayMs } from './date-parts';
import { readStamp } from './stamp';
import { THERMOCOUPLE_TYPES, type TemperatureUnit, type ThermocoupleType } from './schema';

/** What the lines above the header say of the table below. */
export interface PreambleFacts {
  unit: TemperatureUnit | null;
  thermocouple: ThermocoupleType | null;
  /** Seconds between rows, if stated with a unit. */
  intervalS: number | null;
  /** The same without a unit: no more than a guess. */
  intervalGuessS: number | null;
  timeZone: string | null;
  /** yyyy-MM-dd, if one date is stated and can be read in one way only. */
  date: string | null;
}

const UNIT_LABEL =
  /(?:^|[^a-z])(?:units?|einheit(?:en)?|unit[eé]s?|unidad(?:es)?|unit[aà]|eenheid|scale|skala|temperature unit)\b\s*[:=,;\t ]*\s*(.*)$/i;
const TYPE_LABEL =
  /(?:type|typ|tipo|thermocouple|thermoelement|f[üu]e?hler|sensor|probe)\b[\s:=,;]*(?:type|typ|tipo)?[\s:=,;-]*([BEJKNRST])(?![A-Za-z0-9])/i;
const INTERVAL_LABEL =
  /(?:interval|sampl\w*|period|rate|takt|abtast\w*|cadence|intervall\w*|intervalo|intervallo|every)\D{0,20}?(\d+(?:[.,]\d+)?)\s*(ms|s|sec\w*|sek\w*|min\w*|h|hours?)?\b/i;
const ZONE_LABEL =
  /(?:time.?zone|zeitzone|fuseau|zona horaria|fuso|\btz\b)\s*[:=,;]?\s*([A-Za-z_]+(?:\/[A-Za-z_+-]+){0,2})/i;
const DATE_LABEL =
  /(?:date|datum|fecha|data|start|begin|beginn|d[ée]but|inicio|inizio)\w*\s*[:=,;]?\s*(.{6,40})$/i;

export function preambleFacts(rows: readonly HeadRow[]): PreambleFacts {
  const facts: PreambleFacts = {
    unit: null,
    thermocouple: null,
    intervalS: null,
    intervalGuessS: null,
    timeZone: null,
    date: null,
  };
  for (const row of rows) {
    const line = row.cells
      .join(' ')
      .replace(/^[#;%/*\s]+/, '')
      .trim();
    const unit = unitCell(UNIT_LABEL.exec(line)?.[1] ?? '');
    facts.unit ??= unit?.temperature ?? null;
    const type = TYPE_LABEL.exec(line)?.[1]?.toUpperCase();
    facts.thermocouple ??= THERMOCOUPLE_TYPES.find((letter) => letter === type) ?? null;
    readInterval(line, facts);
    facts.timeZone ??= zoneNamed(ZONE_LABEL.exec(line)?.[1]);
    facts.date ??= singleDate(DATE_LABEL.exec(line)?.[1] ?? '');
  }
  return facts;
}

function readInterval(line: string, facts: PreambleFacts): void {
  const found = INTERVAL_LABEL.exec(line);
  const amount = Number(found?.[1]?.replace(',', '.'));
  if (!found || !(amount > 0)) return;
  const unit = found[2]?.toLowerCase();
  if (unit === undefined) {
    facts.intervalGuessS ??= amount;
    return;
  }
  const seconds = unit === 'ms' ? 0.001 : unit.startsWith('s') ? 1 : unit.startsWith('m') ? 60 : 3600;
  facts.intervalS ??= amount * seconds;
}

function zoneNamed(name: string | undefined): string | null {
  if (!name || !/^UTC$|^GMT$|\//.test(name)) return null;
  try {
    return new Intl.DateTimeFormat('en-GB', { timeZone: name }).resolvedOptions().timeZone;
  } catch {
    return null;
  }
}

/** A date that only one order of its numbers makes a day of. */
function singleDate(text: string): string | null {
  const parts = readStamp(text.trim())?.date;
  if (!parts) return null;
  const days = new Set(
    (['dmy', 'mdy', 'ymd'] as const).map((order) => dayMs(parts, order)).filter((ms) => !Number.isNaN(ms)),
  );
  const [only] = days;
  return days.size === 1 && only !== undefined ? new Date(only).toISOString().slice(0, 10) : null;
}
