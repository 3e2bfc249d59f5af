import type { Caution } from '../estimate-schema';
import type { Simulation } from '../simulation';
import { burningHeatsKiln } from './burning';
import { coreBehindAtHoldEnd } from './core';
import { cristobalite, heatWorkShort, oversintered } from './heat-work';
import { kilnCannotFollow, opensHot, programmerCannotHoldIt } from './kiln';
import { aboveKilnLimit, aboveMaterialLimit, aboveThermocoupleLimit } from './limits';
import { burnoutIncomplete, noDrainStep, patternExpandsFirst } from './pattern';
import { attendedAtNight } from './people';
import { coolingTooFast, inversionTooFast, tooSteepByRate } from './rates';
import { tooSteepByStress } from './stress';
import { type CautionContext, type CautionRule, firingView } from './view';
import { steamInWall } from './water';

export type { CautionContext } from './view';

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
  burningHeatsKiln,
  tooSteepByRate,
  tooSteepByStress,
  inversionTooFast,
  coolingTooFast,
  coreBehindAtHoldEnd,
  heatWorkShort,
  oversintered,
  cristobalite,
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
 * @returns gravest first, then in time order
 */
export function cautionsOf(simulation: Simulation, context: CautionContext): Caution[] {
  const view = firingView(simulation, context);
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
