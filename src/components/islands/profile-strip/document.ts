import {
  beginHistory,
  canRedo,
  canUndo,
  endStep,
  record,
  redo,
  undo,
  type History,
} from '~/lib/profile/history';
import type { Profile } from '~/lib/profile/schema';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import type { Load } from '~/lib/thermal/load-schema';

/** What the editor edits: one version's content, and the name of the profile. Never changed in place. */
export interface ProfileDocument {
  readonly name: string;
  readonly kilnId: string | null;
  readonly profile: Profile;
  readonly load: Load | null;
}

/** The document with all it was, and what stood before the last change: figures say by how much they moved since. */
export interface Editing {
  readonly history: History<ProfileDocument>;
  readonly before: ProfileDocument | null;
  readonly selected: number | null;
}

export type EditingAction =
  | { readonly do: 'edit'; readonly to: ProfileDocument; readonly key?: string; readonly select?: number }
  | { readonly do: 'end-step' }
  | { readonly do: 'undo' | 'redo' }
  | { readonly do: 'select'; readonly segment: number | null };

export const beginEditing = (document: ProfileDocument): Editing => ({
  history: beginHistory(document),
  before: null,
  selected: null,
});

const bounded = (selected: number | null, document: ProfileDocument): number | null =>
  selected === null ? null : Math.min(selected, document.profile.segments.length - 1);

export function editing(state: Editing, action: EditingAction): Editing {
  const { history } = state;
  if (action.do === 'select') return { ...state, selected: action.segment };
  if (action.do === 'end-step') return { ...state, history: endStep(history) };
  if (action.do === 'edit') {
    if (sameDocument(action.to, history.present)) return state;
    const next = record(history, action.to, action.key ?? null);
    const goesOn = next.past === history.past;
    return {
      history: next,
      before: goesOn ? state.before : history.present,
      selected: bounded(action.select ?? state.selected, action.to),
    };
  }
  if (action.do === 'undo' ? !canUndo(history) : !canRedo(history)) return state;
  const next = action.do === 'undo' ? undo(history) : redo(history);
  return { history: next, before: history.present, selected: bounded(state.selected, next.present) };
}

/** Lengths of the ramps whose slope the kiln gives, as the planned curve takes them. */
export function kilnRampsOf(profile: Profile, estimate: Estimate | null): (number | null)[] {
  return profile.segments.map((segment, index) => {
    const timed = estimate?.segments[index];
    if (typeof segment.rateCPerH === 'number' || !timed) return null;
    return Math.max(0, timed.plannedEndS - timed.plannedStartS - segment.holdS);
  });
}

/** Whether two documents say the same. */
export const sameDocument = (a: ProfileDocument, b: ProfileDocument): boolean =>
  a === b || (a.name === b.name && sameContent(a, b));

/** Whether two documents would be the same version, whatever the profile is called. */
export const sameContent = (a: ProfileDocument, b: ProfileDocument): boolean =>
  a === b ||
  (a.kilnId === b.kilnId &&
    JSON.stringify(a.profile) === JSON.stringify(b.profile) &&
    JSON.stringify(a.load) === JSON.stringify(b.load));
