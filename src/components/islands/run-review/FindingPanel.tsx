import { useEffect, useId, useRef, useState } from 'react';
import type { Finding } from '~/lib/contracts/runs';
import type { Profile } from '~/lib/profile/schema';
import { describeFinding, FINDING_TITLES } from '~/lib/review/words';
import { sentenceFor } from '~/lib/client/api';
import { useUnits } from '~/lib/client/units';
import { dayAndDate } from '../strip/clock';
import { spanText, STATE_WORDS } from './FindingCard';

type Change = Partial<Pick<Finding, 'state' | 'remark' | 'followUp'>>;

interface FindingPanelProps {
  readonly finding: Finding;
  readonly place: string;
  readonly plan: Profile;
  readonly startMs: number;
  readonly zone: string;
  readonly mayDecide: boolean;
  readonly saving: boolean;
  readonly problem: unknown;
  readonly onChange: (change: Change) => void;
  readonly onStep: (by: number) => void;
  readonly onClose: () => void;
}

const dayOf = (instant: string | null): string => instant?.slice(0, 10) ?? '';

/** The finding that is chosen: its figures, and what a technician or teacher says of it. */
export function FindingPanel(props: FindingPanelProps) {
  const { finding, plan, startMs, zone, mayDecide, saving } = props;
  const { temperature } = useUnits();
  const [remark, setRemark] = useState(finding.remark);
  const [followUp, setFollowUp] = useState(finding.followUp?.text ?? '');
  const [dueDay, setDueDay] = useState(dayOf(finding.followUp?.dueAt ?? null));
  const id = useId();
  const heading = useRef<HTMLHeadingElement>(null);
  useEffect(() => {
    setRemark(finding.remark);
    setFollowUp(finding.followUp?.text ?? '');
    setDueDay(dayOf(finding.followUp?.dueAt ?? null));
  }, [finding.id, finding.revision, finding.remark, finding.followUp]);

  const written = (): Change => ({
    remark,
    followUp:
      followUp.trim() === ''
        ? null
        : {
            text: followUp,
            dueAt: dueDay === '' ? null : `${dueDay}T12:00:00Z`,
            doneAt: finding.followUp?.doneAt ?? null,
          },
  });
  const changed =
    remark !== finding.remark ||
    followUp !== (finding.followUp?.text ?? '') ||
    dueDay !== dayOf(finding.followUp?.dueAt ?? null);
  const decide = (state: Finding['state']): void => props.onChange({ state, ...written() });

  return (
    <section
      className="finding-panel"
      aria-labelledby={`${id}-title`}
      data-hot={finding.severity !== 'note' || undefined}
    >
      <div className="finding-panel-head">
        <h2 id={`${id}-title`} ref={heading} className="section-title">
          {FINDING_TITLES[finding.kind]}, {describeFinding(finding, { profile: plan, temperature })}
        </h2>
        <p className="hint num">
          {spanText(finding, startMs, zone)} · {props.place}
        </p>
      </div>
      <p className="hint">
        {finding.origin === 'person' ? 'Marked by hand. ' : 'Found by the review. '}
        {finding.decidedBy && finding.decidedAt
          ? `${finding.decidedBy.name} ${STATE_WORDS[finding.state]} it on ${dayAndDate(Date.parse(finding.decidedAt), zone)}.`
          : 'Nobody has decided on it yet.'}
      </p>
      {mayDecide ? (
        <div className="finding-panel-form">
          <label className="label" htmlFor={`${id}-remark`}>
            Remark
            <textarea
              id={`${id}-remark`}
              className="input"
              rows={2}
              maxLength={4000}
              value={remark}
              onChange={(event) => setRemark(event.target.value)}
            />
          </label>
          <label className="label" htmlFor={`${id}-follow`}>
            What follows
            <textarea
              id={`${id}-follow`}
              className="input"
              rows={2}
              maxLength={2000}
              value={followUp}
              onChange={(event) => setFollowUp(event.target.value)}
            />
          </label>
          <label className="label" htmlFor={`${id}-due`}>
            By
            <input
              id={`${id}-due`}
              className="input"
              type="date"
              value={dueDay}
              disabled={followUp.trim() === ''}
              onChange={(event) => setDueDay(event.target.value)}
            />
          </label>
        </div>
      ) : (
        <>
          {finding.remark ? <p>{finding.remark}</p> : null}
          {finding.followUp ? <p>Follow-up: {finding.followUp.text}</p> : null}
        </>
      )}
      {props.problem ? (
        <p className="error" role="alert">
          {sentenceFor(props.problem)}
        </p>
      ) : null}
      <div className="finding-panel-acts">
        {mayDecide ? (
          <>
            <button
              type="button"
              className="btn btn-primary"
              disabled={saving}
              onClick={() => decide('confirmed')}
            >
              {finding.state === 'confirmed' ? 'Save as confirmed' : 'Confirm'}
            </button>
            <button type="button" className="btn" disabled={saving} onClick={() => decide('dismissed')}>
              Dismiss
            </button>
            {finding.state !== 'open' ? (
              <button type="button" className="btn" disabled={saving} onClick={() => decide('open')}>
                Open again
              </button>
            ) : null}
            {changed && finding.state === 'open' ? (
              <button
                type="button"
                className="btn"
                disabled={saving}
                onClick={() => props.onChange(written())}
              >
                Save the remark only
              </button>
            ) : null}
            {finding.followUp && !finding.followUp.doneAt ? (
              <button
                type="button"
                className="btn"
                disabled={saving}
                onClick={() =>
                  finding.followUp &&
                  props.onChange({ followUp: { ...finding.followUp, doneAt: new Date().toISOString() } })
                }
              >
                Follow-up done
              </button>
            ) : null}
          </>
        ) : null}
        <span className="finding-panel-steps">
          <button type="button" className="btn btn-quiet" onClick={() => props.onStep(-1)}>
            Previous
          </button>
          <button type="button" className="btn btn-quiet" onClick={() => props.onStep(1)}>
            Next
          </button>
          <button type="button" className="btn btn-quiet" onClick={props.onClose}>
            Close
          </button>
        </span>
      </div>
    </section>
  );
}
