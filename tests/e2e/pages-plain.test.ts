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
