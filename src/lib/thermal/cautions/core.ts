import type { Caution } from '../estimate-schema';
import { soakMoreS } from '../soak';
import { type CautionRule, segmentsOf } from './view';
import { seriesAt } from '../series';

/** A core this near its target counts as there. */
const THERE_C = 10;
const FAR_C = 25;
const STAGES: readonly string[] = ['melt-out', 'burnout', 'vitrification', 'casting-hold'];

/** The hold ends before the inside of the mould has come to its temperature. */
export const coreBehindAtHoldEnd: CautionRule = (view) => {
  const { simulation, moulds, words } = view;
  const cautions: Caution[] = [];
  for (const { index, segment, fromC, moments } of segmentsOf(view)) {
    if (segment.holdS <= 0 || !STAGES.includes(segment.stage)) continue;
    for (const { trace, name } of moulds) {
      const coreC = seriesAt(simulation.timeS, trace.coreC, moments.endS);
      const behindC = segment.toC >= fromC ? segment.toC - coreC : coreC - segment.toC;
      if (!(behindC > THERE_C)) continue;
      const moreS = soakMoreS(simulation, trace, index);
      const more = moreS === null ? '' : ` It needs about ${words.time(Math.ceil(moreS / 60) * 60)} more.`;
      cautions.push({
        code: 'core-behind-at-hold-end',
        severity: behindC > FAR_C ? 'warn' : 'note',
        segment: index,
        atS: moments.endS,
        text: `${name} is at ${words.temp(coreC)} inside when the hold at ${words.temp(segment.toC)} ends, ${words.difference(behindC)} short of it.${more}`,
        source: 'Conduction through the wall, film outside included',
      });
    }
  }
  return cautions;
};
