import { useMutation } from '@tanstack/react-query';
import { useState, type ReactNode, type SubmitEvent } from 'react';
import { call, sentenceFor } from '~/lib/client/api';
import { profileRoutes, type Version } from '~/lib/contracts/profiles';
import type { Segment } from '~/lib/profile/schema';
import type { Caution } from '~/lib/thermal/estimate-schema';
import { Dialog } from './Dialog';
import { Labelled } from './Labelled';
import { STAGE_NAMES } from './shown';

export interface ActionDialogProps {
  readonly params: { readonly id: string; readonly n: string };
  readonly onClose: () => void;
  readonly onDone: (version: Version) => void;
}

function ActionForm(props: {
  readonly title: string;
  readonly confirm: string;
  readonly onClose: () => void;
  readonly send: () => Promise<Version>;
  readonly onDone: (version: Version) => void;
  readonly children: ReactNode;
}) {
  const sending = useMutation({ mutationFn: props.send, onSuccess: props.onDone });
  const submit = (event: SubmitEvent): void => {
    event.preventDefault();
    sending.mutate();
  };
  return (
    <Dialog title={props.title} onClose={props.onClose}>
      <form className="dialog-form" onSubmit={submit}>
        {props.children}
        {sending.error ? (
          <p className="error" role="alert">
            {sentenceFor(sending.error)}
          </p>
        ) : null}
        <p>
          <button type="submit" className="btn btn-primary" disabled={sending.isPending}>
            {sending.isPending ? 'Sending' : props.confirm}
          </button>
        </p>
      </form>
    </Dialog>
  );
}

function Remark(props: {
  readonly label: string;
  readonly value: string;
  readonly onChange: (value: string) => void;
  readonly required?: boolean;
  readonly hint?: ReactNode;
  readonly rows?: number;
  readonly max: number;
}) {
  return (
    <Labelled label={props.label} hint={props.hint}>
      {(id, hintId) => (
        <textarea
          id={id}
          className="input"
          rows={props.rows ?? 3}
          required={props.required}
          maxLength={props.max}
          aria-describedby={hintId}
          value={props.value}
          onChange={(event) => props.onChange(event.currentTarget.value)}
        />
      )}
    </Labelled>
  );
}

export function SubmitDialog({ params, onClose, onDone }: ActionDialogProps) {
  const [note, setNote] = useState('');
  return (
    <ActionForm
      title="Submit for review"
      confirm="Submit"
      onClose={onClose}
      onDone={onDone}
      send={() => call(profileRoutes.submit, { params, body: note.trim() ? { note: note.trim() } : {} })}
    >
      <p>It cannot be changed while it is in review. A teacher or owner approves it or returns it to you.</p>
      <Remark
        label="Note to the reviewer"
        value={note}
        onChange={setNote}
        max={4000}
        hint="May be left empty."
      />
    </ActionForm>
  );
}

const placeOf = (caution: Caution, segments: readonly Segment[]): string => {
  const segment = caution.segment === null ? undefined : segments[caution.segment];
  if (!segment || caution.segment === null) return 'The whole firing';
  return `Segment ${caution.segment + 1}, ${STAGE_NAMES[segment.stage].toLowerCase()}`;
};

/** Approving over a stop needs a reason for each, in writing. */
export function ApproveDialog(
  props: ActionDialogProps & { readonly stops: readonly Caution[]; readonly segments: readonly Segment[] },
) {
  const { stops } = props;
  const [reasons, setReasons] = useState<readonly string[]>(stops.map(() => ''));
  const overrides = () =>
    stops.map(({ code, segment }, index) => ({ code, segment, reason: (reasons[index] ?? '').trim() }));
  return (
    <ActionForm
      title="Approve and seal"
      confirm="Approve"
      onClose={props.onClose}
      onDone={props.onDone}
      send={() => call(profileRoutes.approve, { params: props.params, body: { overrides: overrides() } })}
    >
      <p>An approved version never changes. It can be handed out, fired and retired.</p>
      {stops.map((caution, index) => (
        <div key={`${caution.code} ${String(caution.segment)}`} className="notice notice-hot">
          <p>
            <strong>{placeOf(caution, props.segments)}.</strong> {caution.text}
          </p>
          <Remark
            label="Why it may be fired all the same"
            required
            rows={2}
            max={2000}
            value={reasons[index] ?? ''}
            onChange={(value) => setReasons(reasons.map((old, at) => (at === index ? value : old)))}
          />
        </div>
      ))}
    </ActionForm>
  );
}

export function ReturnDialog(props: ActionDialogProps & { readonly segments: readonly Segment[] }) {
  const [remark, setRemark] = useState('');
  const [remarks, setRemarks] = useState<readonly string[]>(props.segments.map(() => ''));
  const bySegment = () =>
    remarks.flatMap((text, segment) => (text.trim() ? [{ segment, remark: text.trim() }] : []));
  return (
    <ActionForm
      title="Return to its author"
      confirm="Return"
      onClose={props.onClose}
      onDone={props.onDone}
      send={() =>
        call(profileRoutes.return, {
          params: props.params,
          body: { remark: remark.trim(), segments: bySegment() },
        })
      }
    >
      <Remark label="What is to change" required value={remark} onChange={setRemark} max={4000} />
      <details>
        <summary className="link">Remarks on single segments</summary>
        <div className="dialog-form">
          {props.segments.map((segment, index) => (
            <Remark
              key={index}
              label={`Segment ${index + 1}, ${STAGE_NAMES[segment.stage].toLowerCase()}`}
              rows={2}
              max={2000}
              value={remarks[index] ?? ''}
              onChange={(value) => setRemarks(remarks.map((old, at) => (at === index ? value : old)))}
            />
          ))}
        </div>
      </details>
    </ActionForm>
  );
}

export function RetireDialog({ params, onClose, onDone }: ActionDialogProps) {
  const [reason, setReason] = useState('');
  return (
    <ActionForm
      title="Retire this version"
      confirm="Retire"
      onClose={onClose}
      onDone={onDone}
      send={() => call(profileRoutes.retire, { params, body: { reason: reason.trim() } })}
    >
      <p>It stays on record with its runs, and can no longer be handed out or fired.</p>
      <Remark label="Why" required value={reason} onChange={setReason} max={2000} />
    </ActionForm>
  );
}
