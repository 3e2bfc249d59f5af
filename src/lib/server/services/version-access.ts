import type { Version } from '~/lib/contracts/profiles';
import { hasRole, isOnlyStudent, type Actor } from '../auth/actor';
import type { Tx } from '../database';
import { notAllowed, notFound } from '../errors';
import { isUuid } from '../repositories/row';
import {
  findVersion,
  findVersionById,
  lockVersion,
  type VersionRecord,
  type Viewer,
} from '../repositories/versions';

/** Technicians, teachers and owners see every version of their studio, a student what handouts and own work give. */
export const viewerOf = (actor: Actor): Viewer => (isOnlyStudent(actor) ? actor.userId : null);

/** The `{n}` of an address; what is no version number names nothing. */
export function versionNumber(text: string): number {
  if (!/^[1-9]\d{0,8}$/.test(text)) throw notFound('version');
  return Number(text);
}

export async function readableVersion(
  actor: Actor,
  profileId: string,
  number: number,
  tx?: Tx,
): Promise<VersionRecord> {
  const record = isUuid(profileId)
    ? await findVersion(actor.studioId, viewerOf(actor), profileId, number, tx)
    : null;
  if (!record) throw notFound('version');
  return record;
}

/** The version held for a change in this transaction; 404 if it is not visible to the actor. */
export async function heldVersion(
  actor: Actor,
  profileId: string,
  number: number,
  tx: Tx,
): Promise<VersionRecord> {
  const record = isUuid(profileId)
    ? await lockVersion(actor.studioId, viewerOf(actor), profileId, number, tx)
    : null;
  if (!record) throw notFound('version');
  return record;
}

/** A technician, and whose version or profile it is. */
export function mayEdit(actor: Actor, record: VersionRecord): boolean {
  return (
    hasRole(actor, 'technician') ||
    record.version.authorId === actor.userId ||
    record.profileAuthorId === actor.userId
  );
}

export function requireMayEdit(actor: Actor, record: VersionRecord): void {
  if (!mayEdit(actor, record))
    throw notAllowed('Only its author and technicians may change this version. Make a copy to work on.');
}

const STATES: Record<Version['state'], string> = {
  draft: 'a draft',
  'in-review': 'in review',
  approved: 'approved',
  retired: 'retired',
};
/** 'in review', for a sentence. */
export const stateInWords = (state: Version['state']): string => STATES[state];

/** A version by its id, for a run or a handout that names it: 404 unless the actor sees it. */
export async function versionById(actor: Actor, id: string, tx?: Tx): Promise<VersionRecord> {
  const record = isUuid(id) ? await findVersionById(actor.studioId, viewerOf(actor), id, tx) : null;
  if (!record) throw notFound('version');
  return record;
}
