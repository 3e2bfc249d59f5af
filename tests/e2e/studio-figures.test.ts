import { expect, test } from 'vitest';
import { testApp } from '../helpers/app';
import { alive, overflowPx, PHONE, testBrowser } from '../helpers/browser';
import { axeFaults } from '../helpers/browser-axe';
import { editorOf, figureTexts } from '../helpers/browser-editor';
import { aDraft } from '../helpers/browser-studio';

const app = await testApp();
const browser = testBrowser(app);

test('a technician puts in the studio’s own figure; it shows beside the table’s, counts in estimates, and is taken back', async () => {
  const draft = await aDraft(app);
  const { page, seen } = await browser.openAs('tech');
  seen.expect('422');
  const energyOf = async (): Promise<number> => {
    await page.goto(draft.path);
    await alive(page);
    return Number(/([\d.]+)\s*kWh/.exec((await figureTexts(editorOf(page))).join(' '))?.[1]);
  };
  const before = await energyOf();
  await page.goto('/materials');
  await page.getByText('Fused silica shell', { exact: true }).first().click();
  await page.getByRole('link', { name: /own figures of fused silica shell/ }).click();
  const field = page.getByRole('textbox', { name: /^Heat capacity/ });
  await field.fill('2,4');
  await page.getByRole('button', { name: 'Keep' }).click();
  await page.getByRole('alert').waitFor();
  expect(await field.inputValue()).toBe('2,4');
  await field.fill('2400');
  await page.getByRole('textbox', { name: /Where they come from/ }).fill('Weighed and fired twice.');
  await page.getByRole('button', { name: 'Keep' }).click();
  await page.waitForURL(/\/materials\?done=saved/);
  await page.getByText('Fused silica shell', { exact: true }).first().click();
  expect((await page.locator('#fused-silica-shell').innerText()).replaceAll(/\s+/g, ' ')).toMatch(
    /own figures.*Weighed and fired twice.*2400.*the studio’s own/i,
  );
  expect(await axeFaults(page)).toEqual([]);
  expect(await energyOf()).toBeGreaterThan(before);
  await page.goto('/materials/moulds/fused-silica-shell');
  await page.getByRole('textbox', { name: /^Heat capacity/ }).fill('');
  await page.getByRole('textbox', { name: /Where they come from/ }).fill('');
  await page.getByRole('button', { name: 'Keep' }).click();
  await page.waitForURL(/\/materials\?done=saved/);
  expect(await energyOf()).toBe(before);
});

test('a student reads the table and the methods and is offered no change', async () => {
  const { page } = await browser.openAs('student', { viewport: PHONE });
  await page.goto('/materials');
  expect(await page.getByRole('link', { name: /own figures of/ }).count()).toBe(0);
  await page.getByRole('link', { name: 'How the models use them' }).click();
  await page.getByRole('heading', { name: 'Pattern: melt-out and burnout' }).waitFor();
  expect(await overflowPx(page)).toBe(0);
  expect(await axeFaults(page)).toEqual([]);
});

test('a caution leads to how it is worked out', async () => {
  const draft = await aDraft(app, {
    profile: { startC: 20, segments: [{ stage: 'burnout', toC: 900, rateCPerH: 2000, holdS: 600 }] },
  });
  const { page } = await browser.openAs('tech');
  await page.goto(draft.path);
  await alive(page);
  await page
    .getByRole('link', { name: /^How this is worked out/ })
    .first()
    .click();
  await page.waitForURL(/\/methods#kiln|\/methods#[a-z-]+$/);
  expect(await page.locator('h2:target').count()).toBe(1);
});
