import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import { isOnlyStudent, requireRole, type Actor } from '../auth/actor';
import { inTransaction, type Tx } from '../database';
import { notFound, notValid, staleRevision, type Issue } from '../errors';
import { issuesOf } from '../http/problem';
import type { EquipmentFilter, EquipmentRepository, Kept } from '../repositories/equipment';
import { isUuid } from '../repositories/row';

export type EquipmentQuery = Omit<EquipmentFilter, 'ids'>;

export interface EquipmentKind<Thing extends Kept, Input> {
  /** For sentences: 'kiln'. */
  readonly noun: string;
  readonly repository: EquipmentRepository<Thing, Input>;
  readonly input: z.ZodType<Input>;
  /** Ids that a student sees. */
  readonly idsForPerson: (studioId: string, userId: string, tx?: Tx) => Promise<string[]>;
  /** What a student sees of it. */
  readonly forStudent: (thing: Thing) => Thing;
  /** What a change must not carry over when `energy` becomes another. */
  readonly onlyWithEnergy: Readonly<Record<string, readonly string[]>>;
  /** What is wrong with an input that only the database or the materials table can tell. */
  readonly check: (actor: Actor, input: Input, tx: Tx) => Promise<readonly Issue[]>;
}

/** The use cases that every kind of equipment has. */
export function equipmentService<Thing extends Kept, Input>(kind: EquipmentKind<Thing, Input>) {
  const { repository } = kind;
  const show = (actor: Actor, thing: Thing) => (isOnlyStudent(actor) ? kind.forStudent(thing) : thing);

  async function get(actor: Actor, id: string, tx?: Tx): Promise<Thing> {
    const thing = isUuid(id) ? await repository.find(actor.studioId, id, tx) : null;
    if (!thing) throw notFound(kind.noun);
    if (
      isOnlyStudent(actor) &&
      !(await kind.idsForPerson(actor.studioId, actor.userId, tx)).includes(thing.id)
    )
      throw notFound(kind.noun);
    return show(actor, thing);
  }

  async function list(actor: Actor, query: EquipmentQuery) {
    const ids = isOnlyStudent(actor)
      ? { ids: await kind.idsForPerson(actor.studioId, actor.userId) }
      : undefined;
    const found = await repository.list(actor.studioId, { ...query, ...ids });
    return { ...found, items: found.items.map((thing) => show(actor, thing)) };
  }

  async function create(actor: Actor, input: Input): Promise<Thing> {
    requireRole(actor, 'technician', 'owner');
    return inTransaction(async (tx) => {
      await requireSound(actor, input, tx);
      return repository.insert(actor.studioId, randomUUID(), input, tx);
    });
  }

  /** Merges a change into the thing as it is and validates the whole. `archived` puts it away or brings it back. */
  async function update(
    actor: Actor,
    id: string,
    revision: number,
    change: Readonly<Record<string, unknown>>,
  ): Promise<Thing> {
    requireRole(actor, 'technician', 'owner');
    return inTransaction(async (tx) => {
      const current = isUuid(id) ? await repository.lock(actor.studioId, id, tx) : null;
      if (!current) throw notFound(kind.noun);
      if (current.revision !== revision) throw staleRevision(current);
      const { archived, ...fields } = change;
      const input = parseWhole(kind.input, { ...carriedOver(current, fields), ...fields });
      const archivedAt = whenArchived(archived, current);
      await requireSound(actor, input, tx);
      return repository.update(actor.studioId, id, { input, archivedAt, revision }, tx);
    });
  }

  async function requireSound(actor: Actor, input: Input, tx: Tx): Promise<void> {
    const issues = await kind.check(actor, input, tx);
    if (issues[0])
      throw notValid(`The ${kind.noun} is not valid. ${issues[0].path}: ${issues[0].message}.`, issues);
  }

  /** The fields of a thing that an input has, without those of another energy than the change asks for. */
  function carriedOver(current: Thing, fields: Readonly<Record<string, unknown>>): Record<string, unknown> {
    const { id: _id, revision: _revision, ...rest } = current as Thing & Record<string, unknown>;
    const dropped = new Set(['createdAt', 'updatedAt', 'archivedAt']);
    if (typeof fields['energy'] === 'string' && 'energy' in rest && fields['energy'] !== rest['energy'])
      for (const name of kind.onlyWithEnergy[String(rest['energy'])] ?? []) dropped.add(name);
    return Object.fromEntries(Object.entries(rest).filter(([name]) => !dropped.has(name)));
  }

  return { get, list, create, update };
}

function parseWhole<Input>(schema: z.ZodType<Input>, whole: unknown): Input {
  const result = schema.safeParse(whole);
  if (result.success) return result.data;
  const issues = issuesOf(result.error);
  const [first] = issues;
  const found = first ? `${first.path || 'body'}: ${first.message}` : 'body';
  throw notValid(`With this change it is not valid. ${found}.`, issues);
}

function whenArchived(archived: unknown, current: Kept): Date | null {
  if (archived === undefined) return current.archivedAt === null ? null : new Date(current.archivedAt);
  if (typeof archived !== 'boolean')
    throw notValid('archived is true or false.', [{ path: 'archived', message: 'expected true or false' }]);
  if (!archived) return null;
  return current.archivedAt === null ? new Date() : new Date(current.archivedAt);
}
