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
  /** How air comes to its char through the wall of the mould; null: not told, char burns as fast as it can. */
  charAir: CharAir | null;
  /** Time by which the middle of a solid pattern trails the mould core while all of it is there, s. */
  lagS: number;
}

/**
 * Air that a mould lets in to what is left in its cavity, by diffusion of oxygen through the pores of the wall:
 * kg/s = D(T)·(ε/τ)·(S/ℓ)·ρ_air(T), D = 2.1e-5·(T/298 K)^1.75 m²/s (oxygen in air at one atmosphere; Fuller, Schettler and
 * Giddings 1966 for the exponent). What streams through the pores, and pores finer than the path of a molecule, are left out.
 */
export interface CharAir {
  /** Porosity over tortuosity of the wall. */
  openShare: number;
  /** Area over length of the way through the wall, m. */
  shapeM: number;
}

/** Air that burning 1 kg of carbon takes, kg: 32/12 of oxygen, 0.232 of air by mass. */
export const CHAR_AIR_KG_PER_KG = 32 / 12 / 0.232;

const OXYGEN_IN_AIR_M2_PER_S = 2.1e-5;
/** ρ_air·T at one atmosphere, kg·K/m³. */
const AIR_KG_K_PER_M3 = 353;

/** Air that diffuses into one mould at a temperature while the chamber holds air, kg/s. */
export function charAirKgPerS({ openShare, shapeM }: CharAir, tempC: number): number {
  const kelvin = tempC + KELVIN_AT_0_C;
  const diffusivity = OXYGEN_IN_AIR_M2_PER_S * (kelvin / 298.15) ** 1.75;
  return (diffusivity * openShare * shapeM * AIR_KG_K_PER_M3) / kelvin;
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
  /** Middle of the pattern at the end of the step last taken, and of the one last looked at, °C; NaN before the first. */
  middleC: number;
  nextMiddleC: number;
  /** Of the step last looked at: what came off as gas, and the char that burnt and that would have burnt with air enough, kg. */
  gasKg: number;
  charKg: number;
  charWantedKg: number;
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
    middleC: NaN,
    nextMiddleC: NaN,
    gasKg: 0,
    charKg: 0,
    charWantedKg: 0,
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
 * Temperature at the middle of the pattern after a step in which the core goes straight from one value to another:
 * τ·T′ = T_core − T exactly, τ = `lagS` of the pattern shrunk to what is left of it.
 */
function middleAfter(state: PatternState, fromC: number, toC: number, stepS: number): number {
  const lagS = state.properties.lagS * state.leftShare * state.leftShare;
  if (lagS < 1) return toC;
  const wasC = Number.isNaN(state.middleC) ? fromC : state.middleC;
  const slope = (toC - fromC) / stepS;
  return toC - slope * lagS + (wasC - fromC + slope * lagS) * Math.exp(-stepS / lagS);
}

/**
 * Looks one step of time ahead at the mould's core temperature, without taking it (`settlePattern` does). Draining: above its
 * flow temperature, while the segment drains, its drainable share runs out evenly over the drain time. Decay: Arrhenius
 * steps in parallel, at the temperature of the pattern's middle; one that follows another has only what that one has left
 * behind to burn, and one that needs air goes no faster than air comes to it. What it gives is left in
 * `gasKg`, `charKg` and `charWantedKg`.
 *
 * @param airShare share of the air that burning char asks of the chamber that is there, 0-1
 * @returns gas and burnt char, kg
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
  const { flowsC, steps } = properties;
  const hottestC = Math.max(fromC, toC);
  const flows = draining && flowsC !== null && hottestC >= flowsC;
  const wasC = Number.isNaN(state.middleC) ? fromC : state.middleC;
  state.nextMiddleC = middleAfter(state, fromC, toC, stepS);
  state.gasKg = 0;
  state.charKg = 0;
  state.charWantedKg = 0;
  state.moves = flows || hottestC >= COLDEST_DECAY_C;
  if (!state.moves) return 0;
  state.nextUndrainedShare = flows ? drainedTo(state, stepS) : state.undrainedShare;
  for (let i = 0; i < steps.length; i++) nextStepLeft[i] = stepLeft[i]!;
  if (hottestC < COLDEST_DECAY_C) return 0;
  const nowC = state.nextMiddleC;
  const organicKg =
    ((state.undrainedShare + state.nextUndrainedShare) / 2) * (1 - properties.ashShare) * properties.massKg;
  for (let i = 0; i < steps.length; i++) {
    const step = steps[i]!;
    const left = stepLeft[i]!;
    if (left < 1e-9) continue;
    const progress = progressOf(step, wasC, nowC, stepS);
    if (step.follows === null) {
      nextStepLeft[i] = leftAfter(step, left, progress);
      state.gasKg += organicKg * step.massShare * (left - nextStepLeft[i]!);
      continue;
    }
    const ready = Math.max(0, left - stepLeft[step.follows]!);
    let gone = ready * (1 - Math.exp(-progress));
    if (step.needsAir && gone > 0)
      gone = airedChar(state, gone, organicKg * step.massShare, nowC, stepS, airShare);
    nextStepLeft[i] = left - gone;
  }
  return state.gasKg + state.charKg;
}

function drainedTo(state: PatternState, stepS: number): number {
  const { drainedShare, drainTimeS } = state.properties;
  const drained = drainTimeS > 0 ? (drainedShare * stepS) / drainTimeS : drainedShare;
  return Math.max(Math.min(state.undrainedShare, 1 - drainedShare), state.undrainedShare - drained);
}

/** Share of a char step's own mass that burns, held back to the air that comes through the wall and that the chamber has. */
function airedChar(
  state: PatternState,
  wanted: number,
  ownKg: number,
  tempC: number,
  stepS: number,
  airShare: number,
): number {
  const { charAir } = state.properties;
  let most = wanted;
  if (charAir !== null && ownKg > 0) {
    const throughWallKg = (charAirKgPerS(charAir, tempC) * stepS) / CHAR_AIR_KG_PER_KG;
    most = Math.min(wanted, throughWallKg / ownKg);
  }
  const gone = most * airShare;
  state.charWantedKg += most * ownKg;
  state.charKg += gone * ownKg;
  return gone;
}

/** Takes the step that was last looked at. */
export function settlePattern(state: PatternState): void {
  state.middleC = state.nextMiddleC;
  if (!state.moves) return;
  state.undrainedShare = state.nextUndrainedShare;
  for (let i = 0; i < state.stepLeft.length; i++) state.stepLeft[i] = state.nextStepLeft[i]!;
  state.leftShare = leftShareOf(state);
}
