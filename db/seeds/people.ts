import { hash } from 'bcryptjs';
import type { Client } from 'pg';
import { PASSWORD_COST } from '../../src/lib/server/auth/password';
import accounts from './demo-accounts.json' with { type: 'json' };

export type DemoKey =
  'owner' | 'tech' | 'teacher' | 'student' | 'studentTwo' | 'studentThree' | 'otherOwner' | 'otherTech';

export const demoAccounts = accounts;

/** Two invented studios and the people in them, with the demo password. Fixed ids, so that other seeds can name them. */
export async function seedPeople(client: Client): Promise<void> {
  const passwordHash = await hash(accounts.password, PASSWORD_COST);
  await client.query('begin');
  for (const studio of accounts.studios)
    await client.query('insert into studios (id, name, time_zone) values ($1, $2, $3)', [
      studio.id,
      studio.name,
      studio.timeZone,
    ]);
  for (const person of accounts.people) {
    const { id, name, email, roles } = person;
    await client.query('insert into users (id, name, email) values ($1, $2, $3)', [id, name, email]);
    await client.query('insert into credentials (user_id, password_hash) values ($1, $2)', [
      id,
      passwordHash,
    ]);
    await client.query('insert into memberships (studio_id, user_id, roles) values ($1, $2, $3)', [
      accounts.studios[person.studio]?.id,
      id,
      roles,
    ]);
  }
  await client.query('commit');
}
