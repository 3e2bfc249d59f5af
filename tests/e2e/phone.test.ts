import type { Page } from 'playwright-core';
import { expect, test } from 'vitest';
import { demoAccounts } from '../../db/seeds/people';
import { testApp } from '../helpers/app';
import { alive, overflowPx, PHONE, testBrowser } from '../helpers/browser';
import { editorOf } from '../helpers/browser-editor';
import { aDraft, aRunOf, firingCase, keptVersion } from '../helpers/browser-studio';
import { smallTargets } from '../helpers/browser-touch';

const app = await testApp();
const browser = testBrowser(app);
const POCKET = { viewport: PHONE, hasTouch: true, isMobile: true, deviceScaleFactor: 2 } as const;

/** Sides of a fingertip, px, which what is pressed on the strip's pages has; links within a sentence keep its line. */
const FINGER_PX = 44;
const PRESSED = ':is(.btn, .chip, .undo-button, .segment-summary, select, input.input, .start-picker .link)';

/** What is pressed in the editor and the review and is smaller than a fingertip, each with its size. */
const underFinger = (page: Page, where: string): Promise<string[]> =>
  page.locator(`:is(.editor, .run-review, .log-import) ${PRESSED}:visible`).evaluateAll(
    (controls, { least, where }) =>
      controls.flatMap((control) => {
        const { width, height } = control.getBoundingClientRect();
        if (width >= least - 0.5 && height >= least - 0.5) return [];
        const name = control.getAttribute('aria-label') ?? control.textContent ?? '';
        return [`${where}: ${name} ${width.toFixed(1)} × ${height.toFixed(1)} px`];
      }),
    { least: FINGER_PX, where },
  );

/** Looks at the page as it stands: nothing wider than the screen, nothing too small for a finger. */
async function faultsOf(page: Page, where: string): Promise<string[]> {
  const sideways = await overflowPx(page);
  const small = await smallTargets(page);
  return [...(sideways > 0 ? [`${sideways} px wider than the screen`] : []), ...small].map(
    (fault) => `${where}: ${fault}`,
  );
}

async function signInByTouch(page: Page): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').tap();
  await page.keyboard.type(app.db.people.tech.email);
  await page.getByLabel('Password', { exact: true }).tap();
  await page.keyboard.type(demoAccounts.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).tap();
  await page.waitForURL(`${app.url}/`);
}

test('on a phone a card of the upright strip is tapped, changed and kept', async () => {
  const draft = await aDraft(app);
  const { page } = await browser.open(POCKET);
  const found: string[] = [];
  await page.goto('/sign-in');
  found.push(...(await faultsOf(page, 'sign-in')));
  await signInByTouch(page);
  found.push(...(await faultsOf(page, 'today')));
  await page.locator('summary').filter({ hasText: 'all sections' }).tap();
  await page
    .getByRole('navigation', { name: 'Sections, small screen' })
    .getByRole('link', { name: 'Profiles', exact: true })
    .tap();
  await page.waitForURL(/\/profiles$/);
  found.push(...(await faultsOf(page, 'profiles')));
  await page.getByRole('link', { name: 'Shell', exact: true }).tap();
  await alive(page);
  const editor = editorOf(page);
  const card = page.getByRole('button', { name: /^Change segment 2:.*870/ });
  await card.waitFor();
  await expectUpright(page);
  found.push(...(await faultsOf(page, 'editor')));
  found.push(...(await underFinger(page, 'editor')));

  await card.tap();
  const sheet = page.getByRole('dialog', { name: /Vitrification/ });
  await sheet.waitFor();
  found.push(...(await faultsOf(page, 'sheet of a segment')));
  found.push(...(await underFinger(page, 'sheet of a segment')));
  await editor.field('Target', 2).fill('845');
  await editor.field('Target', 2).press('Enter');
  await sheet.getByLabel('attended').tap();
  await sheet.getByRole('button', { name: 'Close' }).tap();
  await page.getByRole('button', { name: /^Change segment 2:.*845/ }).waitFor();
  await editor.saved.waitFor();
  expect((await keptVersion(app, draft)).profile.segments[1]).toMatchObject({ toC: 845, attended: true });

  await page.getByRole('button', { name: /^2 shells/ }).tap();
  await page.getByRole('region', { name: 'Load', exact: true }).waitFor();
  found.push(...(await faultsOf(page, 'load')));
  found.push(...(await underFinger(page, 'load')));
  expect(found).toEqual([]);
});

/** Time runs downwards: each card begins beneath the one before it. */
async function expectUpright(page: Page): Promise<void> {
  const tops: number[] = [];
  for (const card of await page.getByRole('button', { name: /^Change segment \d/ }).all())
    tops.push((await card.boundingBox())?.y ?? NaN);
  expect(tops.length).toBe(3);
  expect(tops).toEqual([...tops].sort((a, b) => a - b));
}

test('on a phone a log is given to a run and its overshoot is confirmed', async () => {
  const firing = firingCase('p02-overshoot');
  const run = await aRunOf(app, firing);
  const { page } = await browser.open(POCKET);
  const found: string[] = [];
  await signInByTouch(page);
  await page.goto('/runs');
  found.push(...(await faultsOf(page, 'runs')));
  await page.getByRole('link', { name: 'Run 1', exact: true }).tap();
  await page.waitForURL(`**${run.path}`);
  found.push(...(await faultsOf(page, 'planned run')));
  const chooser = page.waitForEvent('filechooser');
  const file = page.getByLabel('Log file');
  await file.scrollIntoViewIfNeeded();
  await file.tap();
  await (await chooser).setFiles(firing.log);
  await page.getByText(/rows read/).waitFor();
  found.push(...(await faultsOf(page, 'what was read')));
  await page.getByRole('link', { name: 'Read the run' }).tap();
  await alive(page);
  const card = page.getByRole('button', { name: /^Overshoot/ });
  await card.tap();
  found.push(...(await faultsOf(page, 'review')));
  found.push(...(await underFinger(page, 'review')));
  const panel = page.getByRole('region', { name: /^Overshoot/ });
  await panel.getByLabel('Remark').fill('Cups glazed at the lip.');
  await panel.getByRole('button', { name: 'Confirm', exact: true }).tap();
  await panel.getByText(`${app.db.people.tech.name} confirmed it`).waitFor();
  const kept = await app.db.query(
    `select state, remark from findings where run_id = $1 and kind = 'overshoot'`,
    [run.id],
  );
  expect(kept).toEqual([{ state: 'confirmed', remark: 'Cups glazed at the lip.' }]);
  expect(found).toEqual([]);
});
