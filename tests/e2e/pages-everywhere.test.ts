import { beforeAll, expect, test } from 'vitest';
import { testApp } from '../helpers/app';
import { DESK, overflowPx, PHONE, testBrowser, type Visit } from '../helpers/browser';
import { axeFaults } from '../helpers/browser-axe';
import { makeWorld, type World } from '../helpers/world';

const app = await testApp();
const browser = testBrowser(app);
let world: World;

beforeAll(async () => {
  world = await makeWorld(app);
  const teacher = await app.as('teacher');
  const { body } = await teacher.get(`/api/classes/${world.classId}`).expect(200);
  const members = { memberIds: [app.db.people.student.id] };
  await teacher.patch(`/api/classes/${world.classId}`, members, body.revision).expect(200);
});

/** Every page that each kind of person has, by the names of path parameters. */
const PAGES = {
  nobody: ['/sign-in', '/set-up?token=abcdefghijklmnopqrstuvwxyz'],
  tech: [
    '/',
    '/account',
    '/kilns',
    '/kilns?archived=yes',
    '/kilns/new',
    '/kilns/kilnId',
    '/kilns/kilnId/edit',
    '/furnaces',
    '/furnaces/new',
    '/furnaces/furnaceId',
    '/thermocouples',
    '/thermocouples/new',
    '/thermocouples/thermocoupleId',
    '/tariffs',
    '/tariffs/new',
    '/tariffs/tariffId',
    '/materials',
    '/profiles',
    '/profiles?q=nothing-is-called-this',
    '/profiles/new',
    '/profiles/profileId',
    '/profiles/profileId/versions/1',
    '/profiles/profileId/versions/2',
    '/profiles/profileId/versions/1/print',
    '/runs',
    '/runs/new',
    '/runs/runId',
  ],
  teacher: [
    '/',
    '/classes',
    '/classes/new',
    '/classes/classId',
    '/handouts',
    '/handouts/new',
    '/handouts/handoutId',
  ],
  student: [
    '/',
    '/handouts',
    '/handouts/handoutId',
    '/handouts/handoutId/print',
    '/profiles',
    '/runs',
    '/runs/new',
  ],
} as const;
type Who = keyof typeof PAGES;

const addressOf = (path: string): string =>
  path.replaceAll(/\b[a-z]+Id\b/g, (name) => String((world as unknown as Record<string, string>)[name]));

const opened = (who: Who, options: object): Promise<Visit> =>
  who === 'nobody' ? browser.open(options) : browser.openAs(who, options);

const LOOKS = [
  { name: 'wide, by day', viewport: DESK, colorScheme: 'light' },
  { name: 'wide, at night', viewport: DESK, colorScheme: 'dark' },
  { name: 'on a phone, by day', viewport: PHONE, colorScheme: 'light', hasTouch: true },
  { name: 'on a phone, at night', viewport: PHONE, colorScheme: 'dark', hasTouch: true },
] as const;

test.each(
  LOOKS.flatMap((look) => (Object.keys(PAGES) as Who[]).map((who) => [look.name, who, look] as const)),
)(
  'every page is in order %s, for %s',
  async (_name, who, { name: _look, ...options }) => {
    const { page } = await opened(who, options);
    const found: string[] = [];
    for (const path of PAGES[who]) {
      const answer = await page.goto(addressOf(path), { waitUntil: 'load' });
      await page.locator('main').waitFor();
      if (answer?.status() !== 200) found.push(`${path}: ${answer?.status()}`);
      const sideways = await overflowPx(page);
      if (sideways > 0) found.push(`${path}: ${sideways} px wider than the window`);
      found.push(...(await axeFaults(page)).map((fault) => `${path}: ${fault}`));
      if ((await page.locator('h1').count()) !== 1) found.push(`${path}: not one heading of the first level`);
    }
    expect(found).toEqual([]);
  },
  300_000,
);

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
