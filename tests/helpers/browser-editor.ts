import type { Locator, Page } from 'playwright-core';
import { expect } from 'vitest';

/** The editor of a profile as a person sees it, by its names. */
export const editorOf = (page: Page) => ({
  field: (what: 'Rate' | 'Target' | 'Hold', segment: number): Locator =>
    page.getByRole('textbox', { name: `${what} of segment ${segment}`, exact: true }),
  stage: (segment: number): Locator =>
    page.getByRole('combobox', { name: `Stage of segment ${segment}`, exact: true }),
  card: (segment: number): Locator => page.getByRole('group', { name: new RegExp(`^Segment ${segment}, `) }),
  corner: (segment: number, end: 'ramp' | 'hold' = 'ramp'): Locator =>
    page.getByRole('slider', { name: new RegExp(`^End of the ${end} of segment ${segment},`) }),
  cautions: page.getByRole('region', { name: 'Cautions' }).getByRole('listitem'),
  figures: page.locator('.figure'),
  saved: page.getByRole('status').filter({ hasText: /^saved/ }),
});
export type EditorOnPage = ReturnType<typeof editorOf>;

/** Types into a field of a card and leaves it. */
export async function typeInto(field: Locator, text: string): Promise<void> {
  await field.fill(text);
  await field.press('Enter');
}

/** What the editor says the firing comes to, once it says so. */
export async function figureTexts(editor: EditorOnPage): Promise<string[]> {
  await editor.figures.nth(1).waitFor();
  return (await editor.figures.allInnerTexts()).map((text) => text.replaceAll(/\s+/g, ' '));
}

export async function cautionTexts(editor: EditorOnPage): Promise<string[]> {
  return (await editor.cautions.allInnerTexts()).map((text) => text.replaceAll(/\s+/g, ' '));
}

/** Waits until a reading of the page differs from what it was, and gives the new one. */
export async function changedFrom<T>(before: T, read: () => Promise<T>): Promise<T> {
  await expect.poll(read, { timeout: 10_000 }).not.toEqual(before);
  return read();
}
