function Arrow({ forward }: { readonly forward?: boolean }) {
  return (
    <svg width="18" height="18" viewBox="0 0 18 18" aria-hidden="true">
      <path
        d={
          forward
            ? 'M14.500 7H7a3.500 3.500 0 0 0 0 7h4M11.500 4l3 3l-3 3'
            : 'M3.500 7H11a3.500 3.500 0 0 1 0 7H7M6.500 4l-3 3l3 3'
        }
      />
    </svg>
  );
}

/** Undo and redo as buttons, and what was last removed. */
export function UndoButtons(props: {
  readonly canUndo: boolean;
  readonly canRedo: boolean;
  readonly notice: string | null;
  readonly onUndo: () => void;
  readonly onRedo: () => void;
}) {
  return (
    <div className="undo-buttons">
      <span role="status" className="undo-notice">
        {props.notice}
      </span>
      <button
        type="button"
        className="undo-button"
        disabled={!props.canUndo}
        aria-label="Undo"
        title="Undo, Ctrl Z"
        onClick={props.onUndo}
      >
        <Arrow />
      </button>
      <button
        type="button"
        className="undo-button"
        disabled={!props.canRedo}
        aria-label="Redo"
        title="Redo, Ctrl Shift Z"
        onClick={props.onRedo}
      >
        <Arrow forward />
      </button>
    </div>
  );
}
