import { QueryTypes } from 'sequelize';
import type { Role, Units } from '~/lib/contracts/common';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { CredentialModel } from '../models/credential';
import { MembershipModel } from '../models/membership';
import { StudioModel } from '../models/studio';
import { UserModel } from '../models/user';

export interface SignInAccount {
  readonly userId: string;
  readonly passwordHash: string;
  /** The studio of the latest session, or the one joined first; null where the person belongs to none any more. */
  readonly studioId: string | null;
}

const signInRow = z.object({
  user_id: z.uuid(),
  password_hash: z.string(),
  studio_id: z.uuid().nullable(),
});

/** The account of an address, in lower case; null where there is none. */
export async function findAccount(email: string): Promise<SignInAccount | null> {
  const rows = await database().query(
    `select u.id as user_id, c.password_hash,
            (select m.studio_id from memberships m
              left join sessions s on s.user_id = m.user_id and s.studio_id = m.studio_id
              where m.user_id = u.id and m.ended_at is null
              order by s.last_seen_at desc nulls last, m.created_at limit 1) as studio_id
       from users u join credentials c on c.user_id = u.id
      where u.email = $email`,
    { bind: { email }, type: QueryTypes.SELECT },
  );
  if (!rows[0]) return null;
  const row = signInRow.parse(rows[0]);
  return { userId: row.user_id, passwordHash: row.password_hash, studioId: row.studio_id };
}

export async function findPasswordHash(userId: string): Promise<string | null> {
  return (await CredentialModel.findByPk(userId))?.passwordHash ?? null;
}

export async function savePasswordHash(tx: Tx, userId: string, passwordHash: string): Promise<void> {
  await CredentialModel.update(
    { passwordHash, changedAt: new Date() },
    { where: { userId }, transaction: tx },
  );
}

export interface AccountChange {
  readonly name?: string | undefined;
  readonly units?: Units | null | undefined;
  readonly theme?: 'auto' | 'light' | 'dark' | undefined;
}

export async function updateUser(tx: Tx, userId: string, change: AccountChange): Promise<void> {
  const { name, units, theme } = change;
  const columns = {
    ...(name === undefined ? {} : { name }),
    ...(theme === undefined ? {} : { theme }),
    ...(units === undefined
      ? {}
      : {
          temperatureUnit: units?.temperature ?? null,
          massUnit: units?.mass ?? null,
          lengthUnit: units?.length ?? null,
        }),
  };
  if (Object.keys(columns).length > 0)
    await UserModel.update(columns, { where: { id: userId }, transaction: tx });
}

export async function insertStudio(tx: Tx, studio: { name: string; timeZone: string }): Promise<string> {
  return (await StudioModel.create(studio, { transaction: tx })).id;
}

/** A new person of a studio, with a password. Null where the address has an account already. */
export async function insertPerson(
  tx: Tx,
  person: { studioId: string; name: string; email: string; roles: readonly Role[]; passwordHash: string },
): Promise<string | null> {
  const { studioId, name, email, roles, passwordHash } = person;
  if (await UserModel.findOne({ where: { email }, transaction: tx })) return null;
  const user = await UserModel.create({ name, email }, { transaction: tx });
  await CredentialModel.create({ userId: user.id, passwordHash }, { transaction: tx });
  await MembershipModel.create({ studioId, userId: user.id, roles: [...roles] }, { transaction: tx });
  return user.id;
}

/** Whether anybody owns a studio of this installation yet. */
export async function anOwnerExists(tx: Tx): Promise<boolean> {
  const rows = await database().query(`select 1 from memberships where 'owner' = any (roles) limit 1`, {
    type: QueryTypes.SELECT,
    transaction: tx,
  });
  return rows.length > 0;
}
