import type { Point } from './scales';

/**
 * The line that joins a card to its stretch of curve: straight out from the stretch, slanting across, straight into the
 * card. Leaders of cards in order never cross.
 *
 * @param fromPx middle of the stretch along the axis of time
 * @param toPx middle of the card along the same axis
 * @param depthPx distance between strip and card
 */
export function leader(fromPx: number, toPx: number, startPx: number, depthPx: number): Point[] {
  const across = [
    { x: fromPx, y: startPx },
    { x: fromPx, y: startPx + depthPx * 0.32 },
    { x: toPx, y: startPx + depthPx * 0.64 },
    { x: toPx, y: startPx + depthPx },
  ];
  return Math.abs(fromPx - toPx) < 0.5 ? [across[0] as Point, across[3] as Point] : across;
}

/** The same for an upright strip: strip and card stand side by side. */
export const leaderDown = (fromPx: number, toPx: number, startPx: number, depthPx: number): Point[] =>
  leader(fromPx, toPx, startPx, depthPx).map(({ x, y }) => ({ x: y, y: x }));

/** Points as an SVG path. */
export const pathOf = (points: readonly Point[]): string =>
  points.map(({ x, y }, index) => `${index === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('');
