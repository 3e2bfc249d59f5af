import type { Profile } from '../profile/schema';
import {
  formatDuration,
  formatInterval,
  formatTemperature,
  joined,
  rate,
  type UnitPreferences,
} from '../units';
import type { ActualSegment, FindingKind } from './types';

/** What each kind of finding is called on screen. */
export const FINDING_TITLES: Readonly<Record<FindingKind | 'other', string>> = {
  overshoot: 'Overshoot',
  undershoot: 'Undershoot',
  late: 'Late',
  'too-steep': 'Too steep',
  'cooled-too-fast': 'Cooled too fast',
  stalled: 'Stalled',
  'hold-short': 'Hold short',
  'hold-long': 'Hold long',
  opened: 'Opened',
  'power-cut': 'Power cut',
  'sensor-open': 'Sensor open',
  'sensor-spike': 'Sensor spike',
  'sensor-stuck': 'Sensor stuck',
  'channels-disagree': 'Channels disagree',
  gap: 'Gap in the log',
  'clock-jump': 'Clock jumped',
  'ended-early': 'Ended early',
  other: 'Marked by hand',
};

/** The figures of a finding, as computed or as stored. */
export interface FindingFigures {
  readonly kind: FindingKind | 'other';
  readonly segment: number | null;
  readonly startS: number;
  readonly endS: number;
  readonly peakC: number | null;
  readonly byC: number | null;
  readonly byS: number | null;
  readonly byCPerH: number | null;
  readonly holdLostS: number | null;
  readonly expected: boolean;
}

interface Words {
  readonly profile: Profile;
  readonly temperature: UnitPreferences['temperature'];
}

/** One line with the finding's figures in it, without its title: '19 °C over 900 °C for 24 min'. */
export function describeFinding(finding: FindingFigures, { profile, temperature }: Words): string {
  const segment = finding.segment === null ? undefined : profile.segments[finding.segment];
  const target = segment ? formatTemperature(segment.toC, temperature) : 'the plan';
  const by = finding.byC === null ? 'out of its band' : formatInterval(Math.abs(finding.byC), temperature);
  const lasting = formatDuration(finding.endS - finding.startS);
  const byTime = formatDuration(Math.abs(finding.byS ?? finding.endS - finding.startS));
  const perHour = finding.byCPerH === null ? '' : joined(rate(finding.byCPerH, temperature));
  const lost = finding.holdLostS ? `; ${formatDuration(finding.holdLostS)} of the hold lost` : '';
  const lines: Readonly<Record<FindingKind | 'other', string>> = {
    overshoot: `${by} over ${target} for ${lasting}`,
    undershoot: `${by} under ${target} for ${lasting}`,
    late: `${byTime} late to ${target}`,
    'too-steep': `${perHour ? `${perHour} faster than planned` : 'faster than planned'} for ${lasting}`,
    'cooled-too-fast': `${perHour ? `${perHour} faster than planned` : 'faster than planned'} for ${lasting}`,
    stalled: `hardly rose for ${lasting}`,
    'hold-short': `the hold at ${target} was ${byTime} short`,
    'hold-long': `the hold at ${target} was ${byTime} long`,
    opened: `fell ${by}, back after ${lasting}${finding.expected ? '; the plan asks for it' : ''}`,
    'power-cut': `no heat for ${lasting}${finding.byC === null ? '' : `, fell ${by}`}`,
    'sensor-open': `no reading to trust for ${lasting}`,
    'sensor-spike': `a jump of ${by} and back`,
    'sensor-stuck': `exactly the same reading for ${lasting}`,
    'channels-disagree': `${by} apart for ${lasting}`,
    gap: `no rows for ${lasting}`,
    'clock-jump': `the logger's clock went ${(finding.byS ?? 0) < 0 ? 'back' : 'forward'} by ${byTime}`,
    'ended-early': `the log stops with ${byTime} of the hold at ${target} to come`,
    other: `${lasting} marked`,
  };
  return lines[finding.kind] + lost;
}

/** How a segment went, in a few words for its card: what was found in it, or that it went as planned. */
export function describeSegment(
  segment: ActualSegment,
  found: readonly FindingFigures[],
  words: Words,
): string {
  const unasked = found.filter((finding) => !finding.expected);
  if (unasked.length > 0) {
    return unasked
      .map((finding) => `${FINDING_TITLES[finding.kind].toLowerCase()}: ${describeFinding(finding, words)}`)
      .join('; ');
  }
  if (segment.arrivedS === null) return 'not reached in this log';
  return found.length > 0 ? 'as planned, opened as instructed' : 'as planned';
}
