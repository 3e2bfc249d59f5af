import { valueAt } from '../../materials';
import { pouring } from '../../materials/pouring';
import { fuelOf } from '../../planning';
import { J_PER_KWH } from '../constants';
import { type Alloy, alloyEnthalpyJPerKg, componentSumErrorShare } from './alloy-heat';

/** A furnace as the melt model knows it. */
export type MeltingFurnace = (
  | { readonly energy: 'electric'; readonly ratedKW: number }
  | { readonly energy: 'gas'; readonly burnerKW: number; readonly fuel: 'propane' | 'natural-gas' }
) & {
  /** Share of the input that ends up in charge and crucible; null: the table's for its kind. */
  readonly efficiencyShare: number | null;
};

/** What is melted, in what, from which temperature to which. */
export interface Melt {
  readonly alloy: Alloy;
  readonly chargeKg: number;
  readonly crucibleKg: number;
  readonly startC: number;
  readonly pourC: number;
}

/** Heat and time of one melt. */
export interface Melting {
  /** Into charge and crucible, kWh. */
  readonly heatKWh: number;
  /** Into the charge alone, kWh, and what the component sum may be off by. */
  readonly chargeKWh: number;
  readonly chargeErrorKWh: number;
  /** Electricity, or fuel on its higher heating value; null: no furnace is named. */
  readonly inputKWh: number | null;
  readonly fuelKg: number;
  readonly fuelM3: number;
  /** At the furnace's full input; null: no furnace is named. */
  readonly durationS: number | null;
}

/**
 * Mass of a clay-graphite crucible for a charge, kg: a cylinder of the table's proportions that the charge fills to the
 * brim, with a wall and a floor of the table's thickness.
 */
export function usualCrucibleKg(chargeKg: number, liquidDensityKgPerM3: number): number {
  const { outerM3, innerM3 } = crucibleSize(chargeKg / liquidDensityKgPerM3);
  return (outerM3 - innerM3) * valueAt(pouring.crucibleDensityKgPerM3, 20);
}

/** A cylinder that holds a volume: inner and outer size. */
export function crucibleSize(volumeM3: number): {
  innerM: number;
  outerM: number;
  heightM: number;
  innerM3: number;
  outerM3: number;
} {
  const ratio = valueAt(pouring.crucibleDepthPerDiameter, 20);
  const wallM = valueAt(pouring.crucibleWallM, 20);
  const innerM = Math.cbrt((4 * volumeM3) / (Math.PI * ratio));
  const outerM = innerM + 2 * wallM;
  const heightM = innerM * ratio + wallM;
  return { innerM, outerM, heightM, innerM3: volumeM3, outerM3: (Math.PI / 4) * outerM ** 2 * heightM };
}

/** The furnace's efficiency: its own, or the table's for its kind. */
export function efficiencyShareOf(furnace: MeltingFurnace): number {
  const usual = furnace.energy === 'gas' ? pouring.gasEfficiencyShare : pouring.electricEfficiencyShare;
  return furnace.efficiencyShare ?? valueAt(usual, 20);
}

/**
 * Heat to bring charge and crucible to the pouring temperature, and what a furnace needs for it:
 * Q = m·[h(pour) − h(start)] + m_c·c_c·(pour − start), input = Q / efficiency, time = input / full input.
 * The charge by the component sum; the crucible at the charge's temperature.
 *
 * @param furnace null: none is named, heat only
 */
export function meltingOf(melt: Melt, furnace: MeltingFurnace | null): Melting {
  const chargeJ =
    melt.chargeKg *
    (alloyEnthalpyJPerKg(melt.alloy, melt.pourC) - alloyEnthalpyJPerKg(melt.alloy, melt.startC));
  const crucibleJ =
    melt.crucibleKg * valueAt(pouring.crucibleHeatCapacityJPerKgK, 20) * (melt.pourC - melt.startC);
  const heatKWh = (chargeJ + crucibleJ) / J_PER_KWH;
  const parts = {
    heatKWh,
    chargeKWh: chargeJ / J_PER_KWH,
    chargeErrorKWh: (componentSumErrorShare(melt.alloy) * chargeJ) / J_PER_KWH,
  };
  if (!furnace) return { ...parts, inputKWh: null, fuelKg: 0, fuelM3: 0, durationS: null };
  const inputKWh = heatKWh / efficiencyShareOf(furnace);
  const fullKW = furnace.energy === 'gas' ? furnace.burnerKW : furnace.ratedKW;
  const fuel = furnace.energy === 'gas' ? fuelOf(furnace.fuel, inputKWh) : { fuelKg: 0, fuelM3: 0 };
  return { ...parts, inputKWh, ...fuel, durationS: (inputKWh / fullKW) * 3600 };
}
