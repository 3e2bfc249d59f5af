import type { Grid } from './grid';

/** Running sums over a grid from which any window's least-squares line follows at once. */
export interface Regression {
  /** Least-squares slope over nodes `from`..`to`, °C/h; NaN where fewer than 80 % of them are known. */
  slopeCPerH(from: number, to: number): number;
}

/**
 * Least-squares slopes by prefix sums: slope = (nΣiv − ΣiΣv) / (nΣi² − (Σi)²), i the node's index (exact in a double for
 * any grid that a review makes), v its value. Building is linear in the nodes, a slope takes constant time.
 */
export function regressionOf(grid: Grid): Regression {
  const n = grid.value.length;
  const s0 = new Float64Array(n + 1);
  const s1 = new Float64Array(n + 1);
  const s2 = new Float64Array(n + 1);
  const sv = new Float64Array(n + 1);
  const siv = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) {
    const w = grid.known[i]!;
    const v = w ? grid.value[i]! : 0;
    s0[i + 1] = s0[i]! + w;
    s1[i + 1] = s1[i]! + w * i;
    s2[i + 1] = s2[i]! + w * i * i;
    sv[i + 1] = sv[i]! + v;
    siv[i + 1] = siv[i]! + v * i;
  }
  const perHour = 3600 / grid.stepS;
  return {
    slopeCPerH(from, to) {
      const a = Math.max(0, from);
      const b = Math.min(n, to + 1);
      const count = s0[b]! - s0[a]!;
      if (count < 2 || count < 0.8 * (b - a)) return Number.NaN;
      // About the window's first index, so that nothing large cancels.
      const sumI = s1[b]! - s1[a]! - count * a;
      const sumII = s2[b]! - s2[a]! - 2 * a * (s1[b]! - s1[a]!) + count * a * a;
      const sumV = sv[b]! - sv[a]!;
      const sumIV = siv[b]! - siv[a]! - a * sumV;
      const spread = count * sumII - sumI * sumI;
      return spread > 0 ? ((count * sumIV - sumI * sumV) / spread) * perHour : Number.NaN;
    },
  };
}

/** Slope at every node over a centred window, °C/h; NaN where the window does not fit or is not known. */
export function centredSlopes(grid: Grid, windowS: number, regression = regressionOf(grid)): Float64Array {
  const half = Math.max(1, Math.round(windowS / grid.stepS / 2));
  const n = grid.value.length;
  const slopes = new Float64Array(n).fill(Number.NaN);
  for (let i = half; i < n - half; i++) slopes[i] = regression.slopeCPerH(i - half, i + half);
  return slopes;
}
