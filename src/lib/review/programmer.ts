import { indexAt, lastIndex, timeAt, type Grid } from './grid';
import type { Leg } from './plan';

/** What a programmer must have done with one leg, as far as the measured curve tells. */
export interface ProgrammerLeg {
  /** When its setpoint reached the target. */
  readonly rampEndS: number;
  /** When it would have gone on to the next leg by itself. */
  readonly endS: number;
}

/**
 * Follows a programmer through one leg along the measured curve.
 * One that waits stops its clock while the kiln is more than its band behind: below a rising setpoint, above a falling one,
 * below a held one. One that runs by the clock does not. Where the kiln is far ahead of the setpoint a person has pushed
 * the ramp on, and the setpoint is taken along. `coast` and `flat-out` have no setpoint: they end where the kiln arrives.
 * @param setpoint written for the nodes of the leg, °C, where given
 */
export function followProgrammer(
  grid: Grid,
  leg: Leg,
  beginS: number,
  waitBandC: number | null,
  setpoint?: Float64Array,
): ProgrammerLeg {
  const ramp =
    leg.rateCPerH === null ? freeRamp(grid, leg, beginS) : ruledRamp(grid, leg, beginS, waitBandC, setpoint);
  if (waitBandC === null) {
    paint(grid, leg, ramp, ramp + leg.holdS, setpoint);
    return { rampEndS: ramp, endS: ramp + leg.holdS };
  }
  let heldS = 0;
  let i = indexAt(grid, ramp);
  // The last node is counted to its time, the rest of the hold is taken to go as planned.
  for (; i < lastIndex(grid) && heldS < leg.holdS; i++) {
    if (grid.value[i]! >= leg.toC - waitBandC || !grid.known[i]) heldS += grid.stepS;
  }
  const endS = Math.max(ramp, Math.max(ramp, timeAt(grid, i)) + leg.holdS - heldS);
  paint(grid, leg, ramp, endS, setpoint);
  return { rampEndS: ramp, endS };
}

/** How many bands ahead of its setpoint a kiln is before a person must have had a hand in it. */
const PUSHED_BANDS = 2;

function ruledRamp(
  grid: Grid,
  leg: Leg,
  beginS: number,
  waitBandC: number | null,
  setpoint?: Float64Array,
): number {
  const { direction } = leg;
  const deltaC = Math.abs(leg.toC - leg.fromC);
  const rateCPerS = (leg.rateCPerH ?? 1) / 3600;
  if (direction === 0) return beginS;
  let doneC = 0;
  let atS = beginS;
  for (let i = indexAt(grid, beginS); i < lastIndex(grid) && doneC < deltaC; i++) {
    if (setpoint) setpoint[i] = leg.fromC + direction * doneC;
    const risenC = direction * (grid.value[i]! - leg.fromC);
    const behind = waitBandC !== null && grid.known[i] === 1 && doneC - risenC > waitBandC;
    const stepS = timeAt(grid, i + 1) - atS;
    if (!behind) {
      const neededS = (deltaC - doneC) / rateCPerS;
      if (neededS <= stepS) return atS + neededS;
      doneC += rateCPerS * stepS;
    }
    if (waitBandC !== null && risenC - doneC > PUSHED_BANDS * leg.bandC && risenC < deltaC * 2) {
      doneC = Math.min(deltaC, risenC);
    }
    atS += stepS;
  }
  return atS + (deltaC - doneC) / rateCPerS;
}

/** Arrival of a leg without a rate, or the end it would have if the log stops before. */
function freeRamp(grid: Grid, leg: Leg, beginS: number): number {
  for (let i = indexAt(grid, beginS); i <= lastIndex(grid); i++) {
    if (leg.direction * (grid.value[i]! - leg.toC) >= 0) return Math.max(beginS, timeAt(grid, i));
  }
  return Math.max(timeAt(grid, lastIndex(grid)), beginS + (leg.rampS ?? 0));
}

function paint(grid: Grid, leg: Leg, fromS: number, toS: number, setpoint?: Float64Array): void {
  if (setpoint) setpoint.fill(leg.toC, indexAt(grid, fromS), indexAt(grid, toS) + 1);
}
