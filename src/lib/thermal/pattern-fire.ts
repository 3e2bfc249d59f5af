import type { FiringModel } from './resolve';

/** Time over which heat still owed by the burning pattern is given to the chamber, s. */
const CATCH_UP_S = 300;

/**
 * The burning of the patterns' gas inside the chamber. Gas burns as far as there is air for it; what there is comes in
 * by leaks, the vent and the burner's excess. Heat of a step warms the chamber over the next one, and what was over- or underpaid is made up.
 */
export class PatternFire {
  readonly #model: FiringModel;
  #airShare = 1;
  #owedJ = 0;
  #lastInputJ = 0;

  constructor(model: FiringModel) {
    this.#model = model;
    this.setVent(false);
  }

  setVent(open: boolean): void {
    const { kiln, chamber } = this.#model;
    chamber.airKgPerS = open ? kiln.ventKgPerS : kiln.leakKgPerS;
  }

  /**
   * Burns what the step gave off and sets the heat source of the next.
   *
   * @param gasOf takes the pattern of a mould through the step and gives its gas, kg
   */
  afterStep(stepS: number, gasOf: (mould: number, airShare: number) => number): void {
    const { chamber, kiln, moulds } = this.#model;
    this.#owedJ -= chamber.sourceW * stepS;
    let heatJ = 0;
    let neededKg = 0;
    for (let i = 0; i < moulds.length; i++) {
      const mould = moulds[i];
      const gasKg = gasOf(i, this.#airShare);
      if (!mould?.pattern || gasKg === 0) continue;
      heatJ += gasKg * mould.count * mould.pattern.heatOfCombustionJPerKg;
      neededKg += gasKg * mould.count * mould.pattern.airKgPerKg;
    }
    const burnerKg = (chamber.booked.inputJ - this.#lastInputJ) * kiln.excessAirKgPerJ;
    this.#lastInputJ = chamber.booked.inputJ;
    const airKg = chamber.airKgPerS * stepS + burnerKg;
    this.#airShare = neededKg > airKg ? airKg / neededKg : 1;
    const burntJ = heatJ * this.#airShare;
    this.#owedJ += burntJ;
    const sourceW = Math.max(0, burntJ / stepS + (this.#owedJ - burntJ) / CATCH_UP_S);
    chamber.sourceW = sourceW > 1e-3 ? sourceW : 0;
  }
}
