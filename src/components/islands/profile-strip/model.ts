import type { Furnace, Kiln, Tariff, Thermocouple } from '~/lib/contracts/equipment';
import { withStudioFigures, type StudioFigures } from '~/lib/materials/studio-figures';
import { zoneOffset } from '~/lib/planning';
import { forecastOf } from '~/lib/planning/forecast';
import { issuesOf } from '~/lib/profile/validate';
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
  readonly furnaces: readonly Furnace[];
  readonly tariffs: readonly Tariff[];
  readonly studioFigures: readonly StudioFigures[];
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
 * What the models say of a document: the same forecast that the server computes for the record.
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
  const load = withStudioFigures(document.load ?? EMPTY_LOAD, around.studioFigures);
  const simulation = simulatedOrNull({ profile, kiln, load, ambientC: around.ambientC });
  if (!simulation) return null;
  const furnace = around.furnaces.find((candidate) => candidate.id === load.pour?.furnaceId) ?? null;
  const planOf = (tariffId: string | null | undefined) =>
    around.tariffs.find((candidate) => candidate.id === tariffId)?.plan ?? null;
  return forecastOf(simulation, {
    mouldIndex: null,
    context: {
      startMs: around.startMs,
      offsetMinutesAt: zoneOffset(around.zone),
      attendedHours: around.attendedHours,
      thermocouple: around.thermocouples.find((candidate) => candidate.id === kiln.thermocoupleId) ?? null,
      furnace,
      units: around.units,
    },
    kilnPlan: planOf(kiln.tariffId),
    furnacePlan: planOf(furnace?.tariffId),
    pricedFromMs: around.startMs,
  });
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
