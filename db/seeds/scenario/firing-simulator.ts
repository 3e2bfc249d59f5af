import type { Profile } from '~/lib/profile/schema';
import { normal, repeatable } from './random';

/** A kiln as five lumps: the makers' plates of the demo kilns, turned into heat capacities and conductances by hand. */
export interface SimulatedKiln {
  readonly fullW: number;
  /** Air, elements and the first millimetres of the hot face. */
  readonly chamberJPerK: number;
  readonly innerLiningJPerK: number;
  readonly outerLiningJPerK: number;
  readonly loadJPerK: number;
  readonly throughLiningWPerK: number;
  readonly toRoomWPerK: number;
  readonly toLoadWPerK: number;
  /** The programmer stops its clock while the kiln is further behind than this; null: it runs by the clock. */
  readonly waitBandC: number | null;
}

export type Fault =
  /** The controller holds too high for a while. */
  | { readonly kind: 'runs-high'; readonly fromS: number; readonly toS: number; readonly byC: number }
  | { readonly kind: 'power-cut'; readonly fromS: number; readonly toS: number }
  | { readonly kind: 'opened'; readonly fromS: number; readonly toS: number }
  | { readonly kind: 'weak-elements'; readonly share: number }
  | { readonly kind: 'spike'; readonly atS: number; readonly byC: number }
  | { readonly kind: 'open-sensor'; readonly fromS: number; readonly toS: number }
  | { readonly kind: 'no-rows'; readonly fromS: number; readonly toS: number }
  | { readonly kind: 'log-stops'; readonly atS: number };

export interface SimulatedRow {
  readonly timeS: number;
  /** Null where the thermocouple was open. */
  readonly chamberC: number | null;
  readonly loadC: number;
  readonly powerShare: number;
}

export interface SimulationSpec {
  readonly profile: Profile;
  readonly kiln: SimulatedKiln;
  readonly faults: readonly Fault[];
  readonly seed: number;
  readonly intervalS: number;
  readonly noiseC: number;
  /** How long the log goes on after the last hold. */
  readonly coolingS: number;
}

const STEP_S = 5;
const ROOM_C = 19;
const SHEATH_LAG_S = 30;
/** The chamber rises by the controller's say: share of full power per kelvin behind, and per kelvin-second. */
const PROPORTIONAL = 0.06;
const INTEGRAL = 0.00008;

/** Fires a profile in a lumped kiln under a proportional-integral programmer, logs it as a noisy sheathed thermocouple would. */
export function simulateFiring(spec: SimulationSpec): SimulatedRow[] {
  const random = repeatable(spec.seed);
  const { kiln, faults } = spec;
  const programmer = new Programmer(spec.profile, kiln.waitBandC);
  const weak = faults.find((fault) => fault.kind === 'weak-elements')?.share ?? 1;
  let [chamberC, innerC, outerC, loadC, sheathC] = [ROOM_C, ROOM_C, ROOM_C, ROOM_C, ROOM_C].map(
    (value) => value + random(),
  ) as [number, number, number, number, number];
  let sum = 0;
  let cooledS = 0;
  const rows: SimulatedRow[] = [];
  for (let timeS = 0; cooledS < spec.coolingS && timeS < 14 * 86400; timeS += STEP_S) {
    const high = active(faults, 'runs-high', timeS);
    const rise = high ? high.byC * Math.sin((Math.PI * (timeS - high.fromS)) / (high.toS - high.fromS)) : 0;
    const setC = programmer.setpoint(sheathC - rise);
    if (setC === null) cooledS += STEP_S;
    const behindC = setC === null ? 0 : setC + rise - sheathC;
    const wanted = PROPORTIONAL * behindC + INTEGRAL * sum;
    const share = setC === null || active(faults, 'power-cut', timeS) ? 0 : Math.min(1, Math.max(0, wanted));
    if (wanted > 0 && wanted < 1) sum += behindC * STEP_S;
    if (setC === null) sum = 0;

    const radiant = 0.3 + 0.7 * ((chamberC + 273) / 1173) ** 3;
    const toInner = kiln.throughLiningWPerK * 4 * radiant * (chamberC - innerC);
    const toLoad = kiln.toLoadWPerK * radiant * (chamberC - loadC);
    const through = kiln.throughLiningWPerK * (innerC - outerC);
    const toRoom = kiln.toRoomWPerK * (outerC - ROOM_C);
    const openLoss = active(faults, 'opened', timeS) ? 0.9 * kiln.fullW + 6 * (chamberC - ROOM_C) : 0;
    chamberC += ((share * kiln.fullW * weak - toInner - toLoad - openLoss) * STEP_S) / kiln.chamberJPerK;
    innerC += ((toInner - through) * STEP_S) / kiln.innerLiningJPerK;
    outerC += ((through - toRoom) * STEP_S) / kiln.outerLiningJPerK;
    loadC += (toLoad * STEP_S) / kiln.loadJPerK;
    sheathC += ((chamberC - sheathC) * STEP_S) / SHEATH_LAG_S;

    if (faults.some((fault) => fault.kind === 'log-stops' && timeS >= fault.atS)) break;
    if (timeS % spec.intervalS !== 0 || active(faults, 'no-rows', timeS)) continue;
    const spike = faults.find(
      (fault) => fault.kind === 'spike' && timeS >= fault.atS && timeS < fault.atS + spec.intervalS,
    );
    const reading = sheathC + spec.noiseC * normal(random) + (spike?.kind === 'spike' ? spike.byC : 0);
    rows.push({
      timeS,
      chamberC: active(faults, 'open-sensor', timeS) ? null : reading,
      loadC: loadC + 0.5 * spec.noiseC * normal(random),
      powerShare: share,
    });
  }
  return rows;
}

type Lasting = Extract<Fault, { fromS: number }>;

function active<K extends Lasting['kind']>(
  faults: readonly Fault[],
  kind: K,
  timeS: number,
): Extract<Lasting, { kind: K }> | undefined {
  return faults.find(
    (fault): fault is Extract<Lasting, { kind: K }> =>
      fault.kind === kind && 'fromS' in fault && timeS >= fault.fromS && timeS < fault.toS,
  );
}

/** Ramps and holds its setpoint as a kiln's programmer does; null once the last hold is over, or while it coasts to a target. */
class Programmer {
  #segment = 0;
  #setC: number;
  #heldS = 0;
  #ramping = true;

  constructor(
    private readonly profile: Profile,
    private readonly waitBandC: number | null,
  ) {
    this.#setC = profile.startC;
  }

  setpoint(measuredC: number): number | null {
    const segment = this.profile.segments[this.#segment];
    if (!segment) return null;
    if (this.#ramping) {
      const down = segment.toC < this.#setC;
      if (segment.rateCPerH === 'coast') {
        if (measuredC > segment.toC) return this.profile.startC - 200;
        this.#arrive(segment.toC);
      } else if (segment.rateCPerH === 'flat-out') {
        this.#setC = segment.toC;
        if (Math.abs(measuredC - segment.toC) < 3) this.#arrive(segment.toC);
      } else {
        const waits = this.waitBandC !== null && Math.abs(this.#setC - measuredC) > this.waitBandC;
        if (!waits) this.#setC += ((down ? -1 : 1) * segment.rateCPerH * STEP_S) / 3600;
        if (down ? this.#setC <= segment.toC : this.#setC >= segment.toC) this.#arrive(segment.toC);
      }
      return this.#setC;
    }
    const waits = this.waitBandC !== null && Math.abs(segment.toC - measuredC) > this.waitBandC;
    if (!waits) this.#heldS += STEP_S;
    if (this.#heldS >= segment.holdS) {
      this.#segment += 1;
      this.#ramping = true;
      this.#heldS = 0;
    }
    return this.#setC;
  }

  #arrive(toC: number): void {
    this.#setC = toC;
    this.#ramping = false;
  }
}
