import type { Body } from './body';
import { foreseePattern, type PatternState, patternState, settlePattern } from './pattern-burnout';
import type { FiringModel, MouldModel } from './resolve';

/** Time over which heat that was foreseen wrongly is made up, s. */
const CATCH_UP_S = 300;

/** Time in which the gas of the chamber is renewed: the burner's air outlasts the flame by it (one chamber volume a minute), s. */
const RENEWAL_S = 60;

interface BurningMould {
  readonly count: number;
  readonly body: Body;
  readonly state: PatternState;
  /** Gas of the step last looked at, kg for one mould. */
  gasKg: number;
}

/**
 * The burning of the patterns' gas inside the chamber. Gas burns as far as there is air for it, and that comes in by leaks,
 * the vent and the burner's excess. The heat of a step is foreseen from the rates of the one before; once
 * the step is taken it is worked out from what the cores really did, and the difference is made up over the next minutes.
 */
export class PatternFire {
  readonly #model: FiringModel;
  readonly #moulds: (BurningMould | null)[];
  #draining = false;
  #airShare = 1;
  #owedJ = 0;
  #lastInputJ = 0;
  #burnerAirKgPerS = 0;
  readonly #burning: boolean;

  constructor(model: FiringModel) {
    this.#model = model;
    this.#moulds = model.moulds.map(({ count, body, pattern }: MouldModel) =>
      pattern === null ? null : { count, body, state: patternState(pattern), gasKg: 0 },
    );
    this.#burning = this.#moulds.some((mould) => mould !== null);
    this.beginSegment(false, false);
  }

  patternOf(mould: number): PatternState | null {
    return this.#moulds[mould]?.state ?? null;
  }

  /** Gas that one mould gave off over the step last taken, kg. */
  gasKgOf(mould: number): number {
    return this.#moulds[mould]?.gasKg ?? 0;
  }

  beginSegment(ventOpen: boolean, draining: boolean): void {
    const { kiln, chamber } = this.#model;
    chamber.airKgPerS = ventOpen ? kiln.ventKgPerS : kiln.leakKgPerS;
    this.#draining = draining;
  }

  /** Sets the heat source for a step that is about to be tried. */
  beforeStep(stepS: number): void {
    if (!this.#burning) return;
    const heatJ = this.#lookAhead(stepS, true);
    const { chamber } = this.#model;
    const sourceW = Math.max(0, heatJ / stepS + this.#owedJ / Math.max(CATCH_UP_S, stepS));
    chamber.sourceW = sourceW > 1e-3 ? sourceW : 0;
  }

  /** Takes the patterns through the step that the bodies have just taken. */
  afterStep(stepS: number): void {
    if (!this.#burning) return;
    const { chamber, kiln } = this.#model;
    const heatJ = this.#lookAhead(stepS, false);
    this.#owedJ += heatJ - chamber.sourceW * stepS;
    for (const mould of this.#moulds) if (mould !== null) settlePattern(mould.state);
    const { inputJ } = chamber.booked;
    const nowKgPerS = ((inputJ - this.#lastInputJ) / stepS) * kiln.excessAirKgPerJ;
    this.#burnerAirKgPerS += (nowKgPerS - this.#burnerAirKgPerS) * (1 - Math.exp(-stepS / RENEWAL_S));
    this.#lastInputJ = inputJ;
  }

  /** Heat burnt over a step, J: ahead of it from the cores' last rates, after it from where they came from. */
  #lookAhead(stepS: number, ahead: boolean): number {
    let heatJ = 0;
    let neededKg = 0;
    for (const mould of this.#moulds) {
      if (mould === null) continue;
      const { body, state, count } = mould;
      const nowC = body.tempC[body.nodes - 1]!;
      const changeC = body.rateCPerS[body.nodes - 1]! * stepS;
      const fromC = ahead ? nowC : nowC - changeC;
      mould.gasKg = foreseePattern(state, fromC, fromC + changeC, stepS, this.#draining, this.#airShare);
      heatJ += mould.gasKg * count * state.properties.heatOfCombustionJPerKg;
      neededKg += mould.gasKg * count * state.properties.airKgPerKg;
    }
    const airKg = (this.#model.chamber.airKgPerS + this.#burnerAirKgPerS) * stepS;
    const share = neededKg > airKg ? airKg / neededKg : 1;
    if (!ahead) this.#airShare = share;
    return heatJ * share;
  }
}
