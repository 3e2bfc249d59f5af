import type { Curve, ReactionProperties } from './properties';

/**
 * Properties over temperature, tabulated once per body so that the solver looks them up by an index.
 * Heat capacity is constant within a bin, so enthalpy is piecewise linear and can be walked exactly;
 * conductivity is linear between the edges of the bins. 100 °C, where water boils, is an edge.
 */
export const TABLE_FROM_C = -100;
export const BIN_C = 10;
export const BIN_COUNT = 240;
export const LAST_BIN = BIN_COUNT - 1;

/** Value of a curve at a temperature; the end values outside it. */
export function curveAt(curve: Curve, tempC: number): number {
  if (typeof curve === 'number') return curve;
  let [fromC, from] = curve[0] ?? [0, 0];
  if (tempC <= fromC) return from;
  for (const [toC, to] of curve) {
    if (tempC <= toC) return from + ((to - from) * (tempC - fromC)) / (toC - fromC);
    fromC = toC;
    from = to;
  }
  return from;
}

/** Values of a curve every BIN_C from the first edge (moved by an offset) on: BIN_COUNT + 1 numbers. */
function atEdges(curve: Curve, scale: number, offsetC: number): Float64Array {
  const table = new Float64Array(BIN_COUNT + 1);
  if (typeof curve === 'number') return table.fill(curve * scale);
  let next = 0;
  for (let edge = 0; edge <= BIN_COUNT; edge++) {
    const tempC = TABLE_FROM_C + offsetC + edge * BIN_C;
    while (next < curve.length && (curve[next]?.[0] ?? Infinity) < tempC) next++;
    const above = curve[next] ?? curve[curve.length - 1] ?? [0, 0];
    const below = curve[next - 1] ?? above;
    const spanC = above[0] - below[0];
    const value = spanC > 0 ? below[1] + ((above[1] - below[1]) * (tempC - below[0])) / spanC : above[1];
    table[edge] = scale * value;
  }
  return table;
}

/** Values of a curve at the edges of the bins, in the curve's own unit: BIN_COUNT + 1 numbers. */
export function edgeTable(curve: Curve): Float64Array {
  return atEdges(curve, 1, 0);
}

/** Mean heat capacity per volume of each bin, J/(m³·K): Simpson's rule, exact where the curve bends at an edge. */
export function capacityTable(curve: Curve, densityKgPerM3: number): Float64Array {
  const edges = atEdges(curve, densityKgPerM3, 0);
  const middles = atEdges(curve, densityKgPerM3, BIN_C / 2);
  const table = new Float64Array(BIN_COUNT);
  for (let bin = 0; bin < BIN_COUNT; bin++) {
    table[bin] = ((edges[bin] ?? 0) + 4 * (middles[bin] ?? 0) + (edges[bin + 1] ?? 0)) / 6;
  }
  return table;
}

/** Heat taken up by reactions per volume and kelvin in each bin, J/(m³·K); a window that ends inside a bin is spread over that bin. */
export function reactionTable(reactions: readonly ReactionProperties[]): Float64Array {
  const table = new Float64Array(BIN_COUNT);
  for (const { fromC, toC, heatJPerM3 } of reactions) {
    for (let bin = 0; bin < BIN_COUNT; bin++) {
      const lowC = TABLE_FROM_C + bin * BIN_C;
      const overlapC = Math.min(toC, lowC + BIN_C) - Math.max(fromC, lowC);
      if (overlapC > 0) table[bin] = (table[bin] ?? 0) + (heatJPerM3 * overlapC) / (toC - fromC) / BIN_C;
    }
  }
  return table;
}

/** Index of the bin that holds a temperature. */
export function binOf(tempC: number): number {
  const bin = Math.floor((tempC - TABLE_FROM_C) / BIN_C);
  return bin < 0 ? 0 : bin > LAST_BIN ? LAST_BIN : bin;
}

/**
 * Integral of a table of bins between two temperatures: the enthalpy between them where it holds heat capacities.
 *
 * @param table one value per kelvin for each bin
 * @param start index of the first bin within `table`
 */
export function integralBetween(table: Float64Array, start: number, fromC: number, toC: number): number {
  if (toC < fromC) return -integralBetween(table, start, toC, fromC);
  const last = binOf(toC);
  let sum = 0;
  let atC = fromC;
  for (let bin = binOf(fromC); bin < last; bin++) {
    const edgeC = TABLE_FROM_C + (bin + 1) * BIN_C;
    sum += (edgeC - atC) * (table[start + bin] ?? 0);
    atC = edgeC;
  }
  return sum + (toC - atC) * (table[start + last] ?? 0);
}

/**
 * Temperature reached from one temperature by taking up heat, walking the bins: the inverse of `integralBetween`.
 *
 * @param table heat capacity of each bin, J/K once multiplied by `scale`
 * @param heatJ heat taken up; negative: given off
 */
export function temperatureAfter(
  table: Float64Array,
  start: number,
  scale: number,
  fromC: number,
  heatJ: number,
): number {
  let bin = binOf(fromC);
  let atC = fromC;
  let leftJ = heatJ;
  for (;;) {
    const capacity = (table[start + bin] ?? 0) * scale;
    const toC = atC + leftJ / capacity;
    const lowC = TABLE_FROM_C + bin * BIN_C;
    if (toC > lowC + BIN_C && bin < LAST_BIN) {
      leftJ -= (lowC + BIN_C - atC) * capacity;
      atC = lowC + BIN_C;
      bin++;
    } else if (toC < lowC && bin > 0) {
      leftJ -= (lowC - atC) * capacity;
      atC = lowC;
      bin--;
    } else return toC;
  }
}
