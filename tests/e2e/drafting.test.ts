import { expect, test } from 'vitest';
import type { LoadInput } from '~/lib/thermal/load-schema';
import { testApp } from '../helpers/app';
import { alive, overflowPx, PHONE, testBrowser } from '../helpers/browser';
import { axeFaults } from '../helpers/browser-axe';
import { cautionTexts, editorOf } from '../helpers/browser-editor';
import { aDraft, keptVersion } from '../helpers/browser-studio';

const app = await testApp();
const browser = testBrowser(app);

const PRINTED: LoadInput = {
  moulds: [
    {
      material: 'fused-silica-shell',
      massKg: 2.2,
      wallM: 0.007,
      label: 'heron',
      thinnestSectionM: 0.004,
      pattern: { material: 'pla', massKg: 0.15, thickestM: 0.004 },
    },
  ],
  pour: { metal: 'tin-bronze-90-10', chargeKg: 6, pourC: 1180, carryS: 15 },
};
const stagesOf = async (draft: Parameters<typeof keptVersion>[1]) =>
  (await keptVersion(app, draft)).profile.segments.map(
    (segment) => (segment as unknown as { stage: string }).stage,
  );

test('a profile is drafted for a load, read with its reasons, put in place, and given back by undo', async () => {
  const draft = await aDraft(app, { load: PRINTED });
  const before = await stagesOf(draft);
  const { page } = await browser.openAs('tech');
  await page.goto(draft.path);
  await alive(page);
  await page
    .getByRole('button', { name: /fused silica/ })
    .first()
    .click();
  await page.getByRole('button', { name: 'Draft a profile for this load' }).click();
  const dialog = page.getByRole('dialog', { name: 'A draft for this load' });
  await dialog.waitFor();
  const text = (await dialog.innerText()).replaceAll(/\s+/g, ' ');
  expect(text).toMatch(/Melt-out.*runs out above 260 °C.*Burnout.*Vitrification.*Casting hold/);
  expect(text).toMatch(/Common practice, no source/);
  expect(await axeFaults(page)).toEqual([]);
  await dialog.getByRole('button', { name: 'Put it in place of the segments' }).click();
  await expect.poll(() => stagesOf(draft)).toEqual(['melt-out', 'burnout', 'vitrification', 'casting-hold']);
  await page.getByText('Why the draft was made so').click();
  expect(await page.getByText(/sinters the binder/).count()).toBe(1);
  expect(await axeFaults(page)).toEqual([]);
  await page.getByRole('button', { name: 'Undo', exact: true }).click();
  await expect.poll(() => stagesOf(draft)).toEqual(before);
});

test('a load that no profile fires well is told why', async () => {
  const solid: LoadInput = {
    moulds: [
      {
        material: 'fused-silica-shell',
        massKg: 2,
        pattern: { material: 'castable-resin', massKg: 0.2, thickestM: 0.012 },
      },
    ],
  };
  const draft = await aDraft(app, { load: solid });
  const { page } = await browser.openAs('tech');
  await page.goto(draft.path);
  await alive(page);
  await page
    .getByRole('button', { name: /fused silica/ })
    .first()
    .click();
  await page.getByRole('button', { name: 'Draft a profile for this load' }).click();
  const dialog = page.getByRole('dialog', { name: 'A draft for this load' });
  await dialog.getByText(/never melts and pushes on its mould/).waitFor();
  await dialog.getByRole('button', { name: 'Leave it' }).click();
  await dialog.waitFor({ state: 'detached' });
});

test('no draft is made without a mould, and the page says what is missing', async () => {
  const draft = await aDraft(app, { load: { moulds: [] } });
  const { page } = await browser.openAs('tech');
  await page.goto(draft.path);
  await alive(page);
  await page
    .getByRole('button', { name: /empty kiln|nothing|load/i })
    .first()
    .click();
  await page.getByText('Put a mould into the load first.').waitFor();
  expect(await page.getByRole('button', { name: 'Draft a profile for this load' }).isDisabled()).toBe(true);
});

test('layers are switched on and off on the strip, and the sheets below say where the heat goes and how the pour comes out', async () => {
  const draft = await aDraft(app, { load: PRINTED });
  const { page } = await browser.openAs('tech');
  await page.goto(draft.path);
  await alive(page);
  for (const name of ['gas given off', 'power', 'heat work']) {
    const layer = page.getByRole('button', { name, exact: true });
    expect(await layer.getAttribute('aria-pressed')).toBe('false');
    await layer.click();
    expect(await layer.getAttribute('aria-pressed')).toBe('true');
  }
  await page.getByText('Where the heat goes, the pour').click();
  const sheets = (await page.locator('.outcome').innerText()).replaceAll(/\s+/g, ' ');
  expect(sheets).toMatch(/Through the walls.*kWh/);
  expect(sheets).toMatch(/The pour: Tin bronze 90\/10.*Heat of charge and crucible.*± /);
  expect(sheets).toMatch(/1 × heron.*100 %/);
});

test('a caution that stops it is answered in writing before a version is approved', async () => {
  // gypsum far above what it stands
  const flask: LoadInput = {
    moulds: [{ form: 'flask', material: 'gypsum-investment', massKg: 1, diameterM: 0.09, heightM: 0.1 }],
  };
  const draft = await aDraft(app, {
    load: flask,
    profile: { startC: 20, segments: [{ stage: 'burnout', toC: 850, rateCPerH: 100, holdS: 7200 }] },
  });
  await (await app.as('tech')).post(`/api${draft.path}/submit`).expect(200);
  const { page } = await browser.openAs('teacher');
  await page.goto(draft.path);
  await alive(page);
  // the estimate is drawn a frame or two after the page is alive
  await expect
    .poll(async () => (await cautionTexts(editorOf(page))).join('\n'))
    .toMatch(/Its material stands 788 °C/);
  await page.getByRole('button', { name: 'Approve', exact: true }).first().click();
  const dialog = page.getByRole('dialog');
  const reason = dialog.getByRole('textbox', { name: 'Why it may be fired all the same' });
  await dialog.getByRole('button', { name: 'Approve', exact: true }).click();
  expect((await keptVersion(app, draft)).state).toBe('in-review');
  await reason.fill('A test of what the block does; nobody pours from it.');
  await dialog.getByRole('button', { name: 'Approve', exact: true }).click();
  await expect.poll(async () => (await keptVersion(app, draft)).state).toBe('approved');
});

test('on a phone the draft and the sheets stay within the screen', async () => {
  const draft = await aDraft(app, { load: PRINTED });
  const { page } = await browser.openAs('tech', { viewport: PHONE });
  await page.goto(draft.path);
  await alive(page);
  await page.getByText('Where the heat goes, the pour').click();
  expect(await overflowPx(page)).toBe(0);
  await page
    .getByRole('button', { name: /fused silica/ })
    .first()
    .click();
  await page.getByRole('button', { name: 'Draft a profile for this load' }).click();
  await page.getByRole('dialog', { name: 'A draft for this load' }).waitFor();
  expect(await overflowPx(page)).toBe(0);
  expect(await axeFaults(page)).toEqual([]);
});
