import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import enthalpy from '../../fixtures/references/melt-enthalpy.json';
import gypsum from '../../fixtures/references/gypsum-dehydration.json' with { type: 'json' };
import kinetics from '../../fixtures/references/kinetics.json' with { type: 'json' };
import available from '../../fixtures/references/heat-available.json' with { type: 'json' };
import decayOfTable from '../../fixtures/references/materials-published-decay.json' with { type: 'json' };
import radiation from '../../fixtures/references/heat-radiation.json' with { type: 'json' };
import integral from '../../fixtures/references/temperature-integral.json';
import units from '../../fixtures/references/units-factors.json' with { type: 'json' };
import { findMaterial } from '~/lib/materials';
import { type Element, findElement, type HeatCapacityRange } from '~/lib/materials/elements';
import { gypsumReactions } from '~/lib/materials/reactions';
import { emfMv } from '~/lib/sensors/its90';
import { availableShare } from '~/lib/thermal/available-heat';
import { CONE_RANGES, coneDownC, lnTemperatureIntegral } from '~/lib/thermal/cone';
import { GAS_CONSTANT_J_PER_MOL_K, KELVIN_AT_0_C } from '~/lib/thermal/constants';
import { liquidEnthalpyJPerMol, solidEnthalpyJPerMol } from '~/lib/thermal/melt/element-enthalpy';
import { exchangeFactor, radiativeFilmWPerM2K } from '~/lib/thermal/radiation';
import { fToC, parseMass } from '~/lib/units';
import { holdsRun, peakC, rampRun } from './kinetics-runs';
import {
  lagShapesRun,
  oneTermRun,
  semiInfiniteRun,
  shellLagRun,
  stefanRun,
  wallRun,
  wallStepRun,
} from './thermal-conduction-runs';
import {
  fullPowerRun,
  ovenWallRun,
  powerLimitedRun,
  radiativeCoolingRun,
  steadyWallRun,
} from './thermal-kiln-runs';

type Coefficients = HeatCapacityRange['coefficients'];
/** What the cones' law is allowed on the two columns it was fitted to, rms, K. */
const CONE_FIT_K = 2;

/**
 * A check against something that is not ours: its error over its tolerance, as it is, and with what the model goes by (a
 * property, a coefficient, an input) spoilt so far that what comes out ought to move by twice the tolerance. The spoilt
 * value runs through the model: one that does not depend on what is spoilt, or hides it, is told.
 */
interface Check {
  readonly name: string;
  readonly asItIs: () => number;
  readonly spoilt: readonly (() => number)[];
}

/** A check of one number that the model computes from something that may be scaled or shifted, up and down. */
const computed = (
  name: string,
  model: (spoil: number) => number,
  expected: number,
  tolerance: number,
  spoil: number,
): Check => {
  const error = (by: number): number => Math.abs(model(by) - expected) / tolerance;
  return { name, asItIs: () => error(0), spoilt: [() => error(spoil), () => error(-spoil)] };
};

// What a run allows is 0.5 % of its column's range, 0.1 % for the lumped kilns, 0.2 % for roots: its property is spoilt so that
// the result moves by twice that (a face under flux goes by √k, a Stefan front by √L, a root by √c).
const solver: Check[] = [
  { name: 'wall, series solution', asItIs: () => wallRun(0), spoilt: [() => wallRun(0, { conductivity: 1.01 }), () => wallRun(0, { capacity: 0.99 })] },
  { name: 'shell behind a film', asItIs: () => shellLagRun(), spoilt: [() => shellLagRun({ conductivity: 1.01 })] },
  { name: 'lag of slabs and cylinders', asItIs: () => lagShapesRun(), spoilt: [() => lagShapesRun({ capacity: 1.002 })] },
  { name: 'semi-infinite, flux', asItIs: () => semiInfiniteRun('flux'), spoilt: [() => semiInfiniteRun('flux', { conductivity: 1.02 })] },
  { name: 'semi-infinite, film', asItIs: () => semiInfiniteRun('film'), spoilt: [() => semiInfiniteRun('film', { film: 1.03 })] },
  { name: 'step at a wall, Bi 0.1-10', asItIs: () => wallStepRun(), spoilt: [() => wallStepRun({ film: 1.02 })] },
  { name: 'one-term root of a wall', asItIs: () => oneTermRun('wall'), spoilt: [() => oneTermRun('wall', { capacity: 1.008 })] },
  { name: 'one-term root of a cylinder', asItIs: () => oneTermRun('cylinder'), spoilt: [() => oneTermRun('cylinder', { capacity: 1.008 })] },
  { name: 'Stefan’s front', asItIs: () => stefanRun(), spoilt: [() => stefanRun({ latent: 1.04 })] },
  { name: 'full power', asItIs: () => fullPowerRun(), spoilt: [() => fullPowerRun({ power: 1.002 })] },
  { name: 'power-limited ramps', asItIs: () => powerLimitedRun(), spoilt: [() => powerLimitedRun({ capacity: 1.002 })] },
  { name: 'cooling by radiation', asItIs: () => radiativeCoolingRun(), spoilt: [() => radiativeCoolingRun({ exchange: 1.002 })] },
  { name: 'steady wall of two layers', asItIs: () => steadyWallRun(), spoilt: [() => steadyWallRun({ conductivity: 1.01 })] },
  { name: 'oven wall of three layers', asItIs: () => ovenWallRun(), spoilt: [() => ovenWallRun({ conductivity: 1.01 })] },
]; // prettier-ignore

const decay: Check[] = [
  ...kinetics.systems.flatMap(({ id, runs }) =>
    runs.map(({ rateKPerMin }) => ({
      name: `decay ${id} at ${rateKPerMin} K/min`,
      asItIs: () => rampRun(id, rateKPerMin),
      spoilt: [() => rampRun(id, rateKPerMin, 1.001), () => rampRun(id, rateKPerMin, 0.999)],
    })),
  ),
  ...kinetics.systems.map(({ id }) => ({
    name: `decay ${id} with holds`,
    asItIs: () => holdsRun(id),
    spoilt: [() => holdsRun(id, 1.001), () => holdsRun(id, 0.999)],
  })),
];

/** An element whose heat capacities and heats of change are all off by a share. */
const spoiltElement = (element: Element, by: number): Element => {
  const ranges = (of: readonly HeatCapacityRange[]): HeatCapacityRange[] =>
    of.map((range) => ({
      ...range,
      coefficients: range.coefficients.map((each) => each * (1 + by)) as unknown as Coefficients,
      changeJPerMol: range.changeJPerMol * (1 + by),
    }));
  return { ...element, solid: ranges(element.solid), liquid: element.liquid && ranges(element.liquid) };
};

const metals: Check[] = enthalpy.cases.flatMap((one, i) => {
  const element = findElement(one.symbol);
  if (!element) return [];
  const { meltsK = NaN, fusionJPerMol, toleranceShare } = one;
  if (fusionJPerMol !== undefined) {
    const fusion = (by: number): number => {
      const spoilt = spoiltElement(element, by);
      return liquidEnthalpyJPerMol(spoilt, meltsK) - solidEnthalpyJPerMol(spoilt, meltsK);
    };
    return [computed(`fusion of ${one.symbol} (${i})`, fusion, fusionJPerMol, toleranceShare * fusionJPerMol, 2.01 * toleranceShare)]; // prettier-ignore
  }
  const [kelvin, phase, expected] = one.table?.at(-1) ?? [];
  if (kelvin === undefined) return [];
  const of = phase === 'solid' ? solidEnthalpyJPerMol : liquidEnthalpyJPerMol;
  const enthalpyOf = (by: number): number => of(spoiltElement(element, by), Number(kelvin));
  return [computed(`enthalpy of ${one.symbol} at ${kelvin} K (${i})`, enthalpyOf, Number(expected), toleranceShare * Number(expected), 2.01 * toleranceShare)]; // prettier-ignore
});

/** One row near 900 °C (or the last below it) of each type: temperature off by what moves the emf by two last printed digits. */
const thermocouples: Check[] = (() => {
  const table = fileURLToPath(new URL('../../fixtures/references/its90-table-10C.csv', import.meta.url));
  const rows = readFileSync(table, 'utf8').trim().split('\n').slice(1).map((line) => line.split(',')); // prettier-ignore
  return (['B', 'E', 'J', 'K', 'N', 'R', 'S', 'T'] as const).flatMap((type) => {
    const below = rows.filter(([each, tempC]) => each === type && Number(tempC) <= 900);
    // The row before the last: a type's range may end at the last.
    const [[, tempC, mv] = [], [, nextC, nextMv] = []] = below.slice(-2);
    const tolerance = 0.0005;
    const mvPerK = (Number(nextMv) - Number(mv)) / (Number(nextC) - Number(tempC));
    const emf = (byK: number): number => emfMv(type, Number(tempC) + byK);
    return [
      computed(`emf of type ${type} at ${tempC} °C`, emf, Number(mv), tolerance, (2.1 * tolerance) / mvPerK),
    ];
  });
})();

const integrals: Check[] = (integral.rows as [number, number][]).map(([x, p]) => {
  const tempC = 900;
  const energy = (x * GAS_CONSTANT_J_PER_MOL_K * (tempC + KELVIN_AT_0_C)) / 1000;
  const found = (by: number): number =>
    Math.exp(lnTemperatureIntegral(energy * (1 + by), tempC)) / (x * (tempC + KELVIN_AT_0_C));
  // d ln p / d ln Ea is about −x.
  return computed(`temperature integral at Ea/RT = ${x}`, found, p, integral.toleranceShare * p, (2 * integral.toleranceShare) / x); // prettier-ignore
});

/** Cones of the chart, all of both columns: a heating rate off by a quarter moves each by 4 K or more (RT²/Ea·ln 1.25). */
const coneChart: Check[] = (() => {
  const rmsOverFit = (rateFactor: number): number => {
    const errors = CONE_RANGES.flatMap((range) =>
      range.cones.flatMap((cone) => [
        coneDownC(range, cone, 60 * rateFactor) - cone.at60C,
        coneDownC(range, cone, 150 * rateFactor) - cone.at150C,
      ]),
    );
    return Math.sqrt(errors.reduce((sum, each) => sum + each ** 2, 0) / errors.length) / CONE_FIT_K;
  };
  const spoilt = [() => rmsOverFit(1.25), () => rmsOverFit(0.8)];
  return [{ name: 'cones of the chart', asItIs: () => rmsOverFit(1), spoilt }];
})();

/** Grey plates: an emissivity off by four millionths moves the exchange by two or more. */
const greyPlates: Check[] = (radiation.cases[0]?.rows ?? [])
  .filter(([geometry]) => geometry === 'infinite parallel plates')
  .map((row, i) => {
    const [hotK = NaN, coldK = NaN, one = NaN, two = NaN, , expected = NaN] = row.slice(1).map(Number);
    const [hotC, coldC] = [hotK - KELVIN_AT_0_C, coldK - KELVIN_AT_0_C];
    const flux = (by: number): number =>
      exchangeFactor(one * (1 + by), two * (1 + by), 1) * radiativeFilmWPerM2K(hotC, coldC) * (hotK - coldK);
    const tolerance = (radiation.cases[0]?.tolerance.relative ?? NaN) * expected;
    return computed(`grey plates ${i + 1}`, flux, expected, tolerance, 4e-6);
  });

/** Peaks of published steps: an energy off by a share moves its peak, in kelvin, by that share; twice 1 K of 600 K. */
const peaks: Check[] = (['calcium', 'scission'] as const).flatMap((id) => {
  const name = id === 'calcium' ? 'PLLA, calcium ends' : 'PLLA, carboxyl ends';
  const step = findMaterial('patterns', 'pla')?.otherKinetics.find((set) => set.name === name)?.steps[0];
  const of = decayOfTable.cases[id];
  return of.ratesKPerMin.map((rate, i) => {
    if (step === undefined) throw new Error(name);
    const expected = of.peakC[i] ?? NaN;
    const found = (by: number): number =>
      peakC({ ...step, activationKJPerMol: step.activationKJPerMol * (1 + by) }, 25, rate, expected);
    const spoil = (2.2 * of.toleranceC) / (expected + KELVIN_AT_0_C);
    return computed(`peak of ${name} at ${rate} K/min`, found, expected, of.toleranceC, spoil);
  });
});

const rest: Check[] = [
  (() => {
    const { formationKJPerMol: of, molarMassGPerMol: mass } = gypsum;
    const expected = ((of.hemihydrate + 1.5 * of.vapour - of.gypsum) / mass.gypsum) * 1e6;
    const heat = (by: number): number => gypsumReactions(1 + by)[0]?.heatJPerKg ?? NaN;
    return computed('gypsum to hemihydrate', heat, expected, gypsum.toleranceShare * expected, 2.1 * gypsum.toleranceShare); // prettier-ignore
  })(),
  (() => {
    const table = findMaterial('fuels', 'natural-gas')?.availableHeat;
    const [chart] = available.cases;
    if (!table || !chart) throw new Error('no chart');
    // The flue takes 8 % of the heat more for 200 K.
    const share = (byK: number): number => availableShare(table, chart.flueC + byK, chart.excessAirShare);
    return computed('available heat', share, chart.share, chart.tolerance.absolute, (2.2 * chart.tolerance.absolute * 200) / 0.08); // prettier-ignore
  })(),
  (() => {
    const factor = units.factors.find(({ from, to }) => from === 'lb' && to === 'kg')?.factor ?? NaN;
    const typed = (by: number): number => {
      const read = parseMass(`${(1 + by).toFixed(13)} lb`, 'kg');
      return read.ok ? read.value : NaN;
    };
    return computed('a pound as it is typed', typed, factor, units.tolerance, 5 * units.tolerance);
  })(),
  ...units.temperatures
    .filter(({ expr }) => ['tempF(-40)', 'tempF(451)', 'tempF(2345)'].includes(expr))
    .map(({ expr, value }) => {
      const tempF = Number(/\((.*)\)/.exec(expr)?.[1]);
      const tolerance = units.tolerance * Math.max(1, Math.abs(value));
      return computed(expr, (by) => fToC(tempF + by), value, tolerance, 2 * tolerance * 1.8);
    }),
];

const all = [...solver, ...decay, ...metals, ...thermocouples, ...integrals, ...coneChart, ...greyPlates, ...peaks, ...rest]; // prettier-ignore

describe(`a model that is off by twice the tolerance of its check: ${all.length} checks`, () => {
  it('is told by at least thirty checks against what is not ours', () => {
    expect(new Set(all.map(({ name }) => name)).size).toBe(all.length);
    expect(all.length).toBeGreaterThanOrEqual(30);
  });

  it.each(all)('$name', ({ asItIs, spoilt }) => {
    expect(asItIs()).toBeLessThanOrEqual(1);
    for (const run of spoilt) expect(run()).toBeGreaterThan(1);
  });
});
