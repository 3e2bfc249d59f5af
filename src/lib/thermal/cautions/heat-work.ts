import type { Caution } from '../estimate-schema';
import { devitrifiedHours } from './rates';
import { type CautionRule, firesTheMould, firstAbove, indexOfLargest, lastHotSegment } from './view';
import { placeAt } from '../series';
import { twoDigits } from './words';

/** Below this share of the target a shell is weak for certain. */
const FAR_SHORT_SHARE = 0.2;

const hours = (value: number): string => `${twoDigits(value)}\u202fh`;

export const heatWorkShort: CautionRule = (view) => {
  const { simulation, moulds, words } = view;
  const last = lastHotSegment(view);
  if (last === null || !firesTheMould(view)) return [];
  const endS = simulation.segments[last]?.endS ?? simulation.predictedS;
  return moulds.flatMap(({ trace, name, value }): Caution[] => {
    const target = value('heatWorkTargetH');
    const reference = value('heatWorkReferenceC');
    if (target === null || reference === null) return [];
    const doneH = trace.heatWorkH[placeAt(simulation.timeS, endS)] ?? 0;
    if (doneH >= target.value) return [];
    const farShort = doneH < FAR_SHORT_SHARE * target.value;
    return [
      {
        code: 'heat-work-short',
        severity: farShort ? 'warn' : 'note',
        segment: last,
        atS: endS,
        text: `${name} gets heat work as of ${doneH < 0.005 ? 'no time' : hours(doneH)} at ${words.temp(reference.value)}. About ${hours(target.value)} makes it sound; ${farShort ? 'it will be weak' : 'it may be a little weak'}.`,
        source: target.source,
      },
    ];
  });
};

export const oversintered: CautionRule = ({ simulation, moulds, words }) =>
  moulds.flatMap(({ trace, name, value }): Caution[] => {
    const most = value('heatWorkMostH');
    const reference = value('heatWorkReferenceC');
    if (most === null || reference === null) return [];
    const at = firstAbove(trace.heatWorkH, most.value);
    if (at === -1) return [];
    const doneH = trace.heatWorkH[indexOfLargest(trace.heatWorkH)] ?? NaN;
    return [
      {
        code: 'oversintered',
        severity: 'warn',
        segment: simulation.segmentAt[at] ?? null,
        atS: simulation.timeS[at] ?? null,
        text: `${name} gets heat work as of ${hours(doneH)} at ${words.temp(reference.value)}. Above ${hours(most.value)} it gets dense and hard to knock out.`,
        source: most.source,
      },
    ];
  });

/** Above it cristobalite grows fast. */
const ALARM_C = 1200;

export const cristobalite: CautionRule = ({ simulation, moulds, words }) =>
  moulds.flatMap((mould): Caution[] => {
    const { hours: aboveH, enough, fromC } = devitrifiedHours(mould, simulation.timeS);
    const after = mould.value('cristobaliteAfterH');
    if (!mould.material.contains.includes('fused-silica') || !enough || after === null) return [];
    const at = firstAbove(mould.trace.surfaceC, fromC);
    const peakC = mould.trace.surfaceC[indexOfLargest(mould.trace.surfaceC)] ?? NaN;
    return [
      {
        code: 'cristobalite',
        severity: peakC > ALARM_C ? 'stop' : 'warn',
        segment: simulation.segmentAt[at] ?? null,
        atS: simulation.timeS[at] ?? null,
        text: `${mould.name} is above ${words.temp(fromC)} for ${words.time(aboveH * 3600)}. Its silica turns to cristobalite: weak and cracked when cold, and its dust is crystalline silica.`,
        source: after.source,
      },
    ];
  });
