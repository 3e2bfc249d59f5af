import type { Body } from './body';
import {
  WATER_BOILS_C,
  WATER_EVAPORATION_J_PER_KG,
  WATER_EVAPORATION_SLOPE_J_PER_KG_K,
  WATER_HEAT_CAPACITY_J_PER_KG_K,
} from './constants';
import type { Grid } from './grid';
import {
  FILM_KG_K_PER_J,
  saturationGrowthPerK,
  saturationPa,
  ATMOSPHERE_PA,
  vapourConductivityKgPerMS,
  WATER_PER_AIR,
} from './humid-air';
import type { BodyProperties } from './properties';

/**
 * Evaporation below boiling, from a front that recedes into a wet body. Vapour goes from the front through the layer already
 * dry and the film at the face into the chamber, and out of it with the air that is drawn through:
 * ṁ = K·ln(u_s/u), 1/K = 1/K_film + ∫dx/A / (ρD·porosity/tortuosity), and ṁ = G·(M/M_air)·(u − u_room),
 * with u = 1/(1 − x), x the mole fraction of vapour: saturated at the front, the same over the face and in what leaves.
 *
 * These are the laws of Stefan's diffusion and of the humidity ratio. Below 50 °C they are those of differences in vapour
 * density within 15 %; at 95 °C vapour is most of the gas and pushes the air out before it, which makes the flow 2 times
 * (diffusion) to 6 times (what a leak carries) that of densities. Left out: vapour that condenses on what is colder,
 * capillary flow (which keeps a coarse mould wet at its face for longer), what a burner's gas carries.
 */
export interface Drying {
  /** Vapour that the film passes, kg/s per unit of ln u. */
  readonly filmKgPerS: number;
  /** ∫dx/A from the face to the near edge of each node's volume, and across it, 1/m. */
  readonly edgePerM: Float64Array;
  readonly cellPerM: Float64Array;
  /** Diffusivity of the dry layer over that of free air. */
  readonly layerShare: number;
  /** Outermost node that holds water. */
  front: number;
  /** Water of the body at the start of the step, kg. */
  leftKg: number;
  /** K between front and chamber, mean of the step, kg/s. */
  conductanceKgPerS: number;
  /** G·M/M_air of the air that comes to ONE such body, kg/s, and u of the room. */
  airKgPerS: number;
  roomU: number;
  /** Most that may evaporate in the stage, kg/s: the body holds no more. */
  mostKgPerS: number;
  /** Heat that evaporation takes from the front in the stage: a straight line about a temperature, W and W/K. */
  aimC: number;
  sinkW: number;
  slopeWPerK: number;
  /** Between which temperatures of the front the stage's lies, as far as known. */
  lowC: number;
  highC: number;
  /** ln u at the face, as last found. */
  logU: number;
  /** Heat of the first stage's evaporation, W, and vapour of both, kg/s. */
  stageOneW: number;
  oneKgPerS: number;
  twoKgPerS: number;
  /** Latent heat of what each node has given to the first stage's evaporation, J. */
  readonly goneJ: Float64Array;
  /** Vapour at the temperature aimed at, kg/s. */
  aimKgPerS: number;
  /** The front was on the plateau in the first stage. */
  oneHeld: boolean;
  /** Heat that the vapour did not take since it left below 100 °C, J: see `stored-heat.ts`. */
  sparedJ: number;
}

/** Phase of a node that is not on the plateau: see `plateau.ts`. */
export const BESIDE = 0;
/** Length of a stage over that of the step. */
export const GAMMA = 1 - Math.SQRT1_2;

/** Tangent of the saturation above it: at 100 °C the vapour would be all of the gas, and the plateau takes over. */
const TANGENT_FROM_C = 99;
/** And below it, where hardly anything evaporates and what is foreseen after a jolt may be no temperature at all. */
const TANGENT_TO_C = -40;
const knownC = (tempC: number): number => Math.min(Math.max(tempC, TANGENT_TO_C), TANGENT_FROM_C);
/** Within how much of the foreseen temperature a stage must end, K. */
const AIM_WITHIN_C = 0.3;

/** State of a body that dries; null where it is dry, or has no face to the chamber's air. */
export function dryingOf(properties: BodyProperties, grid: Grid): Drying | null {
  const { water, face, area } = properties;
  if (water === null || water.kgPerM3 <= 0 || face.kind !== 'film') return null;
  const nodes = grid.depthM.length;
  const edgePerM = new Float64Array(nodes);
  const cellPerM = new Float64Array(nodes);
  for (let i = 0; i < nodes; i++) {
    const depthM = grid.depthM[i] ?? 0;
    const fromM = i > 0 ? ((grid.depthM[i - 1] ?? 0) + depthM) / 2 : depthM;
    const toM = i < nodes - 1 ? (depthM + (grid.depthM[i + 1] ?? 0)) / 2 : depthM;
    const middleM = (fromM + toM) / 2;
    if (i > 0) edgePerM[i] = (edgePerM[i - 1] ?? 0) + (cellPerM[i - 1] ?? 0);
    cellPerM[i] = (toM - fromM) / (area[0] + (area[1] + area[2] * middleM) * middleM);
  }
  return {
    filmKgPerS: FILM_KG_K_PER_J * face.convectionWPerM2K * area[0],
    edgePerM,
    cellPerM,
    layerShare: water.dryLayerShare,
    front: 0,
    leftKg: 0,
    conductanceKgPerS: 0,
    airKgPerS: 0,
    roomU: 1,
    mostKgPerS: 0,
    aimC: 0,
    sinkW: 0,
    slopeWPerK: 0,
    lowC: 0,
    highC: 0,
    logU: 0,
    stageOneW: 0,
    oneKgPerS: 0,
    twoKgPerS: 0,
    goneJ: new Float64Array(nodes),
    aimKgPerS: 0,
    oneHeld: false,
    sparedJ: 0,
  };
}

/** Heat that evaporates a kilogram at a temperature, J/kg. */
const evaporationJPerKg = (tempC: number): number =>
  WATER_EVAPORATION_J_PER_KG + WATER_EVAPORATION_SLOPE_J_PER_KG_K * (WATER_BOILS_C - tempC);

/**
 * Finds the front of a wet body and the mean conductance before it over the step. As the front recedes, resistance grows by r
 * for each kilogram that leaves: m/K + r·m²/2 = ln(u_s/u)·Δt (the shrinking core), hence the mean
 * 2 / (1/K + √(1/K² + 2·r·ln(u_s/u)·Δt)), right for steps in which the dry layer grows to many times what it was.
 */
export function findFront(body: Body, drying: Drying, stepS: number): void {
  const { latentJ, fullLatentJ, nodes, middleC } = body;
  let front = drying.front;
  while (front < nodes - 1 && latentJ[front]! <= 0) front++;
  drying.front = front;
  let leftJ = 0;
  for (let i = front; i < nodes; i++) leftJ += latentJ[i]!;
  drying.leftKg = leftJ / WATER_EVAPORATION_J_PER_KG;
  const frontC = knownC(middleC[front]!);
  const perM = 1 / (vapourConductivityKgPerMS(frontC) * drying.layerShare);
  const dryShare = 1 - latentJ[front]! / fullLatentJ[front]!;
  const cell = drying.cellPerM[front]! * perM;
  const now = 1 / drying.filmKgPerS + drying.edgePerM[front]! * perM + cell * dryShare;
  const growthPerKg = (cell * WATER_EVAPORATION_J_PER_KG) / fullLatentJ[front]!;
  const drop = Math.max(0, -Math.log(1 - saturationPa(frontC) / ATMOSPHERE_PA) - drying.logU);
  const then = Math.sqrt(now * now + 2 * growthPerKg * drop * stepS);
  // The front comes to the far face at most.
  const last = nodes - 1;
  const deepest = 1 / drying.filmKgPerS + (drying.edgePerM[last]! + drying.cellPerM[last]!) * perM;
  drying.conductanceKgPerS = 2 / (now + (then < deepest ? then : deepest));
}

/**
 * Shares the air of the chamber out among the wet bodies by how easily vapour leaves them: bodies that are equally warm
 * then meet the same air, as they do in one chamber.
 *
 * @param airKgPerS dry air drawn through the chamber
 * @param roomU 1 / (1 − x) of the air of the room
 */
export function shareAir(bodies: readonly Body[], airKgPerS: number, roomU: number): void {
  let sum = 0;
  for (const { wet, drying, count } of bodies) {
    if (wet && drying !== null) sum += count * drying.conductanceKgPerS;
  }
  for (const { wet, drying } of bodies) {
    if (!wet || drying === null) continue;
    drying.airKgPerS = (WATER_PER_AIR * airKgPerS * drying.conductanceKgPerS) / sum;
    drying.roomU = roomU;
  }
}

/** Begins a stage: foresees the front's temperature from its last rate and takes evaporation as a straight line about it. */
export function beginStage(body: Body, drying: Drying, carry: number, stageS: number, stepS: number): void {
  const { tempC, rateCPerS } = body;
  const { front, leftKg } = drying;
  if (carry === 0) {
    drying.stageOneW = 0;
    drying.oneKgPerS = 0;
    drying.oneHeld = false;
  }
  const spentKg = (stepS - stageS) * drying.oneKgPerS;
  let dueJ = drying.oneHeld ? 0 : spentKg * WATER_EVAPORATION_J_PER_KG;
  for (let i = front; i < body.nodes; i++) {
    const goneJ = Math.min(body.latentJ[i]!, dueJ);
    drying.goneJ[i] = goneJ;
    dueJ -= goneJ;
  }
  drying.mostKgPerS = carry === 0 ? leftKg / stepS : Math.max(0, leftKg - spentKg) / stageS;
  drying.lowC = -Infinity;
  drying.highC = Infinity;
  const aheadS = carry === 0 ? stageS : stepS;
  aim(drying, Math.min(WATER_BOILS_C, tempC[front]! + rateCPerS[front]! * aheadS));
}

/** Takes the heat of evaporation as the tangent at a temperature of the front. */
function aim(drying: Drying, atC: number): void {
  const { conductanceKgPerS, airKgPerS, roomU, mostKgPerS } = drying;
  drying.aimC = atC;
  drying.sinkW = 0;
  drying.slopeWPerK = 0;
  drying.aimKgPerS = 0;
  const tangentC = knownC(atC);
  const share = saturationPa(tangentC) / ATMOSPHERE_PA;
  const logSlope = (share / (1 - share)) * saturationGrowthPerK(tangentC);
  const logFront = logSlope * (atC - tangentC) - Math.log(1 - share);
  if (airKgPerS <= 0 || logFront <= Math.log(roomU)) return;
  const carried = airKgPerS / conductanceKgPerS;
  const taken = carried * Math.exp(logUAtFace(drying, logFront, carried));
  let kgPerS = conductanceKgPerS * (logFront - drying.logU);
  let slope = (conductanceKgPerS * logSlope * taken) / (1 + taken);
  if (kgPerS >= mostKgPerS) {
    kgPerS = mostKgPerS;
    slope = 0;
  }
  drying.aimKgPerS = kgPerS;
  const heatJPerKg = evaporationJPerKg(atC);
  drying.sinkW = kgPerS * heatJPerKg;
  drying.slopeWPerK = slope * heatJPerKg - kgPerS * WATER_EVAPORATION_SLOPE_J_PER_KG_K;
}

/** Root v = ln u of (ln u_s − v) = g·(e^v − u_room): concave and falling, so that Newton's steps come down to it from above. */
function logUAtFace(drying: Drying, logFront: number, carried: number): number {
  let at = drying.logU;
  for (let round = 0; round < 40; round++) {
    const grown = carried * Math.exp(at);
    const change = (logFront - at - grown + carried * drying.roomU) / (1 + grown);
    at = Math.min(logFront, at + change);
    if (Math.abs(change) < 1e-9) break;
  }
  drying.logU = at;
  return at;
}

/**
 * Aims anew where the front ended the stage too far from where it was foreseen, within what is known of where it must end.
 *
 * @returns true if the stage must be solved again
 */
export function aimsAnew(drying: Drying, stageC: number): boolean {
  const { aimC } = drying;
  const endC = stageC < WATER_BOILS_C ? stageC : WATER_BOILS_C;
  if (Math.abs(endC - aimC) <= AIM_WITHIN_C) return false;
  if (endC > aimC) drying.lowC = aimC;
  else drying.highC = aimC;
  const { lowC, highC } = drying;
  aim(
    drying,
    endC > lowC && endC < highC ? endC : (Math.max(lowC, -100) + Math.min(highC, WATER_BOILS_C)) / 2,
  );
  return true;
}

/**
 * Limits the stage's evaporation to water that no plateau uses up at the same time.
 *
 * @param reachJ latent heat of that water
 * @returns true if the stage must be solved again
 */
export function limitsAnew(drying: Drying, reachJ: number, carry: number, stageS: number): boolean {
  const overS = carry === 0 ? stageS / GAMMA : stageS;
  drying.mostKgPerS = Math.min(drying.mostKgPerS, reachJ / WATER_EVAPORATION_J_PER_KG / overS);
  if (drying.aimKgPerS <= drying.mostKgPerS * (1 + 1e-9)) return false;
  aim(drying, drying.aimC);
  return true;
}

/** Heat that evaporation would take from a front on the plateau, W; the stage is then aimed there. */
export function sinkAtBoilingW(drying: Drying): number {
  if (drying.aimC !== WATER_BOILS_C) aim(drying, WATER_BOILS_C);
  return drying.sinkW;
}

/**
 * Keeps what evaporated in a stage that is solved.
 *
 * @param beside the front ended it below the plateau
 * @param heldW heat that boiled water at a front held on it; 0 if it was not
 */
export function endStage(body: Body, drying: Drying, carry: number, beside: boolean, heldW: number): void {
  const frontC = body.stageC[drying.front]!;
  const tangentW = Math.max(0, drying.sinkW + drying.slopeWPerK * (frontC - drying.aimC));
  const sinkW = beside ? tangentW : Math.max(0, heldW);
  const kgPerS = sinkW / evaporationJPerKg(Math.min(frontC, WATER_BOILS_C));
  if (carry === 0) {
    drying.stageOneW = sinkW;
    drying.oneKgPerS = kgPerS;
    drying.oneHeld = !beside;
  } else {
    drying.twoKgPerS = beside ? kgPerS : 0;
    // On the plateau at the end, all that boiled is found from the heat of the whole step.
    if (!beside && drying.oneHeld) drying.oneKgPerS = 0;
  }
}

/**
 * Takes the step's vapour from the front inwards, and its heat from the front, where the stages had it taken. What a node
 * no longer holds comes from the next, so that a step may dry more than one. Water gone is left in `boilingW`, J.
 *
 * @param twoS weight of the second stage's flow, s
 */
export function evaporate(body: Body, drying: Drying, oneS: number, twoS: number): void {
  const { latentJ, boilingW, tempC, nodes, phase } = body;
  const { front, goneJ, oneHeld, leftKg } = drying;
  boilingW.fill(0);
  const kg = oneS * drying.oneKgPerS + twoS * drying.twoKgPerS;
  if (kg <= 0) return;
  let dueJ = (oneHeld ? kg : twoS * drying.twoKgPerS) * WATER_EVAPORATION_J_PER_KG;
  // The last grains of water go with the rest.
  if (kg >= leftKg * (1 - 1e-9)) dueJ = Infinity;
  let takenJ = 0;
  for (let i = front; i < nodes; i++) {
    let outJ = oneHeld ? 0 : goneJ[i]!;
    if (i === front || phase[i] === BESIDE) {
      const moreJ = Math.min(latentJ[i]! - outJ, dueJ);
      outJ += moreJ;
      dueJ -= moreJ;
    }
    if (outJ <= 0) continue;
    const outKg = outJ / WATER_EVAPORATION_J_PER_KG;
    const belowC = WATER_BOILS_C - tempC[i]!;
    takenJ += outJ + outKg * WATER_EVAPORATION_SLOPE_J_PER_KG_K * belowC;
    drying.sparedJ += outKg * (WATER_HEAT_CAPACITY_J_PER_KG_K - WATER_EVAPORATION_SLOPE_J_PER_KG_K) * belowC;
    latentJ[i] = latentJ[i]! - outJ;
    boilingW[i] = outJ;
  }
  body.stageTwoW[front] = body.stageTwoW[front]! - takenJ / twoS;
}
