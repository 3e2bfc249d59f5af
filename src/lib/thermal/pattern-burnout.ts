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
}

/** A whole pattern. */
export function patternState(properties: PatternProperties): PatternState {
  return { properties, undrainedShare: 1, stepLeft: new Float64Array(properties.steps.length).fill(1) };
}

/** Share of the organic mass that is still there, 0-1. */
function organicLeft(state: PatternState): number {
  return state.properties.steps.reduce((sum, step, i) => sum + step.massShare * (state.stepLeft[i] ?? 0), 0);
}

/** Share of the pattern's mass left in the mould: undrained × (organic left × (1 − ash) + ash), 0-1. */
export function patternLeftShare(state: PatternState): number {
  const { ashShare } = state.properties;
  return state.undrainedShare * (organicLeft(state) * (1 - ashShare) + ashShare);
}

const COLDEST_DECAY_C = 120;

/** ∫ A·exp(−E/RT) dt over a step in which temperature goes straight from one value to another: Simpson's rule. */
function progressOf(step: DecayStep, fromC: number, toC: number, stepS: number): number {
  const perK = step.activationJPerMol / GAS_CONSTANT_J_PER_MOL_K;
  const pace = (tempC: number): number => Math.exp(-perK / (tempC + KELVIN_AT_0_C));
  return ((pace(fromC) + 4 * pace((fromC + toC) / 2) + pace(toC)) / 6) * step.preExponentialPerS * stepS;
}

/** Share of a step's mass left after progress ∫k dt: exact for f = 1 − α, and for f = 2(√α − α), where √α relaxes to 1. */
function leftAfter(step: DecayStep, left: number, progress: number): number {
  if (step.model === 'first-order') return left * Math.exp(-progress);
  const root = Math.sqrt(Math.max(1 - left, 1e-4));
  const next = 1 - (1 - root) * Math.exp(-progress);
  return 1 - next * next;
}

/**
 * Takes a pattern through one step of time at the mould's core temperature. Draining: above its flow temperature, while
 * the segment drains, its drainable share runs out evenly over the drain time. Decay: Arrhenius steps in parallel; one
 * that follows another has only what that one has left behind to burn, and one that needs air goes at the share of its
 * pace that the air allows.
 *
 * @param airShare share of the air needed that got in over the last step, 0-1
 * @returns gas given off, kg
 */
export function burnOut(
  state: PatternState,
  fromC: number,
  toC: number,
  stepS: number,
  draining: boolean,
  airShare: number,
): number {
  const { properties, stepLeft } = state;
  const { flowsC, drainedShare, drainTimeS, massKg, ashShare } = properties;
  if (draining && flowsC !== null && Math.max(fromC, toC) >= flowsC) {
    const rateShare = drainTimeS > 0 ? (drainedShare * stepS) / drainTimeS : drainedShare;
    state.undrainedShare = Math.max(1 - drainedShare, state.undrainedShare - rateShare);
  }
  if (Math.max(fromC, toC) < COLDEST_DECAY_C) return 0;
  let goneShare = 0;
  properties.steps.forEach((step, i) => {
    const left = stepLeft[i] ?? 0;
    if (left < 1e-9) return;
    const progress = progressOf(step, fromC, toC, stepS) * (step.needsAir ? airShare : 1);
    const unready = step.follows === null ? 0 : (stepLeft[step.follows] ?? 0);
    const ready = Math.max(0, left - unready);
    const next =
      step.follows === null ? leftAfter(step, left, progress) : left - ready * (1 - Math.exp(-progress));
    goneShare += step.massShare * (left - next);
    stepLeft[i] = next;
  });
  return goneShare * state.undrainedShare * (1 - ashShare) * massKg;
}
