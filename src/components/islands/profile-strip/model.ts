import type { Kiln, Tariff, Thermocouple } from '~/lib/contracts/equipment';
import { co2Of, costOf, tariffFits, zoneOffset } from '~/lib/planning';
import { issuesOf } from '~/lib/profile/validate';
import { cautionsOf } from '~/lib/thermal/cautions';
import { estimateOf } from '~/lib/thermal/estimate';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { FiringTooStiff } from '~/lib/thermal/march';
import { simulate, type FiringInput } from '~/lib/thermal/simulate';
import type { Simulation } from '~/lib/thermal/simulation';
import type { UnitPreferences } from '~/lib/units';
import type { ProfileDocument } from './document';

/** What an estimate in the editor depends on besides the document. */
export interface Surroundings {
  readonly kilns: readonly Kiln[];
  readonly tariffs: readonly Tariff[];
  readonly thermocouples: readonly Thermocouple[];
  readonly ambientC: number;
  /** Null before the page is in a browser: nothing is computed then. */
  readonly startMs: number | null;
  readonly zone: string;
  readonly units: UnitPreferences;
  readonly attendedHours: { readonly fromMinute: number; readonly toMinute: number } | null;
}

const EMPTY_LOAD = loadSchema.parse({});

/**
 * What the models say of a document: the same simulation, cautions and prices that the server computes for the record.
 *
 * @returns null where no kiln is chosen, the plan is longer than a profile may be, or it cannot be computed
 */
function estimateDocument(
  document: ProfileDocument,
  around: Surroundings & { readonly startMs: number },
): Estimate | null {
  const kiln = around.kilns.find((candidate) => candidate.id === document.kilnId);
  if (!kiln || issuesOf(document.profile).length > 0) return null;
  const { profile } = document;
  const load = document.load ?? EMPTY_LOAD;
  const simulation = simulatedOrNull({ profile, kiln, load, ambientC: around.ambientC });
  if (!simulation) return null;
  const offsetMinutesAt = zoneOffset(around.zone);
  const thermocouple = around.thermocouples.find((candidate) => candidate.id === kiln.thermocoupleId) ?? null;
  const cautions = cautionsOf(simulation, {
    startMs: around.startMs,
    offsetMinutesAt,
    attendedHours: around.attendedHours,
    thermocouple,
    units: around.units,
  });
  const tariff = around.tariffs.find((candidate) => candidate.id === kiln.tariffId);
  const plan = tariff && tariffFits(tariff.plan, kiln) ? tariff.plan : null;
  const fuel = kiln.energy === 'gas' ? kiln.fuel : 'electricity';
  return {
    ...estimateOf(simulation, { mouldIndex: null, cautions }),
    ...co2Only(co2Of(fuel, simulation.energy.inKWh, plan)),
    cost: plan ? costOf(plan, simulation, around.startMs, offsetMinutesAt).cost : null,
  };
}

/** Null where kiln and load are so far from any real ones that they would hold the page up. */
function simulatedOrNull(input: FiringInput): Simulation | null {
  try {
    return simulate(input);
  } catch (error) {
    if (error instanceof FiringTooStiff) return null;
    throw error;
  }
}

/** The model with what surrounds it. */
export function modelOf(around: Surroundings): (document: ProfileDocument) => Estimate | null {
  const { startMs } = around;
  if (startMs === null) return () => null;
  return (document) => estimateDocument(document, { ...around, startMs });
}

const co2Only = ({ co2Kg }: { readonly co2Kg: number }): { co2Kg: number } => ({ co2Kg });
