import { findElement } from '../../materials/elements';
import { KELVIN_AT_0_C } from '../constants';
import { liquidEnthalpyJPerMol, solidEnthalpyJPerMol } from './element-enthalpy';

/** What the melt model needs of an alloy: mass shares by chemical symbol, and where it begins and ends to melt. */
export interface Alloy {
  readonly composition: Readonly<Record<string, number>>;
  readonly solidusC: number;
  readonly liquidusC: number;
}

/**
 * What a component sum may be off by, as a share: heat of mixing is left out. A few per cent for bronzes, brasses and
 * the precious metals; silicon and carbon dissolve with much heat, and there the handbooks' totals lie up to a tenth lower.
 */
export function componentSumErrorShare({ composition }: Alloy): number {
  return (composition.Si ?? 0) + (composition.C ?? 0) > 0.01 ? 0.1 : 0.05;
}

/**
 * Enthalpy of an alloy above the solid at 25 °C, J/kg: the sum of its components by mass (Kopp and Neumann), solid up
 * to the solidus, liquid from the liquidus, straight between the two. The heat of mixing is left out; the result is
 * good to `componentSumErrorShare`. A pure metal melts at once: at its melting point the value is that of the solid.
 *
 * @param tempC −50 to 1800 °C
 * @throws RangeError where the composition names an element that the table lacks
 */
export function alloyEnthalpyJPerKg(alloy: Alloy, tempC: number): number {
  const { solidusC, liquidusC } = alloy;
  if (tempC <= solidusC) return componentSum(alloy, tempC, solidEnthalpyJPerMol);
  if (tempC >= liquidusC) return componentSum(alloy, tempC, liquidEnthalpyJPerMol);
  const solid = componentSum(alloy, solidusC, solidEnthalpyJPerMol);
  const liquid = componentSum(alloy, liquidusC, liquidEnthalpyJPerMol);
  return solid + ((liquid - solid) * (tempC - solidusC)) / (liquidusC - solidusC);
}

/**
 * Temperature at which an alloy holds an enthalpy, °C: the inverse of `alloyEnthalpyJPerKg`, by bisection to 0.001 K
 * between −50 and 2000 °C. Within the heat of fusion of a pure metal it is the melting point.
 */
export function alloyTempC(alloy: Alloy, enthalpyJPerKg: number): number {
  let lowC = -50;
  let highC = 2000;
  while (highC - lowC > 0.001) {
    const middleC = (lowC + highC) / 2;
    if (alloyEnthalpyJPerKg(alloy, middleC) < enthalpyJPerKg) lowC = middleC;
    else highC = middleC;
  }
  return (lowC + highC) / 2;
}

function componentSum({ composition }: Alloy, tempC: number, of: typeof solidEnthalpyJPerMol): number {
  const kelvin = tempC + KELVIN_AT_0_C;
  return Object.entries(composition).reduce((sum, [symbol, massShare]) => {
    const element = findElement(symbol);
    if (!element) throw new RangeError(`no element "${symbol}" in the table`);
    return sum + (massShare * of(element, kelvin)) / element.molarMassKgPerMol;
  }, 0);
}
