import type { PlannedCurve } from '~/lib/profile/planned';
import type { Profile } from '~/lib/profile/schema';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { formatDuration, formatTemperature, type UnitPreferences } from '~/lib/units';
import { clockTime } from '../strip/clock';
import { valueAtTime } from '../strip/scales';
import type { StripTableContent } from '../strip/StripTable';
import type { ProfileDocument } from './document';
import { asksFor, rateText, STAGE_NAMES } from './shown';

type Scale = UnitPreferences['temperature'];

/** The strip in a sentence. */
export function stripSummary(
  document: ProfileDocument,
  planned: PlannedCurve,
  estimate: Estimate | null,
  scale: Scale,
): string {
  const peakC = Math.max(...planned.valueC);
  const plan = `${document.name}: ${document.profile.segments.length} segments, up to ${formatTemperature(peakC, scale)}, ${formatDuration(planned.durationS)} as planned`;
  return estimate ? `${plan}, ${formatDuration(estimate.predictedS)} as this kiln will fire it.` : `${plan}.`;
}

/** The strip as a table: what is asked, what the kiln does, and where the mould core then is. */
export function stripTable(
  profile: Profile,
  planned: PlannedCurve,
  estimate: Estimate | null,
  scale: Scale,
  startMs: number | null,
  zone: string,
): StripTableContent {
  const moment = (timeS: number): string =>
    startMs === null
      ? formatDuration(timeS)
      : `${clockTime(startMs + timeS * 1000, zone)}, +${formatDuration(timeS)}`;
  return {
    caption: 'Segments of the firing: the plan, and what the kiln will do',
    columns: [
      'Segment',
      'Rate',
      'Target',
      'Hold',
      'Planned to end',
      'Kiln arrives',
      'Mould core at the end',
      'Asks for',
    ],
    rows: profile.segments.map((segment, index) => {
      const leg = planned.legs[index];
      const timed = estimate?.segments[index];
      const coreC =
        estimate && timed && estimate.mould !== null
          ? valueAtTime(estimate.curve.timeS, estimate.curve.mouldCoreC, timed.endS)
          : null;
      return [
        `${index + 1}, ${STAGE_NAMES[segment.stage].toLowerCase()}`,
        rateText(segment.rateCPerH, scale),
        formatTemperature(segment.toC, scale),
        formatDuration(segment.holdS),
        leg ? moment(leg.endS) : '',
        timed ? moment(timed.rampEndS) : 'not computed',
        coreC === null ? 'not computed' : formatTemperature(coreC, scale),
        [...asksFor(segment), segment.instruction].filter(Boolean).join(', ') || 'nothing',
      ];
    }),
  };
}
