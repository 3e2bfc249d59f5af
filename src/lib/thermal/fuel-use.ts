import { findMaterial, valueAt } from '../materials';
import { J_PER_KWH } from './constants';
import type { KilnPlate } from './kiln-schema';

/** Mass and volume (at 15 °C and one atmosphere) of the fuel that an energy on its higher heating value comes to; none for electricity. */
export function fuelUse(kiln: KilnPlate, energyKWh: number): { fuelKg: number; fuelM3: number } {
  if (kiln.energy !== 'gas') return { fuelKg: 0, fuelM3: 0 };
  const properties = findMaterial('fuels', kiln.fuel)?.properties;
  if (!properties?.higherHeatingJPerKg || !properties.gasDensityKgPerM3) {
    throw new RangeError(`no heating value of "${kiln.fuel}" in the materials table`);
  }
  const fuelKg = (energyKWh * J_PER_KWH) / valueAt(properties.higherHeatingJPerKg, 15);
  return { fuelKg, fuelM3: fuelKg / valueAt(properties.gasDensityKgPerM3, 15) };
}
