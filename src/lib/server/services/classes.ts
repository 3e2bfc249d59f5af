import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import type { classRoutes, StudioClass } from '~/lib/contracts/classes';
import type { ListQuery } from '~/lib/contracts/common';
import { hasRole, requireRole, type Actor } from '../auth/actor';
import { inTransaction, type Tx } from '../database';
import { notFound, staleRevision } from '../errors';
import { decodeCursor, page } from '../http/pagination';
import {
  findClass,
  insertClass,
  listClasses as listRows,
  lockClass,
  replaceMembers,
  writeClass,
} from '../repositories/classes';
import { isUuid } from '../repositories/row';
import { requirePeople } from './people';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;

/** Teachers and owners see every class; anybody else those they are in, without the others who are in them. */
const onlyFor = (actor: Actor): string | null => (hasRole(actor, 'teacher', 'owner') ? null : actor.userId);

export async function listClasses(actor: Actor, query: ListQuery) {
  const after = decodeCursor(query.cursor);
  const rows = await listRows({
    studioId: actor.studioId,
    onlyUserId: onlyFor(actor),
    limit: query.limit + 1,
    after: after && { sort: String(after.sort), id: after.id },
    q: query.q || undefined,
  });
  const { items, nextCursor } = page(rows, query.limit, (one) => one.nameKey);
  return { items: items.map(({ nameKey: _nameKey, ...one }): StudioClass => one), nextCursor };
}

export async function getClass(actor: Actor, id: string, tx?: Tx): Promise<StudioClass> {
  const one = isUuid(id) ? await findClass(actor.studioId, onlyFor(actor), id, tx) : null;
  if (!one) throw notFound('class');
  return one;
}

/** Begins a class; whoever begins it is its teacher. */
export async function createClass(
  actor: Actor,
  body: Body<(typeof classRoutes)['create']>,
): Promise<StudioClass> {
  requireRole(actor, 'teacher', 'owner');
  return inTransaction(async (tx) => {
    await requirePeople(actor, body.memberIds, tx);
    const { studioId, userId: teacherId } = actor;
    const id = randomUUID();
    await insertClass({ studioId, id, name: body.name, term: body.term, teacherId }, tx);
    await replaceMembers(studioId, id, body.memberIds, tx);
    return getClass(actor, id, tx);
  });
}

export async function updateClass(
  actor: Actor,
  id: string,
  revision: number,
  body: Body<(typeof classRoutes)['update']>,
  now = new Date(),
): Promise<StudioClass> {
  requireRole(actor, 'teacher', 'owner');
  return inTransaction(async (tx) => {
    const current = isUuid(id) ? await lockClass(actor.studioId, id, tx) : null;
    if (!current) throw notFound('class');
    if (current.revision !== revision) throw staleRevision(current);
    const since = current.archivedAt === null ? null : new Date(current.archivedAt);
    const archivedAt = body.archived === undefined ? since : body.archived ? (since ?? now) : null;
    const { name = current.name, term = current.term } = body;
    await writeClass(actor.studioId, id, { name, term, archivedAt, revision }, tx);
    if (body.memberIds) {
      await requirePeople(actor, body.memberIds, tx);
      await replaceMembers(actor.studioId, id, body.memberIds, tx);
    }
    return getClass(actor, id, tx);
  });
}
