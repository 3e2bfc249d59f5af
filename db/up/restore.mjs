import { existsSync } from 'node:fs';
import { resolve } from 'node:path';
import { DATABASE, reach, runTool } from './backup-files.mjs';
import { withClient } from './database.mjs';
import { keptKey } from './keys.mjs';
import { needPackages } from './packages.mjs';
import { dataFolder } from './place.mjs';
import { makeAppRole } from './roles.mjs';
import { run, say, Stop } from './say.mjs';

const BEFORE = `${DATABASE}_before_restore`;
const DRAFT = `${DATABASE}_restored`;

/** `npm run restore FILE`: puts a backup in the place of what is there; what was there stays beside it until the next one. */
async function main() {
  const file = process.argv[2] && resolve(process.argv[2]);
  if (!file || !existsSync(file))
    throw new Stop(
      `Say which backup to restore: npm run restore FILE${file ? ` (${file} is not there)` : ''}.`,
    );
  await needPackages();
  const data = dataFolder();
  const { bin, urlFor, isOwn, stop } = await reach(data, { alone: true });
  try {
    if (isOwn) await restoreBeside(bin, urlFor, file, data);
    else
      runTool(bin, 'pg_restore', urlFor(), [
        '--clean',
        '--if-exists',
        '--no-owner',
        '--single-transaction',
        file,
      ]);
  } finally {
    await stop();
  }
  say(`Restored ${file}.`);
}

/** Into a database of another name first: a backup that turns out broken leaves everything as it was. */
async function restoreBeside(bin, urlFor, file, data) {
  await withClient(urlFor('postgres'), async (client) => {
    await makeAppRole(client, keptKey(data, 'database-app'));
    await client.query(`drop database if exists ${DRAFT} with (force)`);
    await client.query(`create database ${DRAFT}`);
    runTool(bin, 'pg_restore', urlFor(DRAFT), ['--no-owner', '--exit-on-error', file]);
    const { rows } = await client.query('select 1 from pg_database where datname = $1', [DATABASE]);
    await client.query(`drop database if exists ${BEFORE} with (force)`);
    if (rows.length > 0) await client.query(`alter database ${DATABASE} rename to ${BEFORE}`);
    await client.query(`alter database ${DRAFT} rename to ${DATABASE}`);
  });
}

await run(main);
