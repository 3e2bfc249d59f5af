import type { PlannedLeg } from '~/lib/profile/planned';
import type { Segment } from '~/lib/profile/schema';
import {
  formatClock,
  formatDuration,
  formatRate,
  formatTemperature,
  type UnitPreferences,
} from '~/lib/units';

/** What the person at the kiln does or keys in for one segment, in one sentence. */
export function stepInWords(segment: Segment, leg: PlannedLeg, units: UnitPreferences): string {
  const to = formatTemperature(segment.toC, units.temperature);
  return `${rampInWords(segment, leg, to, units)}${holdInWords(segment, leg)}.`;
}

function rampInWords(segment: Segment, leg: PlannedLeg, to: string, units: UnitPreferences): string {
  if (leg.fromC === segment.toC) return `Stay at ${to}`;
  const verb = segment.toC > leg.fromC ? 'Heat' : 'Cool';
  if (segment.rateCPerH === 'flat-out') return `${verb} as fast as the kiln can to ${to}`;
  if (segment.rateCPerH === 'coast') return `Heating off until ${to}`;
  const at = formatRate(segment.rateCPerH, units.temperature);
  return `${verb} at ${at} to ${to}, ${formatDuration(leg.rampEndS - leg.startS)}`;
}

const holdInWords = (segment: Segment, leg: PlannedLeg): string => {
  if (segment.holdS === 0) return '';
  return leg.fromC === segment.toC
    ? ` for ${formatDuration(segment.holdS)}`
    : `, then hold ${formatDuration(segment.holdS)}`;
};

/** `0:00 to 2:53`: when it begins and ends, in hours and minutes from the start. */
export const spanOf = (leg: PlannedLeg): string => `${formatClock(leg.startS)} to ${formatClock(leg.endS)}`;

/** What else it asks for. */
export function asks(segment: Segment): string[] {
  return [
    segment.attended ? 'Somebody must be there' : '',
    segment.drain ? 'Drain the tray' : '',
    segment.vent === 'open' ? 'Vent open' : '',
    segment.openedS === undefined ? '' : `Open the kiln for ${formatDuration(segment.openedS)}`,
  ].filter(Boolean);
}
