import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/kiln-74-litre.json' with { type: 'json' };
import { kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { profileSchema } from '~/lib/profile/schema';
import { simulate } from '~/lib/thermal/simulate';
import type { Simulation } from '~/lib/thermal/simulation';

/** 0.42 m cubed is 74 litres; 118 W a litre is the generous design of a kiln builders' handbook. */
const plate = { energy: 'electric', lining: 'brick', liningM: 0.076, maxC: 1280, ratedKW: 8.7 } as const;
const PREHEATED_C = reference.duties.preheat.toC;
const side = { innerWidthM: 0.42, innerDepthM: 0.42, innerHeightM: 0.42 };
const load = loadSchema.parse({
  furniture: [
    { material: 'cordierite', massKg: 6, thicknessM: 0.015 },
    { material: 'cordierite', massKg: 15, thicknessM: 0.01 },
  ],
});

interface Changed {
  preheatCPerH?: number;
  ratedKW?: number;
  lossFactor?: number;
  heatCapacityFactor?: number;
}

function firedTo(toC: number, { preheatCPerH = 60, ...changed }: Changed = {}): Simulation {
  const segments = [
    { stage: 'drying', toC: PREHEATED_C, rateCPerH: preheatCPerH, holdS: 0 },
    { stage: 'burnout', toC, rateCPerH: 150, holdS: 0 },
  ] as const;
  const profile = profileSchema.parse({ startC: 20, segments });
  const kiln = kilnPlateSchema.parse({ ...plate, ...side, ...changed });
  return simulate({ profile, kiln, load, ambientC: 20 });
}

const usedKWh = (toC: number, lossFactor = 1, heatCapacityFactor = 1): number =>
  firedTo(toC, { lossFactor, heatCapacityFactor }).energy.inKWh;

/** Mean share of full power over segments: what a switched element is on for. */
function dutyOf({ segments, fullPowerKW }: Simulation, index: number): number {
  const { energyKWh = NaN, startS = NaN, endS = NaN } = segments[index] ?? {};
  return energyKWh / ((endS - startS) / 3600) / fullPowerKW;
}

/** How far beyond the readings, as a share of them; 0 between them. */
const beyond = (kWh: number, { fromKWh, toKWh }: (typeof reference.readings)[number]): number =>
  Math.max(0, 1 - kWh / fromKWh, kWh / toKWh - 1);

describe(`${reference.title}: ${reference.source}`, () => {
  it.each(reference.readings)('between $fromKWh and $toKWh kWh to $toC °C, within 10 %', (reading) => {
    expect(beyond(usedKWh(reading.toC), reading)).toBeLessThan(reference.toleranceShare);
  });

  it.each(reference.readings)(
    'a wall that loses 60 % and stores 20 % more, or 40 % less of both, does not to $toC °C',
    (reading) => {
      const off = [usedKWh(reading.toC, 1.6, 1.2), usedKWh(reading.toC, 0.6, 0.6)];
      for (const kWh of off) expect(beyond(kWh, reading)).toBeGreaterThan(reference.toleranceShare);
    },
  );
});

const { duties } = reference;
describe(`share of full power: ${duties.source}`, () => {
  const [generousKW = NaN, lightKW = NaN] = duties.powersKW;

  it.each(duties.firings)('$name: between those of the two designs', ({ toC, share }) => {
    expect(dutyOf(firedTo(toC, { ratedKW: generousKW }), 1)).toBeLessThan(share);
    expect(dutyOf(firedTo(toC, { ratedKW: lightKW }), 1)).toBeGreaterThan(share);
  });

  it('while preheating: more than a slow rate takes, less than a fast one', () => {
    const [slow = NaN, fast = NaN] = duties.preheat.ratesCPerH;
    expect(dutyOf(firedTo(300, { preheatCPerH: slow }), 0)).toBeLessThan(duties.preheat.share);
    expect(dutyOf(firedTo(300, { preheatCPerH: fast }), 0)).toBeGreaterThan(duties.preheat.share);
  });

  it('a wall that loses 60 % and stores 20 % more, or 40 % less of both, is told by one of them', () => {
    const [low, high] = duties.firings;
    const leaky = { ratedKW: generousKW, lossFactor: 1.6, heatCapacityFactor: 1.2 };
    expect(dutyOf(firedTo(low?.toC ?? NaN, leaky), 1)).toBeGreaterThan(low?.share ?? NaN);
    const snug = { ratedKW: lightKW, lossFactor: 0.6, heatCapacityFactor: 0.6 };
    expect(dutyOf(firedTo(high?.toC ?? NaN, snug), 1)).toBeLessThan(high?.share ?? NaN);
  });
});
