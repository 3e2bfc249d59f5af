import type { Page } from 'playwright-core';
import { beforeAll, describe, expect, test } from 'vitest';
import { testApp } from '../helpers/app';
import { DESK, overflowPx, PHONE, testBrowser } from '../helpers/browser';
import { firing, KILN } from '../helpers/studio';

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
    '/methods',
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

const RUNS = 5000;
const UNDER_WAY = 300;

describe(`a studio with ${RUNS} runs, ${UNDER_WAY} of them under way`, () => {
  beforeAll(async () => manyRuns(), 60_000);

  test('sees the newest on its first page, and a way to the rest', async () => {
    const { page } = await browser.openAs('tech');
    await page.goto('/');
    await page.getByText('At least 50 runs under way').waitFor();
    expect(await page.getByRole('article').count()).toBe(8);
    await page.getByRole('link', { name: 'All runs under way, at least 50' }).click();
    expect(await statesOf(page)).toEqual(Array.from({ length: 50 }, () => 'Under way'));
  });

  test('reads a list to its end with each run once, and the search and the state stay', async () => {
    const { page } = await browser.openAs('tech');
    const kept = await app.db.query(
      `select number from runs r join kilns k on k.studio_id = r.studio_id and k.id = r.kiln_id
        where r.studio_id = $1 and k.name = 'Old kiln' and state = 'closed' order by number desc`,
      [app.db.people.tech.studioId],
    );
    await page.goto('/runs?q=old&state=closed&limit=200');
    const read = await runNumbers(page);
    const more = page.getByRole('link', { name: 'More', exact: true });
    while ((await more.count()) > 0) {
      await more.click();
      const asked = new URL(page.url()).searchParams;
      expect([asked.get('q'), asked.get('state'), asked.get('limit')]).toEqual(['old', 'closed', '200']);
      read.push(...(await runNumbers(page)));
    }
    expect(kept.length).toBeGreaterThan(2000);
    expect(read).toEqual(kept.map((row) => Number(row['number'])));
    await page.getByRole('link', { name: 'Back to the start' }).click();
    expect((await runNumbers(page))[0]).toBe(read[0]);
  });

  test('a new search begins at the start of the list and keeps its state', async () => {
    const { page } = await browser.openAs('tech');
    await page.goto('/runs?state=closed');
    await page.getByRole('link', { name: 'More', exact: true }).click();
    await page.getByRole('searchbox').fill('new kiln');
    await page.getByRole('button', { name: 'Search' }).click();
    const asked = new URL(page.url()).searchParams;
    expect([asked.get('q'), asked.get('state'), asked.has('cursor')]).toEqual(['new kiln', 'closed', false]);
    expect(new Set(await statesOf(page))).toEqual(new Set(['Closed']));
    await page.getByRole('link', { name: 'Under way', exact: true }).click();
    expect(new URL(page.url()).searchParams.get('q')).toBe('new kiln');
    expect(new Set(await statesOf(page))).toEqual(new Set(['Under way']));
  });

  test('a part of the address that cannot be read does not undo the others', async () => {
    const { page } = await browser.openAs('tech');
    await page.goto('/runs?state=under-way&limit=all&constructor=x');
    expect(await statesOf(page)).toHaveLength(50);
    expect(new Set(await statesOf(page))).toEqual(new Set(['Under way']));
  });
});

test.each([PHONE, { width: 800, height: 900 }, DESK])(
  'the longest names stay within $width px',
  async (viewport) => {
    const tech = await app.as('tech');
    const long = (word: string) => word.repeat(200).slice(0, 120);
    const kiln = await tech.post('/api/kilns', { ...KILN, name: long('Kiln') }).expect(201);
    const { id: kilnId } = kiln.body as { id: string };
    const profile = { name: long('Profile'), kilnId, profile: firing() };
    const made = await tech.post('/api/profiles', profile).expect(201);
    const { id, version } = made.body as { id: string; version: { id: string } };
    const plan = { kilnId, profileVersionId: version.id, plannedStartAt: new Date().toISOString() };
    const run = await tech.post('/api/runs', plan).expect(201);
    const { page } = await browser.openAs('tech', { viewport });
    const wide: string[] = [];
    for (const path of [
      ...['/', '/kilns', `/kilns/${kilnId}`, '/profiles', `/profiles/${id}`, `/profiles/${id}/versions/1`],
      ...[
        `/profiles/${id}/versions/1/print`,
        '/runs',
        `/runs/${(run.body as { id: string }).id}`,
        '/runs/new',
      ],
    ]) {
      await page.goto(path);
      const sideways = await overflowPx(page);
      if (sideways > 0) wide.push(`${path}: ${sideways} px`);
    }
    expect(wide).toEqual([]);
  },
);

const cells = (page: Page, of: string): Promise<string[]> => page.locator(`main tbody ${of}`).allInnerTexts();
const statesOf = async (page: Page): Promise<string[]> =>
  (await cells(page, 'td[data-label="State"]')).map((text) => text.trim());
const runNumbers = async (page: Page): Promise<number[]> =>
  (await cells(page, 'th')).map((text) => Number(text.replace(/\D+/g, '')));

/** Two kilns and one version, fired again and again: made past the application, from one run that it made. */
async function manyRuns(): Promise<void> {
  const tech = await app.as('tech');
  const kilnIds: string[] = [];
  for (const name of ['Old kiln', 'New kiln']) {
    const made = await tech.post('/api/kilns', { ...KILN, name }).expect(201);
    kilnIds.push((made.body as { id: string }).id);
  }
  const [kilnId = '', other = ''] = kilnIds;
  const profile = await tech
    .post('/api/profiles', { name: 'Shell, slow', kilnId, profile: firing() })
    .expect(201);
  const { version } = profile.body as { version: { id: string } };
  const plan = { kilnId, profileVersionId: version.id, plannedStartAt: new Date().toISOString() };
  const run = await tech.post('/api/runs', plan).expect(201);
  const { id } = run.body as { id: string };
  await tech.post(`/api/runs/${id}/start`, {}).expect(200);
  await app.db.query(
    `insert into runs (studio_id, id, number, state, kiln_id, profile_version_id, frozen, planned_start_at, started_at,
                       finished_at, closed_at, signed_off_by, created_by)
     select studio_id, gen_random_uuid(), n, case when n > $2 - $3 then 'under-way' else 'closed' end,
            case when n % 2 = 0 then kiln_id else $4::uuid end, profile_version_id, frozen, planned_start_at, started_at,
            case when n > $2 - $3 then null else started_at end, case when n > $2 - $3 then null else started_at end,
            case when n > $2 - $3 then null else created_by end, created_by
       from runs, generate_series(2, $2::int) as n where id = $1`,
    [id, RUNS, UNDER_WAY, other],
  );
  await app.db.query('update run_counters set last_number = $1', [RUNS]);
}
