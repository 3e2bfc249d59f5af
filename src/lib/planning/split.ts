import type { Load } from '../thermal/load-schema';
import { type Money, shareOut } from './money';

/** One mould line of a load and what it bears of the cost. */
export interface CostShare {
  /** Index in `load.moulds`. */
  index: number;
  massKg: number;
  cost: Money;
}

/**
 * Splits the cost of a firing over the moulds of its load by their mass, water and pattern included; furniture belongs
 * to everybody. The shares add up to the cost exactly.
 */
export function splitCost(cost: Money, load: Load): CostShare[] {
  const massesKg = load.moulds.map(
    (mould) => mould.count * (mould.massKg + mould.waterKg + (mould.pattern?.massKg ?? 0)),
  );
  return shareOut(cost, massesKg).map((share, index) => ({
    index,
    massKg: massesKg[index] ?? 0,
    cost: share,
  }));
}
