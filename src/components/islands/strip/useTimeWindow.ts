import { useCallback, useMemo, useState, type KeyboardEvent } from 'react';
import { panned, within, zoomed, type TimeWindow } from './window';

export interface TimeWindowControl {
  readonly shown: TimeWindow;
  readonly whole: TimeWindow;
  readonly isZoomed: boolean;
  show(wished: TimeWindow): void;
  zoom(factor: number): void;
  pan(share: number): void;
  reset(): void;
  /** `+` `-` `0` and arrows while the strip has the focus; true if the key was taken. */
  key(event: KeyboardEvent): boolean;
}

/**
 * What a zoomable strip shows of the whole firing, and the ways to change it by keys and buttons.
 *
 * @param mainS a moment that keeps its place while zooming, as long as it is in sight
 */
export function useTimeWindow(whole: TimeWindow, mainS: number | null = null): TimeWindowControl {
  const [wished, setWished] = useState<TimeWindow | null>(null);
  const { fromS, toS } = whole;
  const all = useMemo(() => ({ fromS, toS }), [fromS, toS]);
  const shown = useMemo(() => (wished ? within(wished, all) : all), [wished, all]);
  const isZoomed = shown.toS - shown.fromS < all.toS - all.fromS;
  const zoom = useCallback(
    (factor: number) => {
      const isInSight = mainS !== null && mainS >= shown.fromS && mainS <= shown.toS;
      setWished(zoomed(shown, all, factor, isInSight ? mainS : (shown.fromS + shown.toS) / 2));
    },
    [shown, all, mainS],
  );
  const pan = useCallback((share: number) => setWished(panned(shown, all, share)), [shown, all]);
  const reset = useCallback(() => setWished(null), []);
  const key = useCallback(
    (event: KeyboardEvent): boolean => {
      if (event.ctrlKey || event.metaKey || event.altKey) return false;
      if (event.key === '+' || event.key === '=') zoom(1.5);
      else if (event.key === '-') zoom(1 / 1.5);
      else if (event.key === '0') reset();
      else if (event.key === 'ArrowLeft' && isZoomed) pan(-0.2);
      else if (event.key === 'ArrowRight' && isZoomed) pan(0.2);
      else return false;
      event.preventDefault();
      return true;
    },
    [zoom, pan, reset, isZoomed],
  );
  return { shown, whole: all, isZoomed, show: setWished, zoom, pan, reset, key };
}
