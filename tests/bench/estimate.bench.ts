import { estimate } from '~/lib/thermal/estimate';
import { simulate } from '~/lib/thermal/simulate';
import { dayFiring, fortnightFiring } from './firing-cases';

const WARM_UP = 60;

/** Median of wall-clock milliseconds over many runs, after a warm-up. */
function medianMs(work: () => unknown, runs: number): number {
  for (let i = 0; i < WARM_UP; i++) work();
  const times = Array.from({ length: runs }, () => {
    const begin = performance.now();
    work();
    return performance.now() - begin;
  }).sort((a, b) => a - b);
  return times[runs >> 1] ?? NaN;
}

const dayMs = medianMs(() => estimate(dayFiring), 300);
const fortnightMs = medianMs(() => estimate(fortnightFiring), 60);
const day = simulate(dayFiring);
const fortnight = simulate(fortnightFiring);

console.log(
  `estimate, ${(day.predictedS / 3600).toFixed(1)} h, kiln + 4 moulds + patterns: ` +
    `${dayMs.toFixed(2)} ms median, ${day.steps} steps (bar: 8 ms)`,
);
console.log(
  `estimate, ${(fortnight.predictedS / 86400).toFixed(1)} d of the same: ${fortnightMs.toFixed(2)} ms median, ` +
    `${fortnight.steps} steps, ${(fortnightMs / dayMs).toFixed(1)} x the day (bar: 15 x)`,
);
