import { cautionsOf, type CautionContext } from '../cautions';
import { seriesAt } from '../series';
import type { Caution } from '../estimate-schema';
import { simulate } from '../simulate';
import type { Simulation } from '../simulation';
import { soakMoreS } from '../soak';
import { type DraftNeeds, isFlask, isWet } from './needs';
import { slowedCooling } from './pouring';
import { type DraftStep, profileOf, wholeMinutesS } from './step';

const MOST_ROUNDS = 40;
/** Steps times bodies after which a draft is as good as it gets: a second or two of work. */
const MOST_WORK = 1_000_000;
const LEAST_RATE_C_PER_H = 15;
const MOST_HOLD_S = 48 * 3600;
const RAISING_C_PER_H = 150;
const MOST_REST_S = 4 * 3600;
/** Blocks are seldom fired slower, shells never (common practice). */
const LEAST_BLOCK_RATE_C_PER_H = 40;
const LEAST_SHELL_RATE_C_PER_H = 100;
const DRY_SHARE = 0.02;

/** A draft with what the models say of it. */
export interface Settled {
  steps: DraftStep[];
  simulation: Simulation;
  cautions: Caution[];
}

/** Fires the draft, changes what the cautions object to, and fires it again, until they have nothing that a change mends. */
export function settle(
  first: readonly DraftStep[],
  needs: DraftNeeds,
  input: { ambientC: number; context: CautionContext },
): Settled {
  let steps = first.map((step) => ({ ...step, segment: { ...step.segment } }));
  const bodies = needs.load.moulds.length + needs.load.furniture.length + 1;
  let work = 0;
  for (let round = 0; ; round += 1) {
    const profile = profileOf(steps, input.ambientC);
    const simulation = simulate({ profile, kiln: needs.kiln, load: needs.load, ambientC: input.ambientC });
    const cautions = cautionsOf(simulation, input.context);
    const settled = { steps, simulation, cautions };
    work += simulation.steps * bodies;
    if (round >= MOST_ROUNDS || work > MOST_WORK) return settled;
    const next = changed(settled, needs);
    if (next === null) return settled;
    steps = next;
  }
}

/** The steps after one change; null: there is nothing more to change. */
function changed(settled: Settled, needs: DraftNeeds): DraftStep[] | null {
  const { steps, simulation, cautions } = settled;
  const copy = steps.map((step) => ({ ...step, segment: { ...step.segment } }));
  const dried = dryLonger(copy, simulation, needs);
  const soaked = soakLonger(copy, simulation);
  let moved = dried || soaked;
  for (const caution of cautions) {
    const step = copy[caution.segment ?? -1];
    if (
      caution.code === 'cooling-too-fast' &&
      caution.segment !== null &&
      step?.segment.rateCPerH === 'coast'
    ) {
      const fromC = copy[caution.segment - 1]?.segment.toC ?? simulation.profile.startC;
      copy.splice(caution.segment, 1, ...slowedCooling(step, fromC, needs));
      return copy;
    }
    moved = answer(caution, copy, simulation, needs) || moved;
  }
  return moved ? copy : null;
}

/** Where free water must be gone, °C: what is left above it would be boiled off in a closed wall. */
const DRY_BEFORE_C = { shell: 200, flask: 370 } as const;

/** Lengthens the drying hold until the wettest mould is dry before it is too hot for water. */
function dryLonger(steps: DraftStep[], simulation: Simulation, { moulds }: DraftNeeds): boolean {
  const step = steps.find(({ purpose }) => purpose === 'dry');
  if (step === undefined || step.segment.holdS >= MOST_HOLD_S) return false;
  const late = simulation.moulds.some(({ index, waterKg, surfaceC }) => {
    const needs = moulds[index];
    if (needs === undefined || !isWet(needs)) return false;
    const hotC = DRY_BEFORE_C[needs.mould.form] - 10;
    const at = surfaceC.findIndex((tempC) => tempC > hotC);
    return at >= 0 && (waterKg[at] ?? 0) > DRY_SHARE * (waterKg[0] ?? 0);
  });
  return late && longer(step, 1.25);
}

/** Holds as long as the slowest core needs. */
function soakLonger(steps: DraftStep[], simulation: Simulation): boolean {
  let moved = false;
  steps.forEach(({ segment, purpose }, index) => {
    if (purpose === 'dry' || (purpose === 'rest' && segment.holdS >= MOST_REST_S)) return;
    const moreS = Math.max(0, ...simulation.moulds.map((mould) => soakMoreS(simulation, mould, index) ?? 0));
    if (moreS <= 0 || segment.holdS >= MOST_HOLD_S) return;
    // while a block still boils its core is held back, and the pace read from it says too much
    segment.holdS = Math.min(MOST_HOLD_S, wholeMinutesS(segment.holdS + Math.min(moreS, segment.holdS)));
    moved = true;
  });
  return moved;
}

/** Changes what a caution objects to; false: nothing here mends it. */
function answer(caution: Caution, steps: DraftStep[], simulation: Simulation, needs: DraftNeeds): boolean {
  const { segment: index, code, severity } = caution;
  const step = index === null ? undefined : steps[index];
  const grave = severity !== 'note';
  switch (code) {
    case 'kiln-cannot-follow':
      return step !== undefined && followed(step, simulation, index ?? 0);
    case 'too-steep-for-wall':
    case 'inversion-too-fast':
    case 'burning-heats-kiln':
    case 'burnout-starved':
    case 'offgas-peak':
    case 'steam-in-wall':
      return grave && step !== undefined && slower(step, needs);
    case 'cooling-too-fast':
      return step !== undefined && comesDown(step) && slower(step, needs, LEAST_RATE_C_PER_H);
    case 'burnout-incomplete':
      return longer(lastOf(steps, ['char-below-limit', 'burn']), 1.4) || hotter(lastOf(steps, ['burn']), 25);
    case 'sulphur-risk':
      return longer(lastOf(steps, ['char-below-limit']), 1.4);
    case 'heat-work-short':
      return hotter(lastOf(steps, ['vitrify']), 15) || longer(lastOf(steps, ['vitrify']), 1.4);
    case 'mould-cold-at-pour':
      return hotter(lastOf(steps, ['cast']), 40);
    case 'no-drain-step':
      return longer(lastOf(steps, ['melt-wax', 'melt-print', 'dry']), 1.3);
    case 'above-material-limit':
    case 'above-kiln-limit':
    case 'above-thermocouple-limit':
      return cooler(hottestOf(steps), 20);
    default:
      return false;
  }
}

/** Whether a step is there to bring the mould down: one that heats is not slowed for what cools beside it. */
const comesDown = ({ purpose }: DraftStep): boolean => ['cast', 'cool', 'cool-slowly'].includes(purpose);

const lastOf = (
  steps: readonly DraftStep[],
  purposes: readonly DraftStep['purpose'][],
): DraftStep | undefined => steps.findLast(({ purpose }) => purposes.includes(purpose));

const hottestOf = (steps: readonly DraftStep[]): DraftStep | undefined =>
  steps.reduce<DraftStep | undefined>(
    (hottest, step) => (hottest === undefined || step.segment.toC > hottest.segment.toC ? step : hottest),
    undefined,
  );

/** A rate that the kiln can keep, or a target that it can reach. */
function followed(step: DraftStep, simulation: Simulation, index: number): boolean {
  const moments = simulation.segments[index];
  const { segment } = step;
  if (moments === undefined) return false;
  const rampS = moments.rampEndS - moments.startS;
  const fromC = index === 0 ? simulation.profile.startC : (simulation.profile.segments[index - 1]?.toC ?? 0);
  if (segment.toC < fromC) {
    if (segment.rateCPerH === 'coast') return false;
    return cooledAsItCan(step, simulation, index, fromC);
  }
  if (segment.rateCPerH === 'coast') {
    // raised above what comes before it: now it has to be heated
    segment.rateCPerH = RAISING_C_PER_H;
    return true;
  }
  if (!moments.arrived) return cooler(step, 25);
  if (typeof segment.rateCPerH !== 'number') return false;
  const keptCPerH = Math.floor(((segment.toC - fromC) / rampS) * 3600 * 0.09) * 10;
  const rateCPerH = Math.max(LEAST_RATE_C_PER_H, Math.min(keptCPerH, segment.rateCPerH - 5));
  if (rateCPerH >= segment.rateCPerH) return false;
  segment.rateCPerH = rateCPerH;
  return true;
}

/** A cooling rate that the kiln falls behind of, brought down to what it does by itself. */
function cooledAsItCan(
  { segment }: DraftStep,
  simulation: Simulation,
  index: number,
  fromC: number,
): boolean {
  if (typeof segment.rateCPerH !== 'number') return false;
  const endS = simulation.segments[index]?.endS ?? 0;
  const reachedC = seriesAt(simulation.timeS, simulation.chamberC, endS);
  const share = Math.max(0, Math.min(1, (fromC - reachedC) / (fromC - segment.toC)));
  const rateCPerH = Math.max(LEAST_RATE_C_PER_H, Math.floor((segment.rateCPerH * share * 0.9) / 5) * 5);
  if (rateCPerH >= segment.rateCPerH) return false;
  segment.rateCPerH = rateCPerH;
  return true;
}

function slower(
  { segment, purpose }: DraftStep,
  { moulds }: DraftNeeds,
  leastCPerH = moulds.some(isFlask) ? LEAST_BLOCK_RATE_C_PER_H : LEAST_SHELL_RATE_C_PER_H,
): boolean {
  if (typeof segment.rateCPerH !== 'number' || purpose === 'melt-wax') return false;
  const rateCPerH = Math.max(leastCPerH, Math.floor((segment.rateCPerH * 0.75) / 5) * 5);
  if (rateCPerH >= segment.rateCPerH) return false;
  segment.rateCPerH = rateCPerH;
  return true;
}

function longer(step: DraftStep | undefined, times: number): boolean {
  if (step === undefined || step.segment.holdS >= MOST_HOLD_S) return false;
  step.segment.holdS = Math.min(MOST_HOLD_S, wholeMinutesS(step.segment.holdS * times));
  return true;
}

function hotter(step: DraftStep | undefined, byC: number): boolean {
  if (step === undefined || step.segment.toC >= step.highC - 1) return false;
  step.segment.toC = Math.round(Math.min(step.highC, step.segment.toC + byC));
  return true;
}

function cooler(step: DraftStep | undefined, byC: number): boolean {
  if (step === undefined || step.segment.toC <= step.lowC) return false;
  step.segment.toC = Math.max(step.lowC, step.segment.toC - byC);
  return true;
}
