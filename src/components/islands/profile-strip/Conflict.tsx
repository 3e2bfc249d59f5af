import { useMutation } from '@tanstack/react-query';
import { call, sentenceFor } from '~/lib/client/api';
import { useUnits } from '~/lib/client/units';
import type { Kiln } from '~/lib/contracts/equipment';
import { profileRoutes } from '~/lib/contracts/profiles';
import { differencesOf } from './differences';
import type { ProfileDocument } from './document';
import type { Theirs } from './keep';
import { STATE_NAMES } from './shown';

interface ConflictProps {
  readonly profileId: string;
  readonly mine: ProfileDocument;
  readonly theirs: Theirs;
  readonly kilns: readonly Kiln[];
  readonly onChoose: (choice: 'mine' | 'theirs') => void;
}

/** Someone saved first: both are shown, a person decides, and neither is lost: undo brings the other back. */
export function Conflict({ profileId, mine, theirs, kilns, onChoose }: ConflictProps) {
  const units = useUnits();
  const lines = differencesOf(mine, theirs.document, kilns, units);
  const isDraft = theirs.version.state === 'draft';
  const asDraft = useMutation({
    mutationFn: () => {
      const { profile, kilnId, load } = mine;
      return call(profileRoutes.createVersion, {
        params: { id: profileId },
        body: { profile, kilnId, load },
      });
    },
    onSuccess: (made) => window.location.assign(`/profiles/${profileId}/versions/${made.number}`),
  });
  return (
    <section className="notice notice-hot conflict" role="alert" aria-label="Two versions of this draft">
      <p>
        <strong>Someone else changed this draft while you did.</strong>{' '}
        {isDraft
          ? 'Choose which one stands. The other stays in undo.'
          : `It is now ${STATE_NAMES[theirs.version.state]} and cannot be changed. Yours can become a draft of its own.`}
      </p>
      <table>
        <thead>
          <tr>
            <th scope="col">Differs in</th>
            <th scope="col">Yours</th>
            <th scope="col">Theirs</th>
          </tr>
        </thead>
        <tbody>
          {lines.map((line, index) => (
            <tr key={index}>
              <th scope="row">{line.what}</th>
              <td>{line.mine}</td>
              <td>{line.theirs}</td>
            </tr>
          ))}
        </tbody>
      </table>
      {lines.length === 0 ? <p>Both say the same.</p> : null}
      <p className="conflict-choices">
        {isDraft ? (
          <button type="button" className="btn btn-primary" onClick={() => onChoose('mine')}>
            Keep mine
          </button>
        ) : (
          <button
            type="button"
            className="btn btn-primary"
            disabled={asDraft.isPending}
            onClick={() => asDraft.mutate()}
          >
            Make mine a new draft
          </button>
        )}
        <button type="button" className="btn" onClick={() => onChoose('theirs')}>
          Take theirs
        </button>
      </p>
      {asDraft.error ? <p className="error">{sentenceFor(asDraft.error)}</p> : null}
    </section>
  );
}
