import type { Caution } from '../estimate-schema';
import { strayingOf } from './follow';
import { type CautionRule, segmentsOf } from './view';

/** Less is within what any control strays. */
const NOTED_C = 20;
const WARNED_C = 50;
/** A pattern that gives less than this share of the kiln's own power is not what heats it. */
const HEATING_SHARE = 0.05;

/** The burning pattern heats the kiln beyond what is asked of it. */
export const burningHeatsKiln: CautionRule = (view) => {
  const { simulation, words } = view;
  const cautions: Caution[] = [];
  for (const each of segmentsOf(view)) {
    const { hotterC, hotterAt } = strayingOf(view, each);
    const heatKW = simulation.patternHeatKW[hotterAt] ?? 0;
    if (hotterC <= NOTED_C || heatKW <= HEATING_SHARE * simulation.fullPowerKW) continue;
    cautions.push({
      code: 'burning-heats-kiln',
      severity: hotterC > WARNED_C ? 'warn' : 'note',
      segment: each.index,
      atS: simulation.timeS[hotterAt] ?? null,
      text: `The burning pattern drives the kiln ${words.difference(hotterC)} above what segment ${each.index + 1} asks for. It gives off ${heatKW.toFixed(1)}\u202fkW then; the kiln has ${simulation.fullPowerKW.toFixed(1)}\u202fkW.`,
      source: "Heat of the burning pattern in the chamber's balance; the decay it follows is a fit",
    });
  }
  return cautions;
};
