import type { Body } from './body';
import { WATER_EVAPORATION_J_PER_KG } from './constants';
import { GrowingSeries } from './growing-series';
import { heatWorkOfStepH } from './heat-work';
import type { PatternState } from './pattern-burnout';
import type { MouldModel } from './resolve';
import type { MouldTrace } from './simulation';

/** Follows one line of moulds through the firing: its temperatures, water, pattern and heat work. */
export class MouldRecorder {
  readonly model: MouldModel;
  readonly #pattern: PatternState | null;
  readonly #surfaceC = new GrowingSeries();
  readonly #coreC = new GrowingSeries();
  readonly #waterKg = new GrowingSeries();
  readonly #patternLeftShare = new GrowingSeries();
  readonly #gasGPerMin = new GrowingSeries();
  readonly #gradientKPerM = new GrowingSeries();
  readonly #maxRateCPerH = new GrowingSeries();
  readonly #heatWorkH = new GrowingSeries();
  #heatWorkSumH = 0;

  /** @param pattern its pattern as `PatternFire` burns it; null: none */
  constructor(model: MouldModel, pattern: PatternState | null) {
    this.model = model;
    this.#pattern = pattern;
    this.#record(0, 0);
  }

  /** Core before the step, °C: what the last record holds. */
  #lastCoreC = 0;

  /**
   * Records the moment after a step that the body has just taken.
   *
   * @param gasKg what the pattern of one mould gave off in it
   */
  step(stepS: number, gasKg: number): void {
    const { body, heatWork } = this.model;
    if (heatWork !== null) {
      const toC = body.tempC[body.nodes - 1] ?? 0;
      this.#heatWorkSumH += heatWorkOfStepH(heatWork, this.#lastCoreC, toC, stepS);
    }
    this.#record((gasKg * 1000 * 60) / stepS, fastestCPerH(body));
  }

  #record(gasGPerMin: number, maxRateCPerH: number): void {
    const { body } = this.model;
    this.#lastCoreC = body.tempC[body.nodes - 1] ?? 0;
    this.#surfaceC.push(body.tempC[0] ?? 0);
    this.#coreC.push(this.#lastCoreC);
    this.#waterKg.push(waterKgOf(body));
    this.#patternLeftShare.push(this.#pattern === null ? 0 : this.#pattern.leftShare);
    this.#gasGPerMin.push(gasGPerMin);
    this.#gradientKPerM.push(steepestKPerM(body));
    this.#maxRateCPerH.push(maxRateCPerH);
    this.#heatWorkH.push(this.#heatWorkSumH);
  }

  trace(): MouldTrace {
    return {
      index: this.model.index,
      count: this.model.count,
      surfaceC: this.#surfaceC.toArray(),
      coreC: this.#coreC.toArray(),
      waterKg: this.#waterKg.toArray(),
      patternLeftShare: this.#patternLeftShare.toArray(),
      gasGPerMin: this.#gasGPerMin.toArray(),
      gradientKPerM: this.#gradientKPerM.toArray(),
      maxRateCPerH: this.#maxRateCPerH.toArray(),
      heatWorkH: this.#heatWorkH.toArray(),
    };
  }
}

/** Free water left in one body, kg. */
export function waterKgOf(body: Body): number {
  if (!body.wet) return 0;
  let latentJ = 0;
  for (let i = 0; i < body.nodes; i++) latentJ += body.latentJ[i]!;
  return latentJ / WATER_EVAPORATION_J_PER_KG;
}

function steepestKPerM(body: Body): number {
  const { tempC, nodes } = body;
  const depthM = body.grid.depthM;
  let most = 0;
  for (let i = 1; i < nodes; i++) {
    const slope = Math.abs(tempC[i]! - tempC[i - 1]!) / (depthM[i]! - depthM[i - 1]!);
    if (slope > most) most = slope;
  }
  return most;
}

function fastestCPerH(body: Body): number {
  let most = 0;
  for (let i = 0; i < body.nodes; i++) {
    const rate = body.rateCPerS[i]!;
    if (Math.abs(rate) > Math.abs(most)) most = rate;
  }
  return most * 3600;
}
