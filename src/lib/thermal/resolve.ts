import { type Body, bodyOf } from './body';
import { type Chamber, chamberOf } from './chamber';
import { takeStep, tryHeld } from './chamber-step';
import type { HeatWorkLaw } from './heat-work';
import type { KilnPlate } from './kiln-schema';
import type { Load } from './load-schema';
import type { PatternProperties } from './pattern-burnout';
import type { BodyProperties } from './properties';
import { type KilnModel, kilnModelOf } from './resolve-kiln';
import {
  furnitureBody,
  heatWorkLawOf,
  mouldBody,
  patternProperties,
  type Surroundings,
} from './resolve-load';

/** One line of the load's moulds, as the solver holds it. */
export interface MouldModel {
  index: number;
  count: number;
  body: Body;
  pattern: PatternProperties | null;
  heatWork: HeatWorkLaw | null;
}

/** A kiln with its load, at rest and ready to be fired. */
export interface FiringModel {
  kiln: KilnModel;
  chamber: Chamber;
  lining: Body;
  moulds: MouldModel[];
  furniture: Body[];
}

/**
 * Kiln and load as bodies in one chamber, every figure from the plate, the load or the materials table.
 *
 * @param startC temperature of the kiln, °C; where it is not that of the room, its lining is taken as soaked through
 *   (steady), which is the most heat it can hold
 * @throws RangeError where the table lacks a material that is named
 */
export function firingModelOf(input: {
  kiln: KilnPlate;
  load: Load;
  ambientC: number;
  startC: number;
}): FiringModel {
  const { load, ambientC, startC } = input;
  const kiln = kilnModelOf(input.kiln, ambientC);
  const bare: Surroundings = {
    startC: load.startC ?? startC,
    emissivity: kiln.emissivity,
    convectionWPerM2K: kiln.convectionWPerM2K,
    areaRatio: 0,
  };
  const areaM2 = [
    ...load.moulds.map((mould) => mouldBody(mould, bare)),
    ...load.furniture.map((piece) => furnitureBody(piece, bare)),
  ].reduce((sum, body: BodyProperties) => sum + body.area[0] * body.count, 0);
  const around = { ...bare, areaRatio: Math.min(1, areaM2 / kiln.chamberM2) };
  const lining = bodyOf(kiln.lining);
  if (Math.abs(startC - ambientC) > 0.01) soak(lining, kiln, ambientC, startC);
  const moulds = load.moulds.map((mould, index) => ({
    index,
    count: mould.count,
    body: bodyOf(mouldBody(mould, around)),
    pattern: mould.pattern === null ? null : patternProperties(mould.pattern, mould),
    heatWork: heatWorkLawOf(mould),
  }));
  const furniture = load.furniture.map((piece) => bodyOf(furnitureBody(piece, around)));
  const chamber = chamberOf([lining, ...moulds.map(({ body }) => body), ...furniture], kiln.firing, {
    startC,
    ambientC,
    ownJPerK: kiln.ownJPerK,
  });
  return { kiln, chamber, lining, moulds, furniture };
}

const SOAK_STEPS = 8;
const SOAK_STEP_S = 1e8;

/** Brings a lining to the steady state of a chamber held at a temperature, by implicit steps of years. */
function soak(lining: Body, kiln: KilnModel, ambientC: number, heldC: number): void {
  const chamber = chamberOf([lining], kiln.firing, { startC: heldC, ambientC, ownJPerK: kiln.ownJPerK });
  for (let i = 0; i < SOAK_STEPS; i++) {
    tryHeld(chamber, SOAK_STEP_S, heldC);
    takeStep(chamber);
    lining.rateCPerS.fill(0);
  }
  lining.peakC.set(lining.tempC);
}
