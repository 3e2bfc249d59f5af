import { useEffect, useState, useSyncExternalStore } from 'react';
import type { SaveState } from './autosave';
import type { ProfileDocument } from './document';
import { Keeper, type Kept, type Theirs } from './keep';

export interface Keeping {
  readonly keptName: string;
  readonly state: SaveState;
  readonly retry: () => void;
  /** Sends what is not kept yet and says whether all of it now is. */
  readonly flush: () => Promise<boolean>;
  /** Of two that differ: one's own replaces theirs, or theirs replaces one's own in the editor. */
  readonly settle: (choice: 'mine' | 'theirs', theirs: Theirs) => void;
  /** The version was changed by an action of its own (submitted, approved …). */
  readonly adoptVersion: (version: Kept['version']) => void;
}

/** Sends when the page is left or hidden, and again when the network is back; warns while something is not kept. */
function useLeaving({ autosave }: Keeper): void {
  useEffect(() => {
    const onLeave = (event: BeforeUnloadEvent): void => {
      if (!autosave.isUnsaved) return;
      void autosave.flush();
      event.preventDefault();
    };
    const onOnline = (): void => {
      if (autosave.snapshot().kind === 'away') void autosave.flush();
    };
    const onHidden = (): void => {
      if (document.visibilityState === 'hidden' && autosave.snapshot().kind === 'waiting')
        void autosave.flush();
    };
    window.addEventListener('beforeunload', onLeave);
    window.addEventListener('online', onOnline);
    document.addEventListener('visibilitychange', onHidden);
    return () => {
      window.removeEventListener('beforeunload', onLeave);
      window.removeEventListener('online', onOnline);
      document.removeEventListener('visibilitychange', onHidden);
    };
  }, [autosave]);
}

/** Keeps the document on the server as it is changed, and the page open while something is not kept. */
export function useKeeping(
  document: ProfileDocument,
  first: Kept,
  onBoth: (first: ProfileDocument, then: ProfileDocument) => void,
): Keeping {
  const [keeper] = useState(() => new Keeper(first));
  const { autosave } = keeper;
  const state = useSyncExternalStore(autosave.subscribe, autosave.snapshot, autosave.snapshot);
  useEffect(() => autosave.changed(document), [autosave, document]);
  useLeaving(keeper);
  return {
    keptName: keeper.kept.document.name,
    state,
    retry: () => void autosave.flush(),
    flush: async () => {
      await autosave.flush();
      return !autosave.isUnsaved;
    },
    settle: (choice, theirs) => {
      const chosen = choice === 'theirs' ? theirs.document : document;
      onBoth(choice === 'theirs' ? document : theirs.document, chosen);
      keeper.settle(theirs, chosen);
    },
    adoptVersion: (version) => keeper.adopt({ ...keeper.kept, version }),
  };
}
