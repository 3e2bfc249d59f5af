import { useMutation } from '@tanstack/react-query';
import { useId, useState } from 'react';
import { call, sentenceFor } from '~/lib/client/api';
import { routes } from '~/lib/contracts';
import { formatNumber, parseDuration } from '~/lib/units';
import { durationText } from '../strip/duration';
import type { RunReviewProps } from './props';

const METHODS = { clock: 'by the clock', fit: 'by best fit', person: 'by hand' } as const;

/** How the log lies on the plan, and the means to lay it otherwise. The review is computed anew; decisions stay. */
export function AlignmentPanel(props: RunReviewProps) {
  const { alignment } = props.review;
  const [minutes, setMinutes] = useState(formatNumber(alignment.startOffsetS / 60, 1));
  const id = useId();
  const align = useMutation({
    mutationFn: (wanted: { method: 'auto' } | { method: 'person'; startOffsetS: number }) =>
      call(routes.logs.align, {
        params: { id: props.run.id, logId: props.review.logId },
        revision: props.logRevision,
        body: { alignment: wanted },
      }),
    onSuccess: () => window.location.reload(),
  });
  const negative = minutes.trim().startsWith('-') || minutes.trim().startsWith('−');
  const parsed = parseDuration(minutes.trim().replace(/^[-−]/, ''), 'min');
  const offsetS = parsed.ok ? (negative ? -parsed.value : parsed.value) : null;
  const before = alignment.startOffsetS >= 0;
  return (
    <details className="alignment">
      <summary>
        Laid on the plan {METHODS[alignment.method]}, {formatNumber(alignment.confidence * 100)} % sure
      </summary>
      <p className="hint">
        The firing begins {durationText(Math.abs(alignment.startOffsetS))} {before ? 'after' : 'before'} the
        first row of the log.
      </p>
      {props.mayAlign ? (
        <form
          className="alignment-form"
          onSubmit={(event) => {
            event.preventDefault();
            if (offsetS !== null) align.mutate({ method: 'person', startOffsetS: offsetS });
          }}
        >
          <label className="label" htmlFor={`${id}-offset`}>
            Minutes from the first row to the start
            <input
              id={`${id}-offset`}
              className="input num"
              inputMode="text"
              value={minutes}
              aria-invalid={offsetS === null || undefined}
              onChange={(event) => setMinutes(event.target.value)}
            />
          </label>
          <p className={offsetS === null ? 'error' : 'hint'}>
            {offsetS === null ? (parsed.ok ? '' : parsed.issue) : `Understood: ${durationText(offsetS)}`}
          </p>
          <div className="finding-panel-acts">
            <button type="submit" className="btn btn-small" disabled={offsetS === null || align.isPending}>
              Lay by hand
            </button>
            <button
              type="button"
              className="btn btn-small"
              disabled={align.isPending}
              onClick={() => align.mutate({ method: 'auto' })}
            >
              Lay by itself
            </button>
          </div>
          {align.error ? (
            <p className="error" role="alert">
              {sentenceFor(align.error)}
            </p>
          ) : null}
        </form>
      ) : null}
    </details>
  );
}
