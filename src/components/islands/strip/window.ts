/** A stretch of time that a zoomed strip shows of a whole. */
export interface TimeWindow {
  readonly fromS: number;
  readonly toS: number;
}

/** Closest look: a strip shows at least this long. */
export const MIN_WINDOW_S = 120;

/** A window of the same length moved until it lies within the whole; longer than the whole: the whole. */
export function within(wished: TimeWindow, whole: TimeWindow): TimeWindow {
  const lengthS = Math.min(
    whole.toS - whole.fromS,
    Math.max(Math.min(MIN_WINDOW_S, whole.toS - whole.fromS), wished.toS - wished.fromS),
  );
  const middleS = (wished.fromS + wished.toS) / 2;
  const fromS = Math.min(whole.toS - lengthS, Math.max(whole.fromS, middleS - lengthS / 2));
  return { fromS, toS: fromS + lengthS };
}

/** Zooms by a factor (above 1: closer) about a moment that keeps its place on the strip. */
export function zoomed(shown: TimeWindow, whole: TimeWindow, factor: number, aboutS: number): TimeWindow {
  const lengthS = (shown.toS - shown.fromS) / factor;
  const share = (aboutS - shown.fromS) / Math.max(1e-9, shown.toS - shown.fromS);
  const kept = Math.max(MIN_WINDOW_S, lengthS);
  const fromS = aboutS - share * kept;
  return within({ fromS, toS: fromS + kept }, whole);
}

/** Moves by a share of what is shown: 0.25 is a quarter of the strip onwards. */
export function panned(shown: TimeWindow, whole: TimeWindow, share: number): TimeWindow {
  const byS = (shown.toS - shown.fromS) * share;
  return within({ fromS: shown.fromS + byS, toS: shown.toS + byS }, whole);
}
