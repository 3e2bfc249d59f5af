import { expect, test } from 'vitest';
import { testApp } from '../helpers/app';
import { testBrowser } from '../helpers/browser';

const app = await testApp();
const browser = testBrowser(app);

test('a page that needs no script ships none', async () => {
  const { page } = await browser.openAs('tech');
  for (const path of [
    '/',
    '/kilns',
    '/profiles',
    '/runs',
    '/materials',
    '/account',
    '/runs/new',
    '/profiles/new',
  ]) {
    await page.goto(path);
    expect(await page.locator('script').count(), path).toBe(0);
  }
});

test('somebody who is not signed in is asked to, and then sees the page they asked for', async () => {
  const { page } = await browser.open();
  await page.goto('/runs?state=planned');
  expect(new URL(page.url()).pathname).toBe('/sign-in');
  expect(new URL(page.url()).searchParams.get('next')).toBe('/runs?state=planned');
});

test('a script that the site did not send is stopped by its policy', async () => {
  const { page, seen } = await browser.openAs('tech');
  await page.goto('/runs');
  const ran = await page.evaluate(() => {
    const script = document.createElement('script');
    script.textContent = 'window.foreign = true';
    document.body.append(script);
    return 'foreign' in window;
  });
  expect(ran).toBe(false);
  await expect.poll(() => seen.faults().join('\n')).toMatch(/content security policy: script-src/);
  seen.expect('content security policy');
  seen.expect('Content Security Policy');
});
