import { useRef, useState, type PointerEvent } from 'react';
import type { StripScales } from './scales';
import type { TimeWindow } from './window';

/** Shorter drags than this, px, are clicks. */
const DRAG_PX = 5;

/**
 * A stretch of time chosen by dragging across the strip. Spread `ground` on a rectangle over the ruled area; while the
 * drag lasts `selecting` holds what it spans.
 */
export function useTimeSelection(scales: StripScales, onSelect: (window: TimeWindow) => void) {
  const start = useRef<{ px: number; timeS: number } | null>(null);
  const [selecting, setSelecting] = useState<TimeWindow | null>(null);
  const placeOf = (event: PointerEvent<SVGElement>): { px: number; timeS: number } => {
    const rect = (event.currentTarget.ownerSVGElement ?? event.currentTarget).getBoundingClientRect();
    const x = event.clientX - rect.left;
    const y = event.clientY - rect.top;
    const { fromS, toS } = scales.view;
    const timeS = Math.min(toS, Math.max(fromS, scales.at(x, y).timeS));
    return { px: scales.flow === 'across' ? x : y, timeS };
  };
  const end = (event: PointerEvent<SVGElement>, take: boolean): void => {
    const began = start.current;
    start.current = null;
    setSelecting(null);
    if (!began || !take) return;
    const here = placeOf(event);
    if (Math.abs(here.px - began.px) < DRAG_PX) return;
    onSelect({ fromS: Math.min(began.timeS, here.timeS), toS: Math.max(began.timeS, here.timeS) });
  };
  return {
    selecting,
    ground: {
      onPointerDown: (event: PointerEvent<SVGElement>): void => {
        if (event.button !== 0) return;
        event.currentTarget.setPointerCapture(event.pointerId);
        start.current = placeOf(event);
      },
      onPointerMove: (event: PointerEvent<SVGElement>): void => {
        const began = start.current;
        if (!began) return;
        const here = placeOf(event);
        setSelecting({ fromS: Math.min(began.timeS, here.timeS), toS: Math.max(began.timeS, here.timeS) });
      },
      onPointerUp: (event: PointerEvent<SVGElement>): void => end(event, true),
      onPointerCancel: (event: PointerEvent<SVGElement>): void => end(event, false),
    },
  };
}
