import { readFileSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import enthalpy from '../../fixtures/references/melt-enthalpy.json';
import gypsum from '../../fixtures/references/gypsum-dehydration.json' with { type: 'json' };
import kinetics from '../../fixtures/references/kinetics.json' with { type: 'json' };
import integral from '../../fixtures/references/temperature-integral.json';
import units from '../../fixtures/references/units-factors.json' with { type: 'json' };
import { findElement } from '~/lib/materials/elements';
import { gypsumReactions } from '~/lib/materials/reactions';
import { emfMv } from '~/lib/sensors/its90';
import { lnTemperatureIntegral } from '~/lib/thermal/cone';
import { liquidEnthalpyJPerMol, solidEnthalpyJPerMol } from '~/lib/thermal/melt/element-enthalpy';
import { KG_PER_LB, KWH_PER_THERM, L_PER_US_GALLON } from '~/lib/units';
import { holdsRun, rampRun } from './kinetics-runs';
import {
  lagShapesRun,
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

/** A check against something that is not ours: its error over its tolerance, as it is and with the model spoilt by twice that. */
interface Check {
  readonly name: string;
  readonly asItIs: () => number;
  readonly spoilt: readonly (() => number)[];
}

/** A check of one number: spoilt by twice its tolerance, up and down. */
const scalar = (name: string, got: number, expected: number, tolerance: number): Check => {
  const error = (value: number): number => Math.abs(value - expected) / tolerance;
  return {
    name,
    asItIs: () => error(got),
    spoilt: [() => error(got + 2.0001 * tolerance), () => error(got - 2.0001 * tolerance)],
  };
};

// What a run allows is 0.5 % of its column's range, 0.1 % for the lumped kilns: the property it hangs on is spoilt by 1 %, 0.2 %.
const solver: Check[] = [
  { name: 'wall, series solution', asItIs: () => wallRun(0), spoilt: [() => wallRun(0, { conductivity: 1.01 }), () => wallRun(0, { capacity: 0.99 })] },
  { name: 'shell behind a film', asItIs: () => shellLagRun(), spoilt: [() => shellLagRun({ conductivity: 1.01 })] },
  { name: 'lag of slabs and cylinders', asItIs: () => lagShapesRun(), spoilt: [() => lagShapesRun({ capacity: 1.002 })] },
  { name: 'semi-infinite, flux', asItIs: () => semiInfiniteRun('flux'), spoilt: [() => semiInfiniteRun('flux', { conductivity: 1.03 })] },
  { name: 'semi-infinite, film', asItIs: () => semiInfiniteRun('film'), spoilt: [() => semiInfiniteRun('film', { film: 1.03 })] },
  { name: 'step at a wall, Bi 0.1-10', asItIs: () => wallStepRun(), spoilt: [() => wallStepRun({ film: 1.02 })] },
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

const metals: Check[] = enthalpy.cases.flatMap((one) => {
  const element = findElement(one.symbol);
  const row = one.table?.at(-1);
  if (!element || !row) return [];
  const [kelvin, phase, expected] = row;
  const of = phase === 'solid' ? solidEnthalpyJPerMol : liquidEnthalpyJPerMol;
  const value = Number(expected);
  return [scalar(`enthalpy of ${one.symbol} at ${kelvin} K`, of(element, Number(kelvin)), value, one.toleranceShare * value)]; // prettier-ignore
});

/** One row near 900 °C (or the last below it) of each type, with its last printed digit. */
const thermocouples: Check[] = (() => {
  const table = fileURLToPath(new URL('../../fixtures/references/its90-table-10C.csv', import.meta.url));
  const rows = readFileSync(table, 'utf8').trim().split('\n').slice(1).map((line) => line.split(',')); // prettier-ignore
  return (['B', 'E', 'J', 'K', 'N', 'R', 'S', 'T'] as const).flatMap((type) => {
    const row = rows.filter(([each, tempC]) => each === type && Number(tempC) <= 900).at(-1);
    const [, tempC, mv] = row ?? [];
    return row
      ? [scalar(`emf of type ${type} at ${tempC} °C`, emfMv(type, Number(tempC)), Number(mv), 0.0005)]
      : [];
  });
})();

const factorOf = (from: string, to: string): number =>
  units.factors.find((row) => row.from === from && row.to === to)?.factor ?? NaN;

const rest: Check[] = [
  ...(integral.rows as [number, number][]).map(([x, p]) => {
    const tempC = 900;
    const found = Math.exp(lnTemperatureIntegral((x * 8.314462618 * (tempC + 273.15)) / 1000, tempC));
    return scalar(`temperature integral at Ea/RT = ${x}`, found / (x * (tempC + 273.15)), p, integral.toleranceShare * p); // prettier-ignore
  }),
  scalar('pound', KG_PER_LB, factorOf('lb', 'kg'), units.tolerance),
  scalar('therm', KWH_PER_THERM, factorOf('therm', 'kWh'), units.tolerance * 30),
  scalar('gallon', L_PER_US_GALLON, factorOf('gallon', 'liter'), units.tolerance * 4),
  (() => {
    const { formationKJPerMol: of, molarMassGPerMol: mass } = gypsum;
    const expected = ((of.hemihydrate + 1.5 * of.vapour - of.gypsum) / mass.gypsum) * 1e6;
    const got = gypsumReactions(1)[0]?.heatJPerKg ?? NaN;
    return scalar('gypsum to hemihydrate', got, expected, gypsum.toleranceShare * expected);
  })(),
];

const all = [...solver, ...decay, ...metals, ...thermocouples, ...rest];

describe('a model that is off by twice the tolerance of its check', () => {
  it('is told by more than thirty checks against what is not ours', () => {
    expect(new Set(all.map(({ name }) => name)).size).toBeGreaterThan(30);
  });

  it.each(all)('$name', ({ asItIs, spoilt }) => {
    expect(asItIs()).toBeLessThanOrEqual(1);
    for (const run of spoilt) expect(run()).toBeGreaterThan(1);
  });
});
