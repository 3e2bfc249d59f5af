import { GRAVITY_M_PER_S2, KELVIN_AT_0_C } from './constants';
import { radiativeFilmWPerM2K } from './radiation';

const PRANDTL = 0.707;

/**
 * Natural convection from a vertical wall to still air, W/(m²·K).
 * Churchill and Chu (1975), all Ra: Nu = {0.825 + 0.387·Ra^(1/6) / [1 + (0.492/Pr)^(9/16)]^(8/27)}².
 * Air at film temperature T (K): k = 0.02624·(T/300)^0.8646 W/(m·K), ν = 1.5702e-5·(T/300)^1.7545 m²/s, Pr = 0.707,
 * β = 1/T; power-law fits that hold within 2 % from 250 to 600 K.
 *
 * @param surfaceC wall temperature, °C
 * @param roomC temperature of the air, °C
 * @param heightM height of the wall, m
 */
export function naturalConvectionWPerM2K(surfaceC: number, roomC: number, heightM: number): number {
  const filmK = (surfaceC + roomC) / 2 + KELVIN_AT_0_C;
  const relative = filmK / 300;
  const conductivityWPerMK = 0.02624 * relative ** 0.8646;
  const viscosityM2PerS = 1.5702e-5 * relative ** 1.7545;
  const differenceK = Math.abs(surfaceC - roomC);
  const rayleigh = ((GRAVITY_M_PER_S2 * differenceK * heightM ** 3) / filmK / viscosityM2PerS ** 2) * PRANDTL;
  const spread = (1 + (0.492 / PRANDTL) ** (9 / 16)) ** (8 / 27);
  const nusselt = (0.825 + (0.387 * rayleigh ** (1 / 6)) / spread) ** 2;
  return (nusselt * conductivityWPerMK) / heightM;
}

const STEP_C = 4;
const STEPS = 150;

/**
 * Film of an outer face to the room over its surface temperature: natural convection and grey radiation to walls at
 * room temperature, tabulated every 4 K from the room up to 600 K above it.
 */
export class RoomFilm {
  readonly ambientC: number;
  readonly #table: Float64Array;

  constructor(ambientC: number, film: number | { emissivity: number; heightM: number }) {
    this.ambientC = ambientC;
    this.#table = new Float64Array(STEPS + 1);
    for (let i = 0; i <= STEPS; i++) {
      const surfaceC = ambientC + i * STEP_C;
      this.#table[i] =
        typeof film === 'number'
          ? film
          : naturalConvectionWPerM2K(surfaceC, ambientC, film.heightM) +
            film.emissivity * radiativeFilmWPerM2K(surfaceC, ambientC);
    }
  }

  /** Film coefficient at a surface temperature, W/(m²·K). Below the room it is taken as equally far above. */
  at(surfaceC: number): number {
    const position = Math.min(Math.abs(surfaceC - this.ambientC) / STEP_C, STEPS - 1e-9);
    const step = Math.floor(position);
    const low = this.#table[step] ?? 0;
    return low + ((this.#table[step + 1] ?? low) - low) * (position - step);
  }
}
