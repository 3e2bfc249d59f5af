import { indexAt, lastIndex, timeAt, type Grid } from './grid';
import { plannedCurve, readerOf, type Leg } from './plan';
import { centredSlopes } from './regress';

/** Deviations beyond these count no further: the fit is to what agrees, not to what went wrong. */
const FAR_C = 50;
const FAR_C_PER_H = 150;
const COARSE_NODES = 500;

/**
 * Where the whole plan lies best over the log, for logs that do not show the first ramp. Coarse: every lag is given the
 * mean agreement of rates and of temperatures, each cut off where it is far. Refined: the temperature alone, about the best
 * lag, weighted towards the beginning, because lateness later in the run says nothing about its start.
 * @returns seconds from the first sample to the run's start, and the agreement there, 0-1
 */
export function startByWholePlan(grid: Grid, legs: readonly Leg[]): { startS: number; agreement: number } {
  const plan = plannedCurve(legs);
  const planS = plan.timeS[plan.timeS.length - 1]!;
  const stepS = Math.max(120, planS / COARSE_NODES);
  const nodes = Math.floor(planS / stepS) + 1;
  const planC = new Float64Array(nodes);
  const planRate = new Float64Array(nodes).fill(Number.NaN);
  const read = readerOf(plan);
  for (let k = 0; k < nodes; k++) planC[k] = read(k * stepS);
  for (let k = 1; k < nodes - 1; k++) planRate[k] = ((planC[k + 1]! - planC[k - 1]!) / (2 * stepS)) * 3600;
  const slopes = centredSlopes(grid, 2 * stepS);
  const logS = timeAt(grid, lastIndex(grid)) - grid.originS;
  let best = { startS: 0, agreement: -1 };
  const score = (startS: number, ratesToo: boolean) => {
    let sum = 0;
    let weights = 0;
    for (let k = 0; k < nodes; k++) {
      const atS = startS + k * stepS;
      const weight = ratesToo ? 1 : Math.exp((-3 * k) / nodes);
      weights += weight;
      if (atS < 0 || atS > logS) continue;
      const i = indexAt(grid, grid.originS + atS);
      if (!grid.known[i]) continue;
      const offC = Math.min(1, Math.abs(grid.value[i]! - planC[k]!) / FAR_C);
      const offRate = Math.min(1, Math.abs(slopes[i]! - planRate[k]!) / FAR_C_PER_H);
      sum += weight * (ratesToo && offRate === offRate ? 1 - (offC + offRate) / 2 : 1 - offC);
    }
    return sum / weights;
  };
  for (let startS = -planS; startS <= logS; startS += stepS) {
    const agreement = score(startS, true);
    if (agreement > best.agreement) best = { startS, agreement };
  }
  const coarseS = best.startS;
  let fine = { startS: coarseS, agreement: -1 };
  for (let startS = coarseS - 4 * stepS; startS <= coarseS + 4 * stepS; startS += Math.min(30, stepS / 4)) {
    const agreement = score(startS, false);
    if (agreement > fine.agreement) fine = { startS, agreement };
  }
  return { startS: fine.startS, agreement: best.agreement };
}
