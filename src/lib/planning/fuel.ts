import { findMaterial, valueAt } from '../materials';
import type { TariffPlan } from './tariff-schema';

const J_PER_KWH = 3.6e6;
const ROOM_C = 20;

function fuelProperty(fuel: string, name: 'higherHeatingJPerKg' | 'gasDensityKgPerM3'): number {
  const property = findMaterial('fuels', fuel)?.properties[name];
  if (property === undefined) throw new RangeError(`${fuel} is not a fuel with a ${name}`);
  return valueAt(property, ROOM_C);
}

/**
 * Mass and volume of fuel that hold an amount of energy on the higher heating value.
 *
 * @param fuel `propane` or `natural-gas`
 * @param energyKWh energy on the higher heating value, kWh
 * @returns kg, and m³ of gas at 15 °C and 101.325 kPa
 */
export function fuelOf(fuel: string, energyKWh: number): { fuelKg: number; fuelM3: number } {
  const fuelKg = (energyKWh * J_PER_KWH) / fuelProperty(fuel, 'higherHeatingJPerKg');
  return { fuelKg, fuelM3: fuelKg / fuelProperty(fuel, 'gasDensityKgPerM3') };
}

export interface Co2 {
  co2Kg: number;
  kgPerKWh: number;
  source: string;
}

/**
 * Carbon dioxide of an amount of energy: by the tariff's own factor where the studio has entered one, otherwise by the
 * materials table's.
 *
 * @param energy what is used
 * @param energyKWh electricity, or fuel on its higher heating value
 */
export function co2Of(energy: TariffPlan['energy'], energyKWh: number, plan: TariffPlan | null): Co2 {
  if (plan !== null && plan.energy === energy && plan.co2KgPerKWh !== null) {
    const source = plan.co2Source === '' ? "The studio's own factor" : plan.co2Source;
    return { co2Kg: energyKWh * plan.co2KgPerKWh, kgPerKWh: plan.co2KgPerKWh, source };
  }
  const property = findMaterial('fuels', energy)?.properties.co2KgPerKWh;
  if (property === undefined) throw new RangeError(`no carbon dioxide factor of ${energy}`);
  const kgPerKWh = valueAt(property, ROOM_C);
  return { co2Kg: energyKWh * kgPerKWh, kgPerKWh, source: property.source };
}
