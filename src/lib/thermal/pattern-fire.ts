import type { Body } from './body';
import {
  CHAR_AIR_KG_PER_KG,
  foreseePattern,
  type PatternState,
  patternState,
  settlePattern,
} from './pattern-burnout';
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

/** Heat of burning 1 kg of char, as carbon: 393.5 kJ/mol (CODATA). */
const CHAR_HEAT_J_PER_KG = 393.51e3 / 0.012011;
const LEAST_AIR_SHARE = 0.01;

/**
 * The burning of the patterns' gas inside the chamber. Gas burns as far as there is air for it, and that comes in by leaks,
 * the vent and the burner's excess; char gets what the gas leaves. The heat of a step is foreseen from the rates of the one before; once
 * the step is taken it is worked out from what the cores really did, and the difference is made up over the next minutes.
 */
export class PatternFire {
  readonly #model: FiringModel;
  readonly #moulds: (BurningMould | null)[];
  #draining = false;
  #charAirShare = 1;
  #owedJ = 0;
  #lastInputJ = 0;
  #burnerAirKgPerS = 0;
  #neededKgPerS = 0;
  #airKgPerS = 0;
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

  /** Air that burning all of the last step's gas and char takes, kg/s. */
  get airNeededKgPerS(): number {
    return this.#neededKgPerS;
  }

  /** Air that came in meanwhile, kg/s. */
  get airInKgPerS(): number {
    return this.#airKgPerS;
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
    let gasJ = 0;
    let gasAirKg = 0;
    let charKg = 0;
    let charWantedKg = 0;
    for (const mould of this.#moulds) {
      if (mould === null) continue;
      const { body, state, count } = mould;
      const nowC = body.tempC[body.nodes - 1]!;
      const changeC = body.rateCPerS[body.nodes - 1]! * stepS;
      const fromC = ahead ? nowC : nowC - changeC;
      mould.gasKg = foreseePattern(state, fromC, fromC + changeC, stepS, this.#draining, this.#charAirShare);
      gasJ += state.gasKg * count * state.properties.heatOfCombustionJPerKg;
      gasAirKg += state.gasKg * count * state.properties.airKgPerKg;
      charKg += state.charKg * count;
      charWantedKg += state.charWantedKg * count;
    }
    const airKg = (this.#model.chamber.airKgPerS + this.#burnerAirKgPerS) * stepS;
    if (!ahead) {
      this.#neededKgPerS = (gasAirKg + charWantedKg * CHAR_AIR_KG_PER_KG) / stepS;
      this.#airKgPerS = airKg / stepS;
      this.#charAirShare = shareOfAir(airKg - gasAirKg, charWantedKg * CHAR_AIR_KG_PER_KG);
    }
    return gasJ * (gasAirKg > airKg ? airKg / gasAirKg : 1) + charKg * CHAR_HEAT_J_PER_KG;
  }
}

/** Share of what is asked for that is there, 0.01-1: never nothing, so that the next step can tell what it would want. */
const shareOfAir = (thereKg: number, askedKg: number): number =>
  askedKg > thereKg ? Math.max(LEAST_AIR_SHARE, thereKg / askedKg) : 1;
