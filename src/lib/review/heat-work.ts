/** Where the equivalent is stated, and how steeply sintering goes with temperature. */
export const HEAT_WORK_REFERENCE_C = 870;
const ACTIVATION_J_PER_MOL = 300_000;
const GAS_J_PER_MOL_K = 8.314_462_618;
const ZERO_C_IN_K = 273.15;

/**
 * Heat work of a curve: equivalent hours at 870 °C, H = ∫ exp(−Ea/R · (1/T − 1/Tref)) dt, T in K.
 * Ea = 300 kJ/mol and Tref = 870 °C are Holdfast's convention for silica-bonded shells (no published value exists for these
 * binders); R is the CODATA 2018 molar gas constant. Trapezoids between points, split so that no piece exceeds `stepS`.
 * @param timeS ascending, s
 * @param valueC °C, above −273 °C; NaN pieces are left out
 */
export function heatWorkH(
  timeS: ArrayLike<number>,
  valueC: ArrayLike<number>,
  fromS: number,
  toS: number,
  stepS = 60,
): number {
  let sumS = 0;
  for (let i = 1; i < timeS.length; i++) {
    const a = Math.max(fromS, timeS[i - 1]!);
    const b = Math.min(toS, timeS[i]!);
    if (!(b > a)) continue;
    const slope = (valueC[i]! - valueC[i - 1]!) / (timeS[i]! - timeS[i - 1]!);
    const pieces = Math.max(1, Math.ceil((b - a) / stepS));
    const pieceS = (b - a) / pieces;
    for (let k = 0; k < pieces; k++) {
      const atS = a + k * pieceS;
      const startC = valueC[i - 1]! + slope * (atS - timeS[i - 1]!);
      const part = ((speed(startC) + speed(startC + slope * pieceS)) / 2) * pieceS;
      if (part === part) sumS += part;
    }
  }
  return sumS / 3600;
}

/** Speed of sintering against that at the reference temperature. */
function speed(valueC: number): number {
  const referenceK = HEAT_WORK_REFERENCE_C + ZERO_C_IN_K;
  return Math.exp((-ACTIVATION_J_PER_MOL / GAS_J_PER_MOL_K) * (1 / (valueC + ZERO_C_IN_K) - 1 / referenceK));
}
