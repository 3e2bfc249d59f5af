import type { Page } from 'playwright-core';
import { beforeAll, expect, test } from 'vitest';
import { demoAccounts } from '../../db/seeds/people';
import { testApp } from '../helpers/app';
import { testBrowser } from '../helpers/browser';
import { makeWorld, type World } from '../helpers/world';

const app = await testApp();
const browser = testBrowser(app);
let world: World;

beforeAll(async () => {
  world = await makeWorld(app);
});

const NO_SCRIPT = { javaScriptEnabled: false } as const;
const press = (page: Page, name: string) => page.getByRole('button', { name, exact: true }).click();
const said = (page: Page) => page.getByRole('status').innerText();

test('signing in works without script and keeps the address that was typed', async () => {
  const { page, seen } = await browser.open(NO_SCRIPT);
  seen.expect('answer 401');
  seen.expect('status of 401');
  await page.goto('/sign-in?next=/runs');
  await page.getByLabel('E-mail address').fill(app.db.people.tech.email);
  await page.getByLabel('Password', { exact: true }).fill('not the password');
  await press(page, 'Sign in');
  expect(await page.getByRole('alert').innerText()).toMatch(/do not belong together/);
  expect(await page.getByLabel('E-mail address').inputValue()).toBe(app.db.people.tech.email);
  await page.getByLabel('Password', { exact: true }).fill(demoAccounts.password);
  await press(page, 'Sign in');
  await page.waitForURL(`${app.url}/runs`);
});

test('signing out ends the session, not only the cookie', async () => {
  const { page } = await browser.openAs('otherOwner', NO_SCRIPT);
  await page.goto('/account');
  const cookies = await page.context().cookies();
  await page.goto('/sign-out');
  await press(page, 'Sign out');
  await page.waitForURL(/\/sign-in/);
  await page.context().addCookies(cookies);
  await page.goto('/account');
  expect(new URL(page.url()).pathname).toBe('/sign-in');
});

test('a kiln is archived after a question that names it, and brought back', async () => {
  const { page } = await browser.openAs('tech', NO_SCRIPT);
  await page.goto(`/kilns/${world.kilnId}`);
  await press(page, 'Archive');
  const dialog = page.getByRole('dialog', { name: 'Archive Tall kiln?' });
  await dialog.getByRole('button', { name: 'Archive Tall kiln' }).click();
  expect(await said(page)).toMatch(/^Archived/);
  await page.goto('/kilns');
  expect(await page.getByRole('link', { name: 'Tall kiln' }).count()).toBe(0);
  await page.goto('/kilns?archived=yes');
  await page.getByRole('link', { name: 'Tall kiln' }).click();
  await press(page, 'Bring back');
  expect(await said(page)).toMatch(/^Brought back/);
});

test('a kiln’s form takes inches and °F, shows what it understood, and keeps all that was typed when a field is wrong', async () => {
  const { page } = await browser.openAs('tech');
  await page.goto('/kilns/new');
  const typed: readonly (readonly [string, string])[] = [
    ['What the studio calls it', 'Old top loader'],
    ['Rated power', '7,2'],
    ['Highest temperature', '2300 °F'],
    ['Width inside', '18 in'],
    ['Depth inside', '18 in'],
    ['Height inside', '27 in'],
    ['Lining thickness', 'thick'],
  ];
  for (const [label, text] of typed) await page.getByLabel(label, { exact: true }).fill(text);
  await page.getByText('understood as 1260').waitFor();
  await page.getByText('understood as 457').first().waitFor();
  await press(page, 'Add the kiln');
  await page.getByText('1 field needs another look.').waitFor();
  for (const [label, text] of typed)
    expect(await page.getByLabel(label, { exact: true }).inputValue(), label).toBe(text);
  await page.getByLabel('Lining thickness', { exact: true }).fill('4.5 in');
  await press(page, 'Add the kiln');
  await page.getByRole('heading', { level: 1, name: 'Old top loader' }).waitFor();
  expect(await page.locator('main').innerText()).toMatch(/1260\s*°C/);
  const { body } = await (await app.as('tech')).get('/api/kilns?q=top loader').expect(200);
  expect(body.items[0]).toMatchObject({ ratedKW: 7.2, innerHeightM: expect.closeTo(0.6858, 6) as number });
});

test('a kiln that somebody else changed meanwhile is not overwritten, and nothing typed is lost', async () => {
  const tech = await app.as('tech');
  const { body: kiln } = await tech.get(`/api/kilns/${world.kilnId}`).expect(200);
  const { page, seen } = await browser.openAs('tech');
  seen.expect('412');
  await page.goto(`/kilns/${world.kilnId}/edit`);
  await tech.patch(`/api/kilns/${world.kilnId}`, { note: 'new elements' }, kiln.revision).expect(200);
  await page.getByLabel('Rated power', { exact: true }).fill('13');
  await press(page, 'Save the kiln');
  await page.getByText(/saved a newer revision/).waitFor();
  expect(await page.getByLabel('Rated power', { exact: true }).inputValue()).toBe('13');
  const { body: after } = await tech.get(`/api/kilns/${world.kilnId}`).expect(200);
  expect(after).toMatchObject({ ratedKW: 12, note: 'new elements' });
});

test('a tariff has prices by the hour', async () => {
  const { page } = await browser.openAs('tech');
  await page.goto('/tariffs/new');
  await page.getByLabel('What the studio calls it').fill('Night rate');
  await page.getByLabel('Price of one kWh', { exact: true }).fill('0,31');
  await press(page, 'Add a price');
  const band = page.getByRole('listitem').filter({ hasText: 'From' });
  await band.getByLabel('Price of one kWh').fill('0.12');
  await press(page, 'Add the tariff');
  await page.getByRole('link', { name: 'Night rate' }).waitFor();
  const { body } = await (await app.as('tech')).get('/api/tariffs?q=Night').expect(200);
  expect(body.items[0].plan).toMatchObject({
    price: '0.31',
    bands: [{ days: [1, 2, 3, 4, 5, 6, 7], fromMinute: 1320, toMinute: 360, pricePerKWh: '0.12' }],
  });
});

test('a run is planned, started, finished and broken off, each without script', async () => {
  const { page } = await browser.openAs('tech', NO_SCRIPT);
  await page.goto(`/runs/new?version=${world.approvedVersionId}`);
  await press(page, 'Plan the run');
  expect(await said(page)).toBe('The run is planned.');
  await press(page, 'Start the firing');
  await press(page, 'Start it');
  expect(await said(page)).toMatch(/^The firing has started/);
  await press(page, 'Heating is over');
  await press(page, 'Yes, it cools down');
  expect(await said(page)).toMatch(/cools down/);
  await press(page, 'Break off');
  await page.getByLabel('Why').fill('the power went');
  await page
    .getByRole('dialog')
    .getByRole('button', { name: /^Break off run/ })
    .click();
  expect(await page.locator('main').innerText()).toContain('the power went');
});

test('a start that is still to come is refused in words', async () => {
  const { page, seen } = await browser.openAs('tech', NO_SCRIPT);
  seen.expect('422');
  await page.goto(`/runs/new?version=${world.approvedVersionId}`);
  await press(page, 'Plan the run');
  await press(page, 'Start the firing');
  await page.getByLabel('Started at').fill('2090-01-01T06:00');
  await press(page, 'Start it');
  expect(await page.getByRole('alert').first().innerText()).toMatch(/still to come/);
});

test('a student reads the cautions one by one before the run can be planned', async () => {
  const teacher = await app.as('teacher');
  const { body } = await teacher.get(`/api/classes/${world.classId}`).expect(200);
  const members = { memberIds: [app.db.people.student.id] };
  await teacher.patch(`/api/classes/${world.classId}`, members, body.revision).expect(200);
  const { page } = await browser.openAs('student', NO_SCRIPT);
  await page.goto('/');
  expect(await page.getByText('What to do now').count()).toBe(1);
  await page.getByRole('link', { name: 'Go there' }).click();
  expect(await page.getByRole('link', { name: 'Plan the run' }).count()).toBe(0);
  for (const box of await page.getByRole('checkbox').all()) await box.check();
  await press(page, 'I have read all of them');
  expect(await said(page)).toMatch(/^Noted/);
  await page.getByRole('link', { name: 'Plan the run' }).click();
  await page.getByLabel('Planned start').fill('2026-12-24T08:00');
  await press(page, 'Plan the run');
  expect(await said(page)).toBe('The run is planned.');
});

test('name, units and light are the person’s own, and the light holds from the first byte', async () => {
  const { page } = await browser.openAs('otherTech', NO_SCRIPT);
  await page.goto('/account');
  await page.getByLabel('Name').fill('Cal Brightwater');
  await page.getByLabel('Units').selectOption('C,kg,mm');
  await page.getByLabel('Light').selectOption('dark');
  await press(page, 'Save');
  expect(await said(page)).toBe('Saved.');
  const html = await (await page.request.get('/')).text();
  expect(html).toContain('data-theme="dark"');
  expect(html).toContain('Cal Brightwater');
  // A browser that is known keeps its light before the door, too.
  await page.goto('/sign-out');
  await press(page, 'Sign out');
  await page.waitForURL(/\/sign-in/);
  expect(await page.locator('html').getAttribute('data-theme')).toBe('dark');
});

test('the firing card of five segments fits on one sheet of A4 and of Letter', async () => {
  const { page } = await browser.openAs('tech');
  await page.goto(`/profiles/${world.profileId}/versions/1/print`);
  for (const format of ['A4', 'Letter']) {
    const pdf = (await page.pdf({ format, preferCSSPageSize: false })).toString('latin1');
    expect(pdf.match(/\/Type\s*\/Page\b/g)?.length, format).toBe(1);
  }
});
