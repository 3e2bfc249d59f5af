import type { Body } from './body';
import {
  KELVIN_AT_0_C,
  STEFAN_BOLTZMANN_W_PER_M2K4,
  WATER_EVAPORATION_J_PER_KG,
  WATER_HEAT_CAPACITY_J_PER_KG_K,
} from './constants';
import { beginStage, evaporate, findFront, GAMMA } from './drying';
import { reactionsRemain, warmWithReactions } from './enthalpy-walk';
import { eliminateWet, settleDry } from './plateau';
import { BIN_C, LAST_BIN, TABLE_FROM_C, temperatureAfter } from './property-table';

/**
 * One step of a body is taken by the two-stage, L-stable SDIRK of order two (Alexander 1977, γ = 1 − 1/√2):
 * H₁ = Hₙ + γ·Δt·F(T₁), Hₙ₊₁ = Hₙ + Δt·[(1 − γ)·F(T₁) + γ·F(T₂)]. Properties are taken at the temperatures foreseen for
 * the middle of the step, so both stages share one tridiagonal matrix; heat is then booked by the very fluxes of the
 * stages and temperature read from the enthalpy, so energy closes however strongly properties vary.
 */
export { GAMMA };
/** Weight of the first stage's flux in the equation of the second. */
export const CARRY = (1 - GAMMA) / GAMMA;

const PER_BIN = 1 / BIN_C;

/** Conductances and heat capacities for a step, at the temperatures foreseen for its middle. */
export function prepareBody(body: Body, stepS: number, lastS: number, chamberMiddleC: number): void {
  foresee(body, stepS, lastS, chamberMiddleC);
  setLinks(body, stepS, chamberMiddleC);
  setStores(body, 1 / (GAMMA * stepS));
  if (body.wet && body.drying !== null) findFront(body, body.drying, stepS);
}

/** Temperatures of the middle of the step, from the rates of the last two: T + Δt/2·(rate + bend·(Δt_last/2 + Δt/4)). */
function foresee(body: Body, stepS: number, lastS: number, chamberMiddleC: number): void {
  const { tempC, rateCPerS, bendCPerS2, middleC, nodes } = body;
  const half = stepS / 2;
  const bent = half * (lastS / 2 + stepS / 4);
  for (let i = 0; i < nodes; i++) middleC[i] = tempC[i]! + rateCPerS[i]! * half + bendCPerS2[i]! * bent;
  if (body.first === 1) middleC[0] = chamberMiddleC;
}

function setLinks(body: Body, stepS: number, chamberMiddleC: number): void {
  const { middleC, link, conductivity, conductivityStart, nodes } = body;
  const shapeM = body.grid.shapeM;
  for (let i = 1; i < nodes; i++) {
    const at = ((middleC[i - 1]! + middleC[i]!) / 2 - TABLE_FROM_C) * PER_BIN;
    const bin = at > 0 ? (at < LAST_BIN ? at | 0 : LAST_BIN) : 0;
    const index = conductivityStart[i]! + bin;
    const low = conductivity[index]!;
    link[i] = shapeM[i]! * (low + (conductivity[index + 1]! - low) * (at - bin));
  }
  if (body.wet && body.wetWPerMK !== 0) addWetConductance(body, stepS);
  if (body.exchange !== null) setFaceLink(body, body.exchange, chamberMiddleC);
  if (body.roomFilm) link[nodes] = body.farM2 * body.roomFilm.at(middleC[nodes - 1]!);
}

/** Film at the heated face: convection and grey radiation, in secant form so that no heat flows uphill. */
function setFaceLink(body: Body, exchange: Float64Array, chamberMiddleC: number): void {
  const face = body.properties.face;
  const surfaceC = body.middleC[0]!;
  const at = (surfaceC - TABLE_FROM_C) * PER_BIN;
  const bin = at > 0 ? (at < LAST_BIN ? at | 0 : LAST_BIN) : 0;
  const factor = exchange[bin]! + (exchange[bin + 1]! - exchange[bin]!) * (at - bin);
  const chamberK = chamberMiddleC + KELVIN_AT_0_C;
  const surfaceK = surfaceC + KELVIN_AT_0_C;
  const radiation =
    STEFAN_BOLTZMANN_W_PER_M2K4 * (chamberK * chamberK + surfaceK * surfaceK) * (chamberK + surfaceK);
  const convection = face.kind === 'film' ? face.convectionWPerM2K : 0;
  body.link[0] = body.faceM2 * (convection + factor * radiation);
}

/** What the water adds to conduction, by the water foreseen at the middle of the step. */
function addWetConductance(body: Body, stepS: number): void {
  const { latentJ, boilingW, fullLatentJ, link, nodes, wetWPerMK } = body;
  let before = 0;
  for (let i = 0; i < nodes; i++) {
    const leftJ = latentJ[i]! - (boilingW[i]! * stepS) / 2;
    const share = leftJ > 0 ? leftJ / fullLatentJ[i]! : 0;
    if (i > 0) link[i] = link[i]! + (body.grid.shapeM[i]! * wetWPerMK * (before + share)) / 2;
    before = share;
  }
}

function setStores(body: Body, perS: number): void {
  const { middleC, tempC, store, volumeM3, capacity, capacityStart, nodes, peakC } = body;
  const reaction = body.reacting ? body.reaction : null;
  for (let i = body.first; i < nodes; i++) {
    const at = (middleC[i]! - TABLE_FROM_C) * PER_BIN;
    const bin = at > 0 ? (at < LAST_BIN ? at | 0 : LAST_BIN) : 0;
    let perM3K = capacity[capacityStart[i]! + bin]!;
    if (reaction !== null && middleC[i]! > peakC[i]! && middleC[i]! > tempC[i]!) perM3K += reaction[bin]!;
    store[i] = volumeM3[i]! * perM3K * perS;
  }
  if (body.wet) {
    const { latentJ, wetStore } = body;
    const scale = (WATER_HEAT_CAPACITY_J_PER_KG_K / WATER_EVAPORATION_J_PER_KG) * perS;
    for (let i = body.first; i < nodes; i++) wetStore[i] = store[i]! + latentJ[i]! * scale;
  }
}

/**
 * Elimination from the far face to the heated one: T_i = alpha_i·T_(i−1) + beta_i, hence the heat flow into the body
 * as a straight line of the chamber temperature.
 *
 * @param carry 0 for the first stage, CARRY for the second
 * @param stageS γ times the step
 */
export function eliminate(body: Body, carry: number, stageS: number): void {
  if (body.wet) {
    if (body.drying !== null) beginStage(body, body.drying, carry, stageS, stageS / GAMMA);
    eliminateWet(body, carry, stageS);
    return;
  }
  if (carry === 0) factor(body);
  const { link, inverse, alpha, beta, nodes, first, tempC, stageOneW, store } = body;
  let next = body.farC;
  for (let i = nodes - 1; i >= first; i--) {
    next = (store[i]! * tempC[i]! + carry * stageOneW[i]! + link[i + 1]! * next) * inverse[i]!;
    beta[i] = next;
  }
  body.slopeWPerK = link[first]! * (1 - alpha[first]!);
  body.offsetW = link[first]! * next;
}

/** Pivots of the elimination, the same for both stages: fills `inverse` and `alpha`. */
function factor(body: Body): void {
  const { link, inverse, alpha, nodes, first, store } = body;
  let next = 0;
  for (let i = nodes - 1; i >= first; i--) {
    const pivot = 1 / (store[i]! + link[i]! + link[i + 1]! * (1 - next));
    inverse[i] = pivot;
    next = link[i]! * pivot;
    alpha[i] = next;
  }
}

/**
 * Temperatures and heat flows of a stage once the chamber's temperature is known.
 *
 * @param flowsW filled with the net heat flow into each node, W
 * @returns heat flow out of the far face, W; `link[first]·(chamber − T_first)` is the flow in
 */
export function substitute(body: Body, chamberC: number, flowsW: Float64Array): number {
  const { link, alpha, beta, stageC, nodes, first, farC } = body;
  let tempC = alpha[first]! * chamberC + beta[first]!;
  let flowW = link[first]! * (chamberC - tempC);
  const last = nodes - 1;
  for (let i = first; i < last; i++) {
    const nextC = alpha[i + 1]! * tempC + beta[i + 1]!;
    const onW = link[i + 1]! * (tempC - nextC);
    flowsW[i] = flowW - onW;
    stageC[i] = tempC;
    tempC = nextC;
    flowW = onW;
  }
  const outW = link[nodes]! * (tempC - farC);
  flowsW[last] = flowW - outW;
  stageC[last] = tempC;
  return outW;
}

/** As `substitute`, for the second stage: also finds how far its temperatures lie from what the last two steps foresaw. */
export function substituteLast(body: Body, chamberC: number, stepS: number, lastS: number): number {
  const outW = substitute(body, chamberC, body.stageTwoW);
  const { stageC, tempC, rateCPerS, bendCPerS2, latentJ, nodes } = body;
  const bent = (stepS * (lastS + stepS)) / 2;
  let most = 0;
  for (let i = body.first; i < nodes; i++) {
    const off = Math.abs(stageC[i]! - tempC[i]! - rateCPerS[i]! * stepS - bendCPerS2[i]! * bent);
    // What is wet moves by the plateau, which each stage solves for itself.
    if (off > most && latentJ[i]! === 0) most = off;
  }
  body.surpriseC = most;
  return outW;
}

/**
 * Takes the step: books the heat of both stages on every node and reads the new temperatures from it.
 *
 * @param perBendS one over the time between the middles of this step and the last; 0 where a corner lies between them
 */
export function commitBody(body: Body, stepS: number, perBendS: number): void {
  const { tempC, rateCPerS, bendCPerS2, stageOneW, stageTwoW, nodes, first } = body;
  const { capacity, capacityStart, volumeM3 } = body;
  const oneS = (1 - GAMMA) * stepS;
  const twoS = GAMMA * stepS;
  const perS = 1 / stepS;
  const special = body.wet || body.reacting;
  if (body.wet && body.drying !== null) evaporate(body, body.drying, oneS, twoS);
  for (let i = first; i < nodes; i++) {
    const heatJ = oneS * stageOneW[i]! + twoS * stageTwoW[i]!;
    const fromC = tempC[i]!;
    let toC: number;
    if (special) {
      const wasJ = body.latentJ[i]!;
      toC = warmWithReactions(body, i, heatJ);
      const vapourJ = body.drying === null ? 0 : body.boilingW[i]!;
      body.boilingW[i] = (vapourJ + wasJ - body.latentJ[i]!) * perS;
    } else {
      const bin = ((fromC - TABLE_FROM_C) * PER_BIN) | 0;
      const lowC = TABLE_FROM_C + bin * BIN_C;
      toC = fromC + heatJ / (volumeM3[i]! * capacity[capacityStart[i]! + bin]!);
      if (!(toC >= lowC && toC <= lowC + BIN_C)) {
        toC = temperatureAfter(capacity, capacityStart[i]!, volumeM3[i]!, fromC, heatJ);
      }
    }
    const rate = (toC - fromC) * perS;
    bendCPerS2[i] = (rate - rateCPerS[i]!) * perBendS;
    rateCPerS[i] = rate;
    tempC[i] = toC;
  }
  if (body.wet) settleDry(body);
  if (body.reacting) body.reacting = reactionsRemain(body);
}
