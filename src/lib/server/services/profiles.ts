import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import { instantSchema } from '~/lib/contracts/common';
import type { profileRoutes, ProfileDetail, ProfileSummary, Version } from '~/lib/contracts/profiles';
import { type Actor, hasRole } from '../auth/actor';
import { inTransaction, type Tx } from '../database';
import { HoldfastError, notAllowed, notFound, staleRevision } from '../errors';
import { decodeCursor, page } from '../http/pagination';
import {
  findProfile,
  insertProfile,
  listProfiles as listRows,
  lockProfile,
  writeProfile,
} from '../repositories/profiles';
import { isUuid } from '../repositories/row';
import { findVersion, insertVersion } from '../repositories/versions';
import type { SealedContent } from '~/lib/profile/seal';
import { requireSoundContent } from './content-check';
import { kilnIdsFor } from '../repositories/visibility';
import { sealed } from './seal';
import { versionById, viewerOf } from './version-access';

export { createVersion, getVersion, saveDraft } from './versions';
export { approveVersion, retireVersion, returnVersion, submitVersion } from './version-review';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;
interface NewProfile {
  id: string;
  name: string;
  revision: number;
  version: Version;
}

export async function listProfiles(actor: Actor, query: z.output<(typeof profileRoutes)['list']['query']>) {
  const after = decodeCursor(query.cursor);
  if (after && !instantSchema.safeParse(after.sort).success)
    throw new HoldfastError('malformed', 'This cursor is of another list. Start the list again without it.');
  const rows = await listRows({
    studioId: actor.studioId,
    viewer: viewerOf(actor),
    limit: query.limit + 1,
    after: after && { updatedAt: String(after.sort), id: after.id },
    q: query.q || undefined,
    state: query.state,
    archived: query.archived,
  });
  return page(rows.map(summaryOf), query.limit, (profile) => profile.updatedAt);
}

const summaryOf = ({ versions: _versions, ...summary }: ProfileDetail): ProfileSummary => summary;

export async function getProfile(actor: Actor, id: string, tx?: Tx): Promise<ProfileDetail> {
  const profile = isUuid(id) ? await findProfile(actor.studioId, viewerOf(actor), id, tx) : null;
  if (!profile) throw notFound('profile');
  return profile;
}

/** Begins a profile with its first draft. Anybody signed in may draft; who reviews is another matter. */
export async function createProfile(
  actor: Actor,
  body: Body<(typeof profileRoutes)['create']>,
  now = new Date(),
): Promise<NewProfile> {
  const content = { profile: body.profile, kilnId: body.kilnId ?? null, load: body.load ?? null };
  return inTransaction(async (tx) => {
    await requireSoundContent(actor, content, null, tx);
    return begin(actor, body.name, content, now, tx);
  });
}

/** A new profile, of the actor's own, that begins with the content of a version they see. */
export async function duplicateProfile(
  actor: Actor,
  id: string,
  body: Body<(typeof profileRoutes)['duplicate']>,
  now = new Date(),
): Promise<NewProfile> {
  return inTransaction(async (tx) => {
    const original = await getProfile(actor, id, tx);
    const number = body.version ?? original.latest.number;
    const record = await findVersion(actor.studioId, viewerOf(actor), id, number, tx);
    if (!record) throw notFound('version');
    const { profile, kilnId, load } = record.version;
    const content = { profile, kilnId: await kilnToCopy(actor, kilnId, tx), load };
    return begin(actor, body.name ?? `${original.name.slice(0, 113)} (copy)`, content, now, tx);
  });
}

/** A copy must not open a kiln to somebody who was given the profile for another one. */
async function kilnToCopy(actor: Actor, kilnId: string | null, tx: Tx): Promise<string | null> {
  if (kilnId === null || viewerOf(actor) === null) return kilnId;
  return (await kilnIdsFor(actor.studioId, actor.userId, tx)).includes(kilnId) ? kilnId : null;
}

async function begin(
  actor: Actor,
  name: string,
  content: SealedContent,
  now: Date,
  tx: Tx,
): Promise<NewProfile> {
  const { studioId, userId: authorId } = actor;
  const id = randomUUID();
  await insertProfile({ studioId, id, name, authorId, createdAt: now }, tx);
  const versionId = randomUUID();
  await insertVersion(
    { ...sealed(content), studioId, id: versionId, profileId: id, authorId, createdAt: now },
    tx,
  );
  const { version } = await versionById(actor, versionId, tx);
  return { id, name, revision: 1, version };
}

/** Renames, archives or brings back a profile. */
export async function updateProfile(
  actor: Actor,
  id: string,
  revision: number,
  body: Body<(typeof profileRoutes)['update']>,
  now = new Date(),
): Promise<ProfileDetail> {
  return inTransaction(async (tx) => {
    const current = isUuid(id) ? await lockProfile(actor.studioId, viewerOf(actor), id, tx) : null;
    if (!current) throw notFound('profile');
    if (!hasRole(actor, 'technician') && current.author.id !== actor.userId)
      throw notAllowed('Only its author and technicians may rename or archive a profile.');
    if (current.revision !== revision) throw staleRevision(current);
    const archivedAt = current.archivedAt === null ? null : new Date(current.archivedAt);
    const change = {
      name: body.name ?? current.name,
      archivedAt: body.archived === undefined ? archivedAt : body.archived ? (archivedAt ?? now) : null,
      revision,
    };
    await writeProfile(actor.studioId, id, change, now, tx);
    return getProfile(actor, id, tx);
  });
}

/** The version that a run is to be fired from: 404 unless the actor sees it. */
export async function versionForRun(
  actor: Actor,
  versionId: string,
  tx?: Tx,
): Promise<Version & { profileId: string; profileName: string }> {
  const { version, profileId, profileName } = await versionById(actor, versionId, tx);
  return { ...version, profileId, profileName };
}
