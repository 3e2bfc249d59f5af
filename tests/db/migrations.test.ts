import { mkdtempSync, copyFileSync, readdirSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import pg from 'pg';
import { afterAll, describe, expect, it } from 'vitest';
import { migrate, migrationNames } from '../../db/up/migrate.mjs';
import { ROOT } from '../../db/up/root.mjs';
import { testDatabase } from '../helpers/database';

const db = await testDatabase();
const folder = mkdtempSync(join(tmpdir(), 'holdfast-migrations-'));
const REAL = join(ROOT, 'db/migrations');
for (const name of readdirSync(REAL)) copyFileSync(join(REAL, name), join(folder, name));
afterAll(() => rmSync(folder, { recursive: true, force: true }));

async function onEmpty<T>(work: (connect: () => Promise<pg.Client>) => Promise<T>): Promise<T> {
  const name = `m_${Math.random().toString(36).slice(2)}`;
  await db.query(`create database ${name}`);
  const url = new URL(db.ownerUrl);
  url.pathname = `/${name}`;
  const clients: pg.Client[] = [];
  try {
    return await work(async () => {
      const client = new pg.Client(url.href);
      await client.connect();
      clients.push(client);
      return client;
    });
  } finally {
    for (const client of clients) await client.end();
    await db.query(`drop database ${name} with (force)`);
  }
}

describe('migrations', () => {
  it('are numbered without a gap or a number twice', () => {
    const numbers = migrationNames().map((name) => Number(name.slice(0, 4)));
    expect(numbers).toEqual(numbers.map((_, index) => index + 1));
  });

  it('run once: a second run does nothing', async () => {
    await onEmpty(async (connect) => {
      const client = await connect();
      expect(await migrate(client)).toEqual(migrationNames());
      expect(await migrate(client)).toEqual([]);
    });
  });

  it('run once when several processes start at the same moment', async () => {
    await onEmpty(async (connect) => {
      const clients = await Promise.all([connect(), connect(), connect(), connect()]);
      const ran = await Promise.all(clients.map((client) => migrate(client)));
      expect(ran.flat().sort()).toEqual(migrationNames());
    });
  });

  it('refuse a database that newer code has migrated', async () => {
    await onEmpty(async (connect) => {
      const client = await connect();
      await migrate(client);
      await client.query("insert into migrations (name) values ('9999_from_the_future.sql')");
      await expect(migrate(client)).rejects.toThrow(/newer code.*9999_from_the_future/);
    });
  });

  it('leave nothing of one that fails half-way', async () => {
    await onEmpty(async (connect) => {
      const client = await connect();
      const broken = '9000_broken.sql';
      writeFileSync(join(folder, broken), 'create table half (id int); select 1 / 0;');
      await expect(migrate(client, { folder })).rejects.toThrow(/9000_broken.*division by zero/);
      const { rows } = await client.query("select to_regclass('half') as half");
      expect(rows).toEqual([{ half: null }]);
      rmSync(join(folder, broken));
      expect(await migrate(client, { folder })).toEqual([]);
    });
  });

  it('grant to the role of the application under whatever name it has', async () => {
    await onEmpty(async (connect) => {
      const client = await connect();
      await client.query('create role "app of theirs" nologin');
      try {
        await migrate(client, { appRole: 'app of theirs' });
        const { rows } = await client.query(
          `select has_table_privilege('app of theirs', 'kilns', 'insert') as theirs, has_table_privilege('holdfast_app', 'kilns', 'insert') as usual`,
        );
        expect(rows).toEqual([{ theirs: true, usual: false }]);
      } finally {
        await client.query('drop owned by "app of theirs"; drop role "app of theirs"');
      }
    });
  });
});

describe('the tables', () => {
  it('of studios begin their key with the studio', async () => {
    const shared = ['users', 'credentials', 'sessions', 'throttles', 'setup_tokens', 'migrations'];
    const rows = await db.query(
      `select c.relname as name, (select a.attname from pg_attribute a where a.attrelid = c.oid and a.attnum = i.indkey[0]) as first
         from pg_class c join pg_index i on i.indrelid = c.oid and i.indisprimary
        where c.relnamespace = 'public'::regnamespace and c.relkind = 'r'`,
    );
    expect(rows.length).toBeGreaterThan(15);
    const wrong = rows.filter(
      (row) =>
        !shared.includes(String(row['name'])) && row['name'] !== 'studios' && row['first'] !== 'studio_id',
    );
    expect(wrong).toEqual([]);
  });

  it('all have a primary key, and nothing that the application role could truncate', async () => {
    expect(
      await db.query(
        `select relname from pg_class c where relnamespace = 'public'::regnamespace and relkind = 'r'
            and not exists (select 1 from pg_index i where i.indrelid = c.oid and i.indisprimary)`,
      ),
    ).toEqual([]);
    expect(
      await db.query(
        `select table_name from information_schema.role_table_grants
          where grantee = 'holdfast_app' and privilege_type in ('TRUNCATE', 'TRIGGER', 'REFERENCES')`,
      ),
    ).toEqual([]);
  });
});
