import { GAS_CONSTANT_J_PER_MOL_K, KELVIN_AT_0_C } from './constants';

/** One atmosphere, Pa. Exact by definition. */
export const ATMOSPHERE_PA = 101325;
/** Molar mass of water over that of dry air: 18.015 / 28.96. */
export const WATER_PER_AIR = 0.622;
/** Relative humidity of the air of a room (common practice, no source). */
export const ROOM_HUMIDITY_SHARE = 0.5;

const WATER_KG_PER_MOL = 0.018015;
const PA_PER_MMHG = 133.322387415;
const LN_10 = Math.LN10;

/** Slope of the saturation pressure of water over the pressure itself, 1/K: the derivative of Antoine's equation. */
export function saturationGrowthPerK(tempC: number): number {
  return (LN_10 * 1730.63) / (233.426 + tempC) ** 2;
}

/**
 * Saturation pressure of water, Pa: Antoine's equation, log₁₀ p(mmHg) = 8.07131 − 1730.63 / (233.426 + T).
 * Valid 1-100 °C within 0.5 % of the steam tables, and at 100 °C it is one atmosphere within 0.01 %, so that what evaporates
 * below boiling joins the plateau at 100 °C (a Magnus form is 2-3 % above it there). The constants stand in many handbooks.
 */
export function saturationPa(tempC: number): number {
  return PA_PER_MMHG * Math.exp(LN_10 * (8.07131 - 1730.63 / (233.426 + tempC)));
}

/** Total over air pressure, 1 / (1 − x), of air that holds a share of what it can at a temperature; x the mole fraction of vapour. */
export function totalOverAir(tempC: number, humidityShare: number): number {
  return 1 / (1 - (humidityShare * saturationPa(tempC)) / ATMOSPHERE_PA);
}

/**
 * Diffusivity of water vapour in air at one atmosphere, m²/s: 1.87e-10·T^2.072 (T in K), 282-450 K.
 * Marrero and Mason, J. Phys. Chem. Ref. Data 1, 3 (1972), recalled.
 */
export function vapourDiffusivityM2PerS(tempC: number): number {
  return 1.87e-10 * (tempC + KELVIN_AT_0_C) ** 2.072;
}

/** ρ·D of vapour in air at one atmosphere, kg/(m·s): P·M/(R·T)·D. Times ln[(1 − x₂)/(1 − x₁)] over a length it is the flow through it. */
export function vapourConductivityKgPerMS(tempC: number): number {
  const molPerM3 = ATMOSPHERE_PA / (GAS_CONSTANT_J_PER_MOL_K * (tempC + KELVIN_AT_0_C));
  return molPerM3 * WATER_KG_PER_MOL * vapourDiffusivityM2PerS(tempC);
}

/** Heat capacity of air, J/(kg·K), and Lewis number α/D of vapour in it: 22.5e-6 / 26e-6 m²/s at 25 °C (Incropera, Tables A.4 and A.8, recalled). */
const AIR_J_PER_KG_K = 1007;
const LEWIS = 0.865;

/**
 * What a film passes of vapour for what it passes of heat, kg/(m²·s) by W/(m²·K): h_m = h / (ρ·cp·Le^(2/3)) (Chilton and
 * Colburn 1934), as a flow per unit of ln[(1 − x₂)/(1 − x₁)]; ρ and T cancel: M/M_air / (cp·Le^(2/3)).
 */
export const FILM_KG_K_PER_J = WATER_PER_AIR / (AIR_J_PER_KG_K * LEWIS ** (2 / 3));
