import type { Locator, Page } from 'playwright-core';

/** A person at the keyboard. After every key the focus must be somewhere, in sight, and marked; what is not is in `faults`. */
export interface Keyboard {
  press(...keys: string[]): Promise<void>;
  type(text: string): Promise<void>;
  /** Tab, or Shift+Tab, until this has the focus. */
  tabTo(to: Locator, back?: boolean): Promise<void>;
  readonly faults: readonly string[];
}

const MOST_TABS = 90;

export function keyboardOf(page: Page): Keyboard {
  const faults: string[] = [];
  const look = async (after: string): Promise<void> => {
    // A key that leaves the page leaves its focus too.
    const fault = await focusFault(page).catch((error: unknown) => {
      if (error instanceof Error && /navigation/.test(error.message)) return null;
      throw error;
    });
    if (fault) faults.push(`after ${after}: ${fault}`);
  };
  const press = async (...keys: string[]): Promise<void> => {
    for (const key of keys) {
      await page.keyboard.press(key);
      await look(key);
    }
  };
  return {
    faults,
    press,
    type: async (text) => {
      await page.keyboard.type(text);
      await look(`typing ${text}`);
    },
    tabTo: async (to, back = false) => {
      for (let tabs = 0; tabs < MOST_TABS; tabs += 1) {
        if (await hasFocus(to)) return;
        await press(back ? 'Shift+Tab' : 'Tab');
      }
      throw new Error(`${String(to)} is not among the next ${MOST_TABS} stops of Tab`);
    },
  };
}

const hasFocus = async (to: Locator): Promise<boolean> =>
  (await to.count()) > 0 && to.first().evaluate((element) => element === document.activeElement);

/** Waits until this has the focus, which a page may give after it has drawn anew. */
export const focused = (page: Page, to: Locator): Promise<void> =>
  to
    .elementHandle()
    .then((element) => page.waitForFunction((wanted) => wanted === document.activeElement, element))
    .then(() => undefined);

/** What is wrong with the focus as it stands: nowhere, out of sight, covered, or not marked. Null where it is well. */
function focusFault(page: Page): Promise<string | null> {
  return page.evaluate(async () => {
    await new Promise((resolve) => requestAnimationFrame(() => requestAnimationFrame(resolve)));
    const element = document.activeElement;
    // At the end of a page the focus goes to the browser's own bar.
    if (!element || element === document.body || element === document.documentElement) return null;
    // Where the link past the navigation leads: a place to read on from, not a control.
    if (element.matches('main')) return null;
    const label = (element as Partial<HTMLInputElement>).labels?.[0] ?? element;
    const name = `${element.tagName.toLowerCase()} "${
      element.getAttribute('aria-label') ?? (label.textContent ?? '').trim().slice(0, 40)
    }"`;
    const marked = (one: Element | null | undefined): boolean => {
      if (!one) return false;
      const { outlineStyle, outlineWidth, stroke, fill } = getComputedStyle(one);
      if (outlineStyle !== 'none' && parseFloat(outlineWidth) >= 1.5) return true;
      // The calendar's button within a field for a date is marked by the browser itself.
      if (one instanceof HTMLInputElement && /^date/.test(one.type)) return one === element;
      return one instanceof SVGElement && one !== element && stroke !== 'none' && fill === 'rgba(0, 0, 0, 0)';
    };
    const near = [element, element.nextElementSibling, element.closest('label'), element.parentElement];
    const marks = [...near, ...(element instanceof SVGElement ? element.children : [])];
    if (!marks.some(marked)) return `the focus on ${name} is not marked`;
    const shown = marks.find(marked) ?? element;
    const { left, top, right, bottom } = shown.getBoundingClientRect();
    if (right <= 0 || bottom <= 0 || left >= innerWidth || top >= innerHeight)
      return `the focus on ${name} is out of sight`;
    const x = (Math.max(0, left) + Math.min(innerWidth, right)) / 2;
    const y = (Math.max(0, top) + Math.min(innerHeight, bottom)) / 2;
    const above = document.elementFromPoint(x, y);
    const pairs = [shown, element].some((one) => one.contains(above) || above?.contains(one));
    return pairs || above?.closest('label')?.contains(element) ? null : `the focus on ${name} is covered`;
  });
}
