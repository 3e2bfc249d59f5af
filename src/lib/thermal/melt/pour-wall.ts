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

const FINEST_M = 0.0004;
const MOST_CELLS = 24;

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
): number {
  const cells = tempC.length;
  const cellM = wall.wallM / cells;
  const flux = new Float64Array(cells + 1);
  const skinC = tempC[0] ?? 0;
  const half = curveAt(wall.conductivityWPerMK, skinC) / (cellM / 2);
  const film =
    curveAt(wall.emissivity, skinC) * radiativeFilmWPerM2K(skinC, wall.ambientC) + wall.convectionWPerM2K;
  flux[0] = (skinC - wall.ambientC) / (1 / film + 1 / half);
  for (let i = 1; i < cells; i++) {
    const middleC = ((tempC[i] ?? 0) + (tempC[i - 1] ?? 0)) / 2;
    flux[i] = (curveAt(wall.conductivityWPerMK, middleC) / cellM) * ((tempC[i] ?? 0) - (tempC[i - 1] ?? 0));
  }
  const innerC = tempC[cells - 1] ?? 0;
  if (metal) {
    const innerHalf = curveAt(wall.conductivityWPerMK, innerC) / (cellM / 2);
    flux[cells] = (metal.tempC - innerC) / (1 / metal.contact + 1 / innerHalf);
  }
  for (let i = 0; i < cells; i++) {
    const capacity = wall.densityKgPerM3 * curveAt(wall.heatCapacityJPerKgK, tempC[i] ?? 0) * cellM;
    tempC[i] = (tempC[i] ?? 0) + (stepS * ((flux[i + 1] ?? 0) - (flux[i] ?? 0))) / capacity;
  }
  return (flux[cells] ?? 0) * stepS;
}

/** The wall after standing empty in the room for a time; the given temperatures are not changed. */
export function wallAfterS(wall: PourWall, startC: Float64Array, forS: number): Float64Array {
  const tempC = startC.slice();
  const stepS = stableStepS(wall, tempC, 0);
  for (let atS = 0; atS < forS; atS += stepS) step(wall, tempC, Math.min(stepS, forS - atS), null);
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
  mostS = 600,
): number {
  const tempC = startC.slice();
  const stepS = stableStepS(wall, tempC, metal.contactWPerM2K);
  let enthalpy = fromJPerKg;
  for (let atS = 0; atS < mostS; atS += stepS) {
    const hot = { tempC: metal.tempOf(enthalpy), contact: metal.contactWPerM2K };
    const next = enthalpy - step(wall, tempC, stepS, hot) / metal.massKgPerM2;
    if (next <= untilJPerKg) return atS + (stepS * (enthalpy - untilJPerKg)) / (enthalpy - next);
    enthalpy = next;
  }
  return Infinity;
}
