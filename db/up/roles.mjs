import { createHmac } from 'node:crypto';
import { Stop } from './say.mjs';

export const APP_ROLE = 'holdfast_app';

/**
 * Makes the role the application connects as, or brings its password up to date. It owns nothing and may log in, no more.
 * The roles of a server are shared by its databases, so two starts at once take turns under an advisory lock.
 */
export async function makeAppRole(client, password) {
  await client.query('begin');
  try {
    await client.query('select pg_advisory_xact_lock(7104001)');
    const { rows } = await client.query('select 1 from pg_roles where rolname = $1', [APP_ROLE]);
    const verb = rows.length > 0 ? 'alter' : 'create';
    await client.query(
      `${verb} role ${APP_ROLE} with login nosuperuser nocreatedb nocreaterole noreplication nobypassrls password ${client.escapeLiteral(password)}`,
    );
    await client.query('commit');
  } catch (error) {
    await client.query('rollback').catch(() => undefined);
    throw new Stop(
      `The role in DATABASE_URL may not make the role ${APP_ROLE} (${error.message}). ` +
        'Make a role for the application by hand and give its address as DATABASE_APP_URL.',
    );
  }
}

/** The application's address on the same server and database as the owner's. */
export function appUrlOf(ownerUrl, password) {
  const url = new URL(ownerUrl);
  url.username = APP_ROLE;
  url.password = password;
  return url.href;
}

/** Several machines that share a database and a secret come to the same password without telling each other. */
export const appPasswordFrom = (secret) =>
  createHmac('sha256', secret).update('password of the application role').digest('base64url');
