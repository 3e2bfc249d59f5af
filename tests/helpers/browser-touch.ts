import type { Page } from 'playwright-core';

/** Least side of what is pressed by finger, px (WCAG 2.2, success criterion 2.5.8). */
const LEAST_PX = 24;

/**
 * Controls in sight that are smaller than a finger needs, each with its size. A control within a label is as large as
 * the label; a link within a sentence is as high as its line, which the criterion allows.
 */
export function smallTargets(page: Page): Promise<string[]> {
  return page.evaluate((leastPx) => {
    const controls = document.querySelectorAll<HTMLElement | SVGElement>(
      'a[href], button, input, select, textarea, summary, [role="slider"], [role="button"], [tabindex="0"]',
    );
    const small: string[] = [];
    for (const control of controls) {
      if (!control.checkVisibility({ visibilityProperty: true, opacityProperty: false })) continue;
      const own = control.getBoundingClientRect();
      const label = control.closest('label') ?? (control as Partial<HTMLInputElement>).labels?.[0];
      const isTick = control instanceof HTMLInputElement && /checkbox|radio|file/.test(control.type);
      const around = isTick && label ? label.getBoundingClientRect() : own;
      const [width, height] = [Math.max(own.width, around.width), Math.max(own.height, around.height)];
      // Hidden from sight until it has the focus.
      if (width <= 1 || height <= 1) continue;
      if (width >= leastPx - 0.5 && height >= leastPx - 0.5) continue;
      if (isInSentence(control)) continue;
      const name = control.getAttribute('aria-label') ?? (control.textContent ?? '').trim().slice(0, 40);
      small.push(`${control.tagName.toLowerCase()} "${name}" ${width.toFixed(1)} × ${height.toFixed(1)} px`);
    }
    return small;

    function isInSentence(control: Element): boolean {
      const parent = control.parentElement;
      if (!parent || !getComputedStyle(control).display.startsWith('inline')) return false;
      return [...parent.childNodes].some(
        (node) => node.nodeType === Node.TEXT_NODE && (node.textContent ?? '').trim().length > 2,
      );
    }
  }, LEAST_PX);
}
