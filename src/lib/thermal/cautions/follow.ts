import { type FiringView, type segmentsOf } from './view';
import { placeAt } from '../series';

type SegmentView = ReturnType<typeof segmentsOf> extends Generator<infer Each> ? Each : never;

/** How far the chamber strays from what a segment asks for, and when. */
export interface Straying {
  /** Most that it lags on the way up or down, °C, 0 or more. */
  behindC: number;
  behindAt: number;
  /** Most that it is hotter than asked for, °C, 0 or more, and the place in the simulation's series. */
  hotterC: number;
  hotterAt: number;
}

/** What a segment with a rate asks for at a moment, °C; its hold only where it has none. Null: nothing is asked for. */
function askedC({ segment, fromC, moments }: SegmentView, atS: number): number | null {
  if (typeof segment.rateCPerH !== 'number')
    return atS >= moments.rampEndS && moments.arrived ? segment.toC : null;
  const movedC = (segment.rateCPerH * (atS - moments.startS)) / 3600;
  if (movedC >= Math.abs(segment.toC - fromC)) return segment.toC;
  return fromC + Math.sign(segment.toC - fromC) * movedC;
}

/**
 * Compares the chamber with the set point through one segment. A programmer that waits asks for less than its clock
 * says: then the solver's own largest lag is the bound.
 */
export function strayingOf({ simulation }: FiringView, view: SegmentView): Straying {
  const { timeS, chamberC } = simulation;
  const down = view.segment.toC < view.fromC;
  const straying = { behindC: 0, behindAt: -1, hotterC: 0, hotterAt: -1 };
  const last = placeAt(timeS, view.moments.endS);
  for (let at = placeAt(timeS, view.moments.startS); at <= last; at += 1) {
    const asked = askedC(view, timeS[at] ?? 0);
    const isOpened = view.segment.openedS !== undefined && (timeS[at] ?? 0) > view.moments.rampEndS;
    if (asked === null || isOpened) continue;
    const aboveC = (chamberC[at] ?? asked) - asked;
    const behindC = down ? aboveC : -aboveC;
    if (behindC > straying.behindC) Object.assign(straying, { behindC, behindAt: at });
    if (aboveC > straying.hotterC) Object.assign(straying, { hotterC: aboveC, hotterAt: at });
  }
  straying.behindC = Math.min(straying.behindC, view.moments.largestLagC);
  return straying;
}
