/** Last place at or before a moment. */
export function placeAt(timeS: ArrayLike<number>, atS: number): number {
  let low = 0;
  let high = timeS.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((timeS[middle] ?? Infinity) <= atS) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** Value of a series at a moment, straight between its own moments. */
export function seriesAt(timeS: ArrayLike<number>, series: ArrayLike<number>, atS: number): number {
  const at = placeAt(timeS, atS);
  const [t0 = 0, v0 = NaN] = [timeS[at], series[at]];
  const [t1 = t0, v1 = v0] = [timeS[at + 1], series[at + 1]];
  return t1 > t0 ? v0 + (v1 - v0) * Math.min(1, Math.max(0, (atS - t0) / (t1 - t0))) : v0;
}
