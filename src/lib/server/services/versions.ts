import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import type { profileRoutes, Version } from '~/lib/contracts/profiles';
import { hasRole, type Actor } from '../auth/actor';
import { inTransaction } from '../database';
import { notAllowed, notFound, staleRevision, wrongState } from '../errors';
import { lockProfile, touchProfile } from '../repositories/profiles';
import { isUuid } from '../repositories/row';
import { insertVersion, writeContent } from '../repositories/versions';
import { requireSoundContent } from './content-check';
import { sealed } from './seal';
import { heldVersion, readableVersion, requireMayEdit, stateInWords, viewerOf } from './version-access';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;

export async function getVersion(actor: Actor, profileId: string, number: number): Promise<Version> {
  return (await readableVersion(actor, profileId, number)).version;
}

/**
 * Adds a draft with the next number: from another version, or with content of its own; the kiln and the load of the
 * latest version are kept where the body names none. Several drafts may stand side by side: nobody's work waits for
 * another's.
 */
export async function createVersion(
  actor: Actor,
  profileId: string,
  body: Body<(typeof profileRoutes)['createVersion']>,
  now = new Date(),
): Promise<Version> {
  return inTransaction(async (tx) => {
    const { studioId, userId } = actor;
    const profile = isUuid(profileId) ? await lockProfile(studioId, viewerOf(actor), profileId, tx) : null;
    if (!profile) throw notFound('profile');
    if (!hasRole(actor, 'technician') && profile.author.id !== userId)
      throw notAllowed(
        'Only its author and technicians may add a version to a profile. Make a copy to work on.',
      );
    if (profile.archivedAt !== null)
      throw wrongState('This profile is archived. Bring it back, then draft a new version.');
    const from = 'from' in body ? body.from : profile.latest.number;
    const before = (await readableVersion(actor, profileId, from, tx)).version;
    const content = 'from' in body ? before : { ...before, ...withoutUndefined(body) };
    await requireSoundContent(actor, content, before, tx);
    const number = await insertVersion(
      { ...sealed(content), studioId, id: randomUUID(), profileId, authorId: userId, createdAt: now },
      tx,
    );
    await touchProfile(studioId, profileId, now, tx);
    return (await readableVersion(actor, profileId, number, tx)).version;
  });
}

/** Saves a draft over its present revision. Kiln and load stay as they are where the body names none. */
export async function saveDraft(
  actor: Actor,
  profileId: string,
  number: number,
  revision: number,
  body: Body<(typeof profileRoutes)['putVersion']>,
  now = new Date(),
): Promise<Version> {
  return inTransaction(async (tx) => {
    const record = await heldVersion(actor, profileId, number, tx);
    requireMayEdit(actor, record);
    const { version } = record;
    if (version.state !== 'draft')
      throw wrongState(
        `Version ${number} is ${stateInWords(version.state)}; only a draft changes. Draft a new version.`,
      );
    if (version.revision !== revision) throw staleRevision(version);
    const content = { ...version, ...withoutUndefined(body) };
    await requireSoundContent(actor, content, version, tx);
    await writeContent(actor.studioId, version, { ...sealed(content), editedById: actor.userId }, tx);
    await touchProfile(actor.studioId, profileId, now, tx);
    return (await readableVersion(actor, profileId, number, tx)).version;
  });
}

/** Members that were left out must not hide what is there. */
function withoutUndefined<T extends object>(body: T): { [K in keyof T]: Exclude<T[K], undefined> } {
  return Object.fromEntries(Object.entries(body).filter(([, value]) => value !== undefined)) as {
    [K in keyof T]: Exclude<T[K], undefined>;
  };
}
