import { readdirSync } from 'node:fs';
import { join } from 'node:path';
import { beforeAll, describe, expect, test } from 'vitest';
import { ROOT } from '../../db/up/root.mjs';
import type { DemoKey } from '../../db/seeds/people';
import { seedScenario } from '../../db/seeds/scenario/seed';
import { testApp } from '../helpers/app';
import { DESK, overflowPx, PHONE, testBrowser } from '../helpers/browser';
import { axeFaults } from '../helpers/browser-axe';

const app = await testApp();
const browser = testBrowser(app);

const LOOKS = [
  { name: 'wide, by day', viewport: DESK, colorScheme: 'light' },
  { name: 'wide, at night', viewport: DESK, colorScheme: 'dark' },
  { name: 'on a phone, by day', viewport: PHONE, colorScheme: 'light', hasTouch: true },
  { name: 'on a phone, at night', viewport: PHONE, colorScheme: 'dark', hasTouch: true },
] as const;
type Look = (typeof LOOKS)[number];
type Visits = Partial<Record<DemoKey, readonly string[]>>;

/** At night a page has other colours and is otherwise the same. */
const judgedBy = (look: Look) => (look.colorScheme === 'dark' ? 'colours' : 'all');

async function faultsOf(visits: Visits, look: Look): Promise<string[]> {
  const { name: _name, ...options } = look;
  const found: string[] = [];
  for (const [who, paths] of Object.entries(visits) as [DemoKey, readonly string[]][]) {
    const { page } = await browser.openAs(who, options);
    for (const path of paths) {
      const answer = await page.goto(path, { waitUntil: 'load' });
      await page.waitForFunction(() => !document.querySelector('astro-island[client="load"][ssr]'));
      if (answer?.status() !== 200) found.push(`${who} ${path}: ${String(answer?.status())}`);
      if ((await page.locator('h1').count()) !== 1) found.push(`${who} ${path}: not one heading of level 1`);
      const sideways = await overflowPx(page);
      if (sideways > 0) found.push(`${who} ${path}: ${sideways} px wider than the window`);
      found.push(...(await axeFaults(page, judgedBy(look))).map((fault) => `${who} ${path}: ${fault}`));
    }
  }
  return found;
}

/** Pages of a studio in which nobody has done anything yet, and a word by which each says what comes here. */
const EMPTY: Visits = {
  otherTech: [
    '/',
    '/profiles',
    '/runs',
    '/runs/new',
    '/kilns',
    '/furnaces',
    '/thermocouples',
    '/tariffs',
    '/kilns?q=nothing',
  ],
  teacher: ['/', '/classes', '/handouts', '/handouts/new'],
  student: ['/', '/handouts', '/profiles', '/runs', '/kilns'],
  otherOwner: ['/', '/profiles/new'],
};

describe('in a studio with nothing in it', () => {
  test.each(LOOKS)('every page is in order, $name', async (look) => {
    expect(await faultsOf(EMPTY, look)).toEqual([]);
  });

  test('every list says what comes there, and offers the first step to whoever may take it', async () => {
    const { page } = await browser.openAs('otherTech');
    const steps: Readonly<Record<string, RegExp>> = {
      '/profiles': /Begin the first profile/,
      '/runs': /Plan|Begin/,
      '/kilns': /Add the first kiln/,
      '/furnaces': /Add the first furnace/,
      '/thermocouples': /Add the first thermocouple/,
      '/tariffs': /Add the first tariff/,
    };
    for (const [path, step] of Object.entries(steps)) {
      await page.goto(path);
      const link = page.getByRole('main').getByRole('link', { name: step }).first();
      await link.click();
      await page.waitForURL(/\/new$/);
    }
  });
});

describe('in the demo studio', () => {
  const visits: { -readonly [key in keyof Visits]: Visits[key] } = {};

  beforeAll(async () => {
    await seedScenario(new Date());
    const furnace = { name: 'Crucible furnace', energy: 'electric', ratedKW: 15, capacityKg: 30, maxC: 1250 };
    const made = await (await app.as('tech')).post('/api/furnaces', furnace).expect(201);
    Object.assign(visits, await demoPages((made.body as { id: string }).id));
  }, 120_000);

  test.each(LOOKS)(
    'every page is in order, $name',
    async (look) => {
      expect(await faultsOf(visits, look)).toEqual([]);
    },
    300_000,
  );

  test('the list above holds every page of the product', () => {
    const visited = Object.values(visits).flatMap((paths) => paths ?? []);
    const missed = pagePatterns().filter(({ matches }) => !visited.some((path) => matches.test(path)));
    expect(missed.map(({ file }) => file)).toEqual([]);
  });
});

async function demoPages(furnaceId: string): Promise<Visits> {
  const one = async (text: string): Promise<string> => {
    const [row] = await app.db.query(text);
    if (!row) throw new Error(`the demo has nothing for: ${text}`);
    return String(Object.values(row)[0]);
  };
  const studio = `studio_id = '${app.db.people.tech.studioId}'`;
  const kiln = await one(`select id from kilns where ${studio} and name = 'Tall kiln'`);
  const thermocouple = await one(`select id from thermocouples where ${studio} limit 1`);
  const tariff = await one(`select id from tariffs where ${studio} limit 1`);
  const profile = (name: string) => one(`select id from profiles where ${studio} and name like '${name}%'`);
  const run = (state: string) =>
    one(`select id from runs where ${studio} and state = '${state}' order by number desc limit 1`);
  const [shell, wax, resin, medal] = [
    await profile('Printed shell'),
    await profile('Wax shell'),
    await profile('Resin lattice'),
    await profile('Medal'),
  ];
  const judged = await one(`select run_id from findings where ${studio} and state = 'confirmed' limit 1`);
  const open = await one(
    `select run_id from findings where ${studio} and state = 'open' group by run_id order by count(*) desc limit 1`,
  );
  const handout = await one(`select id from handouts where ${studio} limit 1`);
  return {
    tech: [
      '/',
      '/account',
      '/materials',
      '/methods',
      '/materials/moulds/fused-silica-shell',
      ...['/kilns', '/kilns?archived=yes', '/kilns/new', `/kilns/${kiln}`, `/kilns/${kiln}/edit`],
      ...['/furnaces', '/furnaces/new', `/furnaces/${furnaceId}`],
      ...['/thermocouples', '/thermocouples/new', `/thermocouples/${thermocouple}`],
      ...['/tariffs', '/tariffs/new', `/tariffs/${tariff}`],
      ...['/profiles', '/profiles?q=nothing', '/profiles/new', `/profiles/${shell}`],
      ...[`/profiles/${wax}/versions/1`, `/profiles/${shell}/versions/1`],
      `/profiles/${shell}/versions/1/print`,
      ...['/runs', '/runs/new', `/runs/${judged}`, `/runs/${open}`],
      ...[`/runs/${await run('planned')}`, `/runs/${await run('under-way')}`],
    ],
    teacher: [
      '/',
      `/profiles/${resin}/versions/1`,
      ...['/classes', '/classes/new', `/classes/${await one(`select id from classes where ${studio}`)}`],
      ...['/handouts', '/handouts/new', `/handouts/${handout}`],
      `/runs/${await run('cooling-down')}`,
    ],
    owner: ['/', '/kilns'],
    student: [
      '/',
      ...['/handouts', `/handouts/${handout}`, `/handouts/${handout}/print`],
      ...['/profiles', `/profiles/${medal}/versions/1`, `/profiles/${shell}/versions/1`],
      ...['/runs', `/runs/new?handout=${handout}`, '/materials', '/methods'],
    ],
  };
}

/** Pages that nobody signed in goes to by an address: they are looked at in tests of their own. */
const ELSEWHERE = ['404', '500', 'set-up', 'sign-in', 'sign-out'];

/** Every file of `src/pages` that is a page, as a pattern of its addresses. */
function pagePatterns(): { file: string; matches: RegExp }[] {
  return readdirSync(join(ROOT, 'src/pages'), { recursive: true, encoding: 'utf8' })
    .filter((file) => file.endsWith('.astro'))
    .map((file) => file.replaceAll('\\', '/').replace(/\.astro$/, ''))
    .filter((file) => !ELSEWHERE.includes(file))
    .map((file) => {
      const path = file.replace(/(^|\/)index$/, '').replaceAll(/\[\w+\]/g, '(?!new)[^/?]+');
      return { file, matches: new RegExp(`^/${path}(\\?.*)?$`) };
    });
}

test.each(LOOKS)(
  'the door and what stands before it are in order, $name',
  async ({ name: _name, ...options }) => {
    const { page, seen } = await browser.open(options);
    seen.expect('404');
    const found: string[] = [];
    for (const path of ['/sign-in', '/set-up?token=abcdefghijklmnopqrstuvwxyz', '/no-such-page']) {
      await page.goto(path);
      if ((await overflowPx(page)) > 0) found.push(`${path}: wider than the window`);
      found.push(...(await axeFaults(page)).map((fault) => `${path}: ${fault}`));
    }
    const inside = await browser.openAs('tech', options);
    inside.seen.expect('404');
    for (const path of ['/sign-out', '/runs/00000000-0000-4000-8000-000000000000']) {
      await inside.page.goto(path);
      if ((await overflowPx(inside.page)) > 0) found.push(`${path}: wider than the window`);
      found.push(...(await axeFaults(inside.page)).map((fault) => `${path}: ${fault}`));
    }
    expect(found).toEqual([]);
  },
);
