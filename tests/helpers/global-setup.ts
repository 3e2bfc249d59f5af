import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { startCluster } from '../../db/up/cluster.mjs';
import { needPostgres } from '../../db/up/debian.mjs';
import { migrate } from '../../db/up/migrate.mjs';
import { placeOfCluster } from '../../db/up/place.mjs';
import { appUrlOf, makeAppRole } from '../../db/up/roles.mjs';
import { seedPeople } from '../../db/seeds/people';
import { TEMPLATE } from './template';

/** A cluster that may forget everything in a crash: quicker, and gone after the tests. */
const QUICK = { fsync: 'off', synchronous_commit: 'off', full_page_writes: 'off' };

/** Brings up a PostgreSQL cluster of the tests' own with a migrated template, once for all projects of a run. */
export default async function setUp(): Promise<(() => Promise<void>) | undefined> {
  if (process.env['HOLDFAST_TEST_OWNER_URL']) return undefined;
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-test-'));
  chmodSync(folder, 0o711);
  const cluster = await startCluster({
    bin: await needPostgres(),
    place: placeOfCluster(folder),
    password: randomBytes(18).toString('hex'),
    settings: QUICK,
  });
  const appPassword = randomBytes(18).toString('hex');
  await makeTemplate(cluster.urlFor, appPassword);
  process.env['HOLDFAST_TEST_OWNER_URL'] = cluster.urlFor('postgres');
  process.env['HOLDFAST_TEST_APP_URL'] = appUrlOf(cluster.urlFor('postgres'), appPassword);
  return async () => {
    await cluster.stop();
    rmSync(folder, { recursive: true, force: true });
  };
}

async function makeTemplate(urlFor: (database: string) => string, appPassword: string): Promise<void> {
  await withClient(urlFor('postgres'), (client) => client.query(`create database ${TEMPLATE}`));
  await withClient(urlFor(TEMPLATE), async (client) => {
    await makeAppRole(client, appPassword);
    await migrate(client);
    await seedPeople(client);
  });
}

async function withClient<T>(url: string, work: (client: pg.Client) => Promise<T>): Promise<T> {
  const client = new pg.Client(url);
  await client.connect();
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}
