/** Middle value of a few numbers; NaN of none. The input is not changed. */
export function median(values: ArrayLike<number>): number {
  const sorted = Float64Array.from(values).sort();
  const n = sorted.length;
  if (n === 0) return Number.NaN;
  const upper = sorted[n >> 1]!;
  return n % 2 === 1 ? upper : (sorted[(n >> 1) - 1]! + upper) / 2;
}

/** Most numbers of a long series that are looked at for a robust figure of the whole. */
const LOOKED_AT = 20_000;

/** Median time between samples, seconds; 0 for fewer than two samples. */
export function medianIntervalS(timeMs: Float64Array): number {
  const n = timeMs.length - 1;
  if (n < 1) return 0;
  const count = Math.min(n, LOOKED_AT);
  const steps = new Float64Array(count);
  for (let k = 0; k < count; k++) {
    const i = Math.floor((k * n) / count);
    steps[k] = timeMs[i + 1]! - timeMs[i]!;
  }
  return median(steps) / 1000;
}

export interface Noise {
  /** Standard deviation of one reading about the slowly changing truth, °C. */
  readonly sigmaC: number;
  /** Smallest step between readings, °C. */
  readonly quantumC: number;
}

/**
 * How noisy and how coarse a channel is.
 * σ = 1.4826 · median|x(i−1) − 2x(i) + x(i+1)| / √6: a second difference removes level and slope, and √6 is its standard
 * deviation for white noise of σ = 1; 1.4826 makes the median of sizes a standard deviation for a normal law. It is never
 * taken below quantum / √12, the deviation of rounding.
 */
export function noiseOf(value: Float64Array): Noise {
  const n = value.length - 2;
  if (n < 1) return { sigmaC: 0, quantumC: 0 };
  const count = Math.min(n, LOOKED_AT);
  const bends: number[] = [];
  let quantumC = Infinity;
  for (let k = 0; k < count; k++) {
    const i = Math.floor((k * n) / count);
    const a = value[i]!;
    const b = value[i + 1]!;
    const bend = Math.abs(a - 2 * b + value[i + 2]!);
    if (Number.isNaN(bend)) continue;
    bends.push(bend);
    const step = Math.abs(b - a);
    if (step > 1e-6 && step < quantumC) quantumC = step;
  }
  if (!Number.isFinite(quantumC)) quantumC = 0;
  const whiteC = bends.length ? (1.4826 * median(bends)) / Math.sqrt(6) : 0;
  return { sigmaC: Math.max(whiteC, quantumC / Math.sqrt(12)), quantumC };
}
