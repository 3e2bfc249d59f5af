import type { Chamber } from './chamber';
import { takeStep, tryHeld, tryPowered } from './chamber-step';
import {
  clockAfterS,
  lengthS,
  nextPhase,
  type Programmer,
  segmentOf,
  setPointC,
  setRateCPerS,
} from './programmer';
import type { Segment } from '../profile/schema';

/** How finely time is taken. */
export interface StepSettings {
  /** Departure from what the last step foresaw that a step aims at, K. */
  toleranceC: number;
  mostS: number;
  /** Every step this long, but for corners and saturation; null: as long as the tolerance allows. */
  fixedS: number | null;
}

export const DEFAULT_STEPS: StepSettings = { toleranceC: 1.5, mostS: 600, fixedS: null };

/** Whether the kiln is on its set point, or at full fire below it, or off above it. */
export type Mode = 'follow' | 'full' | 'off';

/** What the march tells whoever records it. */
export interface Watch {
  segmentBegins(index: number, segment: Segment, atS: number): void;
  /** The chamber reached the segment's target, or the programmer (if it waits) took it as reached. */
  arrives(index: number, atS: number): void;
  rampEnds(index: number, atS: number): void;
  /** Seconds until something outside the programme changes; no step goes past it. */
  changesInS(atS: number): number;
  /** A step is about to be tried: the time to set heat sources. */
  beforeStep(stepS: number): void;
  stepTaken(index: number, atS: number, stepS: number, lagC: number | null): void;
  segmentEnds(index: number, atS: number): void;
}

/** Longest firing computed, s: what is still to come after it is not. */
export const HORIZON_S = 30 * 24 * 3600;
/** Steps that no firing of a real kiln comes near (a month with 64 segments takes 5,000), and steps times bodies. */
const MOST_STEPS = 40_000;
const MOST_BODY_STEPS = 1_000_000;
/** Slower than this where there is no rate to follow, the kiln is taken not to get there: the lowest rate of a profile, K/s. */
const GIVE_UP_C_PER_S = 1 / 3600;
const GIVE_UP_AFTER_S = 30;
/** Steps at which a saturation at the very beginning of a phase is looked for, s. */
const PROBE_S = 0.25;
const LANDED_C = 1e-3;
const ARRIVED_C = 0.01;
const MOST_TRIES = 60;
const MOST_CUTS = 4;
/** Longest step of the cooling after the end, of which only the opening is asked, s. */
const COOLING_MOST_S = 3600;

/** A kiln and a load so far from any real one that their curve cannot be followed in reasonable time. */
export class FiringTooStiff extends RangeError {}

/** The march of one firing: chamber, programmer and clock. */
export class March {
  readonly chamber: Chamber;
  readonly programmer: Programmer;
  readonly settings: StepSettings;
  /** What the thermocouple shows above the chamber, K. */
  readonly offsetC: number;
  readonly watch: Watch;
  atS = 0;
  mode: Mode = 'follow';
  steps = 0;
  #nextS = 1;
  #fresh = true;
  /** The step under way was found to need more than the kiln has, or less than nothing. */
  #saturated = false;
  /** How often it was cut short to end where the kiln saturates. */
  #cuts = 0;
  #endHeatW = 0;
  #mostS: number;
  readonly #mostSteps: number;

  constructor(
    chamber: Chamber,
    programmer: Programmer,
    offsetC: number,
    watch: Watch,
    settings = DEFAULT_STEPS,
  ) {
    this.chamber = chamber;
    this.programmer = programmer;
    this.offsetC = offsetC;
    this.watch = watch;
    this.settings = settings;
    this.#mostS = settings.mostS;
    this.#mostSteps =
      settings.fixedS === null ? Math.min(MOST_STEPS, MOST_BODY_STEPS / chamber.bodies.length) : Infinity;
  }

  /** Runs the programme to its end. */
  run(): void {
    const { programmer, watch } = this;
    do {
      const { index, doing } = programmer;
      const segment = segmentOf(programmer);
      if (doing !== 'hold') watch.segmentBegins(index, segment, this.atS);
      this.#runPhase();
      if (doing === 'hold') watch.segmentEnds(index, this.atS);
      else {
        watch.rampEnds(index, this.atS);
        if (this.#hasArrived(segment)) watch.arrives(index, this.atS);
      }
    } while (nextPhase(programmer));
  }

  /** Lets the kiln cool with heating off until the chamber is at a temperature; null if it is not within the time given. */
  coolTo(tempC: number, withinS: number): number | null {
    const endS = this.atS + withinS;
    this.#beginPhase('off', 0);
    this.#mostS = COOLING_MOST_S;
    while (this.chamber.tempC > tempC && this.atS < endS) {
      const beforeC = this.chamber.tempC;
      const beforeS = this.atS;
      this.#takeUnwatched();
      const { tempC: nowC } = this.chamber;
      if (nowC <= tempC) return beforeS + ((this.atS - beforeS) * (beforeC - tempC)) / (beforeC - nowC);
      if (nowC >= beforeC - 1e-9 && this.#nextS >= this.#mostS) return null;
    }
    return this.chamber.tempC <= tempC ? this.atS : null;
  }

  #takeUnwatched(): void {
    let stepS = this.settings.fixedS ?? this.#nextS;
    for (let tries = 0; tries < MOST_TRIES; tries++) {
      tryPowered(this.chamber, stepS, 0);
      const shorterS = this.#tooBold(stepS);
      if (shorterS === null) break;
      stepS = shorterS;
    }
    this.#accept(this.chamber.trial.stepS);
  }

  get #readingC(): number {
    return this.chamber.tempC + this.offsetC;
  }

  #hasArrived(segment: Segment): boolean {
    const { bandC, gaveUp } = this.programmer;
    if (Math.abs(this.#readingC - segment.toC) <= ARRIVED_C) return true;
    return bandC !== null && !gaveUp;
  }

  #runPhase(): void {
    const { programmer } = this;
    const segment = segmentOf(programmer);
    const { doing } = programmer;
    const gapC = segment.toC - this.#readingC;
    const free = doing === 'flat-out' || doing === 'coast';
    if (free && (Math.abs(gapC) <= ARRIVED_C || (doing === 'coast' && gapC > 0))) return;
    if (free) this.#beginPhase(doing === 'coast' || gapC < 0 ? 'off' : 'full', null);
    else {
      const lagC = setPointC(programmer, 0) - this.#readingC;
      const mode = Math.abs(lagC) <= ARRIVED_C ? 'follow' : lagC > 0 ? 'full' : 'off';
      this.#beginPhase(mode, setRateCPerS(programmer));
    }
    const endS = lengthS(programmer);
    while (programmer.clockS < endS - 1e-6) {
      if (this.atS >= HORIZON_S) programmer.gaveUp = true;
      if (this.atS >= HORIZON_S || (free && (this.mode === 'follow' || programmer.gaveUp))) return;
      this.#step(free, endS);
    }
  }

  /** A corner: rates change at once, so the first steps are short. */
  #beginPhase(mode: Mode, rateCPerS: number | null): void {
    const { toleranceC, mostS } = this.settings;
    this.#mostS = mostS;
    const change = rateCPerS === null ? 0.25 : Math.abs(rateCPerS - this.chamber.rateCPerS);
    this.mode = mode;
    this.#fresh = true;
    this.#nextS = Math.min(30, Math.max(1, (0.5 * toleranceC) / Math.max(change, 1e-6)));
  }

  /** One step of the firing: tried, cut short where something happens within it, and taken. */
  #step(free: boolean, endS: number): void {
    const { programmer, settings } = this;
    const waiting = this.#isWaiting(free);
    const changesInS = this.watch.changesInS(this.atS);
    let stepS = Math.min(settings.fixedS ?? this.#nextS, changesInS);
    if (!free && !waiting) stepS = Math.min(stepS, endS - programmer.clockS);
    this.#saturated = false;
    this.#cuts = 0;
    for (let tries = 0; tries < MOST_TRIES; tries++) {
      this.#try(stepS);
      const shorterS = this.#tooBold(stepS) ?? this.#interrupted(stepS, free, waiting, endS);
      if (shorterS === null) break;
      stepS = shorterS;
    }
    stepS = this.chamber.trial.stepS;
    const landed = this.mode !== 'follow' && !waiting && Math.abs(this.#gapAtEnd(stepS, free)) <= LANDED_C;
    this.#giveUpIfStuck(stepS, free || waiting);
    const nextClockS = free ? 0 : clockAfterS(programmer, stepS, this.chamber.trial.endC + this.offsetC);
    this.#accept(stepS);
    programmer.clockS = endS - nextClockS < 0.01 ? Math.max(nextClockS, endS) : nextClockS;
    const lagC = free ? null : setPointC(programmer, programmer.clockS) - this.#readingC;
    this.watch.stepTaken(programmer.index, this.atS, stepS, lagC);
    // A door that closes is a corner like another.
    if (changesInS - stepS <= 1e-6) this.#beginPhase(this.mode, null);
    if (landed) {
      this.mode = 'follow';
      if (programmer.doing === 'hold') this.watch.arrives(programmer.index, this.atS);
    }
  }

  #try(stepS: number): void {
    const { programmer, chamber, mode } = this;
    this.watch.beforeStep(stepS);
    if (mode === 'follow') {
      tryHeld(chamber, stepS, setPointC(programmer, programmer.clockS + stepS) - this.offsetC);
    } else tryPowered(chamber, stepS, mode === 'full' ? 1 : 0);
  }

  /** A shorter step where this one left too far what was foreseen; null: good enough. */
  #tooBold(stepS: number): number | null {
    const { toleranceC, fixedS } = this.settings;
    const { surpriseC } = this.chamber.trial;
    // The first step after a corner foresees nothing: what it leaves out is of first order, so it must be smaller.
    const mostC = this.#fresh ? toleranceC / 3 : 3 * toleranceC;
    if (fixedS !== null || surpriseC <= mostC || stepS <= PROBE_S) return null;
    return (
      stepS *
      (this.#fresh
        ? Math.max(0.1, (0.8 * mostC) / surpriseC)
        : Math.max(0.2, 0.9 * Math.cbrt(toleranceC / surpriseC)))
    );
  }

  /** A shorter step where the kiln saturates, comes back to its set point or lets the programmer go on; null: nothing happens. */
  #interrupted(stepS: number, free: boolean, waiting: boolean, endS: number): number | null {
    if (this.mode === 'follow') return this.#saturates(stepS);
    const resumesS = waiting ? this.#resumes(stepS, endS) : null;
    if (resumesS !== null) return resumesS;
    const startC = this.#gapNow(free);
    const endC = this.#gapAtEnd(stepS, free);
    const beyondC = this.mode === 'full' ? endC : -endC;
    if (beyondC <= LANDED_C || stepS <= 1e-3) return null;
    const behindC = this.mode === 'full' ? -startC : startC;
    if (behindC <= LANDED_C) {
      // It cannot follow either: full fire and the set point go together here, and full fire it is.
      if (this.#saturated) return null;
      this.mode = 'follow';
      return stepS;
    }
    return stepS * Math.min(0.98, Math.max(0.02, behindC / (behindC + beyondC)));
  }

  /** In follow: the kiln would need more than it has, or less than nothing. */
  #saturates(stepS: number): number | null {
    const { trial, firing, tempC } = this.chamber;
    const fullW = firing.fullHeatW(trial.endC);
    const over = trial.endHeatW - fullW;
    const under = -trial.endHeatW;
    // Needed on the mean but no longer at the end: saturated from the step's beginning on.
    const meanOver = trial.meanHeatW - firing.fullHeatW((tempC + trial.endC) / 2);
    const from = Math.max(meanOver, -trial.meanHeatW) > 1e-9 * fullW;
    const within = over <= 1e-9 * fullW && under <= 1e-9 * fullW;
    if (within && !from) return null;
    if (this.#fresh && stepS > PROBE_S) return PROBE_S;
    const roomW = Math.abs((over > 0 ? fullW : 0) - this.#endHeatW);
    if (within || this.#fresh || stepS <= PROBE_S || roomW <= 1e-4 * fullW) {
      this.mode = Math.max(over, meanOver) > 0 ? 'full' : 'off';
      this.#saturated = true;
      return stepS;
    }
    // A need that jumped since the last step (a pattern's heat, a vent) is not found by cutting the step ever shorter.
    if (++this.#cuts > MOST_CUTS) return PROBE_S;
    return stepS * Math.min(0.95, Math.max(0.02, roomW / (roomW + Math.max(over, under))));
  }

  /** While the programmer waits: the moment at which its clock goes on to the end of the ramp, or runs again in a hold. */
  #resumes(stepS: number, endS: number): number | null {
    const { programmer, chamber } = this;
    const endC = chamber.trial.endC + this.offsetC;
    if (programmer.doing === 'hold') {
      const band = programmer.bandC ?? 0;
      const targetC = segmentOf(programmer).toC;
      const insideC = band - Math.abs(targetC - endC);
      const outsideC = Math.abs(targetC - this.#readingC) - band;
      if (insideC <= LANDED_C || outsideC <= LANDED_C) return null;
      return stepS * Math.max(0.02, outsideC / (outsideC + insideC));
    }
    const onS = clockAfterS(programmer, stepS, endC) - programmer.clockS;
    const leftS = endS - programmer.clockS;
    return onS <= leftS + 1e-3 ? null : stepS * Math.min(0.98, Math.max(0.02, leftS / onS));
  }

  #isWaiting(free: boolean): boolean {
    const { bandC, gaveUp, clockS, doing } = this.programmer;
    if (free || bandC === null || gaveUp || this.mode === 'follow') return false;
    const aheadC = setPointC(this.programmer, clockS) - this.#readingC;
    const lagC = this.mode === 'full' ? aheadC : -aheadC;
    // On a ramp the clock keeps the lag at the very band; in a hold it runs again once the kiln is inside.
    return lagC >= bandC + (doing === 'hold' ? LANDED_C : -LANDED_C);
  }

  /** Chamber above what it makes for, at the beginning of the step and at its end, K. */
  #gapNow(free: boolean): number {
    const { programmer } = this;
    return this.#readingC - (free ? segmentOf(programmer).toC : setPointC(programmer, programmer.clockS));
  }

  #gapAtEnd(stepS: number, free: boolean): number {
    const { programmer, chamber } = this;
    const endC = chamber.trial.endC + this.offsetC;
    if (free) return endC - segmentOf(programmer).toC;
    return endC - setPointC(programmer, clockAfterS(programmer, stepS, endC));
  }

  #giveUpIfStuck(stepS: number, unclocked: boolean): void {
    if (!unclocked || this.mode === 'follow' || stepS < GIVE_UP_AFTER_S) return;
    const { trial, tempC } = this.chamber;
    const towards = ((trial.endC - tempC) / stepS) * (this.mode === 'full' ? 1 : -1);
    if (towards < GIVE_UP_C_PER_S) this.programmer.gaveUp = true;
  }

  #accept(stepS: number): void {
    const { chamber, settings } = this;
    const { surpriseC, endHeatW } = chamber.trial;
    takeStep(chamber, this.#fresh);
    this.atS += stepS;
    this.steps++;
    if (this.steps > this.#mostSteps)
      throw new FiringTooStiff(`not computed: after ${this.steps} steps it is only at ${this.atS} s`);
    this.#fresh = false;
    this.#endHeatW = endHeatW;
    const growth = 0.9 * Math.cbrt(settings.toleranceC / Math.max(surpriseC, 1e-9));
    this.#nextS = Math.min(this.#mostS, stepS * Math.min(2, Math.max(0.3, growth)));
  }
}
