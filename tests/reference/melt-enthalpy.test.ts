import { describe, expect, it } from 'vitest';
import { findElement } from '~/lib/materials/elements';
import { findMaterial } from '~/lib/materials';
import { alloyEnthalpyJPerKg, alloyTempC, componentSumErrorShare } from '~/lib/thermal/melt/alloy-heat';
import { liquidEnthalpyJPerMol, solidEnthalpyJPerMol } from '~/lib/thermal/melt/element-enthalpy';
import { alloyOf } from '~/lib/thermal/melt/charge';
import reference from '../../fixtures/references/melt-enthalpy.json';

function element(symbol: string) {
  const found = findElement(symbol);
  if (!found) throw new Error(`no ${symbol}`);
  return found;
}

function alloy(id: string) {
  const found = findMaterial('metals', id);
  if (!found) throw new Error(`no ${id}`);
  return alloyOf(found);
}

/** Rows within 2 K of 25 °C are left out of the relative check: the tables themselves differ there by the choice of the reference point. */
const NEAR_ZERO_K = 302;

describe.each(reference.cases.filter((one) => one.table))('enthalpy of $symbol ($source)', (one) => {
  it.each(one.table ?? [])('at %d K, %s', (kelvin, phase, expected) => {
    const of = phase === 'solid' ? solidEnthalpyJPerMol : liquidEnthalpyJPerMol;
    const found = of(element(one.symbol), Number(kelvin));
    const largest = Number(kelvin) < NEAR_ZERO_K ? 50 : one.toleranceShare * Math.abs(Number(expected));
    expect(Math.abs(found - Number(expected))).toBeLessThanOrEqual(largest);
  });
});

describe('changes of phase', () => {
  it.each(reference.cases.filter((one) => one.fusionJPerMol))('$symbol: $source', (one) => {
    const { meltsK = NaN, fusionJPerMol = NaN } = one;
    const found =
      liquidEnthalpyJPerMol(element(one.symbol), meltsK) - solidEnthalpyJPerMol(element(one.symbol), meltsK);
    expect(Math.abs(found / fusionJPerMol - 1)).toBeLessThan(one.toleranceShare);
  });

  it('aluminium just molten holds what JANAF says', () => {
    const one = reference.cases.find(({ liquidAtMeltJPerMol }) => liquidAtMeltJPerMol);
    const found = liquidEnthalpyJPerMol(element('Al'), one?.meltsK ?? NaN);
    expect(Math.abs(found / (one?.liquidAtMeltJPerMol ?? NaN) - 1)).toBeLessThan(0.01);
  });
});

describe('an alloy', () => {
  it('holds the sum of its components, 90/10 bronze at the pour', () => {
    const kelvin = 1150 + 273.15;
    const copper = liquidEnthalpyJPerMol(element('Cu'), kelvin) / 0.063546;
    const tin = liquidEnthalpyJPerMol(element('Sn'), kelvin) / 0.11871;
    expect(alloyEnthalpyJPerKg(alloy('tin-bronze-90-10'), 1150)).toBeCloseTo(0.9 * copper + 0.1 * tin, 6);
  });

  // Handbook heats of alloys, recalled: kWh per kg from 25 °C to a usual pouring temperature.
  it.each([
    ['tin-bronze-90-10', 1150, 0.19],
    ['silicon-bronze', 1120, 0.2],
    ['copper', 1200, 0.2],
    ['aluminium-a356', 730, 0.32],
    ['sterling-silver', 1010, 0.1],
    ['gold', 1150, 0.06],
    ['grey-iron', 1400, 0.33],
  ])('%s at %d °C holds about %d kWh/kg', (id, pourC, expected) => {
    // within the sum's own error and half a unit of the two digits printed
    const found = alloyEnthalpyJPerKg(alloy(id), pourC) / 3.6e6;
    expect(Math.abs(found - expected)).toBeLessThan(componentSumErrorShare(alloy(id)) * expected + 0.005);
  });

  it.each(['tin-bronze-90-10', 'red-brass', 'aluminium-bronze', 'gold-14k', 'grey-iron'])(
    '%s: the temperature of an enthalpy is the temperature it came from, and hotter always holds more',
    (id) => {
      let before = -Infinity;
      for (let tempC = 0; tempC <= 1400; tempC += 7) {
        const enthalpy = alloyEnthalpyJPerKg(alloy(id), tempC);
        expect(enthalpy).toBeGreaterThan(before);
        expect(alloyTempC(alloy(id), enthalpy)).toBeCloseTo(tempC, 2);
        before = enthalpy;
      }
    },
  );

  it('with an element that the table lacks is refused', () => {
    expect(() => alloyEnthalpyJPerKg({ composition: { Xx: 1 }, solidusC: 100, liquidusC: 200 }, 50)).toThrow(
      RangeError,
    );
  });
});
