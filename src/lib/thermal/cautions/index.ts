import type { Caution } from '../estimate-schema';
import type { PourForecast } from '../melt/pour';
import type { Simulation } from '../simulation';
import { burnoutStarved, offgasPeak } from './air';
import { burningHeatsKiln } from './burning';
import { coreBehindAtHoldEnd } from './core';
import { cristobalite, heatWorkShort, oversintered } from './heat-work';
import { kilnCannotFollow, opensHot, programmerCannotHoldIt } from './kiln';
import { aboveKilnLimit, aboveMaterialLimit, aboveThermocoupleLimit } from './limits';
import { burnoutIncomplete, noDrainStep, patternExpandsFirst } from './pattern';
import { attendedAtNight } from './people';
import { metalNotReady, mouldColdAtPour } from './pour';
import { coolingTooFast, inversionTooFast, tooSteepByRate } from './rates';
import { tooSteepByStress } from './stress';
import { type CautionContext, type CautionRule, firingView } from './view';
import { steamInWall } from './water';
import { sulphurRisk } from './sulphur';

export type { CautionContext, PouringFurnace } from './view';

const RULES: readonly CautionRule[] = [
  aboveKilnLimit,
  aboveMaterialLimit,
  aboveThermocoupleLimit,
  kilnCannotFollow,
  programmerCannotHoldIt,
  steamInWall,
  patternExpandsFirst,
  noDrainStep,
  burnoutIncomplete,
  burnoutStarved,
  offgasPeak,
  sulphurRisk,
  burningHeatsKiln,
  tooSteepByRate,
  tooSteepByStress,
  inversionTooFast,
  coolingTooFast,
  coreBehindAtHoldEnd,
  heatWorkShort,
  oversintered,
  cristobalite,
  metalNotReady,
  mouldColdAtPour,
  attendedAtNight,
  opensHot,
];

const RANK = { stop: 0, warn: 1, note: 2 } as const;

/**
 * What a firing has to be warned of: every rule reads the simulated curves. Of several cautions of one kind in one
 * segment (many moulds, one cause) the gravest is kept, so that each can be answered once.
 *
 * @param simulation a firing as the solver computed it
 * @param context what the rules need besides: start, time zone, attended hours, thermocouple, units of the sentences
 * @param pour what `pourOf` says of it, where it is known already
 * @returns gravest first, then in time order
 */
export function cautionsOf(
  simulation: Simulation,
  context: CautionContext,
  pour?: PourForecast | null,
): Caution[] {
  const view = firingView(simulation, context, pour);
  const gravest = new Map<string, Caution>();
  for (const caution of RULES.flatMap((rule) => rule(view))) {
    const key = `${caution.code}/${caution.segment ?? ''}`;
    const held = gravest.get(key);
    if (held === undefined || RANK[caution.severity] < RANK[held.severity]) gravest.set(key, caution);
  }
  return [...gravest.values()].sort(
    (a, b) => RANK[a.severity] - RANK[b.severity] || (a.atS ?? -1) - (b.atS ?? -1),
  );
}
