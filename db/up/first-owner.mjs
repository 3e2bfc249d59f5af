import { createHash, randomBytes } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { withClient } from './database.mjs';
import { ROOT } from './root.mjs';
import { Stop } from './say.mjs';

const HOURS = 24;

const demo = JSON.parse(readFileSync(join(ROOT, 'db/seeds/demo-accounts.json'), 'utf8'));
export const demoAccounts = demo;

/** Everybody may read the demo's password, so production does not start where its accounts are. */
export async function refuseDemoAccounts(ownerUrl) {
  const emails = demo.people.map((person) => person.email);
  const { rows } = await withClient(ownerUrl, (client) =>
    client.query('select email from users where email = any ($1) order by email', [emails]),
  );
  if (rows.length > 0)
    throw new Stop(
      `This database holds demo accounts, whose password is public (${rows.map((row) => row.email).join(', ')}). ` +
        'Start production on a database of its own: set HOLDFAST_DATA to another folder, or DATABASE_URL to another database.',
    );
}

/** The one-time link for making the first owner, or null where there is an owner. Links of earlier starts end. */
export async function firstOwnerLink(ownerUrl, origin) {
  return withClient(ownerUrl, async (client) => {
    const { rows } = await client.query("select 1 from memberships where 'owner' = any (roles) limit 1");
    if (rows.length > 0) return null;
    const token = randomBytes(32).toString('base64url');
    await client.query('delete from setup_tokens where used_at is null');
    await client.query(
      `insert into setup_tokens (token_hash, expires_at) values ($1, now() + make_interval(hours => $2))`,
      [createHash('sha256').update(token).digest('hex'), HOURS],
    );
    return `${origin}/set-up?token=${token}`;
  });
}
