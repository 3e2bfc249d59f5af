import { describe, expect, it } from 'vitest';
import { database } from '~/lib/server/database';
import { StudioModel } from '~/lib/server/models/studio';
import { UserModel } from '~/lib/server/models/user';
import { testDatabase } from '../helpers/database';

const db = await testDatabase();

describe('the application role', () => {
  it('reads the people of the template through the models', async () => {
    database();
    const person = await UserModel.findByPk(db.people.tech.id);
    expect(person?.email).toBe('tech@quarrylane.example');
    expect(await StudioModel.count()).toBe(2);
  });

  it('owns no table and can make none', async () => {
    const owned = await db.query("select 1 from pg_tables where tableowner = 'holdfast_app'");
    expect(owned).toEqual([]);
    await expect(database().query('create table mine (id int)')).rejects.toThrow(/permission denied/);
  });

  it('adds to the audit trail and cannot change or clear it', async () => {
    await database().query(
      `insert into audit_events (studio_id, what, subject_kind) values ('${db.people.tech.studioId}', 'tried', 'test')`,
    );
    await expect(database().query("update audit_events set what = 'other'")).rejects.toThrow(
      /permission denied/,
    );
    await expect(database().query('delete from audit_events')).rejects.toThrow(/permission denied/);
  });
});
