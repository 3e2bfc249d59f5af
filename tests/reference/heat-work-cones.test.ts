import { describe, expect, it } from 'vitest';
import { cones } from '~/lib/materials/cones';
import {
  coneDownC,
  CONE_ERROR_K,
  CONE_RANGES,
  lastConeDown,
  lnTemperatureIntegral,
} from '~/lib/thermal/cone';
import reference from '../../fixtures/references/temperature-integral.json';

const R = 8.314462618;
const rms = (errors: number[]): number =>
  Math.sqrt(errors.reduce((sum, error) => sum + error ** 2, 0) / errors.length);
const residuals = (column: 'at15C' | 'at60C' | 'at150C', rateCPerH: number): number[] =>
  CONE_RANGES.flatMap((range) => range.cones.map((cone) => coneDownC(range, cone, rateCPerH) - cone[column]));

describe('the temperature integral', () => {
  it.each(reference.rows as [number, number][])('at Ea/RT = %d is that of mpmath', (x, p) => {
    const tempC = 900;
    const activationKJPerMol = (x * R * (tempC + 273.15)) / 1000;
    const found = Math.exp(lnTemperatureIntegral(activationKJPerMol, tempC)) / (x * (tempC + 273.15));
    expect(Math.abs(found / p - 1)).toBeLessThan(reference.toleranceShare);
  });
});

/** Every check is against the chart of cone temperatures whose source stands with it in the materials. */
describe('pyrometric cones', () => {
  it('every cone of the chart belongs to one range', () => {
    expect(CONE_RANGES.flatMap((range) => range.cones)).toEqual(cones);
  });

  it('the law meets the two columns it was fitted to within rms 2 K', () => {
    expect(rms([...residuals('at60C', 60), ...residuals('at150C', 150)])).toBeLessThan(2);
  });

  it('it gives the 15 °C/h column, which it was not fitted to, within its stated error', () => {
    expect(rms(residuals('at15C', 15))).toBeLessThan(CONE_ERROR_K);
  });

  it('no energy does better than 6.5 K there in the first range: the column’s own steps are uneven', () => {
    const first = CONE_RANGES[0];
    if (!first) throw new Error('no range');
    const best = Math.min(
      ...Array.from({ length: 100 }, (_, i) => {
        const range = { ...first, activationKJPerMol: 200 + 10 * i };
        return rms(range.cones.map((cone) => coneDownC(range, cone, 15) - cone.at15C));
      }),
    );
    expect(best).toBeGreaterThan(6.5);
  });

  it('small cones at 300 °C/h go down about 11 K later than it says, all alike', () => {
    const errors = CONE_RANGES.flatMap((range) =>
      range.cones.flatMap((cone) =>
        cone.smallAt300C === null ? [] : [cone.smallAt300C - coneDownC(range, cone, 300)],
      ),
    );
    const mean = errors.reduce((sum, error) => sum + error, 0) / errors.length;
    expect(mean).toBeGreaterThan(8);
    expect(mean).toBeLessThan(15);
    expect(rms(errors.map((error) => error - mean))).toBeLessThan(5);
  });

  const heating = (rateCPerH: number, toC: number, holdS = 0) => {
    const timeS: number[] = [];
    const tempC: number[] = [];
    for (let c = 20; c <= toC; c += 5) {
      timeS.push(((c - 20) / rateCPerH) * 3600);
      tempC.push(c);
    }
    const endS = timeS.at(-1) ?? 0;
    for (let s = 60; s <= holdS; s += 60) {
      timeS.push(endS + s);
      tempC.push(tempC.at(-1) ?? 0);
    }
    return lastConeDown(timeS, tempC)?.name ?? null;
  };

  it('heated at 60 °C/h the last cone down is the chart’s', () => {
    expect(heating(60, 1000)).toBe('06');
    expect(heating(60, 865)).toBe('012');
    expect(heating(60, 1225)).toBe('6');
    expect(heating(60, 600)).toBeNull();
  });

  it('a hold brings further cones down, a faster firing fewer', () => {
    // The approach at 60 °C/h is worth a hold of RT²/(Ea·β) = 0.27 h, so 3 h more is worth ln(1 + 3/0.27)·RT²/Ea = 40 K.
    expect(heating(60, 1000, 3 * 3600)).toBe('05');
    expect(heating(150, 1000)).toBe('07');
  });
});
