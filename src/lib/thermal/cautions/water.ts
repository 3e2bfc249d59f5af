import type { Caution } from '../estimate-schema';
import { type CautionRule, type MouldView, type Words } from './view';
import type { Simulation } from '../simulation';
import { fastestIn } from './window-rate';

/** Rates are taken over this long: a jolt of a minute moves no steam. */
const WINDOW_S = 300;
/** A wall that has lost this share of its water has no more to build pressure with. */
const DRY_SHARE = 0.02;
/** An air-dried shell keeps about this much per kg and is fired hot with it (common practice); blocks are never that dry. */
const AIR_DRY_SHARE = { shell: 0.01, flask: 0 } as const;
/** Wetter than this and this many times faster than the limit, the wall is in danger at once. */
const WET_SHARE = 0.05;
const FAR_ABOVE = 3;
const BOILS_C = 100;

/** Water behind the drying front while the outer part is above 100 °C and heated faster than the material stands. */
export const steamInWall: CautionRule = ({ simulation, moulds, words }) =>
  moulds.flatMap((view) => steamOf(view, simulation, words));

function steamOf(
  { trace, mould, material, name }: MouldView,
  simulation: Simulation,
  words: Words,
): Caution[] {
  const limit = material.rateLimits.find(
    ({ zone, direction }) => zone === 'steam' && direction === 'heating',
  );
  const fullKg = trace.waterKg[0] ?? 0;
  if (limit === undefined || !(fullKg > 0)) return [];
  const dryKg = Math.max(DRY_SHARE * fullKg, AIR_DRY_SHARE[mould.form] * mould.massKg);
  const fast = fastestIn({
    timeS: simulation.timeS,
    tempC: trace.surfaceC,
    direction: 'heating',
    fromC: BOILS_C,
    toC: Infinity,
    windowS: WINDOW_S,
    maxRateCPerH: limit.maxRateCPerH,
    counts: (at) => (trace.waterKg[at] ?? 0) > dryKg,
  });
  if (fast === null) return [];
  const leftKg = trace.waterKg[fast.at] ?? 0;
  const atOnce = fast.rateCPerH > FAR_ABOVE * limit.maxRateCPerH && leftKg > WET_SHARE * mould.massKg;
  return [
    {
      code: 'steam-in-wall',
      severity: atOnce ? 'stop' : 'warn',
      segment: simulation.segmentAt[fast.at] ?? null,
      atS: simulation.timeS[fast.at] ?? null,
      text: `${name} still holds ${words.mass(leftKg)} of water while its outside is above ${words.temp(BOILS_C)} and heats at up to ${words.rate(fast.rateCPerH)}. With water in the wall ${words.rate(limit.maxRateCPerH)} is the limit.`,
      source: limit.source,
    },
  ];
}
