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
  parseTemperature,
} from '~/lib/units';
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
