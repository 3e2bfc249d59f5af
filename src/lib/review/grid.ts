/**
 * A channel on a uniform grid of times: the common ground on which slopes, levels and plan are compared. Node i stands for
 * run time `originS + i · stepS`. Where the log knows nothing (`known` 0) the value is drawn straight across.
 */
export interface Grid {
  readonly originS: number;
  readonly stepS: number;
  readonly value: Float64Array;
  readonly known: Uint8Array;
}

/** Finest grid, seconds; a log longer than about a month gets a coarser one so that the work stays linear in samples. */
const STEP_S = 10;
const MOST_NODES = 300_000;

export const timeAt = (grid: Grid, index: number): number => grid.originS + index * grid.stepS;
export const lastIndex = (grid: Grid): number => grid.value.length - 1;

/** Nearest node to a time, kept inside the grid. */
export function indexAt(grid: Grid, timeS: number): number {
  const i = Math.round((timeS - grid.originS) / grid.stepS);
  return Math.max(0, Math.min(lastIndex(grid), i));
}

export const valueAt = (grid: Grid, timeS: number): number => grid.value[indexAt(grid, timeS)]!;

/** The same grid with its clock set so that `startOffsetS` after its first node is run time 0. */
export const fromRunStart = (grid: Grid, startOffsetS: number): Grid => ({ ...grid, originS: -startOffsetS });

/**
 * Samples on a uniform grid. The samples nearest to a node are averaged in time and value, and the node's value is read off
 * the straight line between neighbouring averages: on a ramp neither jitter nor averaging shifts it.
 * @param timeS ascending seconds from the first sample
 * @param dropped 1 for samples to be left out; NaN values are left out always
 * @param bridgedS longest time without a sample that still counts as known
 */
export function gridOf(
  timeS: Float64Array,
  value: Float64Array,
  dropped: Uint8Array | null,
  bridgedS: number,
): Grid {
  const spanS = timeS.length ? timeS[timeS.length - 1]! : 0;
  const stepS = Math.max(STEP_S, Math.ceil(spanS / MOST_NODES));
  const n = Math.floor(spanS / stepS) + 1;
  const sumT = new Float64Array(n);
  const sumV = new Float64Array(n);
  const count = new Uint32Array(n);
  for (let i = 0; i < timeS.length; i++) {
    const v = value[i]!;
    if (v !== v || (dropped !== null && dropped[i] === 1)) continue;
    const t = timeS[i]!;
    const cell = Math.min(n - 1, Math.round(t / stepS));
    sumT[cell] = sumT[cell]! + t;
    sumV[cell] = sumV[cell]! + v;
    count[cell] = count[cell]! + 1;
  }
  return { originS: 0, stepS, ...drawn(sumT, sumV, count, stepS, bridgedS) };
}

/** Straight lines between the filled cells, read off at the nodes. */
function drawn(sumT: Float64Array, sumV: Float64Array, count: Uint32Array, stepS: number, bridgedS: number) {
  const n = count.length;
  const value = new Float64Array(n);
  const known = new Uint8Array(n);
  let next = 0;
  let t0 = Number.NaN;
  let v0 = Number.NaN;
  let t1 = Number.NaN;
  let v1 = Number.NaN;
  const advance = () => {
    t0 = t1;
    v0 = v1;
    while (next < n && count[next] === 0) next++;
    t1 = next < n ? sumT[next]! / count[next]! : Number.NaN;
    v1 = next < n ? sumV[next]! / count[next]! : Number.NaN;
    next++;
  };
  advance();
  for (let i = 0; i < n; i++) {
    const t = i * stepS;
    while (t1 < t) advance();
    if (t0 !== t0) {
      value[i] = v1;
      known[i] = t1 - t <= stepS ? 1 : 0;
    } else if (t1 !== t1) {
      value[i] = v0;
      known[i] = t - t0 <= bridgedS ? 1 : 0;
    } else {
      value[i] = v0 + ((v1 - v0) * (t - t0)) / (t1 - t0);
      known[i] = t1 - t0 <= bridgedS ? 1 : 0;
    }
  }
  return { value, known };
}

/** Centred moving mean over about `windowS`, of known nodes where there are any. */
export function smoothed(grid: Grid, windowS: number): Grid {
  const half = Math.floor(windowS / grid.stepS / 2);
  if (half < 1) return grid;
  const n = grid.value.length;
  const sum = new Float64Array(n + 1);
  const count = new Float64Array(n + 1);
  for (let i = 0; i < n; i++) {
    const counted = grid.known[i]!;
    sum[i + 1] = sum[i]! + (counted ? grid.value[i]! : 0);
    count[i + 1] = count[i]! + counted;
  }
  const value = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    // The window stays symmetric at the ends, so that a slope does not bend there.
    const h = Math.min(half, i, n - 1 - i);
    const many = count[i + h + 1]! - count[i - h]!;
    value[i] = grid.known[i] && many > 0 ? (sum[i + h + 1]! - sum[i - h]!) / many : grid.value[i]!;
  }
  return { ...grid, value };
}
