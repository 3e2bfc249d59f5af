import type { PlannedCurve } from '~/lib/profile/planned';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { formatInterval, type UnitPreferences } from '~/lib/units';
import { hatchName, hatchRects } from '../strip/Hatch';
import { curveRects, LINE_PX, placesAbout, placeWords, wordsPx, type Rect } from '../strip/label-places';
import { ASIDE_SHARE, type StripLayer } from '../strip/layers';
import type { Point, StripScales } from '../strip/scales';
import { largestLag } from './lateness';
import { asidePeaks, hatchesOf, type LayerId } from './layers-shown';

/** A few words on the strip, and the line that joins them to what they are about. */
export interface Note {
  readonly id: string;
  readonly text: string;
  readonly place: Rect;
  /** What of the words stands at the edge of their place: the end towards what they are about. */
  readonly anchor: 'start' | 'middle' | 'end';
  /** SVG path; null where the words stand at the thing itself. */
  readonly line: string | null;
}

export interface Noted {
  readonly scales: StripScales;
  readonly planned: PlannedCurve;
  readonly estimate: Estimate | null;
  readonly shown: ReadonlySet<LayerId>;
  readonly layers: readonly StripLayer[];
  readonly scale: UnitPreferences['temperature'];
}

interface Wish {
  readonly id: string;
  readonly text: string;
  readonly wished: readonly Rect[];
  readonly about: Point;
}

/** Half the side of a handle on a corner of the plan, px, with a little paper about it. */
const HANDLE_PX = 9;
/** Words as near as this to what they are about need no line, px. */
const NEAR_PX = 24;
/** Height of a hatching for all there was, as a share of the strip. */
export const HATCH_SHARE = 0.2;

const handleRects = (scales: StripScales, planned: PlannedCurve): Rect[] =>
  planned.legs
    .flatMap((leg) => [leg.rampEndS, leg.endS].map((timeS) => scales.point(timeS, leg.toC)))
    .map(({ x, y }) => ({ x: x - HANDLE_PX, y: y - HANDLE_PX, width: 2 * HANDLE_PX, height: 2 * HANDLE_PX }));

/** How far a point is from the words, px; 0 within them. */
function awayPx({ x, y }: Point, place: Rect): number {
  const besidePx = Math.max(place.x - x, 0, x - place.x - place.width);
  return Math.hypot(besidePx, Math.max(place.y - y, 0, y - place.y - place.height));
}

function anchorOf({ x }: Point, place: Rect): Note['anchor'] {
  if (place.x > x) return 'start';
  return place.x + place.width < x ? 'end' : 'middle';
}

/** Where the text of a note begins, is centred or ends, px, as its anchor says. */
export function textX({ anchor, place }: Note): number {
  if (anchor === 'middle') return place.x + place.width / 2;
  return anchor === 'start' ? place.x + 2 : place.x + place.width - 2;
}

/** From a point to the end of the words that is nearer to it. */
function lineTo({ x, y }: Point, place: Rect): string {
  const right = place.x > x;
  const below = place.y > y;
  const from = { x: x + (right ? 3 : -3), y: y + (below ? 2 : -2) };
  const to = { x: right ? place.x - 4 : place.x + place.width + 4, y: place.y + LINE_PX / 2 };
  return `M${from.x.toFixed(1)} ${from.y.toFixed(1)}L${to.x.toFixed(1)} ${to.y.toFixed(1)}`;
}

const hatchPlans = ({ scales, estimate, shown }: Noted) =>
  hatchesOf(estimate, shown).map((hatch) => ({ ...hatch, scales, heightShare: HATCH_SHARE }));

function hatchWishes(noted: Noted): Wish[] {
  return hatchPlans(noted).map(({ id, name, ...plan }) => {
    const best = hatchName(plan, name);
    const about = { x: best.x - 20, y: best.y + LINE_PX + 8 };
    return { id, text: name, wished: [best, ...placesAbout(about, best.width)], about };
  });
}

function asideWishes({ scales, layers }: Noted): Wish[] {
  const { view } = scales;
  const peakPx = scales.tempPx(view.minC + (view.maxC - view.minC) * ASIDE_SHARE);
  const y = peakPx - LINE_PX - 4;
  return asidePeaks(layers).map(({ id, atS, text }) => {
    const width = wordsPx(text);
    const about = { x: scales.timePx(atS), y: peakPx };
    const x = about.x - width / 2;
    const wished = [0, -1, 1, -2, 2].flatMap((level) =>
      [0, width / 2 + 10, -width / 2 - 10].map((byPx) => ({
        x: x + byPx,
        y: y + level * LINE_PX,
        width,
        height: LINE_PX,
      })),
    );
    return { id, text, wished: [...wished, ...placesAbout(about, width)], about };
  });
}

function lagWishes({ scales, estimate, shown, scale }: Noted): Wish[] {
  const lag = shown.has('core') ? largestLag(estimate) : null;
  if (!lag) return [];
  const text = `mould core, ${formatInterval(lag.lagC, scale)} behind`;
  const about = scales.point(lag.atS, lag.coreC);
  return [{ id: 'lag', text, wished: placesAbout(about, wordsPx(text)), about }];
}

/**
 * The notes of a strip that lies across, each where it covers no curve, hatching, handle, bracket or other note, as far
 * as there is such a place.
 */
export function placeNotes(noted: Noted, taken: readonly Rect[]): Note[] {
  const { scales, layers, planned } = noted;
  const { box } = scales;
  const bounds = { x: box.leftPx + 6, y: box.topPx + 4, width: box.widthPx - 12, height: box.heightPx - 8 };
  const kept = [
    ...taken,
    ...curveRects(scales, layers),
    ...handleRects(scales, planned),
    ...hatchPlans(noted).flatMap(hatchRects),
  ];
  return [...hatchWishes(noted), ...asideWishes(noted), ...lagWishes(noted)].map(
    ({ id, text, wished, about }) => {
      const place = placeWords(wished, kept, bounds);
      kept.push(place);
      const isNear = awayPx(about, place) <= NEAR_PX;
      return {
        id,
        text,
        place,
        anchor: anchorOf(about, place),
        line: isNear ? null : lineTo(about, place),
      };
    },
  );
}
