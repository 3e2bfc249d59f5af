import { indexAt, timeAt, type Grid } from './grid';
import { plannedCurve, readerOf, type Leg } from './plan';
import { startByWholePlan } from './plan-fit';
import { startsByFirstRamp, type StartFit } from './ramp-fit';
import type { Alignment, AlignmentRequest } from './types';

/** How far clock and fit may lie apart and still agree: a kiln trails its programmer by so much time or so many °C. */
const CLOCK_AGREES_S = 180;
const CLOCK_AGREES_C = 4;
/** Least share of the first ramp that has to be seen for it to speak for the start. */
const RAMP_SEEN_SHARE = 0.25;

/**
 * Lays the log under the plan. By hand if a person did so; else by the clock where the planned start agrees with what the
 * log shows; else where the first ramp, or failing that the whole plan, fits best.
 * @param grid the control channel, its origin at the first sample
 * @param clockStartS planned start, seconds from the first sample; null if there is none
 */
export function align(
  grid: Grid,
  legs: readonly Leg[],
  request: AlignmentRequest,
  clockStartS: number | null,
  firstMs: number,
  windowS: number,
): Alignment {
  const at = (method: Alignment['method'], startOffsetS: number): Alignment => ({
    method,
    startOffsetS,
    confidence: agreementAt(grid, legs, startOffsetS),
    runStartMs: firstMs + startOffsetS * 1000,
  });
  if (request.method === 'person') return at('person', request.startOffsetS);
  const rate = legs[0]?.rateCPerH ?? null;
  const toleranceS = Math.max(CLOCK_AGREES_S, rate === null ? 0 : (CLOCK_AGREES_C / rate) * 3600);
  const byRamp = startsOfFirst(grid, legs, windowS);
  const agrees = (startS: number) => clockStartS !== null && Math.abs(startS - clockStartS) <= toleranceS;
  if (byRamp.some((fit) => agrees(fit.startS) || agrees(fit.startS + hotStartS(grid, legs[0], fit)))) {
    return at('clock', clockStartS ?? 0);
  }
  const first = byRamp[0];
  if (first) return at('fit', first.startS);
  const whole = startByWholePlan(grid, legs);
  const byPlan = at('fit', whole.startS);
  if (clockStartS === null) return byPlan;
  const byClock = at('clock', clockStartS);
  return byClock.confidence >= byPlan.confidence - 0.1 ? byClock : byPlan;
}

function startsOfFirst(grid: Grid, legs: readonly Leg[], windowS: number): StartFit[] {
  const leg = legs[0];
  return leg ? startsByFirstRamp(grid, leg, windowS).filter((fit) => fit.seenShare >= RAMP_SEEN_SHARE) : [];
}

/** A kiln still warm from its last firing joins the ramp late: by so much its programmer may have started later. */
function hotStartS(grid: Grid, leg: Leg | undefined, fit: StartFit): number {
  if (!leg || leg.rateCPerH === null || fit.startS < 0) return 0;
  const warmerC = leg.direction * (grid.value[indexAt(grid, grid.originS + fit.startS)]! - leg.fromC);
  return warmerC > CLOCK_AGREES_C ? (warmerC / leg.rateCPerH) * 3600 : 0;
}

/** How long from its start a run is compared with its plan for confidence: what comes later may be late. */
const COMPARED_LEGS = 2;

/** Share of the plan's first legs (those in the log) on which the log is within 1.5 bands of it. */
function agreementAt(grid: Grid, legs: readonly Leg[], startS: number): number {
  const compared = legs.slice(0, COMPARED_LEGS);
  const plan = plannedCurve(compared);
  const endS = plan.timeS[plan.timeS.length - 1]!;
  const read = readerOf(plan);
  const bandC = 1.5 * (compared[0]?.bandC ?? 10);
  let near = 0;
  let seen = 0;
  for (let i = indexAt(grid, grid.originS + startS); i < grid.value.length; i++) {
    const atS = timeAt(grid, i) - grid.originS - startS;
    if (atS > endS) break;
    if (atS < 0 || !grid.known[i]) continue;
    seen++;
    if (Math.abs(grid.value[i]! - read(atS)) <= bandC) near++;
  }
  const planned = Math.max(1, endS / grid.stepS);
  // Little seen is little known: half of the compared plan in the log is enough for full weight.
  return seen === 0 ? 0 : (near / seen) * Math.min(1, (2 * seen) / planned);
}
