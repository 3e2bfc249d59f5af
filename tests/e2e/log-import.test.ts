import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { Page } from 'playwright-core';
import { expect, test } from 'vitest';
import { ROOT } from '../../db/up/root.mjs';
import { testApp } from '../helpers/app';
import { alive, testBrowser } from '../helpers/browser';
import { aDraft, aRun, aRunOf, firingCase, giveLog } from '../helpers/browser-studio';

const app = await testApp();
const browser = testBrowser(app);

const dialect = (id: string) => readFileSync(join(ROOT, 'fixtures/logs', id, 'input.csv'));

/** Lets go of a file over the place for it, as from the machine's desktop. */
async function drop(page: Page, name: string, content: Buffer): Promise<void> {
  const place = page.getByText('Drop the logger’s file here, or choose it.');
  await place.scrollIntoViewIfNeeded();
  await page.waitForFunction(() => !document.querySelector('astro-island[client="visible"][ssr]'));
  const dataTransfer = await page.evaluateHandle(
    ({ text, name }) => {
      const transfer = new DataTransfer();
      const bytes = Uint8Array.from(atob(text), (letter) => letter.charCodeAt(0));
      transfer.items.add(new File([bytes], name, { type: 'text/csv' }));
      return transfer;
    },
    { text: content.toString('base64'), name },
  );
  for (const type of ['dragenter', 'dragover', 'drop']) await place.dispatchEvent(type, { dataTransfer });
}

const runAt = async (plannedStartAt: string) => aRun(app, await aDraft(app), plannedStartAt);

async function reportOf(run: { id: string }) {
  const [log] = await app.db.query('select id from logs where run_id = $1', [run.id]);
  const answer = await (await app.as('tech')).get(`/api/runs/${run.id}/logs/${String(log?.['id'])}`);
  return answer.body as { startOffsetS: number; channels: { firstAt: string }[] };
}

test('a file that can be read in two ways is kept, asked about, and read as answered', async () => {
  const run = await runAt('2026-04-03T08:00:00Z');
  const { page, seen } = await browser.openAs('tech');
  seen.expect('422');
  await page.goto(run.path);
  await drop(page, 'which-day.csv', dialect('d20-which-is-the-day'));
  const question = page.getByRole('group', { name: 'Which part of the date is the day?' });
  await question.waitFor();
  // Both readings are shown by what they would make of the file's first moment.
  const choices = (await question.getByRole('radio').count()) > 1 ? await question.innerText() : '';
  expect(choices).toMatch(/dmy/);
  expect(choices).toMatch(/mdy/);
  await question.getByRole('radio', { name: /^dmy/ }).check();
  await page.getByRole('button', { name: 'Read it so' }).click();
  await page.getByText('60 of 60 rows read').waitFor();
  const { channels } = await reportOf(run);
  expect(channels[0]?.firstAt).toBe('2026-04-03T08:00:00.000Z');
});

test('a file chosen before the page’s script is there is taken when it is', async () => {
  const run = await runAt('2026-02-14T07:00:00Z');
  const { page } = await browser.openAs('tech');
  let letScriptsIn: () => void = () => undefined;
  const chosen = new Promise<void>((resolve) => (letScriptsIn = resolve));
  await page.route(/LogImport[^/]*\.js/, async (route) => {
    await chosen;
    await route.continue();
  });
  await page.goto(run.path);
  const file = { name: 'plain.csv', mimeType: 'text/csv', buffer: dialect('d01-plain') };
  await page.getByLabel('Log file').setInputFiles(file);
  letScriptsIn();
  await page.getByText(/rows read/).waitFor();
});

test('rows that cannot be read are counted and listed by their line, and the file comes back byte for byte', async () => {
  const run = await runAt('2026-02-14T07:00:00Z');
  const content = dialect('d19-repeated-header');
  const { page } = await browser.openAs('tech');
  await page.goto(run.path);
  await drop(page, 'repeated.csv', content);
  // By the labels of the case: 52 rows, the header again in line 27, line 53 cut off.
  await page.getByText('50 of 52 rows read').waitFor();
  await page.getByText('Rows left out, and why').click();
  const lines = await page.getByText(/^line \d+: /).allInnerTexts();
  expect(lines.map((line) => Number(/\d+/.exec(line)?.[0]))).toEqual([27, 53]);
  await page.getByRole('link', { name: 'Read the run' }).click();
  await alive(page);
  const download = page.waitForEvent('download');
  await page.getByRole('link', { name: 'repeated.csv' }).click();
  expect(readFileSync(await (await download).path())).toEqual(content);
});

test('a picture called .csv is refused in a sentence, and another file can be given at once', async () => {
  const run = await runAt('2026-02-14T07:00:00Z');
  const { page, seen } = await browser.openAs('tech');
  seen.expect('415');
  seen.expect('422');
  await page.goto(run.path);
  const png = Buffer.concat([Buffer.from('\x89PNG\r\n\x1a\n', 'latin1'), Buffer.alloc(4096, 7)]);
  await drop(page, 'kiln.csv', png);
  const refusal = page.getByRole('alert').filter({ hasText: /\w/ });
  await refusal.waitFor();
  const sentence = await refusal.innerText();
  expect(sentence).toMatch(/picture|image|not (a )?text/i);
  expect(sentence).not.toMatch(/\b(40\d|415|422|error|exception|null|undefined|mime)\b/i);
  expect(await app.db.query('select id from logs where run_id = $1', [run.id])).toEqual([]);
  await drop(page, 'repeated.csv', dialect('d19-repeated-header'));
  await page.getByText('50 of 52 rows read').waitFor();
  expect(await refusal.count()).toBe(0);
});

test('a log laid wrongly on the plan is laid by hand, and its findings follow', async () => {
  const firing = firingCase('p02-overshoot');
  const run = await aRunOf(app, firing);
  await giveLog(app, run, firing.log);
  const { page } = await browser.openAs('tech');
  await page.goto(run.path);
  await alive(page);
  const overshoot = page.getByRole('button', { name: /^Overshoot/ });
  await overshoot.waitFor();
  const lay = async (minutes: string) => {
    await page.getByText(/^Laid on the plan/).click();
    await page.getByLabel('Minutes from the first row to the start').fill(minutes);
    const loaded = page.waitForEvent('load');
    await page.getByRole('button', { name: 'Lay by hand' }).click();
    await loaded;
    await alive(page);
    await page.getByText(/^Laid on the plan by hand/).waitFor();
  };
  const verdict = () => page.getByText(/ over 870 °C/).count();
  await lay('-45');
  expect((await reportOf(run)).startOffsetS).toBe(-45 * 60);
  await lay('0');
  await overshoot.waitFor();
  expect(await verdict()).toBeGreaterThan(0);
  const [found] = await app.db.query(
    `select start_s, peak_c from findings where run_id = $1 and kind = 'overshoot'`,
    [run.id],
  );
  expect(Math.abs(Number(found?.['start_s']) - Number(firing.findings[0]?.startS))).toBeLessThan(120);
  expect(Math.abs(Number(found?.['peak_c']) - Number(firing.findings[0]?.peakC))).toBeLessThan(2);
});
