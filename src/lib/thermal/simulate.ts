import type { Profile, Segment } from '../profile/schema';
import { J_PER_KWH } from './constants';
import { GrowingSeries } from './growing-series';
import type { KilnPlate } from './kiln-schema';
import type { Load } from './load-schema';
import { DEFAULT_STEPS, March, type StepSettings, type Watch } from './march';
import { MouldRecorder } from './mould-recorder';
import { PatternFire } from './pattern-fire';
import { plannedMoments, plannedSeries } from './planned-moments';
import { programmerOf } from './programmer';
import { type FiringModel, firingModelOf } from './resolve';
import type { SegmentMoments, Simulation } from './simulation';
import { energySplit, heatSnapshot } from './stored-heat';

/** What a firing is computed from. */
export interface FiringInput {
  profile: Profile;
  kiln: KilnPlate;
  load: Load;
  ambientC: number;
}

/** Lag above which the kiln is said not to follow, K. */
const FOLLOWS_WITHIN_C = 2;
/** How long after its end a firing is followed to find when the kiln may be opened, s. */
const COOLING_HORIZON_S = 7 * 24 * 3600;

/** Records a firing as the march takes it: the curves, the segments and what the pattern does meanwhile. */
class FiringRecorder implements Watch {
  readonly model: FiringModel;
  readonly segments: SegmentMoments[] = [];
  readonly moulds: MouldRecorder[];
  readonly timeS = new GrowingSeries();
  readonly chamberC = new GrowingSeries();
  readonly thermocoupleC = new GrowingSeries();
  readonly powerKW = new GrowingSeries();
  readonly energyKWh = new GrowingSeries();
  readonly patternHeatKW = new GrowingSeries();
  readonly airNeededKgPerS = new GrowingSeries();
  readonly airInKgPerS = new GrowingSeries();
  readonly liningKW = new GrowingSeries();
  readonly segmentIndex = new GrowingSeries();
  readonly #fire: PatternFire;
  readonly #kiln: KilnPlate;
  #readingC: number;
  #lastC: number;
  #lastInputJ = 0;
  #segmentInputJ = 0;
  #openUntilS = -Infinity;
  #opening: Segment | null = null;
  readonly #opens = new Set<number>();

  constructor(model: FiringModel, kiln: KilnPlate) {
    this.model = model;
    this.#kiln = kiln;
    this.#fire = new PatternFire(model);
    this.moulds = model.moulds.map((mould, i) => new MouldRecorder(mould, this.#fire.patternOf(i)));
    this.#lastC = model.chamber.tempC;
    this.#readingC = this.#lastC + kiln.thermocoupleOffsetC;
    this.#record(0, 0, 0, 0);
  }

  segmentBegins(index: number, segment: Segment, atS: number): void {
    this.#fire.beginSegment(segment.vent === 'open', segment.drain);
    this.#close();
    this.#opening = segment.openedS === undefined ? null : segment;
    if (this.#opening) this.#opens.add(index);
    this.#segmentInputJ = this.model.chamber.booked.inputJ;
    this.segments[index] = {
      plannedStartS: 0,
      plannedRampEndS: 0,
      plannedEndS: 0,
      startS: atS,
      rampEndS: atS,
      endS: atS,
      arrived: false,
      energyKWh: 0,
      kilnLimited: false,
      largestLagC: 0,
    };
  }

  rampEnds(index: number, atS: number): void {
    const moments = this.segments[index];
    if (moments) moments.plannedRampEndS = atS - moments.startS;
  }

  arrives(index: number, atS: number): void {
    const moments = this.segments[index];
    if (!moments || moments.arrived) return;
    moments.arrived = true;
    moments.rampEndS = atS;
    this.#open(atS);
  }

  /** The kiln is opened once it has come to the target. */
  #open(atS: number): void {
    const segment = this.#opening;
    if (segment?.openedS === undefined) return;
    const { innerWidthM, innerHeightM } = this.#kiln;
    this.model.chamber.openM2 = innerWidthM * innerHeightM * (segment.openedShare ?? 1);
    this.#openUntilS = atS + segment.openedS;
    this.#opening = null;
  }

  #close(): void {
    this.model.chamber.openM2 = 0;
    this.#openUntilS = -Infinity;
  }

  changesInS(atS: number): number {
    return this.#openUntilS > atS ? this.#openUntilS - atS : Infinity;
  }

  segmentEnds(index: number, atS: number): void {
    const moments = this.segments[index];
    if (!moments) return;
    moments.endS = atS;
    if (!moments.arrived) moments.rampEndS = atS;
    moments.energyKWh = (this.model.chamber.booked.inputJ - this.#segmentInputJ) / J_PER_KWH;
  }

  beforeStep(stepS: number): void {
    this.#fire.beforeStep(stepS);
  }

  stepTaken(index: number, atS: number, stepS: number, lagC: number | null): void {
    const moments = this.segments[index];
    if (atS >= this.#openUntilS - 1e-6) this.#close();
    // What an opening takes is no fault of the kiln's power.
    if (moments && lagC !== null && !(moments.arrived && this.#opens.has(index))) {
      moments.largestLagC = Math.max(moments.largestLagC, Math.abs(lagC));
      moments.kilnLimited = moments.largestLagC > FOLLOWS_WITHIN_C;
    }
    const heatKW = this.model.chamber.sourceW / 1000;
    this.#fire.afterStep(stepS);
    for (let i = 0; i < this.moulds.length; i++) this.moulds[i]?.step(stepS, this.#fire.gasKgOf(i));
    this.#record(atS, stepS, index, heatKW);
  }

  #record(atS: number, stepS: number, index: number, patternHeatKW: number): void {
    const { tempC, booked } = this.model.chamber;
    this.#readingC = this.#readAfter(stepS, tempC);
    this.timeS.push(atS);
    this.chamberC.push(tempC);
    this.thermocoupleC.push(this.#readingC);
    this.powerKW.push(stepS > 0 ? (booked.inputJ - this.#lastInputJ) / stepS / 1000 : 0);
    this.energyKWh.push(booked.inputJ / J_PER_KWH);
    this.patternHeatKW.push(patternHeatKW);
    this.airNeededKgPerS.push(this.#fire.airNeededKgPerS);
    this.airInKgPerS.push(this.#fire.airInKgPerS);
    this.liningKW.push(stepS > 0 ? liningW(this.model) / 1000 : 0);
    this.segmentIndex.push(index);
    this.#lastC = tempC;
    this.#lastInputJ = booked.inputJ;
  }

  /** First-order lag behind a chamber that moves straight over the step, exactly: τ·R′ = T + offset − R. */
  #readAfter(stepS: number, tempC: number): number {
    const { thermocoupleLagS: lagS, thermocoupleOffsetC: offsetC } = this.#kiln;
    if (lagS <= 0 || stepS <= 0) return tempC + offsetC;
    const slope = (tempC - this.#lastC) / stepS;
    const behindC = this.#readingC - (this.#lastC + offsetC) + slope * lagS;
    return tempC + offsetC - slope * lagS + behindC * Math.exp(-stepS / lagS);
  }
}

/** Heat that the lining takes in at the end of the step last taken, W; its hot-face skin belongs to the chamber. */
const liningW = ({ lining, chamber }: FiringModel): number =>
  lining.slopeWPerK * chamber.trial.stageTwoC - lining.offsetW;

/**
 * Fires a load in a kiln by a profile, under ideal control within the kiln's power.
 *
 * @param input a valid profile, a kiln's plate, its load and the room's temperature (°C)
 * @param steps how finely time is taken; the default keeps each step within 1 K of what the step before foresaw
 * @throws RangeError where the materials table lacks a material that is named
 * @throws FiringTooStiff for a kiln and a load so far from any real one that it would take too long
 */
export function simulate(input: FiringInput, steps: StepSettings = DEFAULT_STEPS): Simulation {
  const { profile, kiln, load, ambientC } = input;
  const model = firingModelOf({ kiln, load, ambientC, startC: profile.startC });
  const start = heatSnapshot(model.chamber);
  const recorder = new FiringRecorder(model, kiln);
  const programmer = programmerOf(profile, kiln.waitBandC);
  const march = new March(model.chamber, programmer, kiln.thermocoupleOffsetC, recorder, steps);
  march.run();
  const energy = energySplit(model, start);
  const predictedS = march.atS;
  const segments = plannedMoments(profile, recorder.segments);
  const timeS = recorder.timeS.toArray();
  const chamberC = recorder.chamberC.toArray();
  return {
    ...input,
    timeS,
    plannedC: plannedSeries(profile, segments, timeS),
    chamberC,
    thermocoupleC: recorder.thermocoupleC.toArray(),
    powerKW: recorder.powerKW.toArray(),
    energyKWh: recorder.energyKWh.toArray(),
    fullPowerKW: model.kiln.fullInputW / 1000,
    patternHeatKW: recorder.patternHeatKW.toArray(),
    airNeededKgPerS: recorder.airNeededKgPerS.toArray(),
    airInKgPerS: recorder.airInKgPerS.toArray(),
    liningKW: recorder.liningKW.toArray(),
    segmentAt: Uint8Array.from(recorder.segmentIndex.toArray()),
    moulds: recorder.moulds.map((mould) => mould.trace()),
    segments,
    plannedS: segments.at(-1)?.plannedEndS ?? 0,
    predictedS,
    openableS: openableS(march, kiln.openAtC, timeS, chamberC),
    energy,
    steps: march.steps,
  };
}

/** When the chamber comes down to the opening temperature for good: within the firing, or cooling on after it. */
function openableS(
  march: March,
  openAtC: number,
  timeS: Float64Array,
  chamberC: Float64Array,
): number | null {
  const last = chamberC.length - 1;
  if ((chamberC[last] ?? Infinity) > openAtC) {
    march.chamber.sourceW = 0;
    return march.coolTo(openAtC, COOLING_HORIZON_S);
  }
  for (let i = last; i > 0; i--) {
    const beforeC = chamberC[i - 1] ?? 0;
    const afterC = chamberC[i] ?? 0;
    if (beforeC <= openAtC) continue;
    const fromS = timeS[i - 1] ?? 0;
    return fromS + (((timeS[i] ?? 0) - fromS) * (beforeC - openAtC)) / (beforeC - afterC);
  }
  return 0;
}
