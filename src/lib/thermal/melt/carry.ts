import { valueAt } from '../../materials';
import { pouring } from '../../materials/pouring';
import { radiativeFilmWPerM2K } from '../radiation';
import { type Alloy, alloyEnthalpyJPerKg } from './alloy-heat';
import { crucibleSize } from './melting';

/** A filled crucible out of its furnace. */
export interface Carried {
  readonly alloy: Alloy;
  readonly chargeKg: number;
  readonly crucibleKg: number;
  readonly liquidDensityKgPerM3: number;
  readonly pourC: number;
  readonly ambientC: number;
}

const STEP_C = 1;

/**
 * Cooling of a filled crucible in the open, as one lump: m·dh + m_c·c_c·dT = −[ε_m·A_top + ε_c·A_out]·σ·(T⁴ − T_room⁴)·dt
 * − h·A·(T − T_room)·dt, walked in steps of 1 K. Metal and crucible share one temperature: the wall of a clay-graphite
 * crucible conducts far better than its outside radiates. Good to about 40 %, most of it the emissivities.
 *
 * @returns from the pouring temperature down: `[seconds, °C]`, until `untilC` or `forS`, whichever comes first
 */
function* cooling(carried: Carried, untilC: number, forS: number): Generator<[number, number]> {
  const { alloy, chargeKg, crucibleKg, pourC, ambientC } = carried;
  const { innerM, outerM, heightM } = crucibleSize(chargeKg / carried.liquidDensityKgPerM3);
  const topM2 = (Math.PI / 4) * innerM ** 2;
  const outsideM2 = Math.PI * outerM * heightM + (Math.PI / 4) * outerM ** 2;
  const radiatingM2 =
    topM2 * valueAt(pouring.meltEmissivity, 20) + outsideM2 * valueAt(pouring.crucibleEmissivity, 20);
  const convectionWPerK = valueAt(pouring.shopConvectionWPerM2K, 20) * (topM2 + outsideM2);
  const crucibleJPerK = crucibleKg * valueAt(pouring.crucibleHeatCapacityJPerKgK, 20);
  let atS = 0;
  let tempC = pourC;
  yield [atS, tempC];
  while (tempC > untilC && atS < forS) {
    const nextC = Math.max(tempC - STEP_C, untilC);
    const heatJ =
      chargeKg * (alloyEnthalpyJPerKg(alloy, tempC) - alloyEnthalpyJPerKg(alloy, nextC)) +
      crucibleJPerK * (tempC - nextC);
    const middleC = (tempC + nextC) / 2;
    const lostW =
      (radiatingM2 * radiativeFilmWPerM2K(middleC, ambientC) + convectionWPerK) * (middleC - ambientC);
    if (lostW <= 0) return;
    atS += heatJ / lostW;
    tempC = nextC;
    yield [atS, tempC];
  }
}

/** Temperature of the metal after being carried for a time, °C. */
export function carriedC(carried: Carried, carryS: number): number {
  let [beforeS, beforeC] = [0, carried.pourC];
  for (const [atS, tempC] of cooling(carried, carried.ambientC + STEP_C, carryS)) {
    if (atS >= carryS)
      return atS > beforeS ? beforeC + ((tempC - beforeC) * (carryS - beforeS)) / (atS - beforeS) : tempC;
    [beforeS, beforeC] = [atS, tempC];
  }
  return beforeC;
}

/** Seconds until a carried metal has cooled to a temperature; 0 where it is no hotter now. */
export function carriedUntilS(carried: Carried, tempC: number): number {
  let lastS = 0;
  for (const [atS] of cooling(carried, Math.max(tempC, carried.ambientC + STEP_C), Infinity)) lastS = atS;
  return lastS;
}
