import { mkdtempSync, chmodSync, readdirSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { startCluster } from './cluster.mjs';
import { show } from './command.mjs';
import { withClient } from './database.mjs';
import { needPostgres } from './debian.mjs';
import { endOnSignals } from './ending.mjs';
import { keptKey } from './keys.mjs';
import { needPackages } from './packages.mjs';
import { placeOfCluster } from './place.mjs';
import { appUrlOf, makeAppRole } from './roles.mjs';
import { ROOT } from './root.mjs';
import { run } from './say.mjs';

/** `npm run bench [part of a name]`: every benchmark in turn, on a database of its own with the settings of a real one. */
async function main() {
  const ending = endOnSignals();
  await needPackages();
  const folder = mkdtempSync(join(tmpdir(), 'holdfast-bench-'));
  chmodSync(folder, 0o711);
  const password = keptKey(folder, 'database-owner');
  const cluster = await startCluster({ bin: await needPostgres(), place: placeOfCluster(folder), password });
  ending.before(() => rmSync(folder, { recursive: true, force: true }));
  ending.before(cluster.stop);
  const env = {
    ...process.env,
    ...(await prepare(cluster, folder)),
    HOLDFAST_MODE: 'demo',
    HOLDFAST_LOG: 'silent',
  };
  let failed = 0;
  for (const name of benchmarks(process.argv[2] ?? ''))
    if ((await show(process.execPath, ['--expose-gc', '--import', 'tsx', name], { cwd: ROOT, env })) !== 0)
      failed++;
  await ending.end(failed > 0 ? 1 : 0);
}

const benchmarks = (part) =>
  readdirSync(join(ROOT, 'tests/bench'))
    .filter((name) => name.endsWith('.bench.ts') && name.includes(part))
    .sort()
    .map((name) => join('tests/bench', name));

/** A migrated database with the people of the demo, and what the application and a benchmark find it by. */
async function prepare(cluster, folder) {
  const { migrate } = await import('./migrate.mjs');
  const appPassword = keptKey(folder, 'database-app');
  await withClient(cluster.urlFor('postgres'), (client) => client.query('create database holdfast'));
  const ownerUrl = cluster.urlFor('holdfast');
  await withClient(ownerUrl, async (client) => {
    await makeAppRole(client, appPassword);
    await migrate(client);
  });
  const people = { ...process.env, DATABASE_URL: ownerUrl };
  await show(process.execPath, ['--import', 'tsx', 'db/seeds/only-people.ts'], { cwd: ROOT, env: people });
  return { DATABASE_APP_URL: appUrlOf(ownerUrl, appPassword), HOLDFAST_SECRET: keptKey(folder, 'secret') };
}

await run(main);
