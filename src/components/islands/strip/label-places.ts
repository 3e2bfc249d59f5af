import { ASIDE_SHARE, type StripLayer } from './layers';
import { valueAtTime, type Point, type StripScales } from './scales';

export interface Rect {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

/** Height of a line of words on the strip, px. */
export const LINE_PX = 15;

/** Width that words on the strip take, px, a little more than they do: about 0.53 of the size of Inter a letter. */
export const wordsPx = (text: string, sizePx = 12): number => text.length * sizePx * 0.53 + 4;

const overlapPx2 = (a: Rect, b: Rect): number =>
  Math.max(0, Math.min(a.x + a.width, b.x + b.width) - Math.max(a.x, b.x)) *
  Math.max(0, Math.min(a.y + a.height, b.y + b.height) - Math.max(a.y, b.y));

const inside = (rect: Rect, bounds: Rect): Rect => ({
  ...rect,
  x: Math.max(bounds.x, Math.min(bounds.x + bounds.width - rect.width, rect.x)),
  y: Math.max(bounds.y, Math.min(bounds.y + bounds.height - rect.height, rect.y)),
});

/**
 * Where words go: the first of the places wished for, moved into the bounds, that covers nothing that is there; where
 * every one covers something, the one that covers least.
 *
 * @param wished places in order of preference, px; at least one
 * @param taken what must stay in sight, px
 */
export function placeWords(wished: readonly Rect[], taken: readonly Rect[], bounds: Rect): Rect {
  let best: { rect: Rect; covered: number } | null = null;
  for (const place of wished) {
    const rect = inside(place, bounds);
    const covered = taken.reduce((sum, other) => sum + overlapPx2(rect, other), 0);
    if (covered === 0) return rect;
    if (best === null || covered < best.covered) best = { rect, covered };
  }
  if (best === null) throw new RangeError('words need a place wished for');
  return best.rect;
}

/** Places about a point, near ones first: right and left of it, below and above. */
export function placesAbout({ x, y }: Point, widthPx: number): Rect[] {
  return [18, 34, 52, 76, 104, 140].flatMap((awayPx) =>
    [
      { x: x + 26, y: y + awayPx - LINE_PX / 2 },
      { x: x - 26 - widthPx, y: y - awayPx - LINE_PX / 2 },
      { x: x + 26, y: y - awayPx - LINE_PX / 2 },
      { x: x - 26 - widthPx, y: y + awayPx - LINE_PX / 2 },
    ].map((corner) => ({ ...corner, width: widthPx, height: LINE_PX })),
  );
}

const STEP_PX = 6;
const PEN_PX = 3;

/** The curves as rectangles that words must not cover, one each {@link STEP_PX} along the axis of time. */
export function curveRects(scales: StripScales, layers: readonly StripLayer[]): Rect[] {
  const { box, view } = scales;
  const stepS = STEP_PX / scales.pxPerS;
  const rangeC = view.maxC - view.minC;
  return layers.flatMap(({ kind, timeS, value }) => {
    const heatOf = (read: number): number =>
      kind === 'aside' ? view.minC + rangeC * ASIDE_SHARE * read : read;
    const rects: Rect[] = [];
    for (let atS = view.fromS; atS < view.toS; atS += stepS) {
      const from = valueAtTime(timeS, value, atS);
      const to = valueAtTime(timeS, value, atS + stepS);
      if (from === null || to === null) continue;
      const [fromPx, toPx] = [scales.tempPx(heatOf(from)), scales.tempPx(heatOf(to))];
      const y = Math.min(fromPx, toPx) - PEN_PX;
      const height = Math.abs(fromPx - toPx) + 2 * PEN_PX;
      if (y + height >= box.topPx && y <= box.topPx + box.heightPx)
        rects.push({ x: scales.timePx(atS), y, width: STEP_PX, height });
    }
    return rects;
  });
}
