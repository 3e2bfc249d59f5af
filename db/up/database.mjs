import { join } from 'node:path';
import { show } from './command.mjs';
import { startCluster } from './cluster.mjs';
import { needPostgres } from './debian.mjs';
import { keptKey } from './keys.mjs';
import { placeOfCluster } from './place.mjs';
import { appPasswordFrom, appUrlOf, makeAppRole } from './roles.mjs';
import { ROOT } from './root.mjs';
import { say, Stop } from './say.mjs';

const DATABASE = 'holdfast';
/** Where a new database grows until it is whole. */
const DRAFT = 'holdfast_new';

/**
 * Brings the database up and up to date: DATABASE_URL's, or the private cluster's. Gives `{ ownerUrl, appUrl, stop() }`.
 * In demo mode an empty database is filled with the demo studios.
 */
export async function bringUp({ data, mode, secret, onExit }) {
  if (process.env.DATABASE_URL) return bringUpGiven(process.env.DATABASE_URL, { mode, secret });
  const cluster = await startOwnCluster(data, onExit);
  try {
    return await bringUpOwn(cluster, { data, mode, secret });
  } catch (error) {
    await cluster.stop();
    throw error;
  }
}

export async function startOwnCluster(data, onExit) {
  const bin = await needPostgres();
  const password = keptKey(data, 'database-owner');
  return startCluster({ bin, place: placeOfCluster(data), password, onExit });
}

async function bringUpOwn(cluster, { data, mode, secret }) {
  const appPassword = keptKey(data, 'database-app');
  const addresses = (name) => ({
    ownerUrl: cluster.urlFor(name),
    appUrl: appUrlOf(cluster.urlFor(name), appPassword),
  });
  await withClient(cluster.urlFor('postgres'), async (client) => {
    await makeAppRole(client, appPassword);
    const { rows } = await client.query('select 1 from pg_database where datname = $1', [DATABASE]);
    if (rows.length > 0) return;
    // A start that was killed half-way through left this one behind; only a whole database gets the real name.
    await client.query(`drop database if exists ${DRAFT} with (force)`);
    await client.query(`create database ${DRAFT}`);
    await prepare({ ...addresses(DRAFT), mode, secret });
    await client.query(`alter database ${DRAFT} rename to ${DATABASE}`);
  });
  await prepare({ ...addresses(DATABASE), mode, secret });
  return { ...addresses(DATABASE), stop: cluster.stop };
}

async function bringUpGiven(ownerUrl, { mode, secret }) {
  const given = process.env.DATABASE_APP_URL;
  const appUrl = given || appUrlOf(ownerUrl, appPasswordFrom(secret));
  await withClient(ownerUrl, async (client) => {
    if (!given) await makeAppRole(client, appPasswordFrom(secret));
  });
  await prepare({ ownerUrl, appUrl, mode, secret });
  return { ownerUrl, appUrl, stop: async () => undefined };
}

async function prepare({ ownerUrl, appUrl, mode, secret }) {
  const { migrate } = await import('./migrate.mjs');
  const isEmpty = await withClient(ownerUrl, async (client) => {
    const ran = await migrate(client, { appRole: decodeURIComponent(new URL(appUrl).username) });
    if (ran.length > 0) say(`Brought the database up to ${ran.at(-1).slice(0, 4)}.`);
    return (await client.query('select 1 from users limit 1')).rows.length === 0;
  });
  if (mode === 'demo' && isEmpty) await seedDemo({ ownerUrl, appUrl, secret });
}

async function seedDemo({ ownerUrl, appUrl, secret }) {
  say('Filling the empty database with the demo studios.');
  const env = {
    ...process.env,
    DATABASE_URL: ownerUrl,
    DATABASE_APP_URL: appUrl,
    HOLDFAST_SECRET: secret,
    HOLDFAST_MODE: 'demo',
    HOLDFAST_LOG: 'warn',
  };
  const code = await show(process.execPath, ['--import', 'tsx', join(ROOT, 'db/seeds/demo.ts')], {
    cwd: ROOT,
    env,
  });
  if (code !== 0) throw new Stop('The demo studios could not be made; what went wrong stands above.');
}

export async function withClient(url, work) {
  const { default: pg } = await import('pg');
  const client = new pg.Client(url);
  try {
    await client.connect();
  } catch (error) {
    const { host } = new URL(url);
    throw new Stop(`The database at ${host} cannot be reached: ${error.message || error.code}.`);
  }
  try {
    return await work(client);
  } finally {
    await client.end();
  }
}
