import type { Curve } from '../properties';
import { curveAt } from '../property-table';
import { radiativeFilmWPerM2K } from '../radiation';

/** The wall between the casting and the room once the mould stands outside the kiln. */
export interface PourWall {
  readonly wallM: number;
  readonly densityKgPerM3: number;
  readonly conductivityWPerMK: Curve;
  readonly heatCapacityJPerKgK: Curve;
  readonly emissivity: Curve;
  readonly convectionWPerM2K: number;
  readonly ambientC: number;
}

/** Metal that lies against the inner face: one lump per area of face. */
export interface FaceMetal {
  readonly massKgPerM2: number;
  readonly contactWPerM2K: number;
  /** Enthalpy to temperature, J/kg to °C. */
  readonly tempOf: (enthalpyJPerKg: number) => number;
}

/** Longest that metal is followed while it flows, s: what flows longer flows long enough. */
export const LONGEST_FLOW_S = 120;

const FINEST_M = 0.0006;
const MOST_CELLS = 24;
/** Steps between two readings of the properties: a cell moves by a few kelvin meanwhile. */
const PROPERTIES_EVERY = 8;

/** Properties of each cell, read now and then, and the flows between them. */
interface WallState {
  readonly capacity: Float64Array;
  readonly conductivity: Float64Array;
  readonly flux: Float64Array;
  film: number;
  age: number;
}

function wallState(cells: number): WallState {
  return {
    capacity: new Float64Array(cells),
    conductivity: new Float64Array(cells),
    flux: new Float64Array(cells + 1),
    film: 0,
    age: 0,
  };
}

function readProperties(wall: PourWall, tempC: Float64Array, state: WallState): void {
  const cellM = wall.wallM / tempC.length;
  for (let i = 0; i < tempC.length; i++) {
    state.capacity[i] = wall.densityKgPerM3 * curveAt(wall.heatCapacityJPerKgK, tempC[i]!) * cellM;
    state.conductivity[i] = curveAt(wall.conductivityWPerMK, tempC[i]!);
  }
  const skinC = tempC[0]!;
  state.film =
    curveAt(wall.emissivity, skinC) * radiativeFilmWPerM2K(skinC, wall.ambientC) + wall.convectionWPerM2K;
}

/** Temperatures through the wall, outer face first: `cells` equal cells. */
export function wallBetween({ wallM }: PourWall, outerC: number, innerC: number): Float64Array {
  const cells = Math.max(3, Math.min(MOST_CELLS, Math.floor(wallM / FINEST_M)));
  return Float64Array.from({ length: cells }, (_, i) => outerC + ((innerC - outerC) * (i + 0.5)) / cells);
}

/** The longest explicit step that is stable, s, at the temperatures the wall has. */
function stableStepS(wall: PourWall, tempC: Float64Array, contactWPerM2K: number): number {
  const cellM = wall.wallM / tempC.length;
  let stepS = Infinity;
  for (const cellC of tempC) {
    const capacity = wall.densityKgPerM3 * curveAt(wall.heatCapacityJPerKgK, cellC) * cellM;
    const between = curveAt(wall.conductivityWPerMK, cellC) / cellM;
    stepS = Math.min(stepS, capacity / (2 * between + contactWPerM2K + 400));
  }
  return stepS * 0.9;
}

/**
 * One explicit step of heat through the wall: outer face by radiation and convection to the room, inner face insulated
 * (an empty cavity) or against metal.
 *
 * @returns heat taken from the metal over the step, J/m²
 */
function step(
  wall: PourWall,
  tempC: Float64Array,
  stepS: number,
  metal: { tempC: number; contact: number } | null,
  state: WallState,
): number {
  if (state.age++ % PROPERTIES_EVERY === 0) readProperties(wall, tempC, state);
  const { capacity, conductivity, flux, film } = state;
  const cells = tempC.length;
  const perM = cells / wall.wallM;
  flux[0] = (tempC[0]! - wall.ambientC) / (1 / film + 1 / (2 * perM * conductivity[0]!));
  for (let i = 1; i < cells; i++)
    flux[i] = ((conductivity[i]! + conductivity[i - 1]!) / 2) * perM * (tempC[i]! - tempC[i - 1]!);
  const inner = cells - 1;
  flux[cells] =
    metal === null
      ? 0
      : (metal.tempC - tempC[inner]!) / (1 / metal.contact + 1 / (2 * perM * conductivity[inner]!));
  for (let i = 0; i < cells; i++) tempC[i] = tempC[i]! + (stepS * (flux[i + 1]! - flux[i]!)) / capacity[i]!;
  return flux[cells] * stepS;
}

/** The wall after standing empty in the room for a time; the given temperatures are not changed. */
export function wallAfterS(wall: PourWall, startC: Float64Array, forS: number): Float64Array {
  const tempC = startC.slice();
  const stepS = stableStepS(wall, tempC, 0);
  const state = wallState(tempC.length);
  for (let atS = 0; atS < forS; atS += stepS) step(wall, tempC, Math.min(stepS, forS - atS), null, state);
  return tempC;
}

/**
 * Seconds until metal poured against the inner face has given off so much heat that its enthalpy is `untilJPerKg`:
 * heat goes into the wall first and, once the wall is warm, out through its skin. Infinity beyond `mostS`.
 */
export function flowsForS(
  wall: PourWall,
  startC: Float64Array,
  metal: FaceMetal,
  fromJPerKg: number,
  untilJPerKg: number,
  mostS = LONGEST_FLOW_S,
): number {
  const tempC = startC.slice();
  const stepS = stableStepS(wall, tempC, metal.contactWPerM2K);
  const state = wallState(tempC.length);
  let enthalpy = fromJPerKg;
  for (let atS = 0; atS < mostS; atS += stepS) {
    const hot = { tempC: metal.tempOf(enthalpy), contact: metal.contactWPerM2K };
    const next = enthalpy - step(wall, tempC, stepS, hot, state) / metal.massKgPerM2;
    if (next <= untilJPerKg) return atS + (stepS * (enthalpy - untilJPerKg)) / (enthalpy - next);
    enthalpy = next;
  }
  return Infinity;
}
