import { useEffect, useState } from 'react';
import { flushSync } from 'react-dom';

const NAMES = ['ink', 'ink-2', 'line-ink', 'paper', 'sheet', 'grid-1', 'grid-2', 'line', 'hot-fill'] as const;
export type Palette = Readonly<Record<(typeof NAMES)[number], string>>;

/** The colour tokens as they stand now, for the canvas, which cannot use custom properties. */
export function readPalette(element: Element): Palette {
  const style = getComputedStyle(element);
  return Object.fromEntries(
    NAMES.map((name) => [name, style.getPropertyValue(`--${name}`).trim() || 'currentColor']),
  ) as Palette;
}

/**
 * A number that rises whenever the colours may have changed: another theme, the device's night, before and after a
 * print. What draws on a canvas redraws on it.
 */
export function usePaletteVersion(): number {
  const [version, setVersion] = useState(0);
  useEffect(() => {
    const changed = (): void => setVersion((before) => before + 1);
    // A print is laid out at once after this event: the canvas is to be drawn in its colours by then.
    const printing = (): void => flushSync(changed);
    const observer = new MutationObserver(changed);
    observer.observe(document.documentElement, {
      attributes: true,
      attributeFilter: ['data-theme', 'class'],
    });
    const night = window.matchMedia('(prefers-color-scheme: dark)');
    const print = window.matchMedia('print');
    night.addEventListener('change', changed);
    print.addEventListener('change', printing);
    return () => {
      observer.disconnect();
      night.removeEventListener('change', changed);
      print.removeEventListener('change', printing);
    };
  }, []);
  return version;
}
