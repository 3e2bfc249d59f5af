import type { ListQuery, Role } from '~/lib/contracts/common';
import { requireRole, type Actor } from '../auth/actor';
import { decodeCursor, page } from '../http/pagination';
import { listPeople, type PersonWithRoles } from '../repositories/people';

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
