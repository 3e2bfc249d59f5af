import { findMaterial, type MetalMaterial, valueAt, withOverride } from '../../materials';
import { pouring } from '../../materials/pouring';
import type { Mould, Pour } from '../load-schema';
import { readyS, slowestMould } from '../readiness';
import { curveOf } from '../resolve-kiln';
import { seriesAt } from '../series';
import type { MouldTrace, Simulation } from '../simulation';
import { carriedC, carriedUntilS, type Carried } from './carry';
import { chargeAlloy } from './charge';
import { type Fill, fillOf } from './fill';
import { type Melting, type MeltingFurnace, meltingOf, usualCrucibleKg } from './melting';
import { type PourWall, wallAfterS, wallBetween } from './pour-wall';

/** One line of the load at the pour. */
export interface MouldAtPour {
  readonly index: number;
  /** Core as it leaves the kiln, and when the metal comes, °C. */
  readonly coreLeavingC: number;
  readonly coreAtPourC: number;
  /** Null where the thinnest section is not stated. */
  readonly fill: Fill | null;
}

/** The pour that a firing leads to: furnace and mould brought together. Estimates all. */
export interface PourForecast {
  readonly melting: Melting;
  /** Seconds from the kiln's start at which the furnace is lit, and the metal is ready; null: no furnace, or no moment to be ready for. */
  readonly furnaceStartS: number | null;
  readonly metalReadyS: number | null;
  /** When the slowest mould is ready; null: never. */
  readonly mouldReadyS: number | null;
  /** When mould and metal are both ready and leave kiln and furnace; null: the mould never is. */
  readonly atS: number | null;
  readonly metalAtPourC: number;
  readonly liquidusC: number;
  /** How long the metal may be carried before it is no more than `LEAST_SUPERHEAT_K` above its liquidus, s. */
  readonly metalWindowS: number;
  readonly moulds: readonly MouldAtPour[];
}

/** Superheat below which no section is poured, K. Common practice, no source. */
export const LEAST_SUPERHEAT_K = 30;

/**
 * What furnace and kiln come to at the pour. The furnace is lit so as to be ready with the slowest mould, not before
 * the kiln; both wait for the later one. The mould stands in the open for as long as the metal is carried.
 *
 * @param furnace null: none is named, no times of the furnace
 * @returns null where the load has no pour
 * @throws RangeError where the materials table lacks the metal
 */
export function pourOf(simulation: Simulation, furnace: MeltingFurnace | null): PourForecast | null {
  const { pour } = simulation.load;
  if (!pour) return null;
  const metal = findMaterial('metals', pour.metal);
  if (!metal) throw new RangeError(`no metal "${pour.metal}" in the materials table`);
  const carried = carriedOf(pour, metal, simulation.ambientC);
  const melting = meltingOf({ ...carried, startC: simulation.ambientC }, furnace);
  const slowest = simulation.moulds[slowestMould(simulation) ?? -1];
  const mouldReadyS = slowest ? readyS(simulation, slowest) : null;
  const furnaceStartS =
    mouldReadyS === null || melting.durationS === null ? null : Math.max(0, mouldReadyS - melting.durationS);
  const metalReadyS = furnaceStartS === null ? null : furnaceStartS + (melting.durationS ?? 0);
  const atS = mouldReadyS === null ? null : Math.max(mouldReadyS, metalReadyS ?? mouldReadyS);
  const metalAtPourC = carriedC(carried, pour.carryS);
  return {
    melting,
    furnaceStartS,
    metalReadyS,
    mouldReadyS,
    atS,
    metalAtPourC,
    liquidusC: carried.alloy.liquidusC,
    metalWindowS: carriedUntilS(carried, carried.alloy.liquidusC + LEAST_SUPERHEAT_K),
    moulds:
      atS === null
        ? []
        : simulation.moulds.map((trace) =>
            mouldAtPour(simulation, trace, { pour, carried, atS, metalAtPourC }),
          ),
  };
}

function carriedOf(pour: Pour, metal: MetalMaterial, ambientC: number): Carried {
  const liquidDensityKgPerM3 = valueAt(metal.properties.liquidDensityKgPerM3, 20);
  return {
    alloy: chargeAlloy(pour, metal),
    chargeKg: pour.chargeKg,
    crucibleKg: pour.crucibleKg ?? usualCrucibleKg(pour.chargeKg, liquidDensityKgPerM3),
    liquidDensityKgPerM3,
    pourC: pour.pourC,
    ambientC,
  };
}

interface Moment {
  pour: Pour;
  carried: Carried;
  atS: number;
  metalAtPourC: number;
}

function mouldAtPour(simulation: Simulation, trace: MouldTrace, moment: Moment): MouldAtPour {
  const { pour, carried, atS, metalAtPourC } = moment;
  const mould = simulation.load.moulds[trace.index];
  if (!mould) throw new RangeError(`the load has no mould ${trace.index}`);
  const wall = pourWallOf(mould, simulation.ambientC);
  const coreLeavingC = seriesAt(simulation.timeS, trace.coreC, atS);
  const leaving = wallBetween(wall, seriesAt(simulation.timeS, trace.surfaceC, atS), coreLeavingC);
  const wallC = wallAfterS(wall, leaving, pour.carryS);
  const mouldCount = simulation.load.moulds.reduce((sum, { count }) => sum + count, 0);
  return {
    index: trace.index,
    coreLeavingC,
    coreAtPourC: wallC[wallC.length - 1] ?? coreLeavingC,
    fill:
      mould.thinnestSectionM === null
        ? null
        : fillOf({
            alloy: carried.alloy,
            liquidDensityKgPerM3: carried.liquidDensityKgPerM3,
            metalC: metalAtPourC,
            sectionM: mould.thinnestSectionM,
            castKg: pour.chargeKg / mouldCount,
            wall,
            wallC,
          }),
  };
}

/** Wall of a shell whose thickness nobody gives and the table does not have, m. */
const COMMON_WALL_M = 0.008;

/** Between the casting and the room: the wall of a shell, or half the radius of a flask, taken as flat. */
function pourWallOf(mould: Mould, ambientC: number): PourWall {
  const material = findMaterial('moulds', mould.material);
  if (!material) throw new RangeError(`no mould material "${mould.material}" in the materials table`);
  const property = (name: keyof typeof material.properties) =>
    withOverride(material.properties, mould.overrides, name);
  const curve = (name: 'conductivityWPerMK' | 'heatCapacityJPerKgK' | 'emissivity') =>
    curveOf(property(name) ?? material.properties[name]);
  const densityKgPerM3 = valueAt(property('densityKgPerM3') ?? material.properties.densityKgPerM3, 20);
  const typical = property('typicalWallM');
  const shellWallM = mould.wallM ?? (typical ? valueAt(typical, 20) : COMMON_WALL_M);
  const flaskM = mould.diameterM ?? Math.cbrt((4 * mould.massKg) / densityKgPerM3 / (Math.PI * 1.25));
  return {
    wallM: mould.form === 'shell' ? shellWallM : flaskM / 4,
    densityKgPerM3,
    conductivityWPerMK: curve('conductivityWPerMK'),
    heatCapacityJPerKgK: curve('heatCapacityJPerKgK'),
    emissivity: curve('emissivity'),
    convectionWPerM2K: valueAt(pouring.shopConvectionWPerM2K, 20),
    ambientC,
  };
}
