import { QueryTypes } from 'sequelize';
import { classSchema, type StudioClass } from '~/lib/contracts/classes';
import { database, type Tx } from '../database';
import { ClassMemberRow, ClassRow } from '../models/class';
import { instantOf, likeAnywhere } from './row';

/** Only people who belong to the studio now. $onlyUserId: a member's view, in which nobody else is named. */
const SELECT = `
  select c.id, c.name, c.term, c.revision, ${instantOf('c.created_at')} as "createdAt",
    ${instantOf('c.archived_at')} as "archivedAt", json_build_object('id', t.id, 'name', t.name) as teacher,
    (select coalesce(json_agg(json_build_object('id', u.id, 'name', u.name) order by lower(u.name), u.id), '[]')
      from class_members cm
      join memberships m on m.studio_id = cm.studio_id and m.user_id = cm.user_id and m.ended_at is null
      join users u on u.id = cm.user_id
      where cm.studio_id = c.studio_id and cm.class_id = c.id
        and ($onlyUserId::uuid is null or cm.user_id = $onlyUserId::uuid)) as members,
    c.name_key as "nameKey"
  from classes c join users t on t.id = c.teacher_id
  where c.studio_id = $studioId and ($onlyUserId::uuid is null or exists (select 1 from class_members cm
    where cm.studio_id = c.studio_id and cm.class_id = c.id and cm.user_id = $onlyUserId::uuid))`;

export interface ClassFilter {
  readonly studioId: string;
  /** Only the classes that this person is in, as they see them; null: all. */
  readonly onlyUserId: string | null;
  readonly limit: number;
  readonly after: { readonly sort: string; readonly id: string } | null;
  readonly q?: string | undefined;
}

export type ClassRecord = StudioClass & { readonly nameKey: string };
const recordSchema = classSchema.extend({ nameKey: classSchema.shape.name });

/** Classes by name; those that are archived come with the rest, marked. */
export async function listClasses(filter: ClassFilter): Promise<ClassRecord[]> {
  const { after, q, ...bind } = filter;
  const where = [
    q && 'c.name ilike $like',
    after && '(c.name_key, c.id) > ($afterSort, $afterId::uuid)',
  ].filter(Boolean);
  const rows = await database().query(
    `${[SELECT, ...where].join(' and ')} order by c.name_key, c.id limit $limit`,
    {
      type: QueryTypes.SELECT,
      bind: {
        ...bind,
        ...(q ? { like: likeAnywhere(q) } : {}),
        ...(after ? { afterSort: after.sort, afterId: after.id } : {}),
      },
    },
  );
  return rows.map((row) => recordSchema.parse(row));
}

export async function findClass(
  studioId: string,
  onlyUserId: string | null,
  id: string,
  tx?: Tx,
): Promise<StudioClass | null> {
  const rows = await database().query<ClassRecord>(`${SELECT} and c.id = $id`, {
    type: QueryTypes.SELECT,
    bind: { studioId, onlyUserId, id },
    ...(tx ? { transaction: tx } : {}),
  });
  if (!rows[0]) return null;
  const { nameKey: _nameKey, ...found } = recordSchema.parse(rows[0]);
  return found;
}

/** Holds a class until the transaction ends. */
export async function lockClass(studioId: string, id: string, tx: Tx): Promise<StudioClass | null> {
  const row = await ClassRow.findOne({
    attributes: ['id'],
    where: { studioId, id },
    transaction: tx,
    lock: tx.LOCK.NO_KEY_UPDATE,
  });
  return row ? findClass(studioId, null, id, tx) : null;
}

export async function insertClass(
  one: {
    readonly studioId: string;
    readonly id: string;
    readonly name: string;
    readonly term: string;
    readonly teacherId: string;
  },
  tx: Tx,
): Promise<void> {
  await ClassRow.create(one, { transaction: tx });
}

/** Writes name, term and archive, counts the revision up; the caller holds the class. */
export async function writeClass(
  studioId: string,
  id: string,
  change: {
    readonly name: string;
    readonly term: string;
    readonly archivedAt: Date | null;
    readonly revision: number;
  },
  tx: Tx,
): Promise<void> {
  await ClassRow.update(
    { ...change, revision: change.revision + 1 },
    { where: { studioId, id }, transaction: tx },
  );
}

export async function replaceMembers(
  studioId: string,
  classId: string,
  userIds: readonly string[],
  tx: Tx,
): Promise<void> {
  await ClassMemberRow.destroy({ where: { studioId, classId }, transaction: tx });
  await ClassMemberRow.bulkCreate(
    [...new Set(userIds)].map((userId) => ({ studioId, classId, userId })),
    { transaction: tx, validate: true },
  );
}
