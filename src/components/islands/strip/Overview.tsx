import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import type { StripLayer } from './layers';
import { pathOf } from './leader';
import { stripScales, type StripView } from './scales';
import { panned, within, zoomed, type TimeWindow } from './window';

interface OverviewProps {
  readonly view: StripView;
  readonly layers: readonly StripLayer[];
  readonly shown: TimeWindow;
  readonly onShow: (window: TimeWindow) => void;
  readonly widthPx: number;
  readonly leftPx: number;
  readonly heightPx?: number;
  /** What the window spans, in words. */
  readonly valueText: string;
}

type Grip = {
  readonly part: 'whole' | 'from' | 'to';
  readonly grabbedS: number;
  readonly window: TimeWindow;
};

/** The whole firing in small, with a window on what the strip shows: to be dragged, stretched, or moved by keys. */
export function Overview(props: OverviewProps) {
  const { view, shown, onShow, leftPx, widthPx, heightPx = 44 } = props;
  const whole = { fromS: view.fromS, toS: view.toS };
  const scales = stripScales('across', view, { leftPx, topPx: 2, widthPx, heightPx: heightPx - 4 });
  const grip = useRef<Grip | null>(null);
  const momentOf = (event: PointerEvent<SVGElement>): number => {
    const rect = (event.currentTarget.ownerSVGElement ?? event.currentTarget).getBoundingClientRect();
    return scales.at(event.clientX - rect.left, 0).timeS;
  };
  const grab = (part: Grip['part'], event: PointerEvent<SVGElement>): void => {
    event.stopPropagation();
    event.currentTarget.setPointerCapture(event.pointerId);
    grip.current = { part, grabbedS: momentOf(event), window: shown };
  };
  const move = (event: PointerEvent<SVGElement>): void => {
    const held = grip.current;
    if (!held) return;
    const byS = momentOf(event) - held.grabbedS;
    const { fromS, toS } = held.window;
    if (held.part === 'whole') onShow(within({ fromS: fromS + byS, toS: toS + byS }, whole));
    else if (held.part === 'from')
      onShow({ fromS: Math.max(whole.fromS, Math.min(toS - 60, fromS + byS)), toS });
    else onShow({ fromS, toS: Math.min(whole.toS, Math.max(fromS + 60, toS + byS)) });
  };
  const drop = (): void => {
    grip.current = null;
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    const middleS = (shown.fromS + shown.toS) / 2;
    if (event.key === 'ArrowLeft') onShow(panned(shown, whole, -0.2));
    else if (event.key === 'ArrowRight') onShow(panned(shown, whole, 0.2));
    else if (event.key === 'ArrowUp') onShow(zoomed(shown, whole, 1.5, middleS));
    else if (event.key === 'ArrowDown') onShow(zoomed(shown, whole, 1 / 1.5, middleS));
    else return;
    event.preventDefault();
  };
  const from = scales.timePx(shown.fromS);
  const to = scales.timePx(shown.toS);
  const held = { onPointerMove: move, onPointerUp: drop, onPointerCancel: drop };
  return (
    <svg className="strip-overview" width={leftPx + widthPx + 10} height={heightPx}>
      <rect className="strip-sheet" x={leftPx} y="2" width={widthPx} height={heightPx - 4} />
      {props.layers.map((layer) => (
        <path
          key={layer.id}
          className={layer.kind === 'measured' ? 'strip-overview-measured' : 'strip-overview-curve'}
          d={pathOf(
            Array.from(layer.timeS).flatMap((timeS, index) => {
              const value = layer.value[index];
              return value === null || value === undefined ? [] : [scales.point(timeS, value)];
            }),
          )}
        />
      ))}
      <rect
        className="strip-overview-shade"
        x={leftPx}
        y="2"
        width={Math.max(0, from - leftPx)}
        height={heightPx - 4}
      />
      <rect
        className="strip-overview-shade"
        x={to}
        y="2"
        width={Math.max(0, leftPx + widthPx - to)}
        height={heightPx - 4}
      />
      <rect
        className="strip-overview-window"
        role="slider"
        tabIndex={0}
        aria-label="Part of the firing that is shown; arrow keys move, up and down zoom"
        aria-valuemin={Math.round(whole.fromS)}
        aria-valuemax={Math.round(whole.toS)}
        aria-valuenow={Math.round(shown.fromS)}
        aria-valuetext={props.valueText}
        x={from}
        y="2"
        width={Math.max(2, to - from)}
        height={heightPx - 4}
        onKeyDown={onKeyDown}
        onPointerDown={(event) => grab('whole', event)}
        {...held}
      />
      {(['from', 'to'] as const).map((part) => (
        <rect
          key={part}
          className="strip-overview-edge"
          aria-hidden="true"
          x={(part === 'from' ? from : to) - 12}
          y="2"
          width="24"
          height={heightPx - 4}
          onPointerDown={(event) => grab(part, event)}
          {...held}
        />
      ))}
    </svg>
  );
}
