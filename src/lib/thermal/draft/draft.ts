import type { Profile } from '../../profile/schema';
import type { CautionContext } from '../cautions';
import { wordsOf } from '../cautions/view';
import type { Caution } from '../estimate-schema';
import type { KilnPlate } from '../kiln-schema';
import type { Load } from '../load-schema';
import { type Objection, objectionsTo } from './against';
import { burnSteps, dryingStep, meltStep, vitrifyStep } from './heating';
import { needsOf } from './needs';
import { castingStep, coolingStep } from './pouring';
import { settle } from './settle';
import type { DraftStep } from './step';

export interface DraftInput {
  load: Load;
  kiln: KilnPlate;
  ambientC: number;
  /** What the cautions go by; its units are those of the reasons. */
  context: CautionContext;
}

/** A profile to begin from, and why it is as it is. */
export interface Draft {
  profile: Profile;
  /** At least one for each segment, in order. */
  because: { segment: number; text: string; source: string }[];
  /** Why this load cannot be fired well, whatever the profile; usually none. */
  against: Objection[];
  /** What the models still warn of. */
  cautions: Caution[];
}

/**
 * Drafts a profile for a load in a kiln: drying, melt-out, burnout, vitrification, casting hold or cooling, as the moulds
 * need them. Targets and first rates come from the materials table and the trade's practice; holds and rates are then settled by
 * firing it in the models until nothing that a change would mend is warned of. An estimate to begin from, not a
 * recipe.
 *
 * @param input a load with at least one mould
 * @throws RangeError where the load has no mould, or names a material that the table lacks
 */
export function draftOf({ load, kiln, ambientC, context }: DraftInput): Draft {
  if (load.moulds.length === 0) throw new RangeError('a draft needs a mould');
  const needs = needsOf(load, kiln);
  const words = wordsOf(context.units);
  const { steps, simulation, cautions } = settle(firstSteps(needs, ambientC), needs, { ambientC, context });
  return {
    profile: simulation.profile,
    because: steps.flatMap((step, segment) =>
      step
        .reasons(step, { needs, words, simulation, cautions, index: segment })
        .map((reason) => ({ segment, ...reason })),
    ),
    against: [...objectionsTo(needs, words), ...notByProfile(cautions)],
    cautions,
  };
}

function firstSteps(needs: ReturnType<typeof needsOf>, ambientC: number): DraftStep[] {
  const drying = dryingStep(needs);
  const melting = meltStep(needs, drying);
  const soFar = [drying, melting].filter((step): step is DraftStep => step !== null);
  const burning = burnSteps(needs, soFar.at(-1)?.segment.toC ?? ambientC);
  const end = castingStep(needs) ?? coolingStep(needs);
  return [...soFar, ...burning, vitrifyStep(needs), end].filter((step): step is DraftStep => step !== null);
}

/** Stops that no profile answers: the furnace or the metal of the pour. */
const notByProfile = (cautions: readonly Caution[]): Objection[] =>
  cautions
    .filter(({ code, severity }) => code === 'metal-not-ready' && severity === 'stop')
    .map(({ text, source }) => ({ text, source }));
