import type { Load } from '../thermal/load-schema';
import { type Money, shareOut } from './money';

/** One mould line of a load and what it bears of the cost. */
export interface CostShare {
  /** Index in `load.moulds`. */
  index: number;
  massKg: number;
  cost: Money;
}

/** Mass of each line of moulds, water and pattern included, kg: what energy and cost are split by. */
export const massesKg = (load: Load): number[] =>
  load.moulds.map((mould) => mould.count * (mould.massKg + mould.waterKg + (mould.pattern?.massKg ?? 0)));

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
