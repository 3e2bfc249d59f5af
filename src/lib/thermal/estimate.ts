import { fuelOf, massesKg } from '../planning';
import { type CautionContext, cautionsOf } from './cautions';
import { lastConeDown } from './cone';
import type { Caution, Estimate, PourEstimate } from './estimate-schema';
import { type PourForecast, pourOf } from './melt/pour';
import { LONGEST_FLOW_S } from './melt/pour-wall';
import { readyS, slowestMould } from './readiness';
import { type FiringInput, simulate } from './simulate';
import type { MouldTrace, Simulation } from './simulation';
import { soakMoreS } from './soak';

/** What an estimate is made from. */
export interface EstimateInput extends FiringInput {
  /** Line of the load whose curves are wanted; null or absent: the slowest mould. */
  mouldIndex?: number | null;
  /** What the cautions need besides; absent: nothing is known of start, hours of attendance and thermocouple. */
  context?: CautionContext;
}

const NOTHING_KNOWN: CautionContext = {
  startMs: null,
  offsetMinutesAt: () => 0,
  attendedHours: null,
  thermocouple: null,
};

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
  const { mouldIndex = null, context = NOTHING_KNOWN, ...firing } = input;
  const simulation = simulate(firing);
  const pour = pourOf(simulation, context.furnace ?? null);
  return estimateOf(simulation, { mouldIndex, cautions: cautionsOf(simulation, context, pour), pour });
}

/** The estimate that a simulation amounts to. */
export function estimateOf(
  simulation: Simulation,
  {
    mouldIndex,
    cautions,
    pour,
  }: { mouldIndex: number | null; cautions: Caution[]; pour: PourForecast | null },
): Estimate {
  const shown = mouldIndex ?? slowestMould(simulation);
  const mould = shown === null ? undefined : simulation.moulds[shown];
  if (shown !== null && mould === undefined) throw new RangeError(`the load has no mould ${shown}`);
  const slowest = simulation.moulds[slowestMould(simulation) ?? -1];
  return {
    plannedS: simulation.plannedS,
    predictedS: simulation.predictedS,
    energyKWh: simulation.energy.inKWh,
    ...fuelUse(simulation),
    co2Kg: 0,
    cost: null,
    peakC: simulation.chamberC.reduce((peak, value) => Math.max(peak, value), -Infinity),
    readyS: slowest === undefined ? null : readyS(simulation, slowest),
    openableS: simulation.openableS,
    segments: simulation.segments.map((moments, index) => ({
      plannedStartS: moments.plannedStartS,
      plannedEndS: moments.plannedEndS,
      startS: moments.startS,
      rampEndS: moments.rampEndS,
      endS: moments.endS,
      energyKWh: moments.energyKWh,
      kilnLimited: moments.kilnLimited,
      soakMoreS: mould === undefined ? null : soakMoreS(simulation, mould, index),
    })),
    mould: shown,
    curve: curveOf(simulation, mould),
    energy: simulation.energy,
    cone: mould === undefined ? null : (lastConeDown(simulation.timeS, mould.coreC)?.name ?? null),
    split: splitOf(simulation),
    pour: pour === null ? null : pourEstimate(pour),
    cautions,
  };
}

/** What each line of moulds bears by its mass; furniture belongs to everybody. */
function splitOf({ load, energy }: Simulation): Estimate['split'] {
  const masses = massesKg(load);
  const totalKg = masses.reduce((sum, massKg) => sum + massKg, 0);
  return masses.map((massKg, mould) => {
    const share = massKg / totalKg;
    return { mould, massKg, share, energyKWh: share * energy.inKWh, cost: null };
  });
}

/** The pour without money: that comes from the furnace's tariff. */
function pourEstimate({ melting, moulds, ...pour }: PourForecast): PourEstimate {
  return {
    heatKWh: melting.heatKWh,
    chargeKWh: melting.chargeKWh,
    chargeErrorKWh: melting.chargeErrorKWh,
    inputKWh: melting.inputKWh,
    fuelKg: melting.fuelKg,
    fuelM3: melting.fuelM3,
    co2Kg: null,
    cost: null,
    meltS: melting.durationS,
    furnaceStartS: pour.furnaceStartS,
    metalReadyS: pour.metalReadyS,
    atS: pour.atS,
    metalAtPourC: pour.metalAtPourC,
    liquidusC: pour.liquidusC,
    metalWindowS: pour.metalWindowS,
    moulds: moulds.map(({ index, coreLeavingC, coreAtPourC, fill }) => ({
      mould: index,
      coreLeavingC,
      coreAtPourC,
      fill: fill && {
        judgement: fill.judgement,
        flowsS: Math.min(LONGEST_FLOW_S, fill.flowsS),
        flowsFromS: Math.min(LONGEST_FLOW_S, fill.flowsFromS),
        flowsToS: Math.min(LONGEST_FLOW_S, fill.flowsToS),
        fillS: fill.fillS,
        superheatC: fill.superheatK,
        usualSuperheatFromC: fill.usualSuperheatK[0],
        usualSuperheatToC: fill.usualSuperheatK[1],
      },
    })),
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

function fuelUse({ kiln, energy }: Simulation): { fuelKg: number; fuelM3: number } {
  return kiln.energy === 'gas' ? fuelOf(kiln.fuel, energy.inKWh) : { fuelKg: 0, fuelM3: 0 };
}
