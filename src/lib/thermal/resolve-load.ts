import {
  findMaterial,
  type KineticStep,
  type MouldMaterial,
  type Property,
  valueAt,
  withOverride,
} from '../materials';
import type { HeatWorkLaw } from './heat-work';
import type { Furniture, Mould, Pattern } from './load-schema';
import type { CharAir, PatternProperties } from './pattern-burnout';
import type { BodyProperties, Curve } from './properties';
import { exchangeFactor } from './radiation';
import { curveOf } from './resolve-kiln';

/** The enclosure that a body of the load stands in. */
export interface Surroundings {
  startC: number;
  emissivity: number;
  convectionWPerM2K: number;
  /** Area of all the load over that of the chamber, 0-1: how much of what a body sees is other load. */
  areaRatio: number;
}

type Properties = Readonly<Record<string, Property | undefined>>;

/** Reads properties of one material by name, the studio's own figures first. */
function reader(properties: Properties, overrides: Readonly<Record<string, number>>) {
  return {
    curve(name: string): Curve {
      const property = withOverride(properties, overrides, name);
      if (property === undefined) throw new RangeError(`no ${name} in the materials table`);
      return curveOf(property);
    },
    number(name: string, tempC = 20): number | null {
      const property = withOverride(properties, overrides, name);
      return property === undefined ? null : valueAt(property, tempC);
    },
  };
}

function found<T>(material: T | undefined, kind: string, id: string): T {
  if (material === undefined) throw new RangeError(`no ${kind} "${id}" in the materials table`);
  return material;
}

/** Wall of a shell whose thickness nobody gives and the table does not have, m. */
const COMMON_WALL_M = 0.008;
/** Height over diameter of a flask of which only the mass is known (common practice). */
const COMMON_FLASK_RATIO = 1.25;

/** Depth that heat goes through, and area at that depth as a polynomial, from mass and shape. */
function shapeOf(mould: Mould, densityKgPerM3: number, typicalWallM: number | null): Shape {
  const volumeM3 = mould.massKg / densityKgPerM3;
  if (mould.form === 'shell') {
    const wallM = mould.wallM ?? typicalWallM ?? COMMON_WALL_M;
    const areaM2 = (volumeM3 / wallM) * mould.heatedFaces;
    const depthM = wallM / mould.heatedFaces;
    return { depthM, area: [areaM2, 0, 0], cells: Math.min(16, Math.max(6, Math.ceil(depthM / 0.0025))) };
  }
  const radiusM = (mould.diameterM ?? flaskDiameterM(volumeM3, mould.heightM)) / 2;
  const perimeterM = volumeM3 / radiusM ** 2;
  return {
    depthM: radiusM,
    area: [2 * radiusM * perimeterM, -2 * perimeterM, 0],
    cells: Math.min(20, Math.max(8, Math.ceil(radiusM / 0.006))),
  };
}

interface Shape {
  depthM: number;
  area: BodyProperties['area'];
  cells: number;
}

function flaskDiameterM(volumeM3: number, heightM: number | null): number {
  if (heightM !== null) return Math.sqrt((4 * volumeM3) / (Math.PI * heightM));
  return Math.cbrt((4 * volumeM3) / (Math.PI * COMMON_FLASK_RATIO));
}

function exchangeCurve(emissivity: Curve, around: Surroundings): Curve {
  const factor = (value: number): number => exchangeFactor(value, around.emissivity, around.areaRatio);
  return typeof emissivity === 'number'
    ? factor(emissivity)
    : emissivity.map(([tempC, value]): [number, number] => [tempC, factor(value)]);
}

/** Mould as a body: the wall of a shell, or a flask taken as a long cylinder (its ends left out, which errs on the slow side). */
export function mouldBody(mould: Mould, around: Surroundings): BodyProperties {
  const material = found(findMaterial('moulds', mould.material), 'mould material', mould.material);
  const read = reader(material.properties, mould.overrides);
  const densityKgPerM3 = read.number('densityKgPerM3') ?? 0;
  const shape = shapeOf(mould, densityKgPerM3, read.number('typicalWallM'));
  return {
    layers: [
      {
        thicknessM: shape.depthM,
        densityKgPerM3,
        conductivityWPerMK: read.curve('conductivityWPerMK'),
        heatCapacityJPerKgK: read.curve('heatCapacityJPerKgK'),
      },
    ],
    area: shape.area,
    grid: { kind: 'even', cells: shape.cells },
    face: {
      kind: 'film',
      convectionWPerM2K: around.convectionWPerM2K,
      exchangeFactor: exchangeCurve(read.curve('emissivity'), around),
    },
    far: { kind: 'insulated' },
    startC: around.startC,
    water: waterOf(mould, read, densityKgPerM3, around.startC),
    reactions: material.reactions.map(({ fromC, toC, heatJPerKg }) => ({
      fromC,
      toC,
      heatJPerM3: heatJPerKg * densityKgPerM3,
    })),
    count: mould.count,
  };
}

/** Water that no scale shows beside the mould: less, and it is dry. */
const NO_WATER_SHARE = 1e-6;

/** Free water; a mould that goes in at 100 °C or more has none left. */
function waterOf(
  mould: Mould,
  read: ReturnType<typeof reader>,
  densityKgPerM3: number,
  startC: number,
): BodyProperties['water'] {
  if (mould.waterKg <= NO_WATER_SHARE * mould.massKg || startC >= 100) return null;
  const dry = read.number('conductivityWPerMK') ?? 0;
  const wet = read.number('wetConductivityWPerMK') ?? dry;
  const freshKg = (read.number('freshWaterShare') ?? 0) * mould.massKg;
  const wetness = freshKg > 0 ? Math.min(1, mould.waterKg / freshKg) : 1;
  return {
    kgPerM3: (mould.waterKg / mould.massKg) * densityKgPerM3,
    addedConductivityWPerMK: Math.max(0, wet - dry) * wetness,
    dryLayerShare: (read.number('porosityShare') ?? 1) / (read.number('tortuosity') ?? 1),
  };
}

/** Thickness of furniture that nobody gives, m (common practice: shelves of 12-20 mm). */
const COMMON_SHELF_M = 0.015;

/** Shelves and props: a plate heated from both faces, or one lump where its thickness is not given. */
export function furnitureBody(piece: Furniture, around: Surroundings): BodyProperties {
  const material = found(findMaterial('furniture', piece.material), 'furniture material', piece.material);
  const read = reader(material.properties, piece.overrides);
  const densityKgPerM3 = read.number('densityKgPerM3') ?? 0;
  const thicknessM = piece.thicknessM ?? COMMON_SHELF_M;
  return {
    layers: [
      {
        thicknessM: thicknessM / 2,
        densityKgPerM3,
        conductivityWPerMK: read.curve('conductivityWPerMK'),
        heatCapacityJPerKgK: read.curve('heatCapacityJPerKgK'),
      },
    ],
    area: [(2 * piece.massKg) / densityKgPerM3 / thicknessM, 0, 0],
    grid: piece.thicknessM === null ? { kind: 'lumped' } : { kind: 'even', cells: 4 },
    face: {
      kind: 'film',
      convectionWPerM2K: around.convectionWPerM2K,
      exchangeFactor: exchangeCurve(read.curve('emissivity'), around),
    },
    far: { kind: 'insulated' },
    startC: around.startC,
    water: null,
    reactions: [],
    count: 1,
  };
}

/** Heat-work law of a mould's binder; null where the table has none for it. */
export function heatWorkLawOf(mould: Mould): HeatWorkLaw | null {
  const material: MouldMaterial | undefined = findMaterial('moulds', mould.material);
  if (material === undefined) return null;
  const read = reader(material.properties, mould.overrides);
  const referenceC = read.number('heatWorkReferenceC');
  const activationKJPerMol = read.number('heatWorkActivationKJPerMol');
  return referenceC === null || activationKJPerMol === null ? null : { referenceC, activationKJPerMol };
}

/** Crooked ways through a porous wall: their length squared over its thickness squared. Handbooks, recalled: 2-4. */
const TORTUOSITY = 3;

/** The way of air through a mould's wall to its cavity. */
function charAirOf(mould: Mould, pattern: Pattern): CharAir | null {
  const material = findMaterial('moulds', mould.material);
  if (material === undefined) return null;
  const read = reader(material.properties, mould.overrides);
  const openShare = (read.number('porosityShare') ?? 0) / TORTUOSITY;
  const densityKgPerM3 = read.number('densityKgPerM3') ?? 0;
  if (mould.form === 'shell') {
    const wallM = mould.wallM ?? read.number('typicalWallM') ?? COMMON_WALL_M;
    return { openShare, shapeM: mould.massKg / densityKgPerM3 / wallM ** 2 };
  }
  const patternDensity = reader(
    findMaterial('patterns', pattern.material)?.properties ?? {},
    pattern.overrides,
  ).number('densityKgPerM3');
  const cavityM3 = pattern.massKg / (patternDensity ?? 1000);
  const wholeM3 = mould.massKg / densityKgPerM3 + cavityM3;
  const diameterM = mould.diameterM ?? flaskDiameterM(wholeM3, mould.heightM);
  const heightM = wholeM3 / (Math.PI * (diameterM / 2) ** 2);
  // A round cavity along the axis of the flask: 2πH / ln(R/r).
  const cavityM = Math.sqrt(cavityM3 / (Math.PI * heightM));
  return { openShare, shapeM: (2 * Math.PI * heightM) / Math.log(Math.max(1.05, diameterM / 2 / cavityM)) };
}

/**
 * Time by which the middle of a solid pattern trails the wall that heats it from both sides: (s/2)²·4/(π²·a), the first
 * mode of a plate (Carslaw and Jaeger, Conduction of Heat in Solids, 3.3). None for a hollow one, or where no thickness is said.
 */
function patternLagS({ thickestM, hollow }: Pattern, read: ReturnType<typeof reader>): number {
  if (thickestM === null || hollow) return 0;
  const capacity = (read.number('densityKgPerM3') ?? 0) * (read.number('heatCapacityJPerKgK') ?? 0);
  const conductivity = read.number('conductivityWPerMK') ?? 0;
  return conductivity > 0 ? ((thickestM / 2) ** 2 * 4 * capacity) / (Math.PI ** 2 * conductivity) : 0;
}

/** A pattern's figures as the solver takes them, in the mould that holds it. */
export function patternProperties(pattern: Pattern, mould: Mould): PatternProperties {
  const material = found(findMaterial('patterns', pattern.material), 'pattern material', pattern.material);
  const read = reader(material.properties, pattern.overrides);
  const { steps } = material.kinetics;
  const total = steps.reduce((sum, step) => sum + step.massShare, 0);
  return {
    massKg: pattern.massKg,
    flowsC: read.number('flowsC'),
    drainedShare: pattern.drainedShare ?? read.number('drainedShare') ?? 0,
    drainTimeS: read.number('drainTimeS') ?? 0,
    ashShare: read.number('ashShare') ?? 0,
    heatOfCombustionJPerKg: read.number('heatOfCombustionJPerKg') ?? 0,
    airKgPerKg: read.number('airKgPerKg') ?? 0,
    charAir: charAirOf(mould, pattern),
    lagS: patternLagS(pattern, read),
    steps: steps.map((step) => ({
      massShare: step.massShare / total,
      activationJPerMol: step.activationKJPerMol * 1000,
      preExponentialPerS: step.preExponentialPerS,
      model: step.model,
      follows: parentOf(steps, step),
      needsAir: step.needsAir,
    })),
  };
}

function parentOf(steps: readonly KineticStep[], step: KineticStep): number | null {
  const index = steps.findIndex(({ name }) => name === step.follows);
  return index < 0 ? null : index;
}
