import type { FuelMaterial } from '../materials';
import type { Firing } from './chamber';

type HeatTable = NonNullable<FuelMaterial['availableHeat']>;

/** Least share taken to be left for the kiln: above it the burner heats nothing but its own flue. */
const LEAST_SHARE = 0.01;

/**
 * Share of the higher heating value that stays in the kiln when the flue gas leaves at a temperature: straight lines
 * between the rows of the table and beyond them, straight lines between excess airs.
 *
 * @param table of the fuel, in the materials table with its source
 * @param flueC flue temperature, °C
 * @param excessAirShare air over the stoichiometric, 0.25 is 25 %
 * @returns 0.01 to 0.95
 */
export function availableShare(table: HeatTable, flueC: number, excessAirShare: number): number {
  const { fluesC, shares } = table;
  const row = bracket(fluesC, flueC);
  const low = alongRow(table, shares[row] ?? [], excessAirShare);
  const high = alongRow(table, shares[row + 1] ?? [], excessAirShare);
  const fromC = fluesC[row] ?? 0;
  const toC = fluesC[row + 1] ?? 1;
  const share = low + ((high - low) * (flueC - fromC)) / (toC - fromC);
  return Math.min(0.95, Math.max(LEAST_SHARE, share));
}

function alongRow({ excessAirShares }: HeatTable, row: readonly number[], excessAirShare: number): number {
  const column = bracket(excessAirShares, excessAirShare);
  const from = excessAirShares[column] ?? 0;
  const to = excessAirShares[column + 1] ?? 1;
  const low = row[column] ?? 0;
  return low + (((row[column + 1] ?? low) - low) * (excessAirShare - from)) / (to - from);
}

/** Index of the lower end of the interval that holds a value, or of the outermost interval beside it. */
function bracket(values: readonly number[], value: number): number {
  let low = 0;
  while (low < values.length - 2 && (values[low + 1] ?? Infinity) <= value) low++;
  return low;
}

/**
 * A burner: what reaches the chamber is its input times the available heat, with the flue gas leaving at chamber temperature.
 *
 * @param burnerW input at full fire on the higher heating value, W
 */
export function gasFiring(table: HeatTable, burnerW: number, excessAirShare: number): Firing {
  return {
    fullHeatW: (chamberC) => burnerW * availableShare(table, chamberC, excessAirShare),
    inputPerHeat: (chamberC) => 1 / availableShare(table, chamberC, excessAirShare),
  };
}

/** Elements: all that is drawn reaches the chamber. */
export function electricFiring(fullW: number): Firing {
  return { fullHeatW: () => fullW, inputPerHeat: () => 1 };
}
