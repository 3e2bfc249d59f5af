import { expect, test } from 'vitest';
import { testApp } from '../helpers/app';
import { alive, overflowPx, testBrowser, type Visit } from '../helpers/browser';
import { editorOf, figureTexts, typeInto } from '../helpers/browser-editor';
import { aDraft, approve, keptVersion, type Draft } from '../helpers/browser-studio';

const app = await testApp();
const browser = testBrowser(app);

async function opened(visit: Visit, draft: Draft) {
  await visit.page.goto(draft.path);
  await alive(visit.page);
  return { ...visit, editor: editorOf(visit.page) };
}
const targetOf = async (draft: Draft, segment: number) =>
  (await keptVersion(app, draft)).profile.segments[segment - 1]?.toC;

test('what is changed is kept at the next revision without a press, and stands there when the page is opened anew', async () => {
  const draft = await aDraft(app);
  const { revision } = await keptVersion(app, draft);
  const { page, editor } = await opened(await browser.openAs('tech'), draft);
  await typeInto(editor.field('Target', 2), '830');
  await expect.poll(() => targetOf(draft, 2)).toBe(830);
  await editor.saved.waitFor();
  expect((await keptVersion(app, draft)).revision).toBeGreaterThan(revision);
  await page.reload();
  await alive(page);
  expect(await editor.field('Target', 2).inputValue()).toBe('830');
});

test.each([
  { choice: 'Keep mine', stands: [870, 1800], undone: [820, 7200] },
  { choice: 'Take theirs', stands: [820, 7200], undone: [870, 1800] },
])(
  'of two tabs that changed the same draft the second is asked, and whichever it lets go stays in undo: $choice',
  async ({ choice, stands, undone }) => {
    const draft = await aDraft(app);
    const first = await opened(await browser.openAs('tech'), draft);
    const second = await opened(await browser.tabBeside(first), draft);
    second.seen.expect('412');
    await typeInto(first.editor.field('Target', 2), '820');
    await expect.poll(() => targetOf(draft, 2)).toBe(820);
    await typeInto(second.editor.field('Hold', 2), '30 min');
    const asked = second.page.getByRole('alert', { name: 'Two versions of this draft' });
    await asked.getByText('Someone else changed this draft while you did.').waitFor();
    const differences = await asked.getByRole('row').allInnerTexts();
    expect(differences.join('\n')).toMatch(/820/);
    expect(differences.join('\n')).toMatch(/30 min/);
    // Nothing is sent over the other's while nobody has chosen.
    expect(await targetOf(draft, 2)).toBe(820);
    await asked.getByRole('button', { name: choice }).click();
    await asked.waitFor({ state: 'detached' });
    const kept = async () => {
      const { toC, holdS } = (await keptVersion(app, draft)).profile.segments[1] ?? {};
      return [toC, holdS];
    };
    await expect.poll(kept).toEqual(stands);
    await second.page.getByRole('button', { name: 'Undo', exact: true }).click();
    await expect.poll(kept).toEqual(undone);
  },
);

test('what is changed while the network is away is kept in the page and sent once it is back', async () => {
  const draft = await aDraft(app);
  const { page, editor, seen } = await opened(await browser.openAs('tech'), draft);
  seen.expect('ERR_INTERNET_DISCONNECTED');
  await page.context().setOffline(true);
  await typeInto(editor.field('Target', 2), '845');
  await page.getByText('Your changes are here and will be sent.').waitFor();
  expect(await targetOf(draft, 2)).toBe(870);
  await typeInto(editor.field('Hold', 2), '45 min');
  await page.context().setOffline(false);
  await editor.saved.waitFor();
  const kept = await keptVersion(app, draft);
  expect(kept.profile.segments[1]).toMatchObject({ toC: 845, holdS: 2700 });
});

test('a page with changes that are not kept asks before it is left, and one that is kept does not', async () => {
  const draft = await aDraft(app);
  const { page, editor, seen } = await opened(await browser.openAs('tech'), draft);
  seen.expect('ERR_INTERNET_DISCONNECTED');
  await page.context().setOffline(true);
  await typeInto(editor.field('Target', 2), '845');
  await page.getByText('Your changes are here and will be sent.').waitFor();
  const asked = page.waitForEvent('dialog');
  const leave = page.getByRole('link', { name: 'Runs', exact: true }).click({ noWaitAfter: true });
  const dialog = await asked;
  expect(dialog.type()).toBe('beforeunload');
  await dialog.dismiss();
  await leave;
  expect(await editor.field('Target', 2).inputValue()).toBe('845');
  await page.context().setOffline(false);
  await editor.saved.waitFor();
  await page.getByRole('link', { name: 'Runs', exact: true }).click();
  await page.waitForURL(/\/runs$/);
});

test('a person who reads °F types °F or °C, and °C is kept', async () => {
  const draft = await aDraft(app);
  const tech = await app.as('teacher');
  await tech.patch('/api/account', { units: { temperature: 'F', mass: 'lb', length: 'in' } }).expect(200);
  const made = await (await app.as('teacher')).post(`/api/profiles/${draft.profileId}/duplicate`);
  expect(made.status).toBe(201);
  const own: Draft = { ...draft, path: `/profiles/${(made.body as { id: string }).id}/versions/1` };
  const { page, editor } = await opened(await browser.openAs('teacher'), own);
  // 105 °C is 221 °F, and a rise of 60 °C an hour is one of 108 °F.
  expect(await editor.field('Target', 1).inputValue()).toBe('221');
  expect(await editor.field('Rate', 1).inputValue()).toBe('108');
  const target = editor.field('Target', 2);
  await target.fill('500F');
  await page.getByText(/understood as 500\s*°F/).waitFor();
  await target.press('Enter');
  await expect.poll(() => targetOf(own, 2)).toBe(260);
  await typeInto(target, '600 C');
  await expect.poll(() => targetOf(own, 2)).toBe(600);
  expect(await target.inputValue()).toBe('1112');
  await page.getByRole('button', { name: /2 shells, 0\.31 ?in/ }).waitFor();
});

test('a person who reads °C may type °F', async () => {
  const draft = await aDraft(app);
  const { page, editor } = await opened(await browser.openAs('tech'), draft);
  await editor.field('Target', 2).fill('500F');
  await page.getByText(/understood as 260\s*°C/).waitFor();
  await editor.field('Target', 2).press('Enter');
  await expect.poll(() => targetOf(draft, 2)).toBe(260);
  await editor.field('Target', 2).fill('3000');
  await page.getByText(/is above the kiln's limit of 1280\s*°C/).waitFor();
  await editor.field('Target', 2).blur();
  expect(await editor.field('Target', 2).inputValue()).toBe('260');
});

test('a number of the table is overridden by one of the studio, used by the estimate, and given back', async () => {
  const draft = await aDraft(app);
  const { page, editor } = await opened(await browser.openAs('tech'), draft);
  const before = await figureTexts(editor);
  await page.getByRole('button', { name: /^2 shells/ }).click();
  const panel = page.getByRole('region', { name: 'Load', exact: true });
  await panel.getByText('Numbers of fused silica shell').click();
  const own = panel.getByLabel(/^Own figure for heat capacity of fused silica shell/);
  await typeInto(own, '2400');
  await panel.getByText(/Numbers of fused silica shell, 1 your own/).waitFor();
  const mould = async () => (await keptVersion(app, draft)).load?.moulds[0];
  await expect.poll(async () => (await mould())?.overrides).toEqual({ heatCapacityJPerKgK: 2400 });
  const energyKWh = (figures: string[]) => Number(/([\d.]+) ?kWh/.exec(figures[1] ?? '')?.[1]);
  await expect.poll(async () => energyKWh(await figureTexts(editor))).toBeGreaterThan(energyKWh(before));
  await panel.getByRole('button', { name: /^Back to the table's heat capacity/ }).click();
  await expect.poll(async () => (await mould())?.overrides).toEqual({});
});

test('an approved version shows its figures and takes no change; a new draft from it does', async () => {
  const draft = await aDraft(app);
  await approve(app, draft);
  const { page, editor } = await opened(await browser.openAs('tech'), draft);
  await page.getByText('version 1, approved, sealed').waitFor();
  await editor.card(2).waitFor();
  expect(await page.getByRole('main').getByRole('textbox').count()).toBe(0);
  expect(await page.getByRole('slider').count()).toBe(0);
  expect(await page.getByRole('button', { name: 'Undo' }).count()).toBe(0);
  await editor.card(2).focus();
  await page.keyboard.press('Enter');
  await page.keyboard.press('Delete');
  expect(await page.getByRole('group', { name: /^Segment \d+, / }).count()).toBe(3);
  await page.getByRole('button', { name: /^2 shells/ }).click();
  const panel = page.getByRole('region', { name: 'Load', exact: true });
  expect(await panel.getByLabel('Dry, each', { exact: true }).isDisabled()).toBe(true);
  await page.getByRole('button', { name: 'New draft from this version' }).click();
  await page.waitForURL(/\/versions\/2$/);
  await alive(page);
  await typeInto(editor.field('Target', 2), '850');
  await editor.saved.waitFor();
  expect(await targetOf(draft, 2)).toBe(870);
  expect(await targetOf({ ...draft, path: draft.path.replace(/1$/, '2') }, 2)).toBe(850);
});

/** A draft of so many segments, each a step higher than the one before. */
const aLongDraft = (segments: number) =>
  aDraft(app, {
    name: `Long ${segments}`,
    profile: {
      startC: 20,
      segments: Array.from({ length: segments }, (_, index) => ({
        stage: 'burnout' as const,
        toC: 60 + index * 40,
        rateCPerH: 150,
        holdS: 1800,
      })),
    },
  });

test.each([7, 20])(
  'while a strip of %i segments rolls, the axis of temperature stays, and the page is no wider',
  async (segments) => {
    const { page, editor } = await opened(await browser.openAs('tech'), await aLongDraft(segments));
    const axis = page.locator('.strip-axis');
    const at = async () => Math.round((await axis.boundingBox())?.x ?? NaN);
    const before = await at();
    const rolledPx = await page.locator('.strip-frame').evaluate((frame) => {
      frame.scrollLeft = frame.scrollWidth;
      return frame.scrollLeft;
    });
    expect(rolledPx).toBeGreaterThan(20);
    expect(await at()).toBe(before);
    expect(await axis.getByText('°C').count()).toBe(1);
    expect(await overflowPx(page)).toBe(0);
    // A corner that is beneath the axis comes out when it gets the focus.
    await editor.corner(1).focus();
    const corner = await editor.corner(1).boundingBox();
    const edge = await axis.boundingBox();
    expect(corner?.x).toBeGreaterThanOrEqual((edge?.x ?? NaN) + (edge?.width ?? NaN) - 1);
  },
);

/** The colour that most of what is drawn on the strip has, as `r,g,b`. */
const inkOfCurves = (page: Visit['page']) =>
  page.locator('.strip-curves canvas').evaluate((canvas: HTMLCanvasElement) => {
    // A copy: reading the canvas itself again and again would make the browser complain.
    const copy = new OffscreenCanvas(canvas.width, canvas.height).getContext('2d');
    copy?.drawImage(canvas, 0, 0);
    const data = copy?.getImageData(0, 0, canvas.width, canvas.height).data ?? [];
    const counts = new Map<string, number>();
    for (let index = 0; index < data.length; index += 4) {
      if ((data[index + 3] ?? 0) < 255) continue;
      const colour = `${data[index]},${data[index + 1]},${data[index + 2]}`;
      counts.set(colour, (counts.get(colour) ?? 0) + 1);
    }
    return [...counts].sort((a, b) => b[1] - a[1])[0]?.[0];
  });

test('the curves follow the theme at once: of the machine, of the account, and on paper', async () => {
  const draft = await aDraft(app);
  const { page } = await opened(await browser.openAs('tech', { colorScheme: 'light' }), draft);
  // --ink of src/styles/tokens.css: #1a2436 by day, #ede7da by night, #000 in print.
  const [day, night, print] = ['26,36,54', '237,231,218', '0,0,0'];
  await expect.poll(() => inkOfCurves(page)).toBe(day);
  await page.emulateMedia({ colorScheme: 'dark' });
  await expect.poll(() => inkOfCurves(page)).toBe(night);
  await page.evaluate(() => (document.documentElement.dataset['theme'] = 'light'));
  await expect.poll(() => inkOfCurves(page)).toBe(day);
  await page.emulateMedia({ media: 'print' });
  await expect.poll(() => inkOfCurves(page)).toBe(print);
});

test('without scripts a profile says so, shows its figures, and offers nothing that does nothing', async () => {
  const draft = await aDraft(app);
  const { page } = await browser.openAs('tech', { javaScriptEnabled: false });
  await page.goto(draft.path);
  // Playwright does not look for words within noscript.
  expect(await page.locator('.strip noscript .notice').innerText()).toMatch(/script, which is switched off/);
  const table = page.getByRole('table', { name: /^Segments of the firing/ });
  expect((await table.getByRole('row').allInnerTexts()).join('\n')).toMatch(/vitrification\s.*870\s*°C/);
  expect((await table.boundingBox())?.height).toBeGreaterThan(60);
  expect(await page.locator('.editor-actions button:visible, .editor-bar:visible').count()).toBe(0);
});
