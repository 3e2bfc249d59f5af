import { temperatureC } from '../sensors/its90';
import { columnOf } from './time-choice';
import type { ChannelDraft } from './channel-draft';
import {
  THERMOCOUPLE_TYPES,
  type ChannelQuantity,
  type ChannelRole,
  type LogQuestion,
  type Mapping,
  type TemperatureUnit,
} from './schema';
import { shareApart, startOf, type ChannelStatistics } from './statistics';
import { inUnit, unitByEvidence } from './unit-evidence';

/** A channel with everything decided that could be. */
export interface ConcludedChannel extends ChannelDraft {
  quantity: ChannelQuantity;
  unit: string;
  role: ChannelRole;
}

export interface Conclusion {
  channels: ConcludedChannel[];
  control: number | null;
  questions: LogQuestion[];
  assumptions: string[];
}

/** Decides, with all rows read, what names left open: quantities, units, the roles of nameless channels, which one the kiln is led by. */
export function conclude(
  drafts: readonly ChannelDraft[],
  statistics: readonly ChannelStatistics[],
  mapping: Mapping,
): Conclusion {
  const questions: LogQuestion[] = [];
  const assumptions: string[] = [];
  const quantities = drafts.map((entry, i) => entry.quantity ?? quantityByValues(drafts, statistics, i));
  const unit = openUnit(drafts, quantities, statistics, questions, assumptions);
  const settled = drafts.map((entry, i) => settle(entry, quantities[i] ?? 'other', unit));
  const control = controlOf(settled, statistics, mapping, questions);
  askThermocouple(settled, statistics, questions);
  const channels = settled.map((entry, i) => ({
    ...entry,
    role: finalRole(settled, statistics, i, control),
  }));
  describeJunctions(channels, assumptions);
  return { channels, control, questions, assumptions };
}

/** A nameless column of numbers: a temperature, unless it only counts, only switches, or stays within per cents while others heat. */
function quantityByValues(
  drafts: readonly ChannelDraft[],
  statistics: readonly ChannelStatistics[],
  index: number,
): ChannelQuantity {
  const own = statistics[index];
  const values = drafts[index]?.column.values.filter((value) => !Number.isNaN(value)) ?? [];
  if (!own || own.samples === 0) return 'other';
  if (values.length > 3 && values.every((value, i) => i === 0 || value - (values[i - 1] ?? 0) === 1))
    return 'other';
  if (own.max - own.min <= 1 && new Set(values.slice(0, 500)).size <= 2) return 'other';
  const named = statistics.some((other, i) => {
    const heats = drafts[i]?.quantity === 'temperature' && drafts[i]?.role !== 'room';
    return heats && other.max - other.min > 150;
  });
  return named && own.min >= 0 && own.max <= 100 ? 'other' : 'temperature';
}

/** The unit of all temperatures that state none: one logger writes one. */
function openUnit(
  drafts: readonly ChannelDraft[],
  quantities: readonly ChannelQuantity[],
  statistics: readonly ChannelStatistics[],
  questions: LogQuestion[],
  assumptions: string[],
): TemperatureUnit | null {
  const open = drafts.flatMap((entry, i) =>
    quantities[i] === 'temperature' && entry.unit === null ? [i] : [],
  );
  const telling = open.filter((i) => !drafts[i]?.setpoint && (statistics[i]?.samples ?? 0) > 0);
  const hottest = (telling.length > 0 ? telling : open).reduce<number | null>(
    (best, i) => (best === null || evidentlyBetter(statistics, i, best) ? i : best),
    null,
  );
  const own = hottest === null ? undefined : statistics[hottest];
  if (hottest === null || !own || own.samples === 0) return hottest === null ? null : 'C';
  const decimals = drafts[hottest]?.column.maxDecimals ?? 0;
  const verdict = unitByEvidence({ start: startOf(own), min: own.min, max: own.max, decimals });
  const name = drafts[hottest]?.column.name ?? '';
  if ('unit' in verdict) {
    assumptions.push(
      `No unit is stated for ${name}; a log that runs from ${round(startOf(own))} to ${round(own.max)} is in ${unitName(verdict.unit)}.`,
    );
    return verdict.unit;
  }
  const stated = new Set(
    drafts.flatMap((entry, i) => (quantities[i] === 'temperature' && entry.unit ? [entry.unit] : [])),
  );
  const [sibling] = stated;
  const shared = verdict.choices.find((choice) => choice === sibling);
  if (stated.size === 1 && shared) {
    assumptions.push(
      `No unit is stated for ${name}; taken as ${unitName(shared)} like the other temperatures of the file.`,
    );
    return shared;
  }
  questions.push({
    field: 'unit',
    choices: verdict.choices.map((unit) => ({ value: unit, example: inUnit(own.max, unit) })),
    guess: verdict.guess,
  });
  return verdict.guess;
}

/** A channel that begins at the temperature of the room tells more than one that does not; of two such, the hotter one. */
function evidentlyBetter(statistics: readonly ChannelStatistics[], a: number, b: number): boolean {
  const [own, other] = [statistics[a], statistics[b]];
  if (!own || !other) return false;
  const rank = (channel: ChannelStatistics): number =>
    'unit' in unitByEvidence({ start: startOf(channel), min: channel.min, max: channel.max, decimals: 0 })
      ? 1
      : 0;
  return rank(own) === rank(other) ? own.max > other.max : rank(own) > rank(other);
}

function settle(
  entry: ChannelDraft,
  quantity: ChannelQuantity,
  open: TemperatureUnit | null,
): ChannelDraft & { quantity: ChannelQuantity; unit: string } {
  const heat = quantity === 'temperature' || quantity === 'emf';
  const unit = entry.unit ?? (heat ? (open ?? 'C') : '');
  return {
    ...entry,
    quantity: quantity === 'temperature' && unit === 'mV' ? 'emf' : quantity,
    unit: heat || entry.quantity !== null ? unit : '',
  };
}

/**
 * The channel that the kiln is led by: the one a person named; the first of a chamber; else the first nameless one that heats. Nameless
 * ones that go apart by more than 25 degrees most of the time cannot be told from each other: that is a question.
 */
function controlOf(
  channels: readonly (ChannelDraft & { quantity: ChannelQuantity })[],
  statistics: readonly ChannelStatistics[],
  mapping: Mapping,
  questions: LogQuestion[],
): number | null {
  const asked = columnOf(
    channels.map(({ column }) => column),
    mapping.controlColumn,
  );
  const answered = asked ? channels.findIndex(({ column }) => column === asked) : -1;
  if (answered >= 0) return answered;
  const heat = channels.flatMap(({ quantity, setpoint }, i) =>
    (quantity === 'temperature' || quantity === 'emf') && !setpoint && (statistics[i]?.samples ?? 0) > 0
      ? [i]
      : [],
  );
  const full = Math.max(0, ...heat.map((i) => statistics[i]?.samples ?? 0));
  const steady = heat.filter((i) => (statistics[i]?.samples ?? 0) * 2 >= full);
  const chamber = steady.find((i) => channels[i]?.role === 'chamber');
  if (chamber !== undefined) return chamber;
  const climb = (i: number): number => (statistics[i]?.max ?? 0) - (statistics[i]?.min ?? 0);
  const nameless = steady.filter((i) => channels[i]?.role === null);
  const highest = Math.max(0, ...nameless.map(climb));
  const heating = nameless.filter((i) => climb(i) >= 0.2 * highest);
  const [first] = heating;
  if (first === undefined)
    return (
      steady.find((i) => ['mould', 'load'].includes(channels[i]?.role ?? '')) ?? steady[0] ?? heat[0] ?? null
    );
  if (heating.some((i) => i !== first && shareApart(statistics, first, i) > 0.5)) {
    const hottest = heating.reduce((best, i) =>
      startClimb(statistics, i) > startClimb(statistics, best) ? i : best,
    );
    questions.push({
      field: 'controlColumn',
      choices: heating.map((i) => ({
        value: channels[i]?.column.name ?? '',
        example: `${channels[i]?.column.name ?? ''}: ${round(statistics[i]?.min ?? NaN)} to ${round(statistics[i]?.max ?? NaN)}`,
      })),
      guess: channels[hottest]?.column.name ?? null,
    });
    return hottest;
  }
  return first;
}

const startClimb = (statistics: readonly ChannelStatistics[], i: number): number =>
  statistics[i]?.max ?? -Infinity;

function askThermocouple(
  channels: readonly (ChannelDraft & { quantity: ChannelQuantity })[],
  statistics: readonly ChannelStatistics[],
  questions: LogQuestion[],
): void {
  const index = channels.findIndex(
    ({ quantity, thermocouple }) => quantity === 'emf' && thermocouple === null,
  );
  const max = statistics[index]?.max ?? NaN;
  if (index < 0) return;
  const choices = THERMOCOUPLE_TYPES.map((type) => ({ type, tempC: temperatureC(type, max) })).filter(
    ({ tempC }) => !Number.isNaN(tempC) && tempC < 1500,
  );
  const offered = choices.length > 0 ? choices : THERMOCOUPLE_TYPES.map((type) => ({ type, tempC: NaN }));
  const guess =
    offered.find(({ type, tempC }) => type === 'K' && tempC > 100) ??
    offered.find(({ type }) => type === 'S') ??
    offered[0];
  questions.push({
    field: 'thermocouple',
    choices: offered.map(({ type, tempC }) => ({
      value: type,
      example: Number.isNaN(tempC)
        ? `type ${type}`
        : `type ${type}: ${round(max)} mV is about ${Math.round(tempC)} °C`,
    })),
    guess: guess?.type ?? null,
  });
}

/** A channel without a telling name is of the chamber if it leads the kiln or keeps with the one that does. */
function finalRole(
  channels: readonly (ChannelDraft & { quantity: ChannelQuantity })[],
  statistics: readonly ChannelStatistics[],
  index: number,
  control: number | null,
): ChannelRole {
  const channel = channels[index];
  if (!channel || (channel.quantity !== 'temperature' && channel.quantity !== 'emf')) return 'other';
  if (channel.role) return channel.role;
  if (channel.setpoint) return 'other';
  if (index === control) return 'chamber';
  const leads = control !== null && channels[control]?.quantity === channel.quantity;
  const own = statistics[index];
  const other = control === null ? undefined : statistics[control];
  const climbs = own && other && own.max - own.min >= 0.5 * (other.max - other.min);
  return leads && climbs && shareApart(statistics, control, index) <= 0.5 ? 'chamber' : 'other';
}

function describeJunctions(channels: readonly ConcludedChannel[], assumptions: string[]): void {
  for (const { quantity, junction, column } of channels) {
    if (quantity !== 'emf' || !junction) continue;
    if ('channel' in junction) {
      assumptions.push(
        `The cold junction of ${column.name} is ${channels[junction.channel]?.column.name ?? ''}.`,
      );
    } else if (junction.tempC === 0) {
      assumptions.push(`${column.name} has no cold-junction channel; its emf was taken as referred to 0 °C.`);
    } else {
      assumptions.push(
        `${column.name} has no cold-junction channel and begins near 0 mV; its junction was taken as ${junction.tempC} °C.`,
      );
    }
  }
}

const round = (value: number): number => Math.round(value * 10) / 10;
const unitName = (unit: TemperatureUnit): string =>
  unit === 'K' ? 'kelvin' : unit === 'mV' ? 'mV' : `°${unit}`;
