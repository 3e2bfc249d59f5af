import { describe, expect, it } from 'vitest';
import available from '../../fixtures/references/heat-available.json' with { type: 'json' };
import lumped from '../../fixtures/references/heat-lumped.json' with { type: 'json' };
import radiation from '../../fixtures/references/heat-radiation.json' with { type: 'json' };
import steadyWall from '../../fixtures/references/heat-steady-wall.json' with { type: 'json' };
import { findMaterial } from '~/lib/materials';
import { availableShare } from '~/lib/thermal/available-heat';
import { KELVIN_AT_0_C } from '~/lib/thermal/constants';
import { exchangeFactor, radiativeFilmWPerM2K } from '~/lib/thermal/radiation';
import {
  fullPowerRun,
  ovenWallRun,
  powerLimitedRun,
  radiativeCoolingRun,
  steadyWallRun,
} from './thermal-kiln-runs';

describe(lumped.title, () => {
  it(`full power, 0.1 %: ${lumped.cases[0]?.source ?? ''}`, () => {
    expect(fullPowerRun()).toBeLessThanOrEqual(1);
  });
  it(`ramps that saturate, 0.1 %: ${lumped.cases[1]?.source ?? ''}`, () => {
    expect(powerLimitedRun()).toBeLessThanOrEqual(1);
  });
  it(`radiation alone, 0.1 % of the time: ${lumped.cases[2]?.source ?? ''}`, () => {
    expect(radiativeCoolingRun()).toBeLessThanOrEqual(1);
  });
  it('notices power, heat capacity or emissivity that are 0.2 % off', () => {
    expect(fullPowerRun({ power: 1.002 })).toBeGreaterThan(1);
    expect(powerLimitedRun({ capacity: 1.002 })).toBeGreaterThan(1);
    expect(radiativeCoolingRun({ exchange: 1.002 })).toBeGreaterThan(1);
  });
});

describe(steadyWall.title, () => {
  it(`two layers, still air and radiation: ${steadyWall.cases[0]?.source ?? ''}`, () => {
    expect(steadyWallRun()).toBeLessThanOrEqual(1);
  });
  it(`an oven wall of three layers: ${steadyWall.cases[1]?.source ?? ''}`, () => {
    expect(ovenWallRun()).toBeLessThanOrEqual(1);
  });
  it('notices a conductivity that is 1 % off', () => {
    expect(steadyWallRun({ conductivity: 1.01 })).toBeGreaterThan(1);
    expect(ovenWallRun({ conductivity: 1.01 })).toBeGreaterThan(1);
  });
});

describe(`${radiation.title}: ${radiation.cases[0]?.source ?? ''}`, () => {
  const [reference] = radiation.cases;
  const areaRatios: Record<string, number> = {
    'infinite parallel plates': 1,
    'small convex object in enclosure A1/A2=0.1': 0.1,
    'small object in large enclosure': 0,
  };
  const rows = (reference?.rows ?? []).filter(([geometry]) => String(geometry) in areaRatios);
  it.each(rows)('%s, %d K to %d K', (...row) => {
    const [one, two, emissivity, around, expected] = [row[1], row[2], row[3], row[4], row[6]].map(Number) as [
      number,
      number,
      number,
      number,
      number,
    ];
    const factor = exchangeFactor(emissivity, around, areaRatios[String(row[0])] ?? NaN);
    const flux = factor * radiativeFilmWPerM2K(one - KELVIN_AT_0_C, two - KELVIN_AT_0_C) * (one - two);
    expect(Math.abs(flux / expected - 1)).toBeLessThanOrEqual(reference?.tolerance.relative ?? 0);
  });
});

describe(`${available.title}: ${available.source}`, () => {
  it.each(available.cases)(
    'natural gas, flue at $flueC °C',
    ({ flueC, excessAirShare, share, tolerance }) => {
      const table = findMaterial('fuels', 'natural-gas')?.availableHeat;
      if (!table) throw new Error('natural gas has no table of available heat');
      expect(Math.abs(availableShare(table, flueC, excessAirShare) - share)).toBeLessThanOrEqual(
        tolerance.absolute,
      );
    },
  );
});
