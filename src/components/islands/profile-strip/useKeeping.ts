import { useCallback, useEffect, useRef, useState, useSyncExternalStore } from 'react';
import { Autosave, type SaveState } from './autosave';
import { sameDocument, type ProfileDocument } from './document';
import { keep, type Kept, type Theirs } from './keep';

export interface Keeping {
  readonly kept: Kept;
  readonly state: SaveState;
  retry(): void;
  /** Sends what is not kept yet and says whether all of it now is. */
  flush(): Promise<boolean>;
  /** Of two that differ: one's own replaces theirs, or theirs replaces one's own in the editor. */
  settle(choice: 'mine' | 'theirs'): void;
  /** The version was changed by an action of its own (submitted, approved …). */
  adopt(kept: Kept): void;
}

/** Keeps the document on the server as it is changed, and the page open while something is not kept. */
export function useKeeping(
  document: ProfileDocument,
  first: Kept,
  onTheirs: (document: ProfileDocument) => void,
): Keeping {
  const [kept, setKept] = useState(first);
  const keptNow = useRef(first);
  const documentNow = useRef(document);
  documentNow.current = document;
  const adopt = useCallback((next: Kept): void => {
    keptNow.current = next;
    setKept(next);
  }, []);
  const [autosave] = useState(
    () =>
      new Autosave<ProfileDocument>(first.document, {
        isSame: sameDocument,
        now: Date.now,
        save: async (sent) => adopt(await keep(keptNow.current, sent)),
      }),
  );
  const state = useSyncExternalStore(autosave.subscribe, autosave.snapshot, autosave.snapshot);

  useEffect(() => autosave.changed(document), [autosave, document]);

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
      if (window.document.visibilityState === 'hidden' && autosave.snapshot().kind === 'waiting')
        void autosave.flush();
    };
    window.addEventListener('beforeunload', onLeave);
    window.addEventListener('online', onOnline);
    window.document.addEventListener('visibilitychange', onHidden);
    return () => {
      window.removeEventListener('beforeunload', onLeave);
      window.removeEventListener('online', onOnline);
      window.document.removeEventListener('visibilitychange', onHidden);
    };
  }, [autosave]);

  const settle = (choice: 'mine' | 'theirs'): void => {
    if (state.kind !== 'conflict') return;
    const theirs = state.theirs as Theirs;
    adopt({
      profileId: keptNow.current.profileId,
      profileRevision: theirs.profileRevision,
      version: theirs.version,
      document: theirs.document,
    });
    if (choice === 'theirs') onTheirs(theirs.document);
    autosave.settle(theirs.document, choice === 'theirs' ? theirs.document : documentNow.current);
  };
  const flush = async (): Promise<boolean> => {
    await autosave.flush();
    return !autosave.isUnsaved;
  };
  return { kept, state, settle, adopt, flush, retry: () => void autosave.flush() };
}
