import { describe, expect, it } from 'vitest';
import facts from '../../fixtures/references/materials-facts.json' with { type: 'json' };
import peaks from '../../fixtures/references/materials-kinetics-peaks.json' with { type: 'json' };
import { findMaterial, materials, valueAt } from '~/lib/materials';

const GAS_CONSTANT = 8.314462618;
const KWH_PER_MILLION_BTU = 293.07107;

const fact = (name: string) => {
  const found = facts.cases.find((item) => item.name === name);
  if (found === undefined) throw new Error(`no fact called ${name}`);
  return found;
};

/** Kissinger's condition for a first-order step, E·β/(R·T²) = A·exp(−E/RT), solved by bisection. */
function peakC(activationJPerMol: number, preExponentialPerS: number, rateKPerS: number): number {
  let lowK = 300;
  let highK = 1200;
  for (let round = 0; round < 60; round += 1) {
    const middleK = (lowK + highK) / 2;
    const growth = (activationJPerMol * rateKPerS) / (GAS_CONSTANT * middleK * middleK);
    if (growth > preExponentialPerS * Math.exp(-activationJPerMol / (GAS_CONSTANT * middleK))) lowK = middleK;
    else highK = middleK;
  }
  return lowK - 273.15;
}

describe(peaks.title, () => {
  it.each(peaks.cases)('$pattern, $step', ({ pattern, step, peakC: expectedC }) => {
    const found = findMaterial('patterns', pattern)?.kinetics.steps.find((item) => item.name === step);
    if (found === undefined) throw new Error(`${pattern} has no step called ${step}`);
    const computedC = peaks.heatingRatesKPerMin.map((rateKPerMin) =>
      peakC(found.activationKJPerMol * 1000, found.preExponentialPerS, rateKPerMin / 60),
    );
    expect(computedC).toHaveLength(expectedC.length);
    computedC.forEach((eachC, index) => {
      expect(Math.abs(eachC - (expectedC[index] ?? NaN))).toBeLessThanOrEqual(peaks.tolerance);
    });
  });
});

describe('fuels', () => {
  it.each([
    ['natural-gas', 'carbon dioxide of natural gas'],
    ['propane', 'carbon dioxide of propane'],
  ])('%s gives off the carbon dioxide that the rule says', (id, name) => {
    const { value, tolerance } = fact(name);
    const property = findMaterial('fuels', id)?.properties.co2KgPerKWh;
    const perMillionBtu = property === undefined ? NaN : valueAt(property, 20) * KWH_PER_MILLION_BTU;
    expect(Math.abs(perMillionBtu / value - 1)).toBeLessThan(tolerance);
  });

  it('natural gas holds the heat per volume that the rule says', () => {
    const gas = findMaterial('fuels', 'natural-gas')?.properties;
    const { value, tolerance } = fact('heat in a cubic metre of natural gas');
    if (gas?.higherHeatingJPerKg === undefined || gas.gasDensityKgPerM3 === undefined)
      throw new Error('incomplete');
    const heatMJPerM3 = (valueAt(gas.higherHeatingJPerKg, 20) * valueAt(gas.gasDensityKgPerM3, 20)) / 1e6;
    expect(Math.abs(heatMJPerM3 / value - 1)).toBeLessThan(tolerance);
  });

  it('natural gas leaves the kiln what a published chart says', () => {
    const table = findMaterial('fuels', 'natural-gas')?.availableHeat;
    const { value, tolerance } = fact('available heat at 466 °C and 10 % excess air');
    const [at300, at500] = [table?.shares[0]?.[1] ?? NaN, table?.shares[1]?.[1] ?? NaN];
    const share = at300 + ((at500 - at300) * (466 - 300)) / 200;
    expect(Math.abs(share - value)).toBeLessThan(tolerance);
  });
});

describe('air that a pattern needs to burn', () => {
  // Chemical formulae and IUPAC atomic masses; oxygen is 23.14 % of dry air by mass.
  const FORMULAE = {
    pla: { c: 3, h: 4, o: 2 },
    'eps-foam': { c: 8, h: 8, o: 0 },
    pvb: { c: 8, h: 14, o: 2 },
    'castable-resin': { c: 5, h: 8, o: 2 },
    paraffin: { c: 1, h: 2, o: 0 },
  };

  it.each(Object.entries(FORMULAE))('%s, within 2 %% of its formula', (id, { c, h, o }) => {
    const molarMass = c * 12.011 + h * 1.008 + o * 15.999;
    const oxygenMol = c + h / 4 - o / 2;
    const airKgPerKg = (oxygenMol * 31.998) / molarMass / 0.2314;
    const property = materials.patterns.find((pattern) => pattern.id === id)?.properties.airKgPerKg;
    expect(Math.abs((property === undefined ? NaN : valueAt(property, 20)) / airKgPerKg - 1)).toBeLessThan(
      0.02,
    );
  });
});
