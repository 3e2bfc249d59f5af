import { Op, QueryTypes } from 'sequelize';
import { roleSchema, unitsSchema, type Role, type Units } from '~/lib/contracts/common';
import { themeSchema, type Me } from '~/lib/contracts/auth';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { SessionModel } from '../models/session';

/** A session with whom it stands for, as one request needs it. */
export interface LiveSession {
  readonly id: string;
  readonly lastSeenAt: Date;
  readonly createdAt: Date;
  readonly userId: string;
  readonly studioId: string;
  readonly roles: readonly Role[];
  readonly me: Me;
}

export interface SessionRow {
  readonly id: string;
  readonly device: string;
  readonly createdAt: Date;
  readonly lastSeenAt: Date;
}

const rowSchema = z.object({
  id: z.uuid(),
  created_at: z.date(),
  last_seen_at: z.date(),
  user_id: z.uuid(),
  studio_id: z.uuid(),
  roles: z.array(roleSchema).min(1),
  user_name: z.string(),
  email: z.string(),
  theme: themeSchema,
  own_temperature: unitsSchema.shape.temperature.nullable(),
  own_mass: unitsSchema.shape.mass.nullable(),
  own_length: unitsSchema.shape.length.nullable(),
  studio_name: z.string(),
  time_zone: z.string(),
  temperature: unitsSchema.shape.temperature,
  mass: unitsSchema.shape.mass,
  length: unitsSchema.shape.length,
});

/** One statement for what every request asks: the session, its person, their roles in its studio. Ended ones give null. */
export async function findLiveSession(id: string): Promise<LiveSession | null> {
  const rows = await database().query(
    `select s.id, s.created_at, s.last_seen_at, s.user_id, s.studio_id, m.roles,
            u.name as user_name, u.email, u.theme, u.temperature_unit as own_temperature,
            u.mass_unit as own_mass, u.length_unit as own_length, t.name as studio_name, t.time_zone,
            t.temperature_unit as temperature, t.mass_unit as mass, t.length_unit as length
       from sessions s
       join memberships m on m.studio_id = s.studio_id and m.user_id = s.user_id and m.ended_at is null
       join users u on u.id = s.user_id
       join studios t on t.id = s.studio_id
      where s.id = $1 and s.expires_at > now()`,
    { bind: [id], type: QueryTypes.SELECT },
  );
  return rows[0] ? toLiveSession(rowSchema.parse(rows[0])) : null;
}

function toLiveSession(row: z.infer<typeof rowSchema>): LiveSession {
  const own: Units | null =
    row.own_temperature && row.own_mass && row.own_length
      ? { temperature: row.own_temperature, mass: row.own_mass, length: row.own_length }
      : null;
  const units: Units = { temperature: row.temperature, mass: row.mass, length: row.length };
  return {
    id: row.id,
    createdAt: row.created_at,
    lastSeenAt: row.last_seen_at,
    userId: row.user_id,
    studioId: row.studio_id,
    roles: row.roles,
    me: {
      user: { id: row.user_id, name: row.user_name, email: row.email },
      studio: { id: row.studio_id, name: row.studio_name, timeZone: row.time_zone, units },
      roles: row.roles,
      preferences: { units: own, theme: row.theme },
    },
  };
}

export async function insertSession(
  tx: Tx,
  session: { userId: string; studioId: string; device: string; expiresAt: Date },
): Promise<string> {
  const row = await SessionModel.create(session, { transaction: tx });
  return row.id;
}

export async function touchSession(id: string, lastSeenAt: Date, expiresAt: Date): Promise<void> {
  await SessionModel.update({ lastSeenAt, expiresAt }, { where: { id } });
}

export async function listSessions(userId: string, at: Date): Promise<SessionRow[]> {
  const rows = await SessionModel.findAll({
    where: { userId, expiresAt: { [Op.gt]: at } },
    order: [['lastSeenAt', 'DESC']],
    limit: 200,
  });
  return rows.map(({ id, device, createdAt, lastSeenAt }) => ({ id, device, createdAt, lastSeenAt }));
}

/** How many ended: 0 where the session is not that person's. */
export const deleteSession = (tx: Tx, userId: string, id: string): Promise<number> =>
  SessionModel.destroy({ where: { id, userId }, transaction: tx });

export const deleteOtherSessions = (tx: Tx, userId: string, keepId: string): Promise<number> =>
  SessionModel.destroy({ where: { userId, id: { [Op.ne]: keepId } }, transaction: tx });

export const deleteExpiredSessions = (tx: Tx, userId: string, at: Date): Promise<number> =>
  SessionModel.destroy({ where: { userId, expiresAt: { [Op.lte]: at } }, transaction: tx });
