import { useRef, type KeyboardEvent, type PointerEvent } from 'react';
import type { Point, StripScales } from './scales';

export interface HandleProps {
  readonly scales: StripScales;
  readonly timeS: number;
  readonly tempC: number;
  readonly name: string;
  /** What its place means, in words: `900 °C after 9 h 40`. */
  readonly valueText: string;
  /** In degrees as shown, for assistive technology. */
  readonly valueNow: number;
  readonly selected: boolean;
  /** Half the side of what can be touched, px. */
  readonly reachPx: number;
  readonly onGrab: () => void;
  readonly onMove: (to: { timeS: number; tempC: number; fine: boolean }) => void;
  readonly onDrop: () => void;
  readonly onKeyDown: (event: KeyboardEvent<SVGGElement>) => void;
  readonly onFocus: () => void;
}

/** Half a fingertip, and the least that is left of it, px (WCAG 2.2, success criterion 2.5.8). */
const FINGER_PX = { most: 22, least: 12 };

/** How far each handle reaches: half a fingertip, and where two are near, to half way between them. */
export const reachesOf = (places: readonly Point[]): number[] =>
  places.map(({ x, y }, index) => {
    const others = places.filter((_, other) => other !== index);
    const nearest = Math.min(Infinity, ...others.map((other) => Math.hypot(other.x - x, other.y - y)));
    return Math.max(FINGER_PX.least, Math.min(FINGER_PX.most, nearest / 2));
  });

/** A corner of the plan that can be taken hold of, by pointer, finger or keys. */
export function Handle(props: HandleProps) {
  const { scales } = props;
  const { x, y } = scales.point(props.timeS, props.tempC);
  const grip = useRef<{ dx: number; dy: number } | null>(null);
  const placeOf = (event: PointerEvent<SVGGElement>): { x: number; y: number } => {
    const rect = event.currentTarget.ownerSVGElement?.getBoundingClientRect();
    return { x: event.clientX - (rect?.left ?? 0), y: event.clientY - (rect?.top ?? 0) };
  };
  const drop = (event: PointerEvent<SVGGElement>): void => {
    if (!grip.current) return;
    grip.current = null;
    if (event.currentTarget.hasPointerCapture(event.pointerId))
      event.currentTarget.releasePointerCapture(event.pointerId);
    props.onDrop();
  };
  return (
    <g
      className="strip-handle"
      role="slider"
      tabIndex={0}
      aria-label={props.name}
      aria-valuenow={props.valueNow}
      aria-valuetext={props.valueText}
      data-selected={props.selected || undefined}
      onFocus={props.onFocus}
      onKeyDown={props.onKeyDown}
      onPointerDown={(event) => {
        if (event.button !== 0) return;
        event.preventDefault();
        event.currentTarget.focus({ preventScroll: true });
        event.currentTarget.setPointerCapture(event.pointerId);
        const at = placeOf(event);
        grip.current = { dx: at.x - x, dy: at.y - y };
        props.onGrab();
      }}
      onPointerMove={(event) => {
        if (!grip.current) return;
        const at = placeOf(event);
        props.onMove({
          ...scales.at(at.x - grip.current.dx, at.y - grip.current.dy),
          fine: event.shiftKey,
        });
      }}
      onPointerUp={drop}
      onPointerCancel={drop}
    >
      <circle className="strip-handle-reach" cx={x} cy={y} r={props.reachPx} />
      <rect
        className="strip-handle-mark"
        x={x - 5.5}
        y={y - 5.5}
        width="11"
        height="11"
        transform={`rotate(45 ${x.toFixed(2)} ${y.toFixed(2)})`}
      />
    </g>
  );
}
