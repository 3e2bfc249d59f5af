import { randomBytes } from 'node:crypto';
import pg from 'pg';
import { afterAll } from 'vitest';
import { demoAccounts, type DemoKey } from '../../db/seeds/people';
import type { Role } from '~/lib/contracts/common';
import type { Actor } from '~/lib/server/auth/actor';
import { TEMPLATE } from './template';

export interface TestPerson {
  readonly id: string;
  readonly name: string;
  readonly email: string;
  readonly studioId: string;
  /** As the middleware would resolve them: for tests that call services without HTTP. */
  readonly actor: Actor;
}

export interface TestDatabase {
  /** The address the application uses: the role that owns nothing. */
  readonly appUrl: string;
  /** The address of the migrating role, for what only it may do. */
  readonly ownerUrl: string;
  readonly people: Readonly<Record<DemoKey, TestPerson>>;
  /** A query as the owner, past the grants of the application. */
  query(text: string, values?: unknown[]): Promise<Record<string, unknown>[]>;
}

/**
 * A database of this file's own: a clone of the migrated template with two studios and the people of the demo. The
 * application's `database()` connects to it. Call it once at the top of a test file: `const db = await testDatabase();`
 */
export async function testDatabase(): Promise<TestDatabase> {
  const name = `t_${randomBytes(8).toString('hex')}`;
  const ownerUrl = onDatabase(needed('HOLDFAST_TEST_OWNER_URL'), name);
  const appUrl = onDatabase(needed('HOLDFAST_TEST_APP_URL'), name);
  await asOwnerOfAll(`create database ${name} template ${TEMPLATE}`);
  Object.assign(process.env, {
    DATABASE_APP_URL: appUrl,
    HOLDFAST_SECRET: 'a secret for tests, long enough to sign with',
    HOLDFAST_MODE: 'demo',
    HOLDFAST_LOG: process.env['HOLDFAST_TEST_LOG'] ?? 'silent',
  });
  const client = new pg.Client(ownerUrl);
  await client.connect();
  afterAll(async () => {
    await client.end();
    await globalThis.holdfastSequelize?.close();
    globalThis.holdfastSequelize = undefined;
    await asOwnerOfAll(`drop database ${name} with (force)`);
  });
  const query = async (text: string, values?: unknown[]) =>
    (await client.query<Record<string, unknown>>(text, values)).rows;
  return { appUrl, ownerUrl, people: testPeople(), query };
}

function testPeople(): Record<DemoKey, TestPerson> {
  const entries = demoAccounts.people.map((person, index) => {
    const studioId = demoAccounts.studios[person.studio]?.id ?? '';
    const actor: Actor = {
      userId: person.id,
      studioId,
      roles: person.roles as Role[],
      sessionId: `00000000-0000-4000-8000-00000000000${index}`,
    };
    return [person.key, { id: person.id, name: person.name, email: person.email, studioId, actor }];
  });
  return Object.fromEntries(entries) as Record<DemoKey, TestPerson>;
}

async function asOwnerOfAll(statement: string): Promise<void> {
  const client = new pg.Client(needed('HOLDFAST_TEST_OWNER_URL'));
  await client.connect();
  try {
    await client.query(statement);
  } finally {
    await client.end();
  }
}

function onDatabase(url: string, name: string): string {
  const changed = new URL(url);
  changed.pathname = `/${name}`;
  return changed.href;
}

function needed(name: string): string {
  const value = process.env[name];
  if (!value)
    throw new Error(`${name} is not set: run this file in the vitest project 'server' or 'browser'.`);
  return value;
}
