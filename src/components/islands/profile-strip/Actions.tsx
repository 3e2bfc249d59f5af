import { useMutation } from '@tanstack/react-query';
import { useState } from 'react';
import { call, sentenceFor } from '~/lib/client/api';
import { profileRoutes, type Version } from '~/lib/contracts/profiles';
import type { Segment } from '~/lib/profile/schema';
import type { Caution } from '~/lib/thermal/estimate-schema';
import { ApproveDialog, RetireDialog, ReturnDialog, SubmitDialog } from './ActionDialogs';
import type { EditorPermissions } from './permissions';

interface ActionsProps {
  readonly profileId: string;
  readonly version: Version;
  readonly may: EditorPermissions;
  readonly segments: readonly Segment[];
  readonly stops: readonly Caution[];
  readonly canSubmit: boolean;
  /** Sends what is not kept yet; resolves to whether all is kept. */
  readonly flush: () => Promise<boolean>;
  readonly onVersion: (version: Version) => void;
}

type Open = 'submit' | 'approve' | 'return' | 'retire';

function useCopies({ profileId, version, flush }: ActionsProps) {
  const go = (id: string, number: number): void =>
    window.location.assign(`/profiles/${id}/versions/${number}`);
  const draft = useMutation({
    mutationFn: () =>
      call(profileRoutes.createVersion, { params: { id: profileId }, body: { from: version.number } }),
    onSuccess: (made) => go(profileId, made.number),
  });
  const duplicate = useMutation({
    mutationFn: async () => {
      await flush();
      return call(profileRoutes.duplicate, { params: { id: profileId }, body: { version: version.number } });
    },
    onSuccess: (made) => go(made.id, made.version.number),
  });
  return { draft, duplicate };
}

/** What may be done with the version as it stands, by this person. */
export function Actions(props: ActionsProps) {
  const { profileId, version, may } = props;
  const [open, setOpen] = useState<Open | null>(null);
  const { draft, duplicate } = useCopies(props);
  const params = { id: profileId, n: String(version.number) };
  const dialog = {
    params,
    onClose: () => setOpen(null),
    onDone: (next: Version) => {
      setOpen(null);
      props.onVersion(next);
    },
  };
  const submit = async (): Promise<void> => {
    if (await props.flush()) setOpen('submit');
  };
  const trouble = draft.error ?? duplicate.error;
  return (
    <div className="editor-actions">
      {may.submit ? (
        <button
          type="button"
          className="btn btn-primary"
          disabled={!props.canSubmit}
          onClick={() => void submit()}
        >
          Submit for review
        </button>
      ) : null}
      {may.submit && !props.canSubmit ? <p className="hint">Choose a kiln first, then submit.</p> : null}
      {may.review ? (
        <>
          <button type="button" className="btn btn-primary" onClick={() => setOpen('approve')}>
            Approve
          </button>
          <button type="button" className="btn" onClick={() => setOpen('return')}>
            Return with remarks
          </button>
        </>
      ) : null}
      {may.handOut ? (
        <a className="btn btn-primary" href={`/handouts/new?version=${version.id}`}>
          Hand out
        </a>
      ) : null}
      {may.planRun ? (
        <a className="btn" href={`/runs/new?version=${version.id}`}>
          Plan a run
        </a>
      ) : null}
      {may.newVersion ? (
        <button type="button" className="btn" disabled={draft.isPending} onClick={() => draft.mutate()}>
          New draft from this version
        </button>
      ) : null}
      {may.duplicate ? (
        <button
          type="button"
          className="btn"
          disabled={duplicate.isPending}
          onClick={() => duplicate.mutate()}
        >
          Duplicate
        </button>
      ) : null}
      <a className="btn" href={`/profiles/${profileId}/versions/${version.number}/print`}>
        Print
      </a>
      {may.retire ? (
        <button type="button" className="btn btn-hot" onClick={() => setOpen('retire')}>
          Retire
        </button>
      ) : null}
      {trouble ? (
        <p className="error" role="alert">
          {sentenceFor(trouble)}
        </p>
      ) : null}
      {open === 'submit' ? <SubmitDialog {...dialog} /> : null}
      {open === 'approve' ? (
        <ApproveDialog {...dialog} stops={props.stops} segments={props.segments} />
      ) : null}
      {open === 'return' ? <ReturnDialog {...dialog} segments={props.segments} /> : null}
      {open === 'retire' ? <RetireDialog {...dialog} /> : null}
    </div>
  );
}
