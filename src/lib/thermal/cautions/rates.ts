import type { RateLimit } from '../../materials';
import type { Caution } from '../estimate-schema';
import { type CautionRule, type FiringView, type MouldView } from './view';
import { fastestIn, type FastStretch } from './window-rate';

const WINDOW_S = 600;
/** Rates are told apart to about this much. */
const LEEWAY = 1.05;

/** Hours above the temperature at which cristobalite grows, and whether that is enough of it to matter. */
export function devitrifiedHours(
  { trace, value }: MouldView,
  timeS: ArrayLike<number>,
): { hours: number; enough: boolean; fromC: number } {
  const fromC = value('cristobaliteFromC')?.value ?? Infinity;
  let aboveS = 0;
  for (let at = 1; at < timeS.length; at += 1)
    if ((trace.surfaceC[at] ?? 0) > fromC) aboveS += (timeS[at] ?? 0) - (timeS[at - 1] ?? 0);
  const hours = aboveS / 3600;
  return { hours, enough: hours > (value('cristobaliteAfterH')?.value ?? Infinity), fromC };
}

/** Fastest change of a mould's outside within one of its limits; null: it keeps to it. */
function broken(limit: RateLimit, mould: MouldView, view: FiringView): FastStretch | null {
  const { timeS } = view.simulation;
  const { waterKg, patternLeftShare, surfaceC } = mould.trace;
  if (limit.onlyWith === 'devitrified' && !devitrifiedHours(mould, timeS).enough) return null;
  const counts: Record<string, (at: number) => boolean> = {
    water: (at) => (waterKg[at] ?? 0) > 0.02 * (waterKg[0] ?? 0),
    pattern: (at) => (patternLeftShare[at] ?? 0) > 0.01,
  };
  return fastestIn({
    timeS,
    tempC: surfaceC,
    direction: limit.direction,
    fromC: limit.fromC,
    toC: limit.toC,
    windowS: WINDOW_S,
    maxRateCPerH: limit.maxRateCPerH * LEEWAY,
    counts: counts[limit.onlyWith ?? ''] ?? (() => true),
  });
}

function limitCautions(
  view: FiringView,
  wanted: (limit: RateLimit) => boolean,
  say: (limit: RateLimit, mould: MouldView, fast: FastStretch) => Pick<Caution, 'code' | 'severity' | 'text'>,
): Caution[] {
  const { segmentAt, timeS } = view.simulation;
  return view.moulds.flatMap((mould) =>
    mould.material.rateLimits.filter(wanted).flatMap((limit): Caution[] => {
      const fast = broken(limit, mould, view);
      if (fast === null) return [];
      return [
        {
          ...say(limit, mould, fast),
          segment: segmentAt[fast.at] ?? null,
          atS: timeS[fast.at] ?? null,
          source: limit.source,
        },
      ];
    }),
  );
}

const isInversion = ({ zone }: RateLimit): boolean => zone === 'quartz' || zone === 'cristobalite';
const INVERSION_NAMES: Readonly<Record<string, string>> = { quartz: 'quartz', cristobalite: 'cristobalite' };

export const inversionTooFast: CautionRule = (view) =>
  limitCautions(
    view,
    (limit) => isInversion(limit) && limit.direction === 'heating',
    (limit, mould, fast) => ({
      code: 'inversion-too-fast',
      severity: 'warn',
      text: `${mould.name} is heated through its ${INVERSION_NAMES[limit.zone] ?? limit.zone} inversion, ${view.words.temp(limit.fromC)} to ${view.words.temp(limit.toC)}, at up to ${view.words.rate(fast.rateCPerH)}. ${view.words.rate(limit.maxRateCPerH)} is the limit.`,
    }),
  );

export const coolingTooFast: CautionRule = (view) =>
  limitCautions(
    view,
    (limit) => limit.direction === 'cooling',
    (limit, mould, fast) => ({
      code: 'cooling-too-fast',
      severity: 'warn',
      text: `${mould.name} cools at up to ${view.words.rate(fast.rateCPerH)} between ${view.words.temp(limit.toC)} and ${view.words.temp(limit.fromC)}. ${view.words.rate(limit.maxRateCPerH)} is the limit there.`,
    }),
  );

/** Rate limits of a wall as a whole; those of steam have a caution of their own. */
export const tooSteepByRate: CautionRule = (view) =>
  limitCautions(
    view,
    (limit) => limit.direction === 'heating' && !isInversion(limit) && limit.zone !== 'steam',
    (limit, mould, fast) => ({
      code: 'too-steep-for-wall',
      severity: limit.zone === 'drying' ? 'note' : 'warn',
      text: `${mould.name} is heated at up to ${view.words.rate(fast.rateCPerH)} between ${view.words.temp(limit.fromC)} and ${view.words.temp(limit.toC)}. ${view.words.rate(limit.maxRateCPerH)} is the limit${limit.onlyWith === 'water' ? ' while it is wet' : limit.onlyWith === 'pattern' ? ' while the pattern burns' : ''}.`,
    }),
  );
