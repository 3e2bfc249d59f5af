import type { ThermocoupleType } from '../logs/schema';
import { REFERENCE_FUNCTIONS } from './its90-coefficients';
import type { DirectRange } from './reference-function';

/** Widest temperatures of the direct function, °C, both included. */
export function directRangeC(type: ThermocoupleType): { fromC: number; toC: number } {
  const ranges = REFERENCE_FUNCTIONS[type].direct;
  return { fromC: ranges[0]?.fromC ?? NaN, toC: ranges[ranges.length - 1]?.toC ?? NaN };
}

/** Widest emf of the inverse function, mV against a junction at 0 °C, both included. Type B begins at 250 °C. */
export function inverseRangeMv(type: ThermocoupleType): { fromMv: number; toMv: number } {
  const ranges = REFERENCE_FUNCTIONS[type].inverse;
  return { fromMv: ranges[0]?.fromMv ?? NaN, toMv: ranges[ranges.length - 1]?.toMv ?? NaN };
}

/**
 * Emf of a thermocouple, mV, its reference junction at 0 °C.
 * E = Σ cᵢ·tⁱ, for type K from 0 °C up plus a0·exp(a1·(t − a2)²); ITS-90 reference functions, NIST SRD 60.
 * Range: `directRangeC(type)`; outside it, and for NaN, the answer is NaN.
 */
export function emfMv(type: ThermocoupleType, tempC: number): number {
  const range = directFor(type, tempC);
  return range ? directMv(range, tempC) : NaN;
}

/**
 * Temperature of the measuring junction, °C, from the emf in mV against a reference junction at 0 °C.
 * The published inverse polynomial (t = Σ dᵢ·Eⁱ, NIST SRD 60, its error within −0.05..+0.06 °C) starts two Newton steps on
 * the reference function, so that the answer is its exact inverse.
 * Range: `inverseRangeMv(type)`; outside it, and for NaN, the answer is NaN. Type B is not monotonic below about 42 °C and is
 * given from 250 °C only.
 */
export function temperatureC(type: ThermocoupleType, mv: number): number {
  const start = inversePolynomialC(type, mv);
  if (Number.isNaN(start)) return NaN;
  const { fromC, toC } = directRangeC(type);
  let tempC = Math.min(toC, Math.max(fromC, start));
  for (let step = 0; step < 2; step++) {
    const range = directFor(type, tempC);
    if (!range) return tempC;
    const slope = slopeMvPerC(range, tempC);
    tempC = Math.min(toC, Math.max(fromC, tempC - (directMv(range, tempC) - mv) / slope));
  }
  return tempC;
}

/** The published inverse polynomial alone, °C; NaN outside its range. */
export function inversePolynomialC(type: ThermocoupleType, mv: number): number {
  const ranges = REFERENCE_FUNCTIONS[type].inverse;
  for (let i = ranges.length - 1; i >= 0; i--) {
    const range = ranges[i];
    if (range && mv >= range.fromMv && mv <= range.toMv) return horner(range.d, mv);
  }
  return NaN;
}

/**
 * Temperature of the measuring junction, °C, when the reference junction is at `junctionC`: emfs add, degrees do not, so
 * E(t) = E_measured + E(junction).
 */
export function compensatedC(type: ThermocoupleType, mv: number, junctionC: number): number {
  return temperatureC(type, mv + emfMv(type, junctionC));
}

/** Emf in mV of a thermocouple at `tempC` whose reference junction is at `junctionC`. */
export function emfAgainstJunctionMv(type: ThermocoupleType, tempC: number, junctionC: number): number {
  return emfMv(type, tempC) - emfMv(type, junctionC);
}

function directFor(type: ThermocoupleType, tempC: number): DirectRange | null {
  for (const range of REFERENCE_FUNCTIONS[type].direct) {
    if (tempC >= range.fromC && tempC <= range.toC) return range;
  }
  return null;
}

function directMv(range: DirectRange, tempC: number): number {
  const polynomial = horner(range.c, tempC);
  if (!range.exponential) return polynomial;
  const [a0, a1, a2] = range.exponential;
  return polynomial + a0 * Math.exp(a1 * (tempC - a2) ** 2);
}

function slopeMvPerC(range: DirectRange, tempC: number): number {
  let slope = 0;
  for (let i = range.c.length - 1; i > 0; i--) slope = slope * tempC + i * (range.c[i] ?? 0);
  if (!range.exponential) return slope;
  const [a0, a1, a2] = range.exponential;
  return slope + 2 * a0 * a1 * (tempC - a2) * Math.exp(a1 * (tempC - a2) ** 2);
}

function horner(coefficients: readonly number[], x: number): number {
  let sum = 0;
  for (let i = coefficients.length - 1; i >= 0; i--) sum = sum * x + (coefficients[i] ?? 0);
  return sum;
}
