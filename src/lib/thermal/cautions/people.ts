import { localMinute } from '../../planning/local-time';
import type { Caution } from '../estimate-schema';
import { type CautionRule, segmentsOf } from './view';

const clock = (minute: number): string =>
  `${Math.floor(minute / 60)}:${String(minute % 60).padStart(2, '0')}`;

/** Somebody is needed at a moment at which the studio is empty. */
export const attendedAtNight: CautionRule = (view) => {
  const { startMs, attendedHours, offsetMinutesAt } = view.context;
  if (startMs === null || attendedHours === null) return [];
  const { fromMinute, toMinute } = attendedHours;
  const isThere = (minute: number): boolean =>
    fromMinute <= toMinute
      ? minute >= fromMinute && minute <= toMinute
      : minute >= fromMinute || minute <= toMinute;
  const cautions: Caution[] = [];
  for (const { index, segment, moments } of segmentsOf(view)) {
    if (!segment.attended && !segment.drain) continue;
    const alone = [moments.rampEndS, moments.endS]
      .map((atS) => {
        const utcMs = startMs + atS * 1000;
        return { atS, minute: localMinute(utcMs, offsetMinutesAt(utcMs)).minute };
      })
      .find(({ minute }) => !isThere(minute));
    if (alone === undefined) continue;
    cautions.push({
      code: 'attended-at-night',
      severity: 'warn',
      segment: index,
      atS: alone.atS,
      text: `Segment ${index + 1} needs somebody at the kiln at ${clock(alone.minute)}. Somebody is there from ${clock(fromMinute)} to ${clock(toMinute)}.`,
      source: "The studio's attended hours",
    });
  }
  return cautions;
};
