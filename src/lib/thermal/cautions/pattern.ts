import type { Caution } from '../estimate-schema';
import {
  type CautionRule,
  firesTheMould,
  firstAbove,
  type FiringView,
  lastHotSegment,
  type MouldView,
  segmentsOf,
} from './view';
import { placeAt } from '../series';
import { inSentence, twoDigits } from './words';

/** Slower than this through its melting a wax warms through and swells before its skin can run. */
const WAX_RATE_C_PER_H = 200;
const WAX_SOURCE =
  'Richards and Mascreen, AFS 2003: expansion a main cause of cracked shells; the rate is common practice (a hot kiln beats a slow ramp)';
const PRINT_THICK_M = 0.003;

type WithPattern = MouldView & { pattern: NonNullable<MouldView['pattern']> };
const withPattern = (view: FiringView): WithPattern[] =>
  view.moulds.filter((mould): mould is WithPattern => mould.pattern !== null);

const drains = ({ simulation }: FiringView): boolean =>
  simulation.profile.segments.some((segment) => segment.drain);

export const patternExpandsFirst: CautionRule = (view) =>
  withPattern(view).flatMap((mould) => {
    const { behaviour } = mould.pattern.material;
    if (behaviour === 'thermoset') return solidThermoset(mould, view);
    if (behaviour === 'melts' && mould.mould.form === 'shell') return slowWax(mould, view);
    return behaviour === 'softens' ? shutInPrint(mould, view) : [];
  });

function pushing(
  mould: WithPattern,
  view: FiringView,
  fromC: number,
): Pick<Caution, 'code' | 'segment' | 'atS'> | null {
  const at = firstAbove(mould.trace.coreC, fromC);
  if (at === -1) return null;
  const { segmentAt, timeS } = view.simulation;
  return { code: 'pattern-expands-first', segment: segmentAt[at] ?? null, atS: timeS[at] ?? null };
}

function solidThermoset(mould: WithPattern, view: FiringView): Caution[] {
  const { own, material } = mould.pattern;
  const limit = mould.patternValue('pushesAboveM');
  const softens = mould.patternValue('softensC');
  if (own.hollow || limit === null || softens === null) return [];
  if (own.thickestM !== null && own.thickestM <= limit.value) return [];
  const where = pushing(mould, view, softens.value);
  if (where === null) return [];
  const burnsFrom = view.words.temp(softens.value);
  const solid =
    own.thickestM === null
      ? 'How thick it is has not been said; solid, '
      : `Solid and ${view.words.length(own.thickestM)} thick, `;
  return [
    {
      ...where,
      severity: own.thickestM === null ? 'note' : 'warn',
      text: `${material.name} in ${inSentence(mould.name)} never melts. ${solid}it pushes on the mould from about ${burnsFrom} until it burns. Up to ${view.words.length(limit.value)}, or hollow, is safer.`,
      source: limit.source,
    },
  ];
}

function slowWax(mould: WithPattern, view: FiringView): Caution[] {
  const softens = mould.patternValue('softensC')?.value ?? NaN;
  const melts = mould.patternValue('meltsC')?.value ?? NaN;
  const where = pushing(mould, view, softens);
  const { timeS } = view.simulation;
  const { coreC } = mould.trace;
  const meltsAt = firstAbove(coreC, melts);
  if (where === null || where.atS === null || meltsAt <= 0) return [];
  const passageS =
    crossingS(timeS, coreC, melts, meltsAt) - crossingS(timeS, coreC, softens, firstAbove(coreC, softens));
  const rateCPerH = ((melts - softens) / passageS) * 3600;
  if (!(passageS > 0) || rateCPerH >= WAX_RATE_C_PER_H) return [];
  const growth = mould.patternValue('expansionVolumeShare')?.value ?? 0;
  return [
    {
      ...where,
      severity: 'warn',
      text: `The wax in ${inSentence(mould.name)} warms at only ${view.words.rate(rateCPerH)} through its melting, from ${view.words.temp(softens)} to ${view.words.temp(melts)}. It swells by ${Math.round(growth * 100)} % before its skin can run. At ${view.words.rate(WAX_RATE_C_PER_H)} or more the skin melts first.`,
      source: WAX_SOURCE,
    },
  ];
}

/** Moment at which a rising series crosses a value, straight between its moments. */
function crossingS(timeS: ArrayLike<number>, tempC: ArrayLike<number>, valueC: number, at: number): number {
  const [t0, t1 = NaN, v0, v1 = NaN] = [timeS[at - 1], timeS[at], tempC[at - 1], tempC[at]];
  if (t0 === undefined || v0 === undefined || v1 === v0) return t1;
  return t0 + ((valueC - v0) / (v1 - v0)) * (t1 - t0);
}

function shutInPrint(mould: WithPattern, view: FiringView): Caution[] {
  const { own, material } = mould.pattern;
  if (own.hollow || own.thickestM === null || own.thickestM <= PRINT_THICK_M || drains(view)) return [];
  const softens = mould.patternValue('softensC')?.value ?? NaN;
  const where = pushing(mould, view, softens);
  if (where === null) return [];
  return [
    {
      ...where,
      severity: 'warn',
      text: `${material.name} in ${inSentence(mould.name)} is solid and ${view.words.length(own.thickestM)} thick, and no segment lets it out. It swells from ${view.words.temp(softens)} on and pushes on the mould.`,
      source: 'Parts thicker than 3 mm want a way out or a hollow build (common practice)',
    },
  ];
}

/** Less than this runs out in any case: nothing is lost by not draining. */
const LITTLE_SHARE = 0.3;

export const noDrainStep: CautionRule = (view) =>
  withPattern(view).flatMap((mould): Caution[] => {
    const { own, material } = mould.pattern;
    const flows = mould.patternValue('flowsC');
    const drained = own.drainedShare ?? mould.patternValue('drainedShare')?.value ?? 0;
    if (flows === null || drained < LITTLE_SHARE) return [];
    const source = `${material.name} runs out above ${view.words.temp(flows.value)}. ${flows.source}`;
    const hottestC = hottestWhileDraining(mould, view);
    if (hottestC === null)
      return [
        {
          code: 'no-drain-step',
          severity: 'warn',
          segment: null,
          atS: null,
          text: `No segment drains the pattern. ${Math.round(drained * 100)} % of the ${view.words.mass(own.massKg)} in ${inSentence(mould.name)} could run out; so all of it has to burn.`,
          source,
        },
      ];
    if (hottestC.tempC >= flows.value) return [];
    return [
      {
        code: 'no-drain-step',
        severity: 'warn',
        segment: hottestC.segment,
        atS: hottestC.endS,
        text: `${mould.name} is only at ${view.words.temp(hottestC.tempC)} inside when it is drained. Its pattern runs out above ${view.words.temp(flows.value)}.`,
        source,
      },
    ];
  });

/** Hottest core in any segment that drains; null: none does. */
function hottestWhileDraining(
  mould: MouldView,
  view: FiringView,
): { tempC: number; segment: number; endS: number } | null {
  let best: { tempC: number; segment: number; endS: number } | null = null;
  for (const { index, segment, moments } of segmentsOf(view)) {
    if (!segment.drain) continue;
    const { timeS } = view.simulation;
    const last = placeAt(timeS, moments.endS);
    for (let at = placeAt(timeS, moments.startS); at <= last; at += 1) {
      const tempC = mould.trace.coreC[at] ?? -Infinity;
      if (best === null || tempC > best.tempC) best = { tempC, segment: index, endS: moments.endS };
    }
  }
  return best;
}

/** Carbon that practice finds no fault with, share of the pattern; above the second it spoils the casting. */
const CLEAN_SHARE = 0.005;
const FOUL_SHARE = 0.05;

export const burnoutIncomplete: CautionRule = (view) => {
  const last = lastHotSegment(view);
  if (last === null || !firesTheMould(view)) return [];
  const endS = view.simulation.segments[last]?.endS ?? view.simulation.predictedS;
  return withPattern(view).flatMap((mould): Caution[] => {
    const left = mould.trace.patternLeftShare[placeAt(view.simulation.timeS, endS)] ?? 0;
    const ash = mould.patternValue('ashShare')?.value ?? 0;
    const unburned = left - ash;
    if (unburned <= CLEAN_SHARE) return [];
    const clean = mould.patternValue('burnedOutC');
    return [
      {
        code: 'burnout-incomplete',
        severity: unburned > FOUL_SHARE ? 'stop' : 'warn',
        segment: last,
        atS: endS,
        text: `About ${twoDigits(unburned * 100)} % of the pattern in ${inSentence(mould.name)}, some ${twoDigits(unburned * mould.pattern.own.massKg * 1000)} g, is still there at the end of the firing.${clean === null ? '' : ` It burns clean at about ${view.words.temp(clean.value)} with air and time.`}`,
        source: `Decay of ${mould.pattern.material.name} at the mould core's temperature; a fit, ±50 K or so`,
      },
    ];
  });
};
