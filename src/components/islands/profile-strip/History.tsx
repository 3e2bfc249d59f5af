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
        className="btn btn-quiet btn-small"
        disabled={!props.canUndo}
        title="Ctrl Z"
        onClick={props.onUndo}
      >
        Undo
      </button>
      <button
        type="button"
        className="btn btn-quiet btn-small"
        disabled={!props.canRedo}
        title="Ctrl Shift Z"
        onClick={props.onRedo}
      >
        Redo
      </button>
    </div>
  );
}
