import { GAS_CONSTANT_J_PER_MOL_K, KELVIN_AT_0_C } from './constants';

/** One step of the pattern's decay: dα/dt = A·exp(−E/RT)·f(α), α the share of the step's own mass that is gone. */
export interface DecayStep {
  massShare: number;
  activationJPerMol: number;
  preExponentialPerS: number;
  model: 'first-order' | 'random-scission';
  /** Index of the step whose residue this one burns; null: it runs from the start. */
  follows: number | null;
  needsAir: boolean;
}

/** What a pattern is, as the solver needs it. */
export interface PatternProperties {
  massKg: number;
  /** Core temperature above which it runs out while a segment drains; null: never. */
  flowsC: number | null;
  drainedShare: number;
  drainTimeS: number;
  ashShare: number;
  heatOfCombustionJPerKg: number;
  airKgPerKg: number;
  steps: readonly DecayStep[];
}

/** A pattern on its way out: what has drained and what of the rest has gone. */
export interface PatternState {
  readonly properties: PatternProperties;
  /** Share of the pattern that has not run out. */
  undrainedShare: number;
  /** Share of each step's own mass that is still there. */
  readonly stepLeft: Float64Array;
  /** The same at the end of the step last looked at. */
  nextUndrainedShare: number;
  readonly nextStepLeft: Float64Array;
  /** Whether that step changes anything. */
  moves: boolean;
  /** Share of the pattern's mass left, 0-1. */
  leftShare: number;
}

/** A whole pattern. */
export function patternState(properties: PatternProperties): PatternState {
  const steps = properties.steps.length;
  return {
    properties,
    undrainedShare: 1,
    stepLeft: new Float64Array(steps).fill(1),
    nextUndrainedShare: 1,
    nextStepLeft: new Float64Array(steps).fill(1),
    moves: false,
    leftShare: 1,
  };
}

/** Share of the pattern's mass left in the mould: undrained × (organic left × (1 − ash) + ash), 0-1. */
function leftShareOf({ properties, stepLeft, undrainedShare }: PatternState): number {
  const { steps, ashShare } = properties;
  let organic = 0;
  for (let i = 0; i < steps.length; i++) organic += steps[i]!.massShare * stepLeft[i]!;
  return undrainedShare * (organic * (1 - ashShare) + ashShare);
}

const COLDEST_DECAY_C = 120;

function pace(perK: number, tempC: number): number {
  return Math.exp(-perK / (tempC + KELVIN_AT_0_C));
}

/** ∫ A·exp(−E/RT) dt over a step in which temperature goes straight from one value to another: Simpson's rule. */
function progressOf(step: DecayStep, fromC: number, toC: number, stepS: number): number {
  const perK = step.activationJPerMol / GAS_CONSTANT_J_PER_MOL_K;
  const sum = pace(perK, fromC) + 4 * pace(perK, (fromC + toC) / 2) + pace(perK, toC);
  return (sum / 6) * step.preExponentialPerS * stepS;
}

/** Share of a step's mass left after progress ∫k dt: exact for f = 1 − α, and for f = 2(√α − α), where √α relaxes to 1. */
function leftAfter(step: DecayStep, left: number, progress: number): number {
  if (step.model === 'first-order') return left * Math.exp(-progress);
  const root = Math.sqrt(Math.max(1 - left, 1e-4));
  const next = 1 - (1 - root) * Math.exp(-progress);
  return 1 - next * next;
}

/**
 * Looks one step of time ahead at the mould's core temperature, without taking it (`settlePattern` does). Draining: above its
 * flow temperature, while the segment drains, its drainable share runs out evenly over the drain time. Decay: Arrhenius
 * steps in parallel; one that follows another has only what that one has left behind to burn, and one that needs air goes
 * at the share of its pace that the air allows.
 *
 * @param airShare share of the air needed that gets in, 0-1
 * @returns gas given off, kg
 */
export function foreseePattern(
  state: PatternState,
  fromC: number,
  toC: number,
  stepS: number,
  draining: boolean,
  airShare: number,
): number {
  const { properties, stepLeft, nextStepLeft } = state;
  const { flowsC, drainedShare, drainTimeS, massKg, ashShare, steps } = properties;
  const hottestC = Math.max(fromC, toC);
  const flows = draining && flowsC !== null && hottestC >= flowsC;
  state.moves = flows || hottestC >= COLDEST_DECAY_C;
  if (!state.moves) return 0;
  state.nextUndrainedShare = state.undrainedShare;
  for (let i = 0; i < steps.length; i++) nextStepLeft[i] = stepLeft[i]!;
  if (flows) {
    const drained = drainTimeS > 0 ? (drainedShare * stepS) / drainTimeS : drainedShare;
    state.nextUndrainedShare = Math.max(
      Math.min(state.undrainedShare, 1 - drainedShare),
      state.undrainedShare - drained,
    );
  }
  if (hottestC < COLDEST_DECAY_C) return 0;
  let goneShare = 0;
  for (let i = 0; i < steps.length; i++) {
    const step = steps[i]!;
    const left = stepLeft[i]!;
    if (left < 1e-9) continue;
    const progress = progressOf(step, fromC, toC, stepS) * (step.needsAir ? airShare : 1);
    const ready = step.follows === null ? left : Math.max(0, left - stepLeft[step.follows]!);
    const next =
      step.follows === null ? leftAfter(step, left, progress) : left - ready * (1 - Math.exp(-progress));
    goneShare += step.massShare * (left - next);
    nextStepLeft[i] = next;
  }
  return goneShare * ((state.undrainedShare + state.nextUndrainedShare) / 2) * (1 - ashShare) * massKg;
}

/** Takes the step that was last looked at. */
export function settlePattern(state: PatternState): void {
  if (!state.moves) return;
  state.undrainedShare = state.nextUndrainedShare;
  for (let i = 0; i < state.stepLeft.length; i++) state.stepLeft[i] = state.nextStepLeft[i]!;
  state.leftShare = leftShareOf(state);
}
