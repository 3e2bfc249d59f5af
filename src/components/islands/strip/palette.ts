import { useEffect, useState } from 'react';

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
    const observer = new MutationObserver(changed);
    observer.observe(document.documentElement, {
      attributes: true,
      attributeFilter: ['data-theme', 'class'],
    });
    const media = ['(prefers-color-scheme: dark)', 'print'].map((query) => window.matchMedia(query));
    for (const query of media) query.addEventListener('change', changed);
    return () => {
      observer.disconnect();
      for (const query of media) query.removeEventListener('change', changed);
    };
  }, []);
  return version;
}
