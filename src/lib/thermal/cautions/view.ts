import {
  findMaterial,
  type MouldMaterial,
  type PatternMaterial,
  type Property,
  valueAt,
  withOverride,
} from '../../materials';
import {
  formatDuration,
  formatInterval,
  formatLength,
  formatMass,
  formatRate,
  formatTemperature,
  METRIC,
  type UnitPreferences,
} from '../../units';
import type { Segment } from '../../profile/schema';
import type { Caution } from '../estimate-schema';
import type { Mould, Pattern } from '../load-schema';
import type { MeltingFurnace } from '../melt/melting';
import { type PourForecast, pourOf } from '../melt/pour';
import type { MouldTrace, Simulation } from '../simulation';

/** What a rule needs to know besides the simulation. */
export interface CautionContext {
  /** Instant of the start, ms since 1970 UTC; null: not planned yet. */
  startMs: number | null;
  /** Minutes that the studio's local time is ahead of UTC. */
  offsetMinutesAt: (utcMs: number) => number;
  /** Local minutes of the day between which somebody is there; null: not stated. */
  attendedHours: { fromMinute: number; toMinute: number } | null;
  /** The thermocouple that controls the kiln; null: not stated. */
  thermocouple: { type: string; sheathM: number | null; maxC: number | null } | null;
  /** The furnace that the pour names; null or absent: none is known. */
  furnace?: PouringFurnace | null;
  /** Units of the sentences; metric if absent. */
  units?: UnitPreferences;
}

/** A furnace as the cautions know it. */
export type PouringFurnace = MeltingFurnace & {
  readonly name: string;
  readonly capacityKg: number;
  readonly maxC: number;
};

/** A mould of the load with its trace and its materials. */
export interface MouldView {
  trace: MouldTrace;
  mould: Mould;
  material: MouldMaterial;
  pattern: { own: Pattern; material: PatternMaterial } | null;
  /** "The fused silica shell", or what the studio calls it. */
  name: string;
  /** A property of its material at a temperature, the studio's own figure first; null: the table has none. */
  value: (name: string, tempC?: number) => { value: number; source: string } | null;
  patternValue: (name: string, tempC?: number) => { value: number; source: string } | null;
}

/** How quantities are written in a sentence. */
export interface Words {
  temp: (tempC: number) => string;
  difference: (intervalC: number) => string;
  rate: (rateCPerH: number) => string;
  time: (durationS: number) => string;
  mass: (massKg: number) => string;
  length: (lengthM: number) => string;
}

/** A firing as the rules look at it. */
export interface FiringView {
  simulation: Simulation;
  context: CautionContext;
  moulds: MouldView[];
  /** Null where the load has no pour. */
  pour: PourForecast | null;
  words: Words;
}

/** A rule: what it has to say of a firing, nothing if all is well. */
export type CautionRule = (view: FiringView) => Caution[];

type Lookup = Readonly<Record<string, Property | undefined>>;

function reader(properties: Lookup, overrides: Readonly<Record<string, number>>): MouldView['value'] {
  return (name, tempC = 20) => {
    const property = withOverride(properties, overrides, name);
    return property === undefined ? null : { value: valueAt(property, tempC), source: property.source };
  };
}

function mouldView(trace: MouldTrace, mould: Mould | undefined): MouldView[] {
  const material = mould === undefined ? undefined : findMaterial('moulds', mould.material);
  if (mould === undefined || material === undefined) return [];
  const own = mould.pattern;
  const patternMaterial = own === null ? undefined : findMaterial('patterns', own.material);
  return [
    {
      trace,
      mould,
      material,
      pattern: own === null || patternMaterial === undefined ? null : { own, material: patternMaterial },
      name: mould.label === '' ? `The ${material.name.toLowerCase()}` : `“${mould.label}”`,
      value: reader(material.properties, mould.overrides),
      patternValue: reader(patternMaterial?.properties ?? {}, own?.overrides ?? {}),
    },
  ];
}

/** How a person's units write quantities in a sentence. */
export function wordsOf({ temperature: scale, mass, length }: UnitPreferences = METRIC): Words {
  return {
    temp: (tempC) => formatTemperature(tempC, scale),
    difference: (intervalC) => formatInterval(intervalC, scale),
    rate: (rateCPerH) => formatRate(rateCPerH, scale),
    time: formatDuration,
    mass: (massKg) => formatMass(massKg, mass),
    length: (lengthM) => formatLength(lengthM, length),
  };
}

export function firingView(
  simulation: Simulation,
  context: CautionContext,
  pour: PourForecast | null = pourOf(simulation, context.furnace ?? null),
): FiringView {
  return {
    simulation,
    context,
    pour,
    moulds: simulation.moulds.flatMap((trace) => mouldView(trace, simulation.load.moulds[trace.index])),
    words: wordsOf(context.units),
  };
}

/** Segments of the profile with their moments. */
export function* segmentsOf({ simulation }: FiringView): Generator<{
  index: number;
  segment: Segment;
  fromC: number;
  moments: Simulation['segments'][number];
}> {
  let fromC = simulation.profile.startC;
  for (const [index, segment] of simulation.profile.segments.entries()) {
    const moments = simulation.segments[index];
    if (moments !== undefined) yield { index, segment, fromC, moments };
    fromC = segment.toC;
  }
}

/** Index of the last segment that is no cooling; null: all are. */
export function lastHotSegment({ simulation }: FiringView): number | null {
  const at = simulation.profile.segments.findLastIndex((segment) => segment.stage !== 'cooling');
  return at === -1 ? null : at;
}

/** Whether the firing is to end with a mould fit for metal, not only with a pattern melted out. */
export const firesTheMould = ({ simulation }: FiringView): boolean =>
  simulation.profile.segments.some(({ stage }) =>
    ['burnout', 'vitrification', 'casting-hold'].includes(stage),
  );

/** Place of the largest value; -1 for an empty series. */
export function indexOfLargest(series: ArrayLike<number>): number {
  let best = -1;
  for (let at = 0; at < series.length; at += 1) {
    if (best === -1 || (series[at] ?? -Infinity) > (series[best] ?? -Infinity)) best = at;
  }
  return best;
}

/** First place from `from` on at which a value is above a limit; -1 if none is. */
export function firstAbove(series: ArrayLike<number>, limit: number, from = 0): number {
  for (let at = from; at < series.length; at += 1) if ((series[at] ?? -Infinity) > limit) return at;
  return -1;
}
