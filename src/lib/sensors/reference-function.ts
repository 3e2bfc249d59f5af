/** Ranges of a thermocouple reference function: ascending powers, emf in mV, temperature in °C, junction at 0 °C. */
export interface DirectRange {
  fromC: number;
  toC: number;
  c: readonly number[];
  /** Type K from 0 °C up adds a0·exp(a1·(t − a2)²), a0 in mV. */
  exponential?: readonly [a0: number, a1: number, a2: number];
}
export interface InverseRange {
  fromMv: number;
  toMv: number;
  d: readonly number[];
}
export interface ReferenceFunction {
  direct: readonly DirectRange[];
  /** In ascending order; where two ranges overlap (R, S above 1064 °C) the later one is the tighter. */
  inverse: readonly InverseRange[];
}
