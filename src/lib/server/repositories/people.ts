import { QueryTypes } from 'sequelize';
import { roleSchema, type Role } from '~/lib/contracts/common';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { MembershipModel } from '../models/membership';
import { likeAnywhere } from './row';

export interface PersonWithRoles {
  readonly id: string;
  readonly name: string;
  readonly roles: Role[];
}

const rowSchema = z.object({ id: z.uuid(), name: z.string(), roles: z.array(roleSchema) });

/** People who belong to a studio now, by name; `limit` rows after the last of the page before. */
export async function listPeople(
  studioId: string,
  filter: {
    limit: number;
    after: { sort: string | number; id: string } | null;
    q?: string | undefined;
    role?: Role | undefined;
  },
): Promise<PersonWithRoles[]> {
  const rows = await database().query(
    `select u.id, u.name, m.roles from memberships m join users u on u.id = m.user_id
      where m.studio_id = $studioId and m.ended_at is null
        and ($like::text is null or u.name ilike $like)
        and ($role::text is null or $role = any (m.roles))
        and ($afterId::uuid is null or (lower(u.name), u.id) > ($afterSort, $afterId::uuid))
      order by lower(u.name), u.id limit $limit`,
    {
      bind: {
        studioId,
        like: filter.q ? likeAnywhere(filter.q) : null,
        role: filter.role ?? null,
        afterId: filter.after?.id ?? null,
        afterSort: filter.after ? String(filter.after.sort) : '',
        limit: filter.limit,
      },
      type: QueryTypes.SELECT,
    },
  );
  return rows.map((row) => rowSchema.parse(row));
}

/** Those of `userIds` who belong to the studio now. */
export async function membersAmong(studioId: string, userIds: readonly string[], tx?: Tx): Promise<string[]> {
  if (userIds.length === 0) return [];
  const rows = await MembershipModel.findAll({
    attributes: ['userId'],
    where: { studioId, userId: [...userIds], endedAt: null },
    ...(tx ? { transaction: tx } : {}),
  });
  return rows.map((row) => row.userId);
}
