import { KELVIN_AT_0_C, STEFAN_BOLTZMANN_W_PER_M2K4 } from './constants';

/**
 * Exchange factor of two grey, diffuse surfaces, one of which sees only the other: q = F·A₁·σ·(T₁⁴ − T₂⁴),
 * F = 1 / [(1 − ε₁)/ε₁ + 1 + (A₁/A₂)·(1 − ε₂)/ε₂]. With A₁/A₂ = 1 that of parallel plates, with 0 that of a small
 * body in a large room. Source: Incropera, Fundamentals of Heat and Mass Transfer, eq. 13.23, view factor 1.
 *
 * @param emissivity of the inner surface, 0-1
 * @param around emissivity of the surface around it, 0-1
 * @param areaRatio A₁/A₂, 0-1
 */
export function exchangeFactor(emissivity: number, around: number, areaRatio: number): number {
  if (emissivity <= 0 || around <= 0) return 0;
  return 1 / (1 / emissivity + areaRatio * (1 / around - 1));
}

/**
 * Radiative film coefficient in secant form, W/(m²·K): times (T₁ − T₂) it is exactly σ·(T₁⁴ − T₂⁴).
 */
export function radiativeFilmWPerM2K(oneC: number, otherC: number): number {
  const one = oneC + KELVIN_AT_0_C;
  const other = otherC + KELVIN_AT_0_C;
  return STEFAN_BOLTZMANN_W_PER_M2K4 * (one * one + other * other) * (one + other);
}
