import { QueryTypes } from 'sequelize';
import { describe, expect, it } from 'vitest';
import { database } from '~/lib/server/database';
import { loggable } from '~/lib/server/http/failure';
import { UserModel } from '~/lib/server/models/user';
import { testDatabase } from '../helpers/database';

const db = await testDatabase();
const caught = (work: Promise<unknown>): Promise<unknown> =>
  work.then(
    () => null,
    (error: unknown) => error,
  );
/** All that a logger could find in it, hidden properties and causes included. */
const allOf = (value: unknown): string =>
  JSON.stringify(value, (_, each: unknown) =>
    each instanceof Error
      ? Object.fromEntries(Object.getOwnPropertyNames(each).map((name) => [name, each[name as keyof Error]]))
      : each,
  );

describe('what is logged of a failed statement', () => {
  it('holds no value of it: no address, no hash', async () => {
    const error = await caught(
      database().query('select $email::text, $hash::text, $number::int', {
        bind: { email: 'secret@person.example', hash: '$2b$11$secret', number: 'x' },
        type: QueryTypes.SELECT,
      }),
    );
    expect(allOf(error)).toContain('secret@person.example');
    const told = allOf(loggable(error));
    expect(told).not.toMatch(/secret/);
    expect(told).toContain('SequelizeDatabaseError');
    expect(told).toContain('22P02');
    expect(told).toContain('log-lines.test');
  });

  it('of an address that is there already names the constraint, not the address', async () => {
    const { email } = db.people.tech;
    const error = await caught(UserModel.create({ name: 'Twice', email }));
    expect(allOf(error)).toContain(email);
    const told = allOf(loggable(error));
    expect(told).not.toContain(email);
    expect(told).toContain('users_email_key');
  });

  it('leaves any other error as it is', () => {
    const error = new Error('a fault of ours');
    expect(loggable(error)).toBe(error);
  });
});
