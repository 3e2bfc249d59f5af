import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { Umzug } from 'umzug';
import { ROOT } from './root.mjs';
import { APP_ROLE } from './roles.mjs';
import { Stop } from './say.mjs';

const FOLDER = join(ROOT, 'db/migrations');
const LOCK = 7104002;

/**
 * Brings the database behind `client`, one dedicated connection, up to the newest numbered migration and gives the names
 * of those that ran. Forward only; each in its own transaction together with the note that it ran. Starts at the same
 * moment take turns. Refuses a database that was migrated by newer code.
 */
export async function migrate(client, { appRole = APP_ROLE, folder = FOLDER } = {}) {
  await client.query('select pg_advisory_lock($1)', [LOCK]);
  try {
    const umzug = umzugOver(client, appRole, folder);
    await client.query(
      'create table if not exists migrations (name text primary key, ran_at timestamptz not null default now())',
    );
    await client.query(`grant select on migrations to ${client.escapeIdentifier(appRole)}`);
    const known = new Set(migrationNames(folder));
    const { rows } = await client.query('select name from migrations order by name');
    const unknown = rows.map((row) => row.name).filter((name) => !known.has(name));
    if (unknown.length > 0)
      throw new Stop(
        `This database was migrated by newer code: it holds ${unknown.join(', ')}, which this version does not know. ` +
          'Start the newer version, or restore an older backup.',
      );
    return (await umzug.up()).map((each) => each.name);
  } finally {
    await client.query('select pg_advisory_unlock($1)', [LOCK]);
  }
}

export const migrationNames = (folder = FOLDER) =>
  readdirSync(folder)
    .filter((name) => /^\d{4}_[a-z0-9_]+\.sql$/.test(name))
    .sort();

function umzugOver(client, appRole, folder) {
  return new Umzug({
    logger: undefined,
    context: client,
    migrations: migrationNames(folder).map((name) => ({
      name,
      up: () => runOne(client, appRole, join(folder, name), name),
    })),
    storage: {
      executed: async () =>
        (await client.query('select name from migrations order by name')).rows.map((row) => row.name),
      // Noted by `runOne`, inside the transaction of the migration itself.
      logMigration: async () => undefined,
      unlogMigration: async () => {
        throw new Error('migrations go forward only');
      },
    },
  });
}

async function runOne(client, appRole, file, name) {
  const text = readFileSync(file, 'utf8').replace(/\bholdfast_app\b/g, client.escapeIdentifier(appRole));
  await client.query('begin');
  try {
    await client.query(text);
    await client.query('insert into migrations (name) values ($1)', [name]);
    await client.query('commit');
  } catch (error) {
    await client.query('rollback').catch(() => undefined);
    throw new Error(`Migration ${name} failed, and nothing of it was kept: ${error.message}`, {
      cause: error,
    });
  }
}
