import type { Element, HeatCapacityRange } from '../../materials/elements';

/** Integral of the Shomate heat capacity between two temperatures in kelvin, J/mol. */
function integral({ coefficients: [a, b, c, d, e] }: HeatCapacityRange, fromK: number, toK: number): number {
  const at = (kelvin: number): number => {
    const t = kelvin / 1000;
    return 1000 * (a * t + (b * t ** 2) / 2 + (c * t ** 3) / 3 + (d * t ** 4) / 4 - e / t);
  };
  return at(toK) - at(fromK);
}

/** Heat capacity of a range at a temperature, J/(mol·K). */
function capacityAt({ coefficients: [a, b, c, d, e] }: HeatCapacityRange, kelvin: number): number {
  const t = kelvin / 1000;
  return a + b * t + c * t ** 2 + d * t ** 3 + e / t ** 2;
}

/** Enthalpy gained along ranges up to a temperature; beyond the last, and below the first, the heat capacity of that end goes on. */
function along(ranges: readonly HeatCapacityRange[], kelvin: number): number {
  let sum = 0;
  for (const [i, range] of ranges.entries()) {
    if (i > 0 && kelvin <= range.fromK) break;
    sum += range.changeJPerMol;
    if (kelvin < range.fromK) return sum + capacityAt(range, range.fromK) * (kelvin - range.fromK);
    sum += integral(range, range.fromK, Math.min(kelvin, range.toK));
    if (i === ranges.length - 1 && kelvin > range.toK)
      sum += capacityAt(range, range.toK) * (kelvin - range.toK);
  }
  return sum;
}

/**
 * Enthalpy of the solid element above 25 °C, J/mol: the integral of its heat capacity with the heats of its changes
 * of phase. Above its melting point (tin in solid bronze) the heat capacity it melted with goes on.
 */
export function solidEnthalpyJPerMol(element: Element, kelvin: number): number {
  return along(element.solid, kelvin);
}

/**
 * Enthalpy of the element as a liquid above the solid at 25 °C, J/mol. Below its melting point (silicon in molten
 * bronze) its heat of fusion is taken as that at the melting point.
 */
export function liquidEnthalpyJPerMol(element: Element, kelvin: number): number {
  const first = element.liquid?.[0];
  if (!element.liquid || !first) return solidEnthalpyJPerMol(element, kelvin);
  if (kelvin < first.fromK) return solidEnthalpyJPerMol(element, kelvin) + first.changeJPerMol;
  return solidEnthalpyJPerMol(element, first.fromK) + along(element.liquid, kelvin);
}
