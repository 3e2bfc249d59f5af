import type { Body } from './body';
import type { Chamber } from './chamber';
import {
  J_PER_KWH,
  WATER_BOILS_C,
  WATER_EVAPORATION_J_PER_KG,
  WATER_HEAT_CAPACITY_J_PER_KG_K,
} from './constants';
import type { FiringModel } from './resolve';
import { integralBetween } from './property-table';
import type { EnergySplit } from './simulation';

/** Temperatures of every body at one moment, to measure stored heat against. */
export interface HeatSnapshot {
  chamberC: number;
  bodiesC: Float64Array[];
}

export function heatSnapshot(chamber: Chamber): HeatSnapshot {
  return { chamberC: chamber.tempC, bodiesC: chamber.bodies.map((body) => body.tempC.slice()) };
}

/** Heat stored since a snapshot in one body, and heat its water and reactions have taken away, J; for one of `count`. */
function bodyHeatJ(body: Body, startC: Float64Array): { storedJ: number; takenJ: number } {
  let storedJ = 0;
  let takenJ = 0;
  for (let i = body.first; i < body.nodes; i++) {
    const volumeM3 = body.volumeM3[i] ?? 0;
    const fromC = startC[i] ?? 0;
    const toC = body.tempC[i] ?? 0;
    storedJ += volumeM3 * integralBetween(body.capacity, body.capacityStart[i] ?? 0, fromC, toC);
    if (body.reaction !== null) {
      takenJ += volumeM3 * integralBetween(body.reaction, 0, fromC, Math.max(fromC, body.peakC[i] ?? fromC));
    }
    const leftKg = (body.latentJ[i] ?? 0) / WATER_EVAPORATION_J_PER_KG;
    const goneKg = (body.fullLatentJ[i] ?? 0) / WATER_EVAPORATION_J_PER_KG - leftKg;
    storedJ += leftKg * WATER_HEAT_CAPACITY_J_PER_KG_K * (toC - fromC);
    takenJ +=
      goneKg * (WATER_EVAPORATION_J_PER_KG + WATER_HEAT_CAPACITY_J_PER_KG_K * (WATER_BOILS_C - fromC));
  }
  if (body.drying !== null) takenJ -= body.drying.sparedJ;
  return { storedJ, takenJ };
}

/**
 * Where the energy of a firing went since a snapshot at its start. Stored heat is read off the temperatures as they
 * are now, lost heat was summed up on the way, so the imbalance is a check of the solver and not an identity.
 * Water that has left counts as heat taken: warmed and evaporated, at 100 °C or below, where its vapour leaves with less.
 */
export function energySplit(model: FiringModel, start: HeatSnapshot): EnergySplit {
  const { chamber, lining } = model;
  const { booked } = chamber;
  let wallsJ = integralBetween(chamber.capacity, 0, start.chamberC, chamber.tempC);
  let loadJ = 0;
  let reactionsJ = 0;
  chamber.bodies.forEach((body, i) => {
    const { storedJ, takenJ } = bodyHeatJ(body, start.bodiesC[i] ?? body.tempC);
    if (body === lining) wallsJ += storedJ;
    else loadJ += storedJ * body.count;
    reactionsJ += takenJ * body.count;
  });
  const lossesJ = booked.farJ + booked.inputJ - booked.heatJ;
  const overJ = booked.inputJ + booked.sourceJ - wallsJ - loadJ - lossesJ - booked.ventJ - reactionsJ;
  const turnoverJ = booked.inputJ > 0 ? booked.inputJ : Math.abs(lossesJ) + Math.abs(booked.ventJ);
  const kWh = (joules: number): number => joules / J_PER_KWH;
  return {
    inKWh: kWh(booked.inputJ),
    wallsKWh: kWh(wallsJ),
    loadKWh: kWh(loadJ),
    lossesKWh: kWh(lossesJ),
    ventKWh: kWh(booked.ventJ),
    reactionsKWh: kWh(reactionsJ),
    patternKWh: kWh(booked.sourceJ),
    imbalance: turnoverJ > 0 ? overJ / turnoverJ : 0,
  };
}
