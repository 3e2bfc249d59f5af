interface Past<T> {
  value: T;
  /** What kind of edit led away from this value; edits of one kind in a row are undone as one. */
  key: string | null;
  below: Past<T> | null;
}

/** A value with everything it was before and, after undoing, everything it had become. Nothing in it is mutated. */
export interface History<T> {
  readonly present: T;
  readonly past: Past<T> | null;
  readonly future: Past<T> | null;
}

export const beginHistory = <T>(present: T): History<T> => ({ present, past: null, future: null });

/**
 * Notes an edit. Constant cost whatever the length of the history, which has no limit.
 *
 * @param key edits of the same key that follow one another are one step (a drag, typing in one field); null: its own step
 */
export function record<T>(history: History<T>, next: T, key: string | null = null): History<T> {
  if (Object.is(next, history.present)) return history;
  const continues = key !== null && history.past?.key === key && history.future === null;
  const past = continues ? history.past : { value: history.present, key, below: history.past };
  return { present: next, past, future: null };
}

/** Closes a step, so that the next edit of the same key is a step of its own. */
export function endStep<T>(history: History<T>): History<T> {
  return history.past === null ? history : { ...history, past: { ...history.past, key: null } };
}

export function undo<T>({ present, past, future }: History<T>): History<T> {
  if (past === null) return { present, past, future };
  return { present: past.value, past: past.below, future: { value: present, key: past.key, below: future } };
}

export function redo<T>({ present, past, future }: History<T>): History<T> {
  if (future === null) return { present, past, future };
  return { present: future.value, past: { value: present, key: null, below: past }, future: future.below };
}

export const canUndo = <T>(history: History<T>): boolean => history.past !== null;
export const canRedo = <T>(history: History<T>): boolean => history.future !== null;
