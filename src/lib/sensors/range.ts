import type { ThermocoupleType } from '../logs/schema';
import { directRangeC } from './its90';

/** Temperatures that a thermocouple type can show at all, °C (its reference function's range); undefined for an unknown type. */
export function sensorRangeC(type: ThermocoupleType | null): { minC: number; maxC: number } | undefined {
  if (type === null) return undefined;
  const { fromC, toC } = directRangeC(type);
  return { minC: fromC, maxC: toC };
}
