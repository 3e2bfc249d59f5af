import { clockTime } from '../strip/clock';
import type { SaveState } from './autosave';

/** Whether the document is kept, in a few words; where it is not, why and what helps. */
export function SaveLine(props: {
  readonly state: SaveState;
  readonly zone: string;
  readonly onRetry: () => void;
}) {
  const { state, zone } = props;
  const words = (): string => {
    if (state.kind === 'waiting' || state.kind === 'saving') return 'saving';
    if (state.kind === 'saved') {
      if (state.atMs !== null) return `saved ${clockTime(state.atMs, zone)}`;
      return 'saved';
    }
    if (state.kind === 'conflict') return 'not saved: someone else changed it';
    return 'not saved';
  };
  const isTrouble = state.kind === 'away' || state.kind === 'refused';
  return (
    <span
      className="save-line"
      role="status"
      data-trouble={isTrouble || state.kind === 'conflict' || undefined}
    >
      {words()}
      {isTrouble ? (
        <>
          {`. ${state.message}${state.kind === 'away' ? ' Your changes are here and will be sent.' : ''} `}
          <button type="button" className="link" onClick={props.onRetry}>
            Try again now
          </button>
        </>
      ) : null}
    </span>
  );
}
