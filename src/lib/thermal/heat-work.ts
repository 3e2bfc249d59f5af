import { GAS_CONSTANT_J_PER_MOL_K, KELVIN_AT_0_C } from './constants';

/** The pace at which a binder sinters relative to its pace at a reference temperature. */
export interface HeatWorkLaw {
  activationKJPerMol: number;
  referenceC: number;
}

/** exp(−Ea/R·(1/T − 1/Tref)): hours at the reference temperature that one hour at this temperature is worth. */
export function heatWorkPace(law: HeatWorkLaw, tempC: number): number {
  const perK = (law.activationKJPerMol * 1000) / GAS_CONSTANT_J_PER_MOL_K;
  return Math.exp(perK * (1 / (law.referenceC + KELVIN_AT_0_C) - 1 / (tempC + KELVIN_AT_0_C)));
}

/** Below this pace at both ends a step counts as nothing: a month of it is less than a second at the reference temperature. */
const NEGLIGIBLE = 1e-7;

/**
 * Equivalent hours at the reference temperature gathered while temperature goes straight from one value to another
 * (Simpson's rule on ∫ exp(−Ea/R·(1/T − 1/Tref)) dt; within 0.5 % for steps up to 25 K at 300 kJ/mol above 500 °C).
 */
export function heatWorkOfStepH(law: HeatWorkLaw, fromC: number, toC: number, stepS: number): number {
  const highest = heatWorkPace(law, Math.max(fromC, toC));
  if (highest < NEGLIGIBLE) return 0;
  const lowest = heatWorkPace(law, Math.min(fromC, toC));
  return ((lowest + 4 * heatWorkPace(law, (fromC + toC) / 2) + highest) / 6) * (stepS / 3600);
}
