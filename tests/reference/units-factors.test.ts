import { describe, expect, it } from 'vitest';
import blackBody from '../../fixtures/references/units-black-body.json' with { type: 'json' };
import units from '../../fixtures/references/units-factors.json' with { type: 'json' };
import {
  cToF,
  fIntervalToC,
  fToC,
  KG_PER_LB,
  KWH_PER_MILLION_BTU,
  KWH_PER_THERM,
  L_PER_US_GALLON,
  parseLength,
  parseMass,
  parseRate,
  parseTemperature,
} from '~/lib/units';
import { findMaterial, valueAt } from '~/lib/materials';
import { regressionOf } from '~/lib/review/regress';
import { GAS_CONSTANT_J_PER_MOL_K, J_PER_KWH, STEFAN_BOLTZMANN_W_PER_M2K4 } from '~/lib/thermal/constants';
import { blackBodyXyz } from '~/lib/units/glow';

const factor = (from: string, to: string) =>
  units.factors.find((row) => row.from === from && row.to === to)?.factor ?? NaN;
const within = (actual: number, expected: number) =>
  expect(Math.abs(actual - expected)).toBeLessThanOrEqual(units.tolerance * Math.max(1, Math.abs(expected)));

describe(`${units.title}, against ${units.source}`, () => {
  it('the pound, the therm, the gallon and the million Btu', () => {
    within(KG_PER_LB, factor('lb', 'kg'));
    within(KWH_PER_THERM, factor('therm', 'kWh'));
    within(L_PER_US_GALLON, factor('gallon', 'liter'));
    within(KWH_PER_MILLION_BTU, (factor('btu_IT', 'J') * 1e6) / 3.6e6);
    within(1e6 / KWH_PER_MILLION_BTU, factor('kWh', 'btu_IT'));
  });

  const parsed = (read: { ok: true; value: unknown } | { ok: false }): number =>
    read.ok ? Number(read.value) : NaN;

  it('pounds, feet and rates as they are typed', () => {
    within(parsed(parseMass('1 lb', 'kg')), factor('lb', 'kg'));
    const cubicFootM3 = parsed(parseLength('1 ft', 'mm')) ** 3;
    within(parsed(parseMass('16 oz', 'kg')) / cubicFootM3, factor('lb/ft^3', 'kg/m^3'));
    within(parsed(parseRate('270 °F/h', 'C')), factor('270 degF/hour', 'degC/hour'));
    within(parsed(parseRate('100', 'F')), factor('100 degF/hour', 'degC/hour'));
  });

  it('the constants of physics and the kilowatt hour', () => {
    within(J_PER_KWH / 1e6, factor('kWh', 'MJ'));
    // Kept to ten digits.
    const share = (found: number, expected: number) =>
      expect(Math.abs(found / expected - 1)).toBeLessThan(1e-9);
    share(GAS_CONSTANT_J_PER_MOL_K, factor('R', 'J/(mol K)'));
    share(STEFAN_BOLTZMANN_W_PER_M2K4, factor('stefanboltzmann', 'W/(m^2 K^4)'));
  });

  it.each([
    ['natural-gas', factor('naturalgas', 'MJ/m^3'), units.gases.naturalGasTolerance],
    [
      'propane',
      factor('propane', 'btu_IT/ft^3') * factor('btu_IT/ft^3', 'MJ/m^3'),
      units.gases.propaneTolerance,
    ],
  ])('%s holds %d MJ in a cubic metre', (id, expected, tolerance) => {
    const gas = findMaterial('fuels', id)?.properties;
    if (gas?.higherHeatingJPerKg === undefined || gas.gasDensityKgPerM3 === undefined) throw new Error(id);
    const found = (valueAt(gas.higherHeatingJPerKg, 20) * valueAt(gas.gasDensityKgPerM3, 20)) / 1e6;
    expect(Math.abs(found / expected - 1)).toBeLessThan(tolerance);
  });

  it('rates in °F per hour', () => {
    within(fIntervalToC(100), factor('100 degF/hour', 'degC/hour'));
    within(fIntervalToC(270), factor('270 degF/hour', 'degC/hour'));
  });

  it.each(units.temperatures)('$expr is $value in $to', ({ expr, value }) => {
    const reading = Number(/\((.*)\)/.exec(expr)?.[1]);
    if (expr.startsWith('tempF')) {
      within(fToC(reading), value);
      const parsed = parseTemperature(`${reading} °F`, 'C');
      within(parsed.ok ? parsed.value : NaN, value);
    } else within(cToF(reading), value);
  });
});

describe(blackBody.title, () => {
  it.each(blackBody.cases)('at $tempK K', ({ tempK, x, y, tolerance }) => {
    const [bigX, bigY, bigZ] = blackBodyXyz(tempK);
    const sum = bigX + bigY + bigZ;
    expect(Math.abs(bigX / sum - x)).toBeLessThan(tolerance);
    if (y !== undefined) expect(Math.abs(bigY / sum - y)).toBeLessThan(tolerance);
  });
});

const { rampRate } = units;
describe(`the rate of a measured ramp: ${rampRate.source}`, () => {
  it('is that of least squares', () => {
    const value = Float64Array.from(rampRate.tempC);
    const stepS = ((rampRate.timeMin[1] ?? NaN) - (rampRate.timeMin[0] ?? NaN)) * 60;
    const grid = { originS: 0, stepS, value, known: new Uint8Array(value.length).fill(1) };
    const found = regressionOf(grid).slopeCPerH(0, value.length - 1);
    expect(Math.abs(found / rampRate.rateCPerH - 1)).toBeLessThan(rampRate.toleranceShare);
  });
});
