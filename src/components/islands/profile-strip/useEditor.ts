import { useCallback, useEffect, useLayoutEffect, useMemo, useReducer, useRef, useState } from 'react';
import { insertSegment, moveSegment, removeSegment } from '~/lib/profile/edit';
import { canRedo, canUndo } from '~/lib/profile/history';
import type { Profile } from '~/lib/profile/schema';
import { beginEditing, editing, type ProfileDocument } from './document';
import { STAGE_NAMES } from './shown';

export type Editor = ReturnType<typeof useEditor>;

const isTyping = (target: EventTarget | null): boolean =>
  target instanceof HTMLElement &&
  (target.isContentEditable || target instanceof HTMLTextAreaElement || target instanceof HTMLInputElement);

/** Puts the focus on a card once it is drawn. */
function focusCard(index: number): void {
  requestAnimationFrame(() => {
    const card = document.querySelector<HTMLElement>(`[data-card="${index}"]`);
    card?.focus();
    card?.scrollIntoView({ block: 'nearest', inline: 'nearest' });
  });
}

/** The document being edited, what was selected, and every way to change it. */
export function useEditor(
  first: ProfileDocument,
  readOnly: boolean,
  limits: (kilnId: string | null) => number | null,
) {
  const [state, dispatch] = useReducer(editing, first, beginEditing);
  const [notice, setNotice] = useState<string | null>(null);
  const { present } = state.history;
  const now = useRef(present);
  useLayoutEffect(() => {
    now.current = present;
  }, [present]);
  const kilnMaxC = limits(present.kilnId);

  const change = useCallback(
    (next: Partial<ProfileDocument>, key?: string, select?: number): void => {
      if (readOnly) return;
      setNotice(null);
      dispatch({
        do: 'edit',
        to: { ...now.current, ...next },
        ...(key === undefined ? {} : { key }),
        ...(select === undefined ? {} : { select }),
      });
    },
    [readOnly],
  );
  const changeProfile = useCallback(
    (profile: Profile, key?: string, select?: number): void => change({ profile }, key, select),
    [change],
  );
  const select = useCallback((segment: number | null) => dispatch({ do: 'select', segment }), []);
  const endStep = useCallback(() => dispatch({ do: 'end-step' }), []);

  const add = useCallback(
    (after: number): void => {
      if (readOnly) return;
      const next = insertSegment(now.current.profile, after + 1, undefined, { kilnMaxC });
      if (next === now.current.profile) {
        setNotice('A profile has 64 segments at most.');
        return;
      }
      changeProfile(next, undefined, after + 1);
      focusCard(after + 1);
    },
    [changeProfile, kilnMaxC, readOnly],
  );
  const remove = useCallback(
    (index: number): void => {
      const { profile } = now.current;
      const removed = profile.segments[index];
      const next = removeSegment(profile, index);
      if (readOnly || !removed || next === profile) return;
      changeProfile(next, undefined, Math.max(0, index - 1));
      setNotice(`Segment ${index + 1}, ${STAGE_NAMES[removed.stage].toLowerCase()}, removed.`);
      focusCard(Math.max(0, index - 1));
    },
    [changeProfile, readOnly],
  );
  const move = useCallback(
    (index: number, by: -1 | 1): void => {
      changeProfile(moveSegment(now.current.profile, index, index + by), undefined, index + by);
      focusCard(index + by);
    },
    [changeProfile],
  );
  const undo = useCallback(() => {
    setNotice(null);
    dispatch({ do: 'undo' });
  }, []);
  const redo = useCallback(() => {
    setNotice(null);
    dispatch({ do: 'redo' });
  }, []);

  useEffect(() => {
    if (readOnly) return undefined;
    const onKey = (event: KeyboardEvent): void => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return;
      const key = event.key.toLowerCase();
      const isUndo = key === 'z' && !event.shiftKey;
      const isRedo = (key === 'z' && event.shiftKey) || key === 'y';
      if (!isUndo && !isRedo) return;
      if (document.querySelector('dialog[open]') && isTyping(event.target)) return;
      if (isTyping(event.target) && (event.target as HTMLElement).dataset['typing'] === 'yes') return;
      event.preventDefault();
      if (isUndo) undo();
      else redo();
    };
    window.addEventListener('keydown', onKey);
    return () => window.removeEventListener('keydown', onKey);
  }, [readOnly, undo, redo]);

  return useMemo(
    () => ({
      document: present,
      before: state.before,
      selected: state.selected,
      notice,
      canUndo: canUndo(state.history),
      canRedo: canRedo(state.history),
      kilnMaxC,
      change,
      changeProfile,
      select,
      endStep,
      add,
      remove,
      move,
      undo,
      redo,
    }),
    [present, state, notice, kilnMaxC, change, changeProfile, select, endStep, add, remove, move, undo, redo],
  );
}
