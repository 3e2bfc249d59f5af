import { useLayoutEffect, useState, type RefObject } from 'react';

export interface Size {
  readonly widthPx: number;
  readonly heightPx: number;
}

/** Size of an element as it is laid out; null until it is known (on the server, and before the first layout). */
export function useSize(element: RefObject<HTMLElement | null>): Size | null {
  const [size, setSize] = useState<Size | null>(null);
  useLayoutEffect(() => {
    const target = element.current;
    if (!target) return undefined;
    const measure = (): void => {
      const { width, height } = target.getBoundingClientRect();
      setSize((before) =>
        before && Math.abs(before.widthPx - width) < 0.5 && Math.abs(before.heightPx - height) < 0.5
          ? before
          : { widthPx: width, heightPx: height },
      );
    };
    measure();
    const observer = new ResizeObserver(measure);
    observer.observe(target);
    return () => observer.disconnect();
  }, [element]);
  return size;
}
