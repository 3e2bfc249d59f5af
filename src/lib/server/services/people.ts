import type { ListQuery, Role } from '~/lib/contracts/common';
import { requireRole, type Actor } from '../auth/actor';
import type { Tx } from '../database';
import { notFound } from '../errors';
import { decodeCursor, page } from '../http/pagination';
import { listPeople, membersAmong, type PersonWithRoles } from '../repositories/people';

/** People of the actor's studio, by name, without their addresses. */
export async function peopleOfStudio(
  actor: Actor,
  query: ListQuery & { role?: Role | undefined },
): Promise<{ items: PersonWithRoles[]; nextCursor: string | null }> {
  requireRole(actor, 'owner', 'technician', 'teacher');
  const rows = await listPeople(actor.studioId, {
    limit: query.limit + 1,
    after: decodeCursor(query.cursor),
    q: query.q,
    role: query.role,
  });
  return page(rows, query.limit, (person) => person.name.toLowerCase());
}

/** Throws 404 unless each of these people belongs to the actor's studio now. */
export async function requirePeople(actor: Actor, ids: readonly string[], tx: Tx): Promise<void> {
  const wanted = [...new Set(ids)];
  const known = new Set(await membersAmong(actor.studioId, wanted, tx));
  if (wanted.some((id) => !known.has(id))) throw notFound('person');
}
