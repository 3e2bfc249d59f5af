import type { Stretch } from './spans';
import type { Thresholds } from './thresholds';

/** Stretches of at least `stuckMinS` in which a channel reads exactly the same: not yet a fault, it may be a hold. */
export function frozenStretches(timeS: Float64Array, value: Float64Array, limits: Thresholds): Stretch[] {
  const found: Stretch[] = [];
  const n = value.length;
  let from = 0;
  for (let i = 1; i <= n; i++) {
    if (i < n && value[i] === value[from]) continue;
    if (i - 1 > from && timeS[i - 1]! - timeS[from]! >= limits.stuckMinS) found.push({ from, to: i - 1 });
    from = i;
  }
  return found;
}

/**
 * How a frozen reading comes free: the leap to the first reading after it, and the step from there to the next, °C. A kiln
 * that leaves a hold makes two like steps, a sensor that comes free one large one. Null if nothing is read soon after.
 */
export function release(value: Float64Array, stretch: Stretch): { byC: number; thenC: number } | null {
  const after: number[] = [];
  for (let i = stretch.to + 1; i < value.length && i <= stretch.to + 10 && after.length < 2; i++) {
    if (value[i] === value[i]) after.push(value[i]!);
  }
  const [first, second] = after;
  if (first === undefined) return null;
  return {
    byC: Math.abs(first - value[stretch.to]!),
    thenC: second === undefined ? 0 : Math.abs(second - first),
  };
}
