import { indexAt, lastIndex, timeAt, type Grid } from './grid';
import type { Leg } from './plan';
import type { Regression } from './regress';

/** How soon after the moment the programmer should have moved on a departure is taken for that move, at least. */
const EXPECTED_WITHIN_S = 300;
/** A curve that has come back stays for so long, or it was only passing through. */
const SETTLED_S = 900;
/** How long a kiln may take to come back to a hold that it fell out of. */
const BACK_WITHIN_S = 3 * 3600;

/**
 * When a hold really ended: the curve leaves the band towards the next target and goes there. An overshoot leaves and comes
 * back to stay; an opened or dark kiln falls, even past the next target, and comes back. The moment itself is read by
 * running the slope after the departure back to the target.
 * @param next the following leg; null after the last, where the kiln cools
 * @param returnsLaterS run time until which the plan itself stays below this hold's band (for falls that come back)
 * @returns run time of the end, null if the log ends without it
 */
export function holdExit(
  grid: Grid,
  regression: Regression,
  leg: Leg,
  next: Leg | null,
  arrivedS: number,
  expectedEndS: number,
  returnsLaterS: number,
): number | null {
  const direction = next ? next.direction : -1;
  const travelC = next ? Math.abs(next.toC - leg.toC) : Number.POSITIVE_INFINITY;
  const thereC = Math.min(travelC - leg.bandC, 6 * leg.bandC);
  const away = (i: number) => direction * (grid.value[i]! - leg.toC);
  const last = lastIndex(grid);
  let i = indexAt(grid, arrivedS);
  while (i <= last) {
    while (i <= last && away(i) <= leg.bandC) i++;
    if (i > last) return null;
    let j = i;
    while (j <= last && away(j) > 0.8 * leg.bandC && away(j) < thereC) j++;
    const gone = j > last || away(j) >= thereC;
    const leftS = departure(grid, regression, leg, direction, i, arrivedS, expectedEndS);
    const backAt = gone ? comesBack(grid, leg, direction, j, returnsLaterS) : j;
    if (backAt === null) return leftS;
    const early =
      !gone && isNextRamp(regression, next, i, grid) && Math.abs(leftS - expectedEndS) <= nearS(leg);
    if (early && !settles(grid, leg, backAt, expectedEndS)) return leftS;
    i = backAt + 1;
  }
  return null;
}

const nearS = (leg: Leg) => Math.max(EXPECTED_WITHIN_S, 0.1 * leg.holdS);

/** Run time at which the slope after the departure, run back, meets the target; in a silence, when it was expected. */
function departure(
  grid: Grid,
  regression: Regression,
  leg: Leg,
  direction: number,
  crossed: number,
  arrivedS: number,
  expectedEndS: number,
): number {
  const crossedS = timeAt(grid, crossed);
  const ahead = Math.min(lastIndex(grid), crossed + Math.round(180 / grid.stepS));
  const slope = direction * regression.slopeCPerH(crossed - Math.round(30 / grid.stepS), ahead);
  const overC = direction * (grid.value[crossed]! - leg.toC);
  const backS = slope > 5 ? Math.min(1800, (overC / slope) * 3600) : 0;
  const leftS = Math.max(arrivedS, crossedS - backS);
  const unseen = [crossed, indexAt(grid, leftS)].find((i) => grid.known[i] === 0);
  return unseen === undefined ? leftS : withinSilence(grid, unseen, Math.max(arrivedS, expectedEndS));
}

/** The time nearest to `atS` in the stretch of unknown nodes about one of them. */
function withinSilence(grid: Grid, node: number, atS: number): number {
  let from = node;
  let to = node;
  while (from > 0 && grid.known[from - 1] === 0) from--;
  while (to < lastIndex(grid) && grid.known[to + 1] === 0) to++;
  return Math.max(timeAt(grid, from), Math.min(timeAt(grid, to), atS));
}

function isNextRamp(regression: Regression, next: Leg | null, crossed: number, grid: Grid): boolean {
  if (!next || next.rateCPerH === null) return true;
  const slope = next.direction * regression.slopeCPerH(crossed, crossed + Math.round(300 / grid.stepS));
  return slope > 0.6 * next.rateCPerH && slope < 1.6 * next.rateCPerH;
}

/** Whether the curve stays about the hold from node `from` on. */
function settles(grid: Grid, leg: Leg, from: number, expectedEndS: number): boolean {
  const fromS = timeAt(grid, from);
  // A hold that is still due may end while the curve settles; one that was over has to be seen to go on.
  const dueS = expectedEndS > fromS ? Math.max(expectedEndS, fromS + EXPECTED_WITHIN_S) : fromS + SETTLED_S;
  const untilS = Math.min(fromS + SETTLED_S, dueS);
  const to = Math.min(lastIndex(grid), indexAt(grid, untilS));
  for (let i = from; i <= to; i++) if (Math.abs(grid.value[i]! - leg.toC) > 2 * leg.bandC) return false;
  return true;
}

/** Node at which a curve that has gone far comes back to the hold and stays; null if it went for good. */
function comesBack(
  grid: Grid,
  leg: Leg,
  direction: number,
  from: number,
  returnsLaterS: number,
): number | null {
  // Upwards every later cooling passes the level again; downwards only a recovery does.
  if (direction > 0) return null;
  const untilS = Math.min(returnsLaterS, timeAt(grid, from) + BACK_WITHIN_S);
  const to = indexAt(grid, untilS);
  const heldNodes = Math.round(300 / grid.stepS);
  let held = 0;
  for (let i = from; i <= to; i++) {
    held = Math.abs(grid.value[i]! - leg.toC) <= leg.bandC ? held + 1 : 0;
    if (held >= heldNodes) return i - held + 1;
  }
  return null;
}
