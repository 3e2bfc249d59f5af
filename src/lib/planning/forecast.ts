import { type CautionContext, cautionsOf } from '../thermal/cautions';
import { estimateOf } from '../thermal/estimate';
import type { Estimate } from '../thermal/estimate-schema';
import { pourOf } from '../thermal/melt/pour';
import type { Simulation } from '../thermal/simulation';
import { co2Of } from './fuel';
import { splitCost } from './split';
import { costOf, tariffFits } from './tariff-cost';
import type { TariffPlan } from './tariff-schema';

/** What a forecast goes by besides the simulated firing. */
export interface ForecastAround {
  /** Line of the load whose curves are wanted; null: the slowest mould. */
  mouldIndex: number | null;
  context: CautionContext;
  /** What kiln and furnace are priced by; null, or one that does not price what they use: no cost. */
  kilnPlan: TariffPlan | null;
  furnacePlan: TariffPlan | null;
  /** Instant that prices by time of use begin at, ms since 1970 UTC. */
  pricedFromMs: number;
}

/**
 * All that the models say of a firing: curves, times, energy, cautions, the pour, and what it costs. The one way to an
 * estimate, in the browser as on the server.
 *
 * @throws RangeError where the load has no mould of that index, or the materials table lacks a metal that is named
 */
export function forecastOf(simulation: Simulation, around: ForecastAround): Estimate {
  const { context, mouldIndex } = around;
  const pour = pourOf(simulation, context.furnace ?? null);
  const cautions = cautionsOf(simulation, context, pour);
  return withMoney(estimateOf(simulation, { mouldIndex, cautions, pour }), simulation, around);
}

function withMoney(estimate: Estimate, simulation: Simulation, around: ForecastAround): Estimate {
  const { kiln, load } = simulation;
  const { context, pricedFromMs } = around;
  const plan = around.kilnPlan !== null && tariffFits(around.kilnPlan, kiln) ? around.kilnPlan : null;
  const energy = kiln.energy === 'gas' ? kiln.fuel : 'electricity';
  const cost = plan ? costOf(plan, simulation, pricedFromMs, context.offsetMinutesAt).cost : null;
  const shares = cost ? splitCost(cost, load) : [];
  return {
    ...estimate,
    co2Kg: co2Of(energy, simulation.energy.inKWh, plan).co2Kg,
    cost,
    split: estimate.split.map((line) => ({ ...line, cost: shares[line.mould]?.cost ?? null })),
    pour: pricedPour(estimate.pour, around),
  };
}

/** The melt at the furnace's full input from the moment it is lit, or with the kiln where nobody knows better. */
function pricedPour(pour: Estimate['pour'], around: ForecastAround): Estimate['pour'] {
  const { furnace = null, offsetMinutesAt } = around.context;
  if (pour === null || furnace === null || pour.inputKWh === null || pour.meltS === null) return pour;
  const fits = around.furnacePlan !== null && tariffFits(around.furnacePlan, furnace);
  const plan = fits ? around.furnacePlan : null;
  const startS = pour.furnaceStartS ?? 0;
  const curve = { timeS: [startS, startS + pour.meltS], energyKWh: [0, pour.inputKWh] };
  return {
    ...pour,
    co2Kg: co2Of(furnace.energy === 'gas' ? furnace.fuel : 'electricity', pour.inputKWh, plan).co2Kg,
    cost: plan ? costOf(plan, curve, around.pricedFromMs, offsetMinutesAt).cost : null,
  };
}
