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

/** Reading of the first sound sample after a stretch, NaN if there is none within ten samples. */
export function readingAfter(value: Float64Array, stretch: Stretch): number {
  for (let i = stretch.to + 1; i < value.length && i <= stretch.to + 10; i++) {
    if (value[i] === value[i]) return value[i]!;
  }
  return Number.NaN;
}
