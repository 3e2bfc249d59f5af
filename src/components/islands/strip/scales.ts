/**
 * Where a moment and a temperature lie on the strip. `across`: time runs left to right, heat upwards. `down`: the strip
 * stands upright, time runs downwards and heat to the right.
 */
export type Flow = 'across' | 'down';

/** The stretch of time and the range of temperature that the strip shows. */
export interface StripView {
  readonly fromS: number;
  readonly toS: number;
  readonly minC: number;
  readonly maxC: number;
}

/** The ruled area within the strip, in CSS pixels. */
export interface StripBox {
  readonly leftPx: number;
  readonly topPx: number;
  readonly widthPx: number;
  readonly heightPx: number;
}

export interface Point {
  readonly x: number;
  readonly y: number;
}

export interface StripScales {
  readonly flow: Flow;
  readonly view: StripView;
  readonly box: StripBox;
  /** Pixel along the axis of time. */
  timePx(timeS: number): number;
  /** Pixel along the axis of temperature. */
  tempPx(tempC: number): number;
  point(timeS: number, tempC: number): Point;
  /** Moment and temperature at a pixel. */
  at(x: number, y: number): { timeS: number; tempC: number };
  readonly pxPerS: number;
  readonly pxPerC: number;
}

export function stripScales(flow: Flow, view: StripView, box: StripBox): StripScales {
  const across = flow === 'across';
  const timeLengthPx = across ? box.widthPx : box.heightPx;
  const tempLengthPx = across ? box.heightPx : box.widthPx;
  const timeStartPx = across ? box.leftPx : box.topPx;
  const pxPerS = timeLengthPx / Math.max(1e-9, view.toS - view.fromS);
  const pxPerC = tempLengthPx / Math.max(1e-9, view.maxC - view.minC);
  const timePx = (timeS: number): number => timeStartPx + (timeS - view.fromS) * pxPerS;
  const tempPx = (tempC: number): number =>
    across ? box.topPx + (view.maxC - tempC) * pxPerC : box.leftPx + (tempC - view.minC) * pxPerC;
  return {
    flow,
    view,
    box,
    pxPerS,
    pxPerC,
    timePx,
    tempPx,
    point: (timeS, tempC) =>
      across ? { x: timePx(timeS), y: tempPx(tempC) } : { x: tempPx(tempC), y: timePx(timeS) },
    at: (x, y) =>
      across
        ? {
            timeS: view.fromS + (x - box.leftPx) / pxPerS,
            tempC: view.maxC - (y - box.topPx) / pxPerC,
          }
        : {
            timeS: view.fromS + (y - box.topPx) / pxPerS,
            tempC: view.minC + (x - box.leftPx) / pxPerC,
          },
  };
}

/** Value of a curve at a moment: straight lines between its points, nothing outside them. */
export function valueAtTime(
  timeS: ArrayLike<number>,
  value: ArrayLike<number | null>,
  atS: number,
): number | null {
  const last = timeS.length - 1;
  if (last < 0 || atS < (timeS[0] ?? Infinity) || atS > (timeS[last] ?? -Infinity)) return null;
  let low = 0;
  let high = last;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if ((timeS[middle] ?? Infinity) <= atS) low = middle;
    else high = middle;
  }
  const from = value[low] ?? null;
  const to = value[high] ?? null;
  if (from === null || to === null) return from ?? to;
  const span = (timeS[high] ?? 0) - (timeS[low] ?? 0);
  return span <= 0 ? to : from + ((to - from) * (atS - (timeS[low] ?? 0))) / span;
}
