import type { Profile, Segment } from '~/lib/profile/schema';
import type { ReviewChannel } from '~/lib/review/types';

/**
 * Firings made up for testing the review: a chamber, a three-layer lining and a PI programmer, stepped explicitly, with
 * faults at known moments. It shares no code with the review and knows its faults from having caused them.
 */

export interface Fault {
  readonly kind: string;
  /** Leg that it falls in, and where in its ramp or hold (0-1). */
  readonly leg: number;
  readonly at: number;
  readonly lastsS: number;
  /** Strength, in the unit of its kind: °C, a factor of a rate, a share of a hold or of heating power. */
  readonly by: number;
}

export interface Sampling {
  readonly intervalS: number;
  readonly jitterS: number;
  readonly quantumC: number;
  readonly noiseC: number;
  readonly beforeS: number;
  readonly afterS: number;
}

export interface SimulatedFiring {
  readonly profile: Profile;
  readonly waitBandC: number | null;
  readonly channels: ReviewChannel[];
  readonly runStartMs: number;
  /** When each leg really began, arrived (setpoint at target) and ended, s. */
  readonly legs: { startS: number; rampEndS: number; endS: number }[];
  /** Noiseless sensor reading each `STEP_S` of run time. */
  readonly trueC: Float64Array;
  /** What the faults did, in run time. */
  readonly done: { kind: string; leg: number; startS: number; endS: number }[];
}

export type Random = () => number;

/** A small, well-known generator of uniform numbers (mulberry32), so that a failing seed can be run again. */
export function randomOf(seed: number): Random {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
}

export const between = (random: Random, low: number, high: number) => low + (high - low) * random();
export const pick = <T>(random: Random, from: readonly T[]): T =>
  from[Math.floor(random() * from.length)] as T;
/** A normal number by the method of Box and Muller. */
const normal = (random: Random) => Math.sqrt(-2 * Math.log(1 - random())) * Math.cos(2 * Math.PI * random());

export const STEP_S = 2;

const segment = (
  stage: Segment['stage'],
  toC: number,
  rateCPerH: Segment['rateCPerH'],
  holdS: number,
): Segment => ({
  stage,
  toC,
  rateCPerH,
  holdS,
  attended: false,
  drain: false,
  vent: 'closed',
  instruction: '',
});

/** A profile such as studios fire: two to four climbs, each with a hold, then a casting hold by coast or at a rate. */
export function randomProfile(random: Random): Profile {
  const segments: Segment[] = [];
  const minutes = (low: number, high: number) => Math.round(between(random, low, high) / 5) * 300;
  let atC = 20;
  if (random() < 0.6) {
    atC = Math.round(between(random, 100, 160) / 10) * 10;
    segments.push(segment('drying', atC, Math.round(between(random, 50, 150)), minutes(30, 120)));
  }
  atC = Math.round(between(random, 200, 370) / 10) * 10;
  segments.push(segment('melt-out', atC, Math.round(between(random, 60, 160)), minutes(30, 120)));
  if (random() < 0.5) {
    atC = Math.round(between(random, 500, 730) / 10) * 10;
    segments.push(
      segment('burnout', atC, Math.round(between(random, 80, 220)), random() < 0.2 ? 0 : minutes(30, 180)),
    );
  }
  const topC = Math.round(between(random, Math.max(atC + 100, 700), 950) / 10) * 10;
  segments.push(segment('vitrification', topC, Math.round(between(random, 100, 260)), minutes(45, 150)));
  const castC = topC - Math.round(between(random, 50, 200) / 10) * 10;
  segments.push(
    segment(
      'casting-hold',
      castC,
      random() < 0.5 ? 'coast' : Math.round(between(random, 60, 110)),
      minutes(60, 150),
    ),
  );
  return { startC: 20, segments };
}

export function randomSampling(random: Random): Sampling {
  const intervalS = pick(random, [2, 5, 10, 10, 15, 20, 30, 60]);
  return {
    intervalS,
    jitterS: random() < 0.5 ? 0 : intervalS * 0.1,
    quantumC: pick(random, [0.1, 0.1, 0.5, 1]),
    noiseC: between(random, 0.1, intervalS >= 30 ? 1.2 : 0.8),
    beforeS: random() < 0.4 ? Math.round(between(random, 300, 7200)) : 0,
    afterS: Math.round(between(random, 900, 14_400)),
  };
}

/** State of chamber and lining, °C, and what the programmer has in mind. */
interface Kiln {
  chamberC: number;
  wallC: number[];
  readingC: number;
  integral: number;
}

/** Heat capacities J/K and conductances W/K of a kiln of about 90 litres; the scale makes it larger or smaller. */
const CHAMBER_J_PER_K = 18_000;
const WALL_J_PER_K = [9_000, 22_000, 30_000];
const LINKS_W_PER_K = [38, 9, 7, 6];
const RATED_W = 9_000;
const AMBIENT_C = 20;

function stepKiln(kiln: Kiln, powerW: number, openWPerK: number, lagS: number): void {
  const nodes = [kiln.chamberC, ...kiln.wallC, AMBIENT_C];
  const flows = LINKS_W_PER_K.map((g, i) => g * ((nodes[i] ?? 0) - (nodes[i + 1] ?? 0)));
  kiln.chamberC +=
    ((powerW - (flows[0] ?? 0) - openWPerK * (kiln.chamberC - AMBIENT_C)) / CHAMBER_J_PER_K) * STEP_S;
  kiln.wallC = kiln.wallC.map(
    (c, i) => c + (((flows[i] ?? 0) - (flows[i + 1] ?? 0)) / (WALL_J_PER_K[i] ?? 1)) * STEP_S,
  );
  kiln.readingC += ((kiln.chamberC - kiln.readingC) / lagS) * STEP_S;
}

/** Power that keeps the reading on a setpoint that moves at a rate: feed-forward of the model, and a PI for the rest. */
function controlW(kiln: Kiln, setC: number, rateCPerS: number, lagS: number, limitW: number): number {
  const leadC = setC + rateCPerS * lagS;
  const forwardW =
    CHAMBER_J_PER_K * rateCPerS + (LINKS_W_PER_K[0] ?? 0) * (kiln.chamberC - (kiln.wallC[0] ?? 0));
  const errorC = leadC - kiln.chamberC;
  const wantedW = forwardW + 220 * errorC + kiln.integral;
  const givenW = Math.max(0, Math.min(limitW, wantedW));
  if (givenW === wantedW)
    kiln.integral = Math.max(-2000, Math.min(2000, kiln.integral + 0.4 * errorC * STEP_S));
  return givenW;
}

export interface FiringOptions {
  readonly profile: Profile;
  readonly waitBandC: number | null;
  readonly sampling: Sampling;
  readonly faults: readonly Fault[];
  readonly withPower: boolean;
  readonly random: Random;
}

/** Fires a profile with its faults and logs it. */
export function simulatedFiring(options: FiringOptions): SimulatedFiring {
  const { profile, waitBandC, sampling, faults } = options;
  const lagS = 25;
  const kiln: Kiln = {
    chamberC: AMBIENT_C,
    wallC: [AMBIENT_C, AMBIENT_C, AMBIENT_C],
    readingC: AMBIENT_C,
    integral: 0,
  };
  const trueC: number[] = [];
  const powerW: number[] = [];
  const legs: SimulatedFiring['legs'] = [];
  const done: SimulatedFiring['done'] = [];
  let atS = 0;
  const record = (w: number) => {
    trueC.push(kiln.readingC);
    powerW.push(w);
    atS += STEP_S;
  };
  let fromC = profile.startC;
  profile.segments.forEach((seg, index) => {
    const here = faults.filter((f) => f.leg === index);
    const started = new Map<Fault, number>();
    const direction = Math.sign(seg.toC - fromC);
    const startS = atS;
    let setC = fromC;
    let heldS = 0;
    let ramping = true;
    let rampEndS = atS;
    const longer = here.find((f) => f.kind === 'hold-long');
    const shorter = here.find((f) => f.kind === 'hold-short');
    const holdS = seg.holdS * (longer ? 1 + longer.by : shorter ? 1 - shorter.by : 1);
    if (longer || shorter)
      done.push({ kind: (longer ?? shorter)?.kind ?? '', leg: index, startS: 0, endS: 0 });
    const entry = done[done.length - 1];
    while (ramping || heldS < holdS) {
      if (atS - startS > 5 * 24 * 3600) throw new Error('the simulated kiln never arrives');
      const rampShare = seg.toC === fromC ? 1 : Math.abs(kiln.readingC - fromC) / Math.abs(seg.toC - fromC);
      const active = (kind: string, inRamp: boolean) => {
        const fault = here.find((f) => f.kind === kind);
        if (!fault) return null;
        const begun = started.get(fault);
        if (begun === undefined) {
          const due = inRamp ? ramping && rampShare >= fault.at : !ramping && heldS >= fault.at * holdS;
          if (!due) return null;
          started.set(fault, atS);
          done.push({ kind, leg: index, startS: atS, endS: atS + fault.lastsS });
          return { fault, sinceS: 0 };
        }
        return atS - begun < fault.lastsS ? { fault, sinceS: atS - begun } : null;
      };
      const pushed = active('too-steep', true) ?? active('cooled-too-fast', true);
      const weak = active('late', true);
      const stall = active('stalled', true);
      const cut = active('power-cut', true) ?? active('power-cut-in-hold', false);
      const opened = active('opened', false) ?? active('opened-on-ramp', true);
      const swing = active('overshoot', false) ?? active('undershoot', false);
      let rateCPerS = 0;
      if (ramping && seg.rateCPerH === 'coast') {
        setC = -300;
        if (kiln.readingC <= seg.toC) {
          ramping = false;
          setC = seg.toC;
          kiln.integral = 0;
        }
      } else if (ramping && typeof seg.rateCPerH === 'number') {
        const behindC = direction * (setC - kiln.readingC);
        if (waitBandC === null || behindC <= waitBandC) {
          rateCPerS = (direction * seg.rateCPerH * (pushed ? pushed.fault.by : 1)) / 3600;
          setC += rateCPerS * STEP_S;
        }
        if (direction * (setC - seg.toC) >= 0) {
          setC = seg.toC;
          ramping = false;
        }
      } else if (waitBandC === null || kiln.readingC >= seg.toC - waitBandC) heldS += STEP_S;
      if (ramping) rampEndS = atS + STEP_S;
      const easing = swing ? Math.min(1, swing.sinceS / 240, (swing.fault.lastsS - swing.sinceS) / 240) : 0;
      const swingC = swing ? swing.fault.by * (swing.fault.kind === 'overshoot' ? 1 : -1) * easing : 0;
      const balanceW = (LINKS_W_PER_K[0] ?? 0) * (kiln.chamberC - (kiln.wallC[0] ?? 0));
      let limitW = RATED_W;
      if (weak) {
        const ruledCPerS = typeof seg.rateCPerH === 'number' ? seg.rateCPerH / 3600 : 0;
        limitW = balanceW + CHAMBER_J_PER_K * ruledCPerS * weak.fault.by;
      }
      if (stall) limitW = balanceW + CHAMBER_J_PER_K * 0.000_3;
      if (cut) limitW = 0;
      const w = controlW(kiln, setC + swingC, rateCPerS, lagS, limitW);
      stepKiln(kiln, w, opened ? opened.fault.by : 0, lagS);
      record(w);
    }
    legs.push({ startS, rampEndS, endS: atS });
    if (entry && (longer || shorter) && entry.leg === index && entry.startS === 0) {
      entry.startS = rampEndS;
      entry.endS = atS;
    }
    fromC = seg.toC;
  });
  const endS = atS;
  while (atS < endS + sampling.afterS) {
    stepKiln(kiln, 0, 0, lagS);
    record(0);
  }
  return {
    profile,
    waitBandC,
    ...logged(options, trueC, powerW),
    legs,
    trueC: Float64Array.from(trueC),
    done,
  };
}

/** Samples the true reading as a logger does: at its interval with jitter, with noise, rounded. */
function logged(options: FiringOptions, trueC: readonly number[], powerW: readonly number[]) {
  const { sampling, random } = options;
  const originMs = Date.UTC(2026, 3, 7, 6, 0, 0);
  const timeMs: number[] = [];
  const value: number[] = [];
  const output: number[] = [];
  const endS = (trueC.length - 1) * STEP_S;
  for (let nominalS = -sampling.beforeS; nominalS <= endS; nominalS += sampling.intervalS) {
    const jitterS = timeMs.length ? Math.round(between(random, -sampling.jitterS, sampling.jitterS)) : 0;
    const atS = nominalS + jitterS;
    const i = Math.max(0, Math.min(trueC.length - 1, Math.round(atS / STEP_S)));
    const real = atS < 0 ? AMBIENT_C : (trueC[i] ?? AMBIENT_C);
    const read = real + normal(random) * sampling.noiseC;
    timeMs.push(originMs + atS * 1000);
    value.push(Math.round(read / sampling.quantumC) * sampling.quantumC);
    output.push(atS < 0 ? 0 : Math.round(((powerW[i] ?? 0) / RATED_W) * 1000) / 10);
  }
  const channel = (
    id: string,
    role: ReviewChannel['role'],
    quantity: ReviewChannel['quantity'],
    values: number[],
  ): ReviewChannel => ({
    id,
    name: id,
    role,
    quantity,
    timeMs: Float64Array.from(timeMs),
    value: Float64Array.from(values),
  });
  const channels = [channel('chamber', 'chamber', 'temperature', value)];
  if (options.withPower) channels.push(channel('output', 'other', 'power', output));
  return { channels, runStartMs: originMs };
}
