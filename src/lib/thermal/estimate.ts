import type { Profile } from '../profile/schema';
import type { Caution, Estimate } from './estimate-schema';
import { fuelUse } from './fuel-use';
import type { KilnPlate } from './kiln-schema';
import type { Load } from './load-schema';
import { readyS, slowestMould } from './readiness';
import { simulate } from './simulate';
import type { MouldTrace, Simulation } from './simulation';

/** What an estimate is made from. Clock, tariff and locale play no part in it. */
export interface EstimateInput {
  profile: Profile;
  kiln: KilnPlate;
  load: Load;
  ambientC: number;
  /** Line of the load whose curves are wanted; null or absent: the slowest mould. */
  mouldIndex?: number | null;
}

/**
 * What the models say of one firing: how long it takes, what it uses, what the kiln and the moulds really do.
 *
 * `cost` is null and `co2Kg` 0 here: money and emissions come from a tariff, priced from the simulation's power.
 *
 * @param input a valid profile, kiln and load, and the room's temperature in °C
 * @returns times in s from the start, energy in kWh (fuel on its higher heating value), curves at the solver's own moments
 * @throws RangeError where the materials table lacks a material that is named, or the load has no mould of that index
 */
export function estimate(input: EstimateInput): Estimate {
  const { mouldIndex, ...firing } = input;
  return estimateOf(simulate(firing), { mouldIndex: mouldIndex ?? null, cautions: [] });
}

/** The estimate that a simulation amounts to. */
export function estimateOf(
  simulation: Simulation,
  { mouldIndex, cautions }: { mouldIndex: number | null; cautions: Caution[] },
): Estimate {
  const shown = mouldIndex ?? slowestMould(simulation);
  const mould = shown === null ? undefined : simulation.moulds[shown];
  if (shown !== null && mould === undefined) throw new RangeError(`the load has no mould ${shown}`);
  const slowest = simulation.moulds[slowestMould(simulation) ?? -1];
  return {
    plannedS: simulation.plannedS,
    predictedS: simulation.predictedS,
    energyKWh: simulation.energy.inKWh,
    ...fuelUse(simulation.kiln, simulation.energy.inKWh),
    co2Kg: 0,
    cost: null,
    peakC: simulation.chamberC.reduce((peak, value) => Math.max(peak, value), -Infinity),
    readyS: slowest === undefined ? null : readyS(simulation, slowest),
    openableS: simulation.openableS,
    segments: simulation.segments.map((moments) => ({
      plannedStartS: moments.plannedStartS,
      plannedEndS: moments.plannedEndS,
      startS: moments.startS,
      rampEndS: moments.rampEndS,
      endS: moments.endS,
      energyKWh: moments.energyKWh,
      kilnLimited: moments.kilnLimited,
    })),
    mould: shown,
    curve: curveOf(simulation, mould),
    energy: simulation.energy,
    cautions,
  };
}

function curveOf(simulation: Simulation, mould: MouldTrace | undefined): Estimate['curve'] {
  return {
    timeS: list(simulation.timeS),
    plannedC: list(simulation.plannedC),
    chamberC: list(simulation.chamberC),
    mouldSurfaceC: list(mould?.surfaceC),
    mouldCoreC: list(mould?.coreC),
    powerKW: list(simulation.powerKW),
    patternLeftShare: list(mould?.patternLeftShare),
    waterLeftKg: list(mould?.waterKg),
    gasGPerMin: list(mould?.gasGPerMin),
    heatWorkH: list(mould?.heatWorkH),
  };
}

/** A plain list of a series; an empty one where there is none. */
function list(series: Float64Array | undefined): number[] {
  if (series === undefined) return [];
  const values = new Array<number>(series.length);
  for (let i = 0; i < series.length; i++) values[i] = series[i]!;
  return values;
}
