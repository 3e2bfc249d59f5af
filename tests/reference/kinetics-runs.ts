import reference from '../../fixtures/references/kinetics.json' with { type: 'json' };
import {
  foreseePattern,
  type PatternProperties,
  patternState,
  settlePattern,
} from '~/lib/thermal/pattern-burnout';

/** One step, first-order unless said, all of it gas. */
export interface OneStep {
  readonly activationKJPerMol: number;
  readonly preExponentialPerS: number;
  readonly model?: PatternProperties['steps'][number]['model'];
}

/** The solver's steps: it keeps each to a few kelvin where things change. */
const STEP_C = 2;
const STEP_S = 60;

const patternOf = ({ activationKJPerMol, preExponentialPerS, model }: OneStep): PatternProperties => ({
  massKg: 1,
  flowsC: null,
  drainedShare: 0,
  drainTimeS: 0,
  ashShare: 0,
  heatOfCombustionJPerKg: 0,
  airKgPerKg: 0,
  charAir: null,
  lagS: 0,
  steps: [
    {
      massShare: 1,
      activationJPerMol: activationKJPerMol * 1000,
      preExponentialPerS,
      model: model ?? 'first-order',
      follows: null,
      needsAir: false,
    },
  ],
});

/** Share left at the moments asked for, of a curve given by its corners, straight between them. */
export function shareLeftAt(
  step: OneStep,
  corners: readonly (readonly [timeS: number, tempC: number])[],
  momentsS: readonly number[],
): number[] {
  const state = patternState(patternOf(step));
  const found: number[] = [];
  let atS = corners[0]?.[0] ?? 0;
  let at = 1;
  for (const momentS of [...momentsS].sort((a, b) => a - b)) {
    while (atS < momentS - 1e-9) {
      while ((corners[at]?.[0] ?? Infinity) <= atS + 1e-9) at += 1;
      const [fromS, fromC] = corners[at - 1] ?? [0, 20];
      const [toS, toC] = corners[at] ?? [Infinity, fromC];
      const slope = (toC - fromC) / (toS - fromS);
      const mostS = Math.abs(slope) > 1e-9 ? STEP_C / Math.abs(slope) : STEP_S;
      const stepS = Math.min(mostS, momentS - atS, toS - atS);
      const nowC = fromC + slope * (atS - fromS);
      foreseePattern(state, nowC, nowC + slope * stepS, stepS, false, 1);
      settlePattern(state);
      atS += stepS;
    }
    found.push(state.leftShare);
  }
  return found;
}

/** Share left along a linear ramp at the temperatures asked for. */
export function rampLeft(
  step: OneStep,
  startC: number,
  rateKPerMin: number,
  tempsC: readonly number[],
): number[] {
  const timeS = (tempC: number): number => ((tempC - startC) / rateKPerMin) * 60;
  const endC = Math.max(...tempsC) + 1;
  return shareLeftAt(step, [[0, startC], [timeS(endC), endC]], tempsC.map(timeS)); // prettier-ignore
}

/** Temperature at which a ramp loses mass fastest, °C: the middle of the steepest 0.2 K. */
export function peakC(step: OneStep, startC: number, rateKPerMin: number, aroundC: number): number {
  const tempsC = Array.from({ length: 601 }, (_, i) => aroundC - 60 + i * 0.2);
  const left = rampLeft(step, startC, rateKPerMin, tempsC);
  let best = 1;
  for (let i = 1; i < left.length; i += 1) {
    const lost = (left[i - 1] ?? 0) - (left[i] ?? 0);
    if (lost > (left[best - 1] ?? 0) - (left[best] ?? 0)) best = i;
  }
  return (tempsC[best] ?? NaN) - 0.1;
}

/** Largest error of a ramp of a system against the exact table, over its tolerance. */
export function rampRun(system: string, rateKPerMin: number, energyFactor = 1): number {
  const of = reference.systems.find(({ id }) => id === system);
  const run = of?.runs.find((each) => each.rateKPerMin === rateKPerMin);
  if (of === undefined || run === undefined) throw new RangeError(`${system} at ${rateKPerMin}`);
  const step = { ...of, activationKJPerMol: of.activationKJPerMol * energyFactor };
  const rows = run.table as [number, number][];
  const left = rampLeft(step, of.startC, rateKPerMin, rows.map(([tempC]) => tempC)); // prettier-ignore
  const worst = Math.max(...rows.map(([, gone], i) => Math.abs(1 - (left[i] ?? NaN) - gone)));
  return worst / reference.tolerance;
}

/** The same of the ramp with holds. */
export function holdsRun(system: string, energyFactor = 1): number {
  const of = reference.systems.find(({ id }) => id === system);
  const result = reference.rampHoldRamp.results.find((each) => each.system === system);
  if (of === undefined || result === undefined) throw new RangeError(system);
  let [atS, atC] = [0, reference.rampHoldRamp.startC];
  const corners: [number, number][] = [[atS, atC]];
  for (const part of reference.rampHoldRamp.schedule) {
    if (part.type === 'hold') atS += (part.min ?? 0) * 60;
    else {
      atS += (Math.abs((part.to_C ?? 0) - atC) / (part.rate_K_min ?? 1)) * 60;
      atC = part.to_C ?? atC;
    }
    corners.push([atS, atC]);
  }
  const rows = result.table as [number, number, number][];
  const step = { ...of, activationKJPerMol: of.activationKJPerMol * energyFactor };
  const left = shareLeftAt(step, corners, rows.map(([timeS]) => timeS)); // prettier-ignore
  return (
    Math.max(...rows.map(([, , gone], i) => Math.abs(1 - (left[i] ?? NaN) - gone))) / reference.tolerance
  );
}
