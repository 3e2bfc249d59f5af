import {
  defaultLayers,
  findMaterial,
  kilnDefaults,
  type LiningLayer,
  type LiningMaterial,
  type Property,
  valueAt,
} from '../materials';
import { electricFiring, gasFiring } from './available-heat';
import type { Firing } from './chamber';
import { ROOM_AIR_KG_PER_M3 } from './constants';
import type { KilnPlate } from './kiln-schema';
import type { BodyProperties, Curve } from './properties';

/** A property of the table as the solver takes it. */
export const curveOf = (property: Property): Curve =>
  'value' in property ? property.value : property.points;

const constantOf = (property: Property): number => valueAt(property, 20);

/** What the solver needs of a kiln. */
export interface KilnModel {
  lining: BodyProperties;
  firing: Firing;
  /** Electric power or burner input at full fire, W. */
  fullInputW: number;
  /** Heat capacity of air and elements, J/K. */
  ownJPerK: number;
  chamberM2: number;
  emissivity: number;
  convectionWPerM2K: number;
  /** Air drawn through with the vent closed and open, kg/s. */
  leakKgPerS: number;
  ventKgPerS: number;
  /** Oxygen-bearing air beside that: what the burner brings in excess, kg per J of input. */
  excessAirKgPerJ: number;
}

/** Layers of a kiln's wall: as the studio says, or as its kind of lining usually has. */
export function liningLayersOf(kiln: KilnPlate): LiningLayer[] {
  return kiln.liningLayers.length > 0
    ? kiln.liningLayers
    : defaultLayers(kiln.lining, kiln.liningM, kiln.maxC);
}

/** Most a kiln can take in, W: rated × share still delivered × (supply / plate voltage)², or the burner's input. */
export function fullInputW(kiln: KilnPlate): number {
  if (kiln.energy === 'gas') return kiln.burnerKW * 1000;
  const { ratedKW, ratedPowerShare, voltsV, supplyV } = kiln;
  const voltage = voltsV !== null && supplyV !== null ? supplyV / voltsV : 1;
  return ratedKW * 1000 * ratedPowerShare * voltage ** 2;
}

function liningMaterial(id: string): LiningMaterial {
  const material = findMaterial('linings', id);
  if (material === undefined) throw new RangeError(`no lining material "${id}" in the materials table`);
  return material;
}

/** Cells of a lining: 1.5 mm at the hot face, growing by a seventh of their depth. */
export const LINING_GRID = { kind: 'graded', firstM: 0.0015, growth: 0.14 } as const;

/**
 * The lining as one body. Its area grows with depth as A(x) = A + 1.08·E·x + 3.6·x², E the sum of the chamber's twelve
 * edges, so that a steady wall of thickness L conducts over A + 0.54·E·L + 8·0.15·L²: the shape factors of Langmuir, Adams and
 * Meikle (1913) for edges and corners, valid where every inner dimension is over L/5 (Incropera, Table 4.1).
 */
function liningOf(kiln: KilnPlate, ambientC: number): BodyProperties {
  const { innerWidthM: w, innerDepthM: d, innerHeightM: h, lossFactor, heatCapacityFactor } = kiln;
  const layers = liningLayersOf(kiln).map(({ material, thicknessM }) => {
    const { properties } = liningMaterial(material);
    return {
      thicknessM,
      densityKgPerM3: constantOf(properties.densityKgPerM3) * heatCapacityFactor,
      conductivityWPerMK: scaled(curveOf(properties.conductivityWPerMK), lossFactor),
      heatCapacityJPerKgK: curveOf(properties.heatCapacityJPerKgK),
    };
  });
  const outermost = liningLayersOf(kiln).at(-1);
  const emissivity = outermost ? constantOf(liningMaterial(outermost.material).properties.emissivity) : 0.9;
  const thicknessM = layers.reduce((sum, layer) => sum + layer.thicknessM, 0);
  return {
    layers,
    area: [2 * (w * d + d * h + w * h), 1.08 * 4 * (w + d + h), 3.6],
    grid: LINING_GRID,
    face: { kind: 'held' },
    far: { kind: 'room', ambientC, film: { emissivity, heightM: h + 2 * thicknessM } },
    startC: ambientC,
    water: null,
    reactions: [],
    count: 1,
  };
}

const scaled = (curve: Curve, factor: number): Curve =>
  typeof curve === 'number'
    ? curve * factor
    : curve.map(([tempC, value]): [number, number] => [tempC, value * factor]);

function firingOf(kiln: KilnPlate): { firing: Firing; excessAirKgPerJ: number } {
  if (kiln.energy === 'electric') return { firing: electricFiring(fullInputW(kiln)), excessAirKgPerJ: 0 };
  const fuel = findMaterial('fuels', kiln.fuel);
  if (!fuel?.availableHeat) throw new RangeError(`no fuel "${kiln.fuel}" in the materials table`);
  const { airKgPerKg, higherHeatingJPerKg } = fuel.properties;
  const airKgPerJ =
    airKgPerKg && higherHeatingJPerKg ? constantOf(airKgPerKg) / constantOf(higherHeatingJPerKg) : 0;
  return {
    firing: gasFiring(fuel.availableHeat, kiln.burnerKW * 1000, kiln.excessAirShare),
    excessAirKgPerJ: airKgPerJ * kiln.excessAirShare,
  };
}

/**
 * What the solver needs of a kiln, from its plate and the materials table.
 *
 * @throws RangeError where the table lacks a material that the plate names
 */
export function kilnModelOf(kiln: KilnPlate, ambientC: number): KilnModel {
  const lining = liningOf(kiln, ambientC);
  const chamberM3 = kiln.innerWidthM * kiln.innerDepthM * kiln.innerHeightM;
  const leakM3PerH = constantOf(kilnDefaults.leakVolumesPerH) * chamberM3;
  const ventM3PerH = kiln.ventM3PerH ?? constantOf(kilnDefaults.ventVolumesPerH) * chamberM3;
  const elementsJPerK =
    kiln.energy === 'electric'
      ? kiln.ratedKW *
        constantOf(kilnDefaults.elementsKgPerKW) *
        constantOf(kilnDefaults.elementsHeatCapacityJPerKgK)
      : 0;
  const hotFace = liningMaterial(liningLayersOf(kiln)[0]?.material ?? '');
  return {
    lining,
    ...firingOf(kiln),
    fullInputW: fullInputW(kiln),
    ownJPerK: (elementsJPerK + chamberM3 * ROOM_AIR_KG_PER_M3 * 1005) * kiln.heatCapacityFactor,
    chamberM2: lining.area[0],
    emissivity: valueAt(hotFace.properties.emissivity, 800),
    convectionWPerM2K: constantOf(
      kiln.energy === 'gas' ? kilnDefaults.gasConvectionWPerM2K : kilnDefaults.electricConvectionWPerM2K,
    ),
    leakKgPerS: (leakM3PerH / 3600) * ROOM_AIR_KG_PER_M3,
    ventKgPerS: ((leakM3PerH + ventM3PerH) / 3600) * ROOM_AIR_KG_PER_M3,
  };
}
