/** One card, by the stretch of the strip that it belongs to, in pixels along the axis of time. */
export interface Stretch {
  readonly fromPx: number;
  readonly toPx: number;
}

export interface Placed {
  readonly startPx: number;
  readonly sizePx: number;
}

/**
 * Sizes of the cards along the axis: as their stretch of curve, but no smaller than `minPx` and no larger than `maxPx`;
 * where they would not fit, what is above the smallest size shrinks evenly.
 *
 * @returns one size per stretch; their sum with gaps exceeds `availablePx` only if even the smallest do not fit
 */
export function cardSizes(
  stretches: readonly Stretch[],
  availablePx: number,
  limits: { readonly minPx: number; readonly maxPx: number; readonly gapPx: number },
): number[] {
  const wished = stretches.map((stretch) =>
    Math.min(limits.maxPx, Math.max(limits.minPx, stretch.toPx - stretch.fromPx - limits.gapPx)),
  );
  const room = availablePx - limits.gapPx * Math.max(0, stretches.length - 1);
  const total = wished.reduce((sum, size) => sum + size, 0);
  const spare = total - limits.minPx * wished.length;
  if (total <= room || spare <= 0) return wished;
  const share = Math.max(0, (room - limits.minPx * wished.length) / spare);
  return wished.map((size) => limits.minPx + (size - limits.minPx) * share);
}

/** Length along the axis that cards of the smallest size need. */
export const neededPx = (count: number, limits: { readonly minPx: number; readonly gapPx: number }): number =>
  count * limits.minPx + Math.max(0, count - 1) * limits.gapPx;

interface Block {
  sum: number;
  count: number;
}

/**
 * Places cards in order, none over another, each as near as can be to the middle of its own stretch.
 *
 * Least squares of the distances from card middle to stretch middle, subject to order and gaps: with the sizes before
 * each card taken off, that is isotonic regression, solved by pooling adjacent violators (Ayer et al. 1955,
 * Ann. Math. Statist. 26, 641); limits at both ends are met by clamping its solution.
 *
 * @param middlesPx middle of each card's stretch, in order
 * @param sizesPx size of each card along the axis
 * @returns where each card starts, and its size
 */
export function placeCards(
  middlesPx: readonly number[],
  sizesPx: readonly number[],
  bounds: { readonly fromPx: number; readonly toPx: number; readonly gapPx: number },
): Placed[] {
  const before: number[] = [];
  let taken = 0;
  for (const size of sizesPx) {
    before.push(taken);
    taken += size + bounds.gapPx;
  }
  const blocks: Block[] = [];
  middlesPx.forEach((middle, index) => {
    let block: Block = { sum: middle - (sizesPx[index] ?? 0) / 2 - (before[index] ?? 0), count: 1 };
    for (let last = blocks[blocks.length - 1]; last; last = blocks[blocks.length - 1]) {
      if (last.sum / last.count <= block.sum / block.count) break;
      blocks.pop();
      block = { sum: last.sum + block.sum, count: last.count + block.count };
    }
    blocks.push(block);
  });
  const low = bounds.fromPx;
  const high = Math.max(low, bounds.toPx - (taken - bounds.gapPx));
  const starts = blocks.flatMap((block) =>
    Array.from({ length: block.count }, () => Math.min(high, Math.max(low, block.sum / block.count))),
  );
  return sizesPx.map((sizePx, index) => ({
    startPx: (starts[index] ?? low) + (before[index] ?? 0),
    sizePx,
  }));
}
