import type { Body } from './body';
import { WATER_BOILS_C } from './constants';
import { aimsAnew, BESIDE, endStage, limitsAnew, sinkAtBoilingW } from './drying';

/** A node of a wet body within a stage: on one side of the plateau, held on it, or through it and dry. */
const HELD = 1;
const THROUGH = 2;

/** Store that holds a node at the boiling point, W/K: so large that no flow moves it by a nanokelvin. */
const HOLDING_W_PER_K = 1e15;

/**
 * Elimination of a body that holds water, each node by its `phase`:
 * beside the plateau its water only adds heat capacity, and at the front evaporates; held it stays at 100 °C and whatever flows in evaporates;
 * through it, wet·(100 − Tₙ) + L + dry·(T − 100) = heat. All three are linear in the node's temperature.
 */
export function eliminateWet(body: Body, carry: number, stageS: number): void {
  const { link, inverse, alpha, beta, nodes, first } = body;
  const { tempC, stageOneW, store, wetStore, latentJ, phase, drying } = body;
  const front = drying === null ? -1 : drying.front;
  let next = body.farC;
  let nextAlpha = 0;
  for (let i = nodes - 1; i >= first; i--) {
    let hold = wetStore[i]!;
    let baseW = hold * tempC[i]!;
    if (phase[i] === HELD) {
      hold = HOLDING_W_PER_K;
      baseW = HOLDING_W_PER_K * WATER_BOILS_C;
    } else if (phase[i] === THROUGH) {
      const warmingW = hold * (WATER_BOILS_C - tempC[i]!);
      hold = store[i]!;
      baseW = hold * WATER_BOILS_C - warmingW - latentJ[i]! / stageS;
      if (drying !== null && i >= front) baseW += drying.goneJ[i]! / stageS;
      if (i === front && drying !== null && !drying.oneHeld) baseW -= carry * drying.stageOneW;
    }
    if (i === front && phase[i] === BESIDE && drying !== null) {
      hold += drying.slopeWPerK;
      baseW += drying.slopeWPerK * drying.aimC - drying.sinkW - carry * drying.stageOneW;
    }
    const onward = link[i + 1]!;
    const pivot = 1 / (hold + link[i]! + onward * (1 - nextAlpha));
    next = (baseW + carry * stageOneW[i]! + onward * next) * pivot;
    nextAlpha = link[i]! * pivot;
    inverse[i] = pivot;
    alpha[i] = nextAlpha;
    beta[i] = next;
  }
  body.slopeWPerK = link[first]! * (1 - nextAlpha);
  body.offsetW = link[first]! * next;
}

/**
 * Whether each wet node ended the stage where its phase says, moving those that did not.
 *
 * @param flowsW net heat flows of this stage; `carry` brings in those of the first
 * @returns true if a phase changed, so that the stage must be solved again
 */
export function phasesChanged(body: Body, carry: number, stageS: number, flowsW: Float64Array): boolean {
  const { phase, latentJ, stageC, wetStore, tempC, stageOneW, drying } = body;
  let changed = false;
  let reachJ = 0;
  for (let i = body.first; i < body.nodes; i++) {
    const leftJ = latentJ[i]!;
    if (leftJ <= 0) continue;
    const front = drying !== null && i === drying.front ? drying : null;
    let now: number = BESIDE;
    if (phase[i] === HELD) {
      const takenW = flowsW[i]! + carry * stageOneW[i]!;
      let boilingW = takenW - wetStore[i]! * (WATER_BOILS_C - tempC[i]!);
      const mostJ = drying === null ? leftJ : leftJ - drying.goneJ[i]!;
      let beside = boilingW < 0;
      if (front !== null) {
        const vapourW = carry * front.stageOneW;
        beside = boilingW - vapourW < sinkAtBoilingW(front);
        if (!front.oneHeld) boilingW -= vapourW;
      }
      now = beside ? BESIDE : boilingW * stageS > mostJ ? THROUGH : HELD;
    } else if (phase[i] === THROUGH) now = stageC[i]! < WATER_BOILS_C ? HELD : THROUGH;
    else if (front !== null && aimsAnew(front, stageC[i]!)) changed = true;
    else now = stageC[i]! > WATER_BOILS_C ? HELD : BESIDE;
    if (now !== phase[i]) {
      phase[i] = now;
      changed = true;
    }
    if (drying !== null && (front !== null || now === BESIDE)) reachJ += leftJ - drying.goneJ[i]!;
  }
  if (drying !== null && phase[drying.front] === BESIDE) {
    if (limitsAnew(drying, reachJ, carry, stageS)) changed = true;
  }
  return changed;
}

/** Keeps what evaporated at the front in a stage that is solved. */
export function keepVapour(body: Body, carry: number): void {
  const { drying, phase, stageOneW, wetStore, tempC } = body;
  if (drying === null) return;
  const { front } = drying;
  const held = carry === 0 && phase[front] === HELD && drying.airKgPerS > 0;
  const heldW = held ? stageOneW[front]! - wetStore[front]! * (WATER_BOILS_C - tempC[front]!) : 0;
  endStage(body, drying, carry, phase[front] === BESIDE, heldW);
}

/** After a step: what has dried has no phase, and a body without water left is an ordinary one. */
export function settleDry(body: Body): void {
  let wet = false;
  for (let i = body.first; i < body.nodes; i++) {
    if (body.latentJ[i]! > 0) wet = true;
    else body.phase[i] = BESIDE;
  }
  body.wet = wet;
}
