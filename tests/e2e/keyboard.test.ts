import { expect, test } from 'vitest';
import { demoAccounts } from '../../db/seeds/people';
import { testApp } from '../helpers/app';
import { alive, testBrowser } from '../helpers/browser';
import { cautionTexts, editorOf, figureTexts } from '../helpers/browser-editor';
import { focused, keyboardOf } from '../helpers/browser-keys';
import { aDraft, aRunOf, firingCase, giveLog, keptVersion } from '../helpers/browser-studio';

const app = await testApp();
const browser = testBrowser(app);

test('a profile is designed and submitted by keyboard alone, the focus in sight at every step', async () => {
  const draft = await aDraft(app, { load: { moulds: [] } });
  const { page } = await browser.open();
  const keys = keyboardOf(page);
  await page.goto(`/sign-in?next=${encodeURIComponent(draft.path)}`);
  await focused(page, page.getByLabel('E-mail address'));
  await keys.type(app.db.people.tech.email);
  await keys.press('Tab');
  await keys.type(demoAccounts.password);
  await keys.press('Enter');
  await page.waitForURL(`**${draft.path}`);
  await alive(page);
  const editor = editorOf(page);
  const before = await figureTexts(editor);

  await keys.press('Tab');
  await focused(page, page.getByRole('link', { name: 'Skip to the page' }));
  await keys.press('Enter');

  // The load, by its button and fields.
  await keys.tabTo(page.getByRole('button', { name: 'an empty kiln' }));
  await keys.press('Enter');
  const panel = page.getByRole('region', { name: 'Load', exact: true });
  await keys.tabTo(panel.getByRole('button', { name: 'Put in a mould' }));
  await keys.press('Enter');
  await keys.tabTo(panel.getByLabel('How many', { exact: true }), true);
  await keys.type('3');
  await keys.tabTo(panel.getByRole('button', { name: 'Close' }), true);
  await keys.press('Enter');
  await page.getByRole('button', { name: /^3 shells/ }).waitFor();

  // A corner of the curve: five degrees a key, one with Shift.
  await keys.tabTo(editor.corner(2));
  await keys.press('ArrowDown', 'ArrowDown', 'Shift+ArrowUp');
  await expect.poll(() => editor.field('Target', 2).inputValue()).toBe('861');

  // The card: down into its fields, typed, and one more after it.
  await keys.tabTo(editor.card(2));
  await keys.press('ArrowDown', 'ArrowDown', 'ArrowDown');
  await focused(page, editor.field('Target', 2));
  await keys.type('850');
  await keys.press('Enter');
  await keys.press('ArrowDown');
  await focused(page, editor.field('Hold', 2));
  await keys.type('1h30');
  await keys.press('Enter', 'Escape');
  await focused(page, editor.card(2));
  await keys.press('Enter');
  await focused(page, editor.card(3));
  expect(await page.getByRole('group', { name: /^Segment \d+, / }).count()).toBe(4);
  await keys.press('ArrowLeft');
  await focused(page, editor.card(2));
  await keys.press('ArrowRight');
  await keys.press('Delete');
  await focused(page, editor.card(2));
  expect(await page.getByRole('group', { name: /^Segment \d+, / }).count()).toBe(3);
  await keys.press('Control+z');
  expect(await page.getByRole('group', { name: /^Segment \d+, / }).count()).toBe(4);
  await keys.press('Control+Shift+z');
  expect(await page.getByRole('group', { name: /^Segment \d+, / }).count()).toBe(3);

  expect(await figureTexts(editor)).not.toEqual(before);
  expect((await cautionTexts(editor)).length).toBeGreaterThanOrEqual(0);
  await editor.saved.waitFor();
  expect((await keptVersion(app, draft)).profile.segments[1]).toMatchObject({ toC: 850, holdS: 5400 });

  await keys.tabTo(page.getByRole('button', { name: 'Submit for review' }));
  await keys.press('Enter');
  const dialog = page.getByRole('dialog', { name: 'Submit for review' });
  await dialog.waitFor();
  await keys.tabTo(dialog.getByLabel('Note to the reviewer'));
  await keys.type('Two of three are thin.');
  await keys.tabTo(dialog.getByRole('button', { name: 'Submit', exact: true }));
  await keys.press('Enter');
  await page.getByText('version 1, in review').waitFor();
  expect((await keptVersion(app, draft)).state).toBe('in-review');
  expect(keys.faults).toEqual([]);
});

test('a run is read, and its overshoot confirmed, by keyboard alone', async () => {
  const firing = firingCase('p02-overshoot');
  const run = await aRunOf(app, firing);
  await giveLog(app, run, firing.log);
  const { page } = await browser.openAs('tech');
  const keys = keyboardOf(page);
  await page.goto(run.path);
  await alive(page);
  const strip = page.getByRole('group', { name: 'Strip of the firing' });
  const card = page.getByRole('button', { name: /^Overshoot/ });
  await card.waitFor();
  await keys.tabTo(strip);

  // J and K step through the findings and back; the one stepped to opens beneath.
  const cards = page.getByRole('button', { pressed: true }).and(page.locator('.finding-card'));
  await keys.press('j');
  const first = await cards.innerText();
  const total = await page.locator('.finding-card').count();
  for (let step = 0; step < total && (await card.getAttribute('aria-pressed')) !== 'true'; step += 1)
    await keys.press('j');
  expect(await card.getAttribute('aria-pressed')).toBe('true');
  if (total > 1) {
    await keys.press('k', 'j');
    expect(await card.getAttribute('aria-pressed')).toBe('true');
  } else expect(first).toMatch(/^Overshoot/);

  // Closer, along, and the whole again.
  const whole = page.getByRole('button', { name: 'Whole firing' });
  await keys.press('+');
  await expect.poll(() => whole.isEnabled()).toBe(true);
  await keys.press('0');
  await expect.poll(() => whole.isDisabled()).toBe(true);
  await focused(page, strip);

  await keys.press('c');
  const panel = page.getByRole('region', { name: /^Overshoot/ });
  await panel.getByText(`${app.db.people.tech.name} confirmed it`).waitFor();
  await focused(page, strip);
  await keys.tabTo(panel.getByLabel('Remark'));
  await keys.type('Cups glazed. Jot dc down.');
  await keys.tabTo(panel.getByLabel('What follows'));
  await keys.type('Slow the end');
  await keys.tabTo(panel.getByRole('button', { name: 'Save as confirmed' }));
  await keys.press('Enter');
  const kept = () =>
    app.db.query(`select state, remark, follow_up from findings where run_id = $1 and kind = 'overshoot'`, [
      run.id,
    ]);
  await expect
    .poll(kept)
    .toMatchObject([
      { state: 'confirmed', remark: 'Cups glazed. Jot dc down.', follow_up: { text: 'Slow the end' } },
    ]);

  // One more is marked by hand for the stretch that is shown, and the dialog can be left again.
  await keys.tabTo(strip, true);
  await keys.press('m');
  const dialog = page.getByRole('dialog', { name: /^Mark a finding/ });
  await dialog.waitFor();
  await keys.press('Escape');
  await dialog.waitFor({ state: 'detached' });
  await keys.press('m');
  await keys.tabTo(dialog.getByLabel('Remark'));
  await keys.type('smoke until noon');
  await keys.tabTo(dialog.getByRole('button', { name: 'Mark it' }));
  await keys.press('Enter');
  await dialog.waitFor({ state: 'detached' });
  const byHand = await app.db.query(
    `select origin, remark from findings where run_id = $1 and origin = 'person'`,
    [run.id],
  );
  expect(byHand).toEqual([{ origin: 'person', remark: 'smoke until noon' }]);
  expect(keys.faults).toEqual([]);
});
