import type { Profile } from '../profile/schema';
import type { ComputedFinding } from './types';

/** What the words of a verdict need. */
export interface VerdictInput {
  readonly profile: Profile;
  readonly findings: readonly ComputedFinding[];
  /** Index of the last segment that the log holds wholly; −1 for none. */
  readonly lastWholeSegment: number;
  readonly controlName: string;
  readonly fired: number;
}

/** Most clauses that a verdict names before it counts the rest. */
const MOST_CLAUSES = 3;

/** One sentence in plain words on how the run followed its plan, temperatures in °C. */
export function verdictOf(input: VerdictInput): string {
  const { profile, findings } = input;
  const on = `, on ${input.controlName}`;
  if (input.fired === 0) return 'The log does not show the run.';
  if (findings.length === 0) {
    const last = profile.segments[profile.segments.length - 1];
    return input.lastWholeSegment >= profile.segments.length - 1
      ? `Followed the plan to the end${on}.`
      : `Followed the plan as far as the log goes, towards ${degrees(last?.toC ?? profile.startC)}${on}.`;
  }
  const telling = [...findings].sort((a, b) => weight(b) - weight(a)).slice(0, MOST_CLAUSES);
  const clauses = telling.sort((a, b) => a.startS - b.startS).map((finding) => clauseOf(finding, profile));
  const rest = findings.length - clauses.length;
  const first = Math.min(...findings.map((f) => f.segment));
  const lead =
    first > 0 ? `followed the plan to ${degrees(profile.segments[first - 1]?.toC ?? profile.startC)}` : null;
  const parts = [...(lead ? [lead] : []), ...clauses];
  const more = rest > 0 ? `, and ${rest} more ${rest === 1 ? 'finding' : 'findings'}` : '';
  return capital(`${listed(parts)}${on}${more}.`);
}

const WEIGHTS = { serious: 3, warn: 2, note: 1 } as const;
const weight = (finding: ComputedFinding) => WEIGHTS[finding.severity];
const degrees = (valueC: number) => `${Math.round(valueC)} °C`;
const capital = (text: string) => text.charAt(0).toUpperCase() + text.slice(1);

function listed(parts: readonly string[]): string {
  if (parts.length < 2) return parts.join('');
  return `${parts.slice(0, -1).join(', ')}, then ${parts[parts.length - 1]}`;
}

/** Time in words: minutes up to two hours, then hours and minutes. */
export function lasting(seconds: number): string {
  const minutes = Math.max(1, Math.round(Math.abs(seconds) / 60));
  if (Math.abs(seconds) < 60) return `${Math.round(Math.abs(seconds))} s`;
  if (minutes < 120) return `${minutes} min`;
  const rest = minutes % 60;
  return rest === 0 ? `${Math.floor(minutes / 60)} h` : `${Math.floor(minutes / 60)} h ${rest} min`;
}

/** What one finding says, as a clause that follows "the run". */
export function clauseOf(finding: ComputedFinding, profile: Profile): string {
  const targetC = degrees(profile.segments[finding.segment]?.toC ?? profile.startC);
  const lasted = lasting(finding.endS - finding.startS);
  const byC = finding.byC === null ? '' : degrees(finding.byC);
  const byS = lasting(finding.byS ?? 0);
  switch (finding.kind) {
    case 'overshoot':
      return `ran ${byC} over ${targetC} for ${lasted}`;
    case 'undershoot':
      return `sank ${byC} below ${targetC} for ${lasted}`;
    case 'late':
      return `came ${byS} late to ${targetC}`;
    case 'too-steep':
      return `heated ${Math.round(finding.byCPerH ?? 0)} °C/h too fast towards ${targetC} for ${lasted}`;
    case 'cooled-too-fast':
      return `cooled ${Math.round(finding.byCPerH ?? 0)} °C/h too fast towards ${targetC} for ${lasted}`;
    case 'stalled':
      return `stood still for ${lasted} on the way to ${targetC}`;
    case 'hold-short':
      return `held ${targetC} ${byS} too short`;
    case 'hold-long':
      return `held ${targetC} ${byS} too long`;
    case 'opened':
      return `was opened${finding.expected ? ' as planned' : ''} and fell ${byC}`;
    case 'power-cut':
      return finding.remarks.includes('open-ended')
        ? `lost its heat on the way and did not get it back`
        : `lost power for ${lasted} and fell ${byC}`;
    case 'sensor-open':
      return `had no reading for ${lasted}`;
    case 'sensor-spike':
      return `read ${byC} wrong for a moment`;
    case 'sensor-stuck':
      return `read the same for ${lasted} while the kiln moved on`;
    case 'channels-disagree':
      return `had two chamber sensors up to ${byC} apart for ${lasted}`;
    case 'gap':
      return `was not logged for ${byS}`;
    case 'clock-jump':
      return `had its logger's clock jump by ${byS}`;
    case 'ended-early':
      return `was logged only until ${byS} before the end of the last hold`;
  }
}
