import type { CSSProperties } from 'react';
import type { Finding } from '~/lib/contracts/runs';
import { describeFinding, FINDING_TITLES } from '~/lib/review/words';
import type { Profile } from '~/lib/profile/schema';
import { useUnits } from '~/lib/client/units';
import { clockTime } from '../strip/clock';

export const STATE_WORDS: Readonly<Record<Finding['state'], string>> = {
  open: 'open',
  confirmed: 'confirmed',
  dismissed: 'dismissed',
};

export interface FindingCardProps {
  readonly finding: Finding;
  readonly plan: Profile;
  readonly startMs: number;
  readonly zone: string;
  readonly selected: boolean;
  readonly onSelect: () => void;
  readonly place: CSSProperties;
}

/** When it was, on the clock of the studio. */
export function spanText(finding: Pick<Finding, 'startS' | 'endS'>, startMs: number, zone: string): string {
  const from = clockTime(startMs + finding.startS * 1000, zone);
  const to = clockTime(startMs + finding.endS * 1000, zone);
  return from === to ? from : `${from}–${to}`;
}

/** One finding in short: what, how much, when, and what was decided. Choosing it opens it beneath the strip. */
export function FindingCard({ finding, plan, startMs, zone, selected, onSelect, place }: FindingCardProps) {
  const { temperature } = useUnits();
  const hot = finding.severity !== 'note' && !finding.expected && finding.state !== 'dismissed';
  return (
    <button
      type="button"
      className="finding-card"
      style={place}
      data-hot={hot || undefined}
      data-state={finding.state}
      aria-pressed={selected}
      onClick={onSelect}
    >
      <span className="finding-card-title">{FINDING_TITLES[finding.kind]}</span>
      <span className="finding-card-line">{describeFinding(finding, { profile: plan, temperature })}</span>
      <span className="finding-card-when num">
        {spanText(finding, startMs, zone)}
        <span className="finding-card-state">{STATE_WORDS[finding.state]}</span>
      </span>
    </button>
  );
}
