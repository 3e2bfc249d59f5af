import type { Caution } from '../estimate-schema';
import type { CautionRule } from './view';
import { inSentence, twoDigits } from './words';

/** Carbon below this share of the pattern does no harm that anybody has seen. */
const CLEAN_SHARE = 0.005;
/** This far above its limit the reaction is under way for certain, K. */
const SURE_ABOVE_C = 50;

/** A gypsum mould with carbon in it above the temperature at which the two react. */
export const sulphurRisk: CautionRule = ({ simulation, moulds, words }) =>
  moulds.flatMap((mould): Caution[] => {
    const { trace, pattern } = mould;
    const limit = mould.value('maxWithCarbonC');
    if (pattern === null || limit === null) return [];
    const ash = mould.patternValue('ashShare')?.value ?? 0;
    let worst = { at: -1, aboveC: 0, unburnt: 0 };
    for (let at = 0; at < trace.surfaceC.length; at += 1) {
      const unburnt = (trace.patternLeftShare[at] ?? 0) - ash;
      const aboveC = (trace.coreC[at] ?? -Infinity) - limit.value;
      if (aboveC > 0 && unburnt > CLEAN_SHARE && aboveC > worst.aboveC) worst = { at, aboveC, unburnt };
    }
    if (worst.at === -1) return [];
    return [
      {
        code: 'sulphur-risk',
        severity: worst.aboveC > SURE_ABOVE_C ? 'stop' : 'warn',
        segment: simulation.segmentAt[worst.at] ?? null,
        atS: simulation.timeS[worst.at] ?? null,
        text: `About ${twoDigits(worst.unburnt * 100)} % of the pattern, ${twoDigits(worst.unburnt * pattern.own.massKg * 1000)} g, is still in ${inSentence(mould.name)} when its core is at ${words.temp(limit.value + worst.aboveC)}. Above ${words.temp(limit.value)} carbon breaks gypsum down: sulphur dioxide, a rough casting, a weak mould. Burn it out below that first.`,
        source: limit.source,
      },
    ];
  });
