import { useEffect, useId, useRef, useState } from 'react';
import { sentenceFor } from '~/lib/client/api';
import { FINDING_KINDS } from '~/lib/contracts/runs';
import { FINDING_TITLES } from '~/lib/review/words';
import type { TimeWindow } from '../strip/window';
import { spanText } from './FindingCard';
import type { NewFinding } from './use-review';

interface AddFindingProps {
  readonly stretch: TimeWindow;
  readonly startMs: number;
  readonly zone: string;
  readonly saving: boolean;
  readonly problem: unknown;
  readonly onAdd: (finding: NewFinding) => void;
  readonly onClose: () => void;
}

const KINDS = [...FINDING_KINDS, 'other'] as const;
const SEVERITIES = { note: 'Note', warn: 'Worth acting on', serious: 'Serious' } as const;

/** A dialog for the stretch that was dragged over: what it is, how bad, and a remark. */
export function AddFinding(props: AddFindingProps) {
  const { stretch, startMs, zone } = props;
  const dialog = useRef<HTMLDialogElement>(null);
  const id = useId();
  const [kind, setKind] = useState<NewFinding['kind']>('other');
  const [severity, setSeverity] = useState<NewFinding['severity']>('warn');
  const [remark, setRemark] = useState('');
  useEffect(() => {
    const open = dialog.current;
    if (open && !open.open) open.showModal();
  }, []);
  return (
    <dialog ref={dialog} className="review-dialog" aria-labelledby={`${id}-title`} onClose={props.onClose}>
      <form
        onSubmit={(event) => {
          event.preventDefault();
          props.onAdd({ kind, severity, remark, startS: stretch.fromS, endS: stretch.toS });
        }}
      >
        <h2 id={`${id}-title`} className="section-title">
          Mark a finding,{' '}
          <span className="num">{spanText({ startS: stretch.fromS, endS: stretch.toS }, startMs, zone)}</span>
        </h2>
        <label className="label" htmlFor={`${id}-kind`}>
          What it is
          <select
            id={`${id}-kind`}
            className="input"
            value={kind}
            onChange={(event) => setKind(event.target.value as NewFinding['kind'])}
          >
            {KINDS.map((one) => (
              <option key={one} value={one}>
                {FINDING_TITLES[one]}
              </option>
            ))}
          </select>
        </label>
        <label className="label" htmlFor={`${id}-severity`}>
          How much it matters
          <select
            id={`${id}-severity`}
            className="input"
            value={severity}
            onChange={(event) => setSeverity(event.target.value as NewFinding['severity'])}
          >
            {Object.entries(SEVERITIES).map(([value, text]) => (
              <option key={value} value={value}>
                {text}
              </option>
            ))}
          </select>
        </label>
        <label className="label" htmlFor={`${id}-remark`}>
          Remark
          <textarea
            id={`${id}-remark`}
            className="input"
            rows={3}
            maxLength={4000}
            value={remark}
            onChange={(event) => setRemark(event.target.value)}
          />
        </label>
        {props.problem ? (
          <p className="error" role="alert">
            {sentenceFor(props.problem)}
          </p>
        ) : null}
        <div className="finding-panel-acts">
          <button type="submit" className="btn btn-primary" disabled={props.saving}>
            Mark it
          </button>
          <button type="button" className="btn" onClick={props.onClose}>
            Cancel
          </button>
        </div>
      </form>
    </dialog>
  );
}
