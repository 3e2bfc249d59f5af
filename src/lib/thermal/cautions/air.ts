import { ROOM_AIR_KG_PER_M3 } from '../constants';
import type { Caution } from '../estimate-schema';
import { type CautionRule, type FiringView, segmentsOf } from './view';
import { seriesAt } from '../series';
import { twoDigits } from './words';

/** Gas of which more than this share finds no air leaves as smoke and soot; above the second most of it does. */
const UNBURNT_NOTED = 0.1;
const UNBURNT_WARNED = 0.3;
/** Less than this is gone with the first draught, kg. */
const LEAST_KG = 0.002;

/** What one segment's patterns ask for and get in air. */
interface Airing {
  /** Mass of gas and char that burning wanted air for, as air, kg; and what did not come, kg. */
  askedKg: number;
  missedKg: number;
  worstAtS: number;
  worstKgPerS: number;
  inKgPerS: number;
}

function airingOf({ simulation }: FiringView, fromS: number, toS: number): Airing {
  const { timeS, airNeededKgPerS, airInKgPerS } = simulation;
  const airing: Airing = { askedKg: 0, missedKg: 0, worstAtS: fromS, worstKgPerS: 0, inKgPerS: 0 };
  for (let at = 1; at < timeS.length; at += 1) {
    const atS = timeS[at] ?? 0;
    if (atS <= fromS || atS > toS) continue;
    const stepS = atS - (timeS[at - 1] ?? 0);
    const needed = airNeededKgPerS[at] ?? 0;
    const there = airInKgPerS[at] ?? 0;
    airing.askedKg += needed * stepS;
    airing.missedKg += Math.max(0, needed - there) * stepS;
    if (needed - there > airing.worstKgPerS - airing.inKgPerS || airing.worstKgPerS === 0)
      Object.assign(airing, { worstAtS: atS, worstKgPerS: needed, inKgPerS: there });
  }
  return airing;
}

const cubicMetres = (kgPerS: number): string =>
  `${twoDigits((kgPerS / ROOM_AIR_KG_PER_M3) * 3600)}\u202fm³/h`;

/** The patterns give off more than the air that comes in can burn. */
export const burnoutStarved: CautionRule = (view) => {
  const cautions: Caution[] = [];
  for (const { index, segment, moments } of segmentsOf(view)) {
    const { askedKg, missedKg, worstAtS, worstKgPerS, inKgPerS } = airingOf(
      view,
      moments.startS,
      moments.endS,
    );
    const unburnt = askedKg > 0 ? missedKg / askedKg : 0;
    if (askedKg < LEAST_KG || unburnt <= UNBURNT_NOTED) continue;
    const cure =
      segment.vent === 'open'
        ? 'A slower rate or fewer patterns would need less.'
        : 'The vent is closed in this segment.';
    cautions.push({
      code: 'burnout-starved',
      severity: unburnt > UNBURNT_WARNED ? 'warn' : 'note',
      segment: index,
      atS: worstAtS,
      text: `Burning what the patterns give off takes up to ${cubicMetres(worstKgPerS)} of air; ${cubicMetres(inKgPerS)} comes in. About ${twoDigits(unburnt * 100)} % of what segment ${index + 1} drives off leaves as smoke and soot. ${cure}`,
      source: 'Stoichiometric air of the pattern material against vent, leaks and the burner’s excess',
    });
  }
  return cautions;
};

/**
 * Heat of burning in 1 m³ of air at its lower flammable limit, MJ/m³: 45 g/m³ of a hydrocarbon vapour of 44 MJ/kg; that
 * limit times heat of burning is about the same for most vapours (law of Burgess and Wheeler).
 */
const LIMIT_MJ_PER_M3 = 2;
/** Ovens that give off vapour are kept below this share of the limit. */
const OVEN_SHARE = 0.25;
/** From here on gas burns as it meets air; cooler it gathers. */
const BURNS_FROM_C = 600;
const LIMIT_SOURCE =
  'NFPA 86: ovens below 25 % of the lower flammable limit; the limit by the law of Burgess and Wheeler from 45 g/m³ of hydrocarbons (US Bureau of Mines Bulletin 627, recalled)';

/** At its peak the gas of the patterns makes what is in the kiln flammable. */
export const offgasPeak: CautionRule = (view) => {
  const { simulation, words, moulds } = view;
  const { timeS, chamberC, airInKgPerS, segmentAt } = simulation;
  let peak = { share: 0, at: -1, gPerMin: 0 };
  for (let at = 1; at < timeS.length; at += 1) {
    if ((chamberC[at] ?? Infinity) >= BURNS_FROM_C) continue;
    let heatMJPerS = 0;
    let gPerMin = 0;
    for (const { trace, patternValue } of moulds) {
      const ofAll = (trace.gasGPerMin[at] ?? 0) * trace.count;
      gPerMin += ofAll;
      heatMJPerS += (ofAll / 60_000) * ((patternValue('heatOfCombustionJPerKg')?.value ?? 0) / 1e6);
    }
    const airM3PerS = (airInKgPerS[at] ?? 0) / ROOM_AIR_KG_PER_M3;
    const share = heatMJPerS > 0 ? heatMJPerS / Math.max(airM3PerS, 1e-9) / LIMIT_MJ_PER_M3 : 0;
    if (share > peak.share) peak = { share, at, gPerMin };
  }
  if (peak.share <= OVEN_SHARE) return [];
  const text =
    peak.share > 1
      ? `more than the air drawn through can carry without becoming flammable`
      : `${twoDigits(peak.share * 100)} % of what would make the air drawn through flammable`;
  return [
    {
      code: 'offgas-peak',
      severity: peak.share > 1 ? 'warn' : 'note',
      segment: segmentAt[peak.at] ?? null,
      atS: timeS[peak.at] ?? null,
      text: `The patterns give off up to ${twoDigits(peak.gPerMin)}\u202fg/min with the chamber at ${words.temp(seriesAt(timeS, chamberC, timeS[peak.at] ?? 0))}: ${text}. Vent to outdoors, and do not open the kiln then: it may flash.`,
      source: LIMIT_SOURCE,
    },
  ];
};
