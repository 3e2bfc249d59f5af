import type { Body } from './body';
import { CARRY, commitBody, eliminate, GAMMA, prepareBody, substitute, substituteLast } from './body-step';
import type { Chamber } from './chamber';
import { meanAirHeatCapacityJPerKgK } from './air';
import { shareAir } from './drying';
import { eliminateWet, keepVapour, phasesChanged } from './plateau';
import { radiativeFilmWPerM2K } from './radiation';
import { binOf, integralBetween, temperatureAfter } from './property-table';

const MOST_ROUNDS = 12;
const ONE = 1 - GAMMA;

/**
 * Tries a step whose end temperature is given (ideal control on the set point), the chamber moving straight to it,
 * and works out the heat that takes. Nothing is changed but scratch and `chamber.trial`.
 *
 * Chamber balance: dH/dt = Q − Σ n·q_b(T) − G_vent·(T − T_room) + source, q_b = slope·T − offset of each body.
 */
export function tryHeld(chamber: Chamber, stepS: number, endC: number): void {
  const { trial, capacity, tempC } = chamber;
  const stageS = GAMMA * stepS;
  const middleC = (tempC + endC) / 2;
  prepare(chamber, stepS, middleC);
  trial.stageOneC = tempC + (endC - tempC) * GAMMA;
  solveStage(chamber, 0, stageS, trial.stageOneC);
  const lostOneW = lostW(chamber, trial.stageOneC);
  trial.stageTwoC = endC;
  solveStage(chamber, CARRY, stageS, endC);
  const lostTwoW = lostW(chamber, endC);
  const storedW = integralBetween(capacity, 0, tempC, endC) / stepS;
  trial.nodeOneW = integralBetween(capacity, 0, tempC, trial.stageOneC) / stageS;
  trial.nodeTwoW = (storedW - ONE * trial.nodeOneW) / GAMMA;
  trial.held = true;
  trial.endC = endC;
  trial.endHeatW = trial.nodeTwoW + lostTwoW;
  trial.meanHeatW = storedW + ONE * lostOneW + GAMMA * lostTwoW;
  finish(chamber, stepS, middleC);
}

/**
 * Tries a step with a given share of full fire (0: heating off) and works out where the chamber goes. As every body's heat flow is a
 * straight line of the chamber's temperature, the coupled implicit equations are solved exactly.
 */
export function tryPowered(chamber: Chamber, stepS: number, share: number): void {
  const { trial, capacity, tempC } = chamber;
  const stageS = GAMMA * stepS;
  const { rateCPerS, bendCPerS2, lastS } = chamber;
  const middleC = tempC + (stepS / 2) * (rateCPerS + bendCPerS2 * (lastS / 2 + stepS / 4));
  prepare(chamber, stepS, middleC);
  const heatW = share === 0 ? 0 : share * chamber.firing.fullHeatW(middleC);
  const store = (capacity[binOf(middleC)] ?? 0) / stageS;
  trial.stageOneC = solveStage(chamber, 0, stageS, null, store, heatW);
  trial.nodeOneW = heatW - lostW(chamber, trial.stageOneC);
  trial.stageTwoC = solveStage(chamber, CARRY, stageS, null, store, heatW);
  trial.nodeTwoW = heatW - lostW(chamber, trial.stageTwoC);
  const takenJ = stepS * (ONE * trial.nodeOneW + GAMMA * trial.nodeTwoW);
  trial.held = false;
  trial.endC = temperatureAfter(capacity, 0, 1, tempC, takenJ);
  trial.endHeatW = heatW;
  trial.meanHeatW = heatW;
  finish(chamber, stepS, middleC);
  const foreseenC = tempC + stepS * (rateCPerS + (bendCPerS2 * (lastS + stepS)) / 2);
  trial.surpriseC = Math.max(trial.surpriseC, Math.abs(trial.endC - foreseenC));
}

/**
 * Takes the step last tried and books its heat.
 *
 * @param afterCorner the rates of the step before say nothing of this one's
 */
export function takeStep(chamber: Chamber, afterCorner = false): void {
  const { trial, booked, bodies, ambientC, ventWPerK } = chamber;
  const { stepS, endC, stageOneC, stageTwoC } = trial;
  const perBendS = afterCorner ? 0 : 2 / (stepS + chamber.lastS);
  for (const body of bodies) {
    commitBody(body, stepS, perBendS);
    if (body.first === 1) body.tempC[0] = endC;
    booked.farJ += stepS * body.count * (ONE * body.farOneW + GAMMA * body.farTwoW);
  }
  booked.ventJ += stepS * ventWPerK * (ONE * (stageOneC - ambientC) + GAMMA * (stageTwoC - ambientC));
  booked.sourceJ += stepS * chamber.sourceW;
  booked.heatJ += stepS * trial.meanHeatW;
  booked.inputJ += stepS * trial.meanHeatW * trial.inputPerHeat;
  const rateCPerS = (endC - chamber.tempC) / stepS;
  chamber.bendCPerS2 = (rateCPerS - chamber.rateCPerS) * perBendS;
  chamber.rateCPerS = rateCPerS;
  chamber.lastS = stepS;
  chamber.tempC = endC;
}

function prepare(chamber: Chamber, stepS: number, middleC: number): void {
  chamber.ventWPerK = chamber.airKgPerS * meanAirHeatCapacityJPerKgK(middleC);
  // A cavity looks black: an opening radiates σ·A·(T⁴ − T_room⁴) (Incropera, section 12.3).
  if (chamber.openM2 > 0)
    chamber.ventWPerK += chamber.openM2 * radiativeFilmWPerM2K(middleC, chamber.ambientC);
  let wet = false;
  for (const body of chamber.bodies) {
    prepareBody(body, stepS, chamber.lastS, middleC);
    if (body.wet) wet = true;
  }
  if (wet) shareAir(chamber.bodies, chamber.airKgPerS, chamber.roomU);
}

function finish(chamber: Chamber, stepS: number, middleC: number): void {
  const { trial } = chamber;
  let most = 0;
  for (const body of chamber.bodies) if (body.surpriseC > most) most = body.surpriseC;
  trial.surpriseC = most;
  trial.inputPerHeat = chamber.firing.inputPerHeat(middleC);
  trial.stepS = stepS;
}

/**
 * Solves one stage of all bodies, with the chamber's temperature known or found from its balance.
 * Wet bodies are solved again until every node is on the right side of its boiling plateau and their fronts evaporate as their
 * temperature has it.
 *
 * @param store heat capacity of the node over the length of the stage, W/K; only where the temperature is to be found
 * @returns the chamber's temperature at the end of the stage, °C
 */
function solveStage(
  chamber: Chamber,
  carry: number,
  stageS: number,
  knownC: number | null,
  store = 0,
  heatW = 0,
): number {
  const { bodies } = chamber;
  for (const body of bodies) eliminate(body, carry, stageS);
  let chamberC = knownC ?? balanceC(chamber, carry, store, heatW);
  for (let round = 0; round < MOST_ROUNDS; round++) {
    let changed = false;
    for (const body of bodies) {
      if (!body.wet) continue;
      settle(body, chamberC, carry, stageS, chamber.lastS);
      if (phasesChanged(body, carry, stageS, carry === 0 ? body.stageOneW : body.stageTwoW)) {
        eliminateWet(body, carry, stageS);
        changed = true;
      }
    }
    if (!changed) break;
    chamberC = knownC ?? balanceC(chamber, carry, store, heatW);
  }
  for (const body of bodies) {
    settle(body, chamberC, carry, stageS, chamber.lastS);
    if (body.wet) keepVapour(body, carry);
  }
  return chamberC;
}

function balanceC(chamber: Chamber, carry: number, store: number, heatW: number): number {
  let slope = store + chamber.ventWPerK;
  let drive =
    store * chamber.tempC +
    carry * chamber.trial.nodeOneW +
    heatW +
    chamber.sourceW +
    chamber.ventWPerK * chamber.ambientC;
  for (const body of chamber.bodies) {
    slope += body.count * body.slopeWPerK;
    drive += body.count * body.offsetW;
  }
  return drive / slope;
}

function settle(body: Body, chamberC: number, carry: number, stageS: number, lastS: number): void {
  if (carry === 0) body.farOneW = substitute(body, chamberC, body.stageOneW);
  else body.farTwoW = substituteLast(body, chamberC, stageS / GAMMA, lastS);
}

/** Heat that the node loses to bodies and vent, less what is released inside it, W. */
function lostW(chamber: Chamber, chamberC: number): number {
  let sum = chamber.ventWPerK * (chamberC - chamber.ambientC) - chamber.sourceW;
  for (const body of chamber.bodies) sum += body.count * (body.slopeWPerK * chamberC - body.offsetW);
  return sum;
}
