import { compensatedC, temperatureC } from '../sensors/its90';
import { isReading, statedUnit, type Column } from './columns';
import { unitCell } from './header-words';
import type { PreambleFacts } from './preamble';
import type { ChannelQuantity, ChannelRole, Mapping, TemperatureUnit, ThermocoupleType } from './schema';

/** A channel as far as names, units rows and answers tell before its rows are read. */
export interface ChannelDraft {
  column: Column;
  /** Null: decided by the values at the end. */
  quantity: ChannelQuantity | null;
  /** Null for a temperature whose unit nothing states. */
  unit: string | null;
  role: ChannelRole | null;
  setpoint: boolean;
  thermocouple: ThermocoupleType | null;
  junction: { channel: number } | { tempC: number } | null;
}

const ROOM_C = 20;

/** Drafts of the channels of a table, in the order of its columns. */
export function draftChannels(
  columns: readonly Column[],
  timeColumns: readonly number[],
  facts: PreambleFacts,
  mapping: Mapping,
): ChannelDraft[] {
  const common = facts.unit ?? unitColumn(columns);
  const drafts = columns
    .filter((column) => !timeColumns.includes(column.index) && isReading(column))
    .map((column) => draft(column, common, facts));
  applyAnswers(drafts, mapping);
  drafts.forEach((entry) => {
    if (entry.quantity === 'emf') entry.junction = junctionOf(entry, drafts);
  });
  return drafts;
}

function draft(column: Column, common: TemperatureUnit | null, facts: PreambleFacts): ChannelDraft {
  const { words } = column;
  const stated = statedUnit(column);
  const base = { column, role: words.role, setpoint: words.setpoint, thermocouple: null, junction: null };
  if (stated?.temperature === 'mV' && !words.foreign) {
    return { ...base, quantity: 'emf', unit: 'mV', thermocouple: words.thermocouple ?? facts.thermocouple };
  }
  if (stated?.temperature && !words.power) {
    return {
      ...base,
      quantity: 'temperature',
      unit: stated.temperature,
      thermocouple: typeOf(column, facts),
    };
  }
  if (words.power || (stated?.other === '%' && !words.foreign)) {
    return { ...base, role: 'other', quantity: 'power', unit: stated?.other ?? '' };
  }
  if (words.foreign || stated?.other)
    return { ...base, role: 'other', quantity: 'other', unit: stated?.other ?? '' };
  const known = words.temperature || words.role !== null || words.thermocouple !== null;
  return {
    ...base,
    quantity: known ? (common === 'mV' ? 'emf' : 'temperature') : null,
    unit: common,
    thermocouple: typeOf(column, facts),
  };
}

const typeOf = (column: Column, facts: PreambleFacts): ThermocoupleType | null =>
  column.words.role === 'junction' || column.words.role === 'room'
    ? null
    : (column.words.thermocouple ?? facts.thermocouple);

/** A column of words that holds one and the same unit in all rows. */
function unitColumn(columns: readonly Column[]): TemperatureUnit | null {
  for (const column of columns) {
    const unit = column.constantText === null ? null : unitCell(column.constantText);
    if (unit?.temperature && /unit|einheit|scale/i.test(column.name)) return unit.temperature;
  }
  return null;
}

/** A stated unit wins over an answer, unless every one is stated: then the answer is meant to overrule them. */
function applyAnswers(drafts: ChannelDraft[], mapping: Mapping): void {
  const { unit, thermocouple } = mapping;
  const heat = (entry: ChannelDraft): boolean =>
    entry.quantity === 'temperature' || entry.quantity === 'emf' || entry.quantity === null;
  if (unit) {
    const open = drafts.filter((entry) => heat(entry) && entry.unit === null);
    for (const entry of open.length > 0 ? open : drafts.filter(heat)) {
      entry.unit = unit;
      entry.quantity = entry.quantity === null ? null : unit === 'mV' ? 'emf' : 'temperature';
    }
    const nameless = drafts.filter((entry) => entry.quantity === null);
    if (unit === 'mV' && nameless.length === drafts.length)
      for (const entry of nameless) entry.quantity = 'emf';
  }
  if (thermocouple)
    for (const entry of drafts) if (entry.quantity === 'emf') entry.thermocouple = thermocouple;
}

/**
 * Where an emf's reference junction is: in a channel of that name, else in the room's. Without either, an emf that begins where the
 * type stands at room temperature was compensated to 0 °C by the logger; one that begins at nothing was not, and its junction was
 * as warm as the kiln then was, taken as 20 °C.
 */
function junctionOf(entry: ChannelDraft, drafts: readonly ChannelDraft[]): ChannelDraft['junction'] {
  const measured = ['junction', 'room'].map((role) =>
    drafts.findIndex((other) => other.quantity === 'temperature' && other.role === role),
  );
  const channel = measured.find((index) => index >= 0);
  if (channel !== undefined) return { channel };
  const type = entry.thermocouple;
  if (!type) return { tempC: 0 };
  const start = Math.min(...entry.column.values.filter((value) => !Number.isNaN(value)).slice(0, 5));
  const referencedC = temperatureC(type, start);
  if (referencedC >= 8) return { tempC: 0 };
  const openC = compensatedC(type, start, ROOM_C);
  return { tempC: openC > 5 && openC < 45 ? ROOM_C : 0 };
}
