import type { Load } from '../thermal/load-schema';
import { type Money, shareOut } from './money';

/** One mould line of a load and what it bears of the cost. */
export interface CostShare {
  /** Index in `load.moulds`. */
  index: number;
  massKg: number;
  cost: Money;
}

const massesKg = (load: Load): number[] =>
  load.moulds.map((mould) => mould.count * (mould.massKg + mould.waterKg + (mould.pattern?.massKg ?? 0)));

/** What each line of moulds is of all moulds, by mass with water and pattern, 0-1; furniture belongs to everybody. */
export function massShares(load: Load): number[] {
  const masses = massesKg(load);
  const totalKg = masses.reduce((sum, massKg) => sum + massKg, 0);
  return masses.map((massKg) => massKg / totalKg);
}

/**
 * Splits the cost of a firing over the moulds of its load by their mass, water and pattern included; furniture belongs
 * to everybody. The shares add up to the cost exactly.
 */
export function splitCost(cost: Money, load: Load): CostShare[] {
  const masses = massesKg(load);
  return shareOut(cost, masses).map((share, index) => ({
    index,
    massKg: masses[index] ?? 0,
    cost: share,
  }));
}
