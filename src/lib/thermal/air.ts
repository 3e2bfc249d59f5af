/**
 * Mean heat capacity of air between room temperature and a temperature, J/(kg·K): 1004 + 0.088·T(°C).
 * Straight line through tables of dry air (1.005 at 20 °C, mean 1.09 to 1000 °C), recalled; within 1 % to 1300 °C.
 */
export function meanAirHeatCapacityJPerKgK(tempC: number): number {
  return 1004 + 0.088 * tempC;
}
