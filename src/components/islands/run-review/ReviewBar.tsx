import type { StripLayer } from '../strip/layers';
import { PenMark } from '../strip/PenMark';
import type { TimeWindowControl } from '../strip/useTimeWindow';
import type { TimeWindow } from '../strip/window';

interface ReviewBarProps {
  readonly layers: readonly StripLayer[];
  readonly hidden: ReadonlySet<string>;
  readonly onToggle: (id: string) => void;
  readonly zoom: TimeWindowControl;
  /** Null where the person may not mark findings. */
  readonly onMark: ((stretch: TimeWindow) => void) | null;
  /** What is under way, or went wrong, with what is shown. */
  readonly standing: string;
}

/** Which curves lie on the strip, how close it is looked at, and marking what is shown. */
export function ReviewBar(props: ReviewBarProps) {
  const { layers, hidden, zoom, onMark } = props;
  return (
    <div className="review-bar">
      <div className="review-layers" role="group" aria-label="Curves shown">
        {layers.map((layer) => (
          <button
            key={layer.id}
            type="button"
            className="chip"
            aria-pressed={!hidden.has(layer.id)}
            onClick={() => props.onToggle(layer.id)}
          >
            <PenMark pen={layer} />
            {layer.name}
          </button>
        ))}
      </div>
      <div className="review-zoom" role="group" aria-label="Zoom">
        <button type="button" className="btn btn-small" onClick={() => zoom.zoom(1.6)} aria-label="Closer">
          +
        </button>
        <button
          type="button"
          className="btn btn-small"
          onClick={() => zoom.zoom(1 / 1.6)}
          disabled={!zoom.isZoomed}
          aria-label="Further"
        >
          −
        </button>
        <button type="button" className="btn btn-small" onClick={zoom.reset} disabled={!zoom.isZoomed}>
          Whole firing
        </button>
        {onMark ? (
          <button type="button" className="btn btn-small" onClick={() => onMark(zoom.shown)}>
            Mark what is shown
          </button>
        ) : null}
        <span className="hint" role="status">
          {props.standing}
        </span>
      </div>
    </div>
  );
}
