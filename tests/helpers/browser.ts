import { writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContextOptions, type Page } from 'playwright-core';
import { afterAll, afterEach, beforeAll, expect } from 'vitest';
import { demoAccounts, type DemoKey } from '../../db/seeds/people';
import type { TestApp } from './app';
import { watch, type Watched } from './browser-faults';

const FLAGS = [
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
];

export const DESK = { width: 1280, height: 900 };
export const PHONE = { width: 360, height: 740 };

export interface Visit {
  readonly page: Page;
  readonly seen: Watched;
}

export interface TestBrowser {
  /** A browser window of its own, nobody signed in. */
  open(options?: BrowserContextOptions): Promise<Visit>;
  /** A window in which this person has signed in already, without the form. */
  openAs(person: DemoKey, options?: BrowserContextOptions): Promise<Visit>;
  /** One more tab beside another, with the same session. */
  tabBeside(visit: Visit): Promise<Visit>;
}

/**
 * Chromium for the tests of one file. After each test every window must have been without a console error, a page error,
 * a violation of the content security policy and a failed request, but for what the test said it expects.
 */
export function testBrowser(app: TestApp): TestBrowser {
  let browser: Browser;
  const visits: Visit[] = [];
  beforeAll(async () => {
    browser = await chromium.launch({
      executablePath: process.env['HOLDFAST_CHROMIUM'] ?? '/usr/bin/chromium',
      headless: true,
      args: FLAGS,
    });
  });
  afterEach(async ({ task }) => {
    if (task.result?.state === 'fail') await keepPictures(task.name, visits);
    const faults = visits.flatMap(({ seen }) => seen.faults());
    for (const { page } of visits.splice(0)) await page.context().close();
    expect(faults).toEqual([]);
  });
  afterAll(async () => browser.close());

  const visit = async (page: Page): Promise<Visit> => {
    page.setDefaultTimeout(15_000);
    const one = { page, seen: await watch(page) };
    visits.push(one);
    return one;
  };
  const open = async (options: BrowserContextOptions = {}): Promise<Visit> => {
    const context = await browser.newContext({
      baseURL: app.url,
      viewport: DESK,
      reducedMotion: 'reduce',
      locale: 'en-GB',
      ...options,
    });
    return visit(await context.newPage());
  };
  return {
    open,
    openAs: async (person, options) => {
      const opened = await open(options);
      const { email } = app.db.people[person];
      const answer = await opened.page.request.post('/api/auth/sign-in', {
        data: { email, password: demoAccounts.password },
        headers: { origin: app.url },
      });
      expect(answer.status()).toBe(200);
      return opened;
    },
    tabBeside: async ({ page }) => visit(await page.context().newPage()),
  };
}

/** Where `HOLDFAST_TEST_SHOTS` names a folder, what stood in each window of a test that failed is kept there. */
async function keepPictures(test: string, visits: readonly Visit[]): Promise<void> {
  const folder = process.env['HOLDFAST_TEST_SHOTS'];
  if (!folder) return;
  for (const [index, { page }] of visits.entries()) {
    const path = join(folder, `${test.replaceAll(/\W+/g, '-').slice(0, 60)}-${index + 1}`);
    await page.screenshot({ path: `${path}.png`, fullPage: true });
    writeFileSync(`${path}.txt`, `${page.url()}\n${await page.locator('body').ariaSnapshot()}\n`);
  }
}

/** Signs in through the form, as a person does. */
export async function signIn(page: Page, app: TestApp, person: DemoKey): Promise<void> {
  await page.goto('/sign-in');
  await page.getByLabel('E-mail address').fill(app.db.people[person].email);
  await page.getByLabel('Password', { exact: true }).fill(demoAccounts.password);
  await page.getByRole('button', { name: 'Sign in', exact: true }).click();
  await page.waitForURL(`${app.url}/`);
}

/** How far the page can be scrolled sideways, px. */
export const overflowPx = (page: Page): Promise<number> =>
  page.evaluate(() => {
    const root = document.scrollingElement ?? document.documentElement;
    return root.scrollWidth - root.clientWidth;
  });

/** Waits until the islands of the page have taken over: before that a press of their buttons does nothing. */
export async function alive(page: Page): Promise<void> {
  await page.locator('astro-island[client="load"]').first().waitFor({ state: 'attached' });
  await page.waitForFunction(() => !document.querySelector('astro-island[client="load"][ssr]'));
}
