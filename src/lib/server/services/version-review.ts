import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import type { profileRoutes, Version } from '~/lib/contracts/profiles';
import type { Caution } from '~/lib/thermal/estimate-schema';
import { requireRole, type Actor } from '../auth/actor';
import { inTransaction, type Tx } from '../database';
import { HoldfastError, notAllowed, notValid, wrongState, type Issue } from '../errors';
import { recordEvent } from '../repositories/audit';
import { touchProfile } from '../repositories/profiles';
import { studioRules } from '../repositories/studio-rules';
import { insertEvent, writeState, type NewEvent, type VersionRecord } from '../repositories/versions';
import { versionCautions } from './estimates';
import { heldVersion, readableVersion, stateInWords } from './version-access';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;
type Words = Partial<Pick<NewEvent, 'note' | 'overrides' | 'segmentRemarks'>>;

/** The author says that a draft is ready to be read. From here on its content stays as it is. */
export async function submitVersion(
  actor: Actor,
  profileId: string,
  number: number,
  body: Body<(typeof profileRoutes)['submit']>,
  now = new Date(),
): Promise<Version> {
  return inTransaction(async (tx) => {
    const record = await heldVersion(actor, profileId, number, tx);
    if (record.version.authorId !== actor.userId)
      throw notAllowed('Only the author of a version submits it for review.');
    requireState(record.version, 'draft', 'submitted');
    requireKiln(record.version);
    return move(actor, record, 'in-review', 'submitted', { note: body.note ?? '' }, now, tx);
  });
}

/**
 * Seals a version. Every caution that would stop the firing needs the approver's written reason; of two who approve at
 * the same moment one does, and the other is told that it is approved already.
 */
export async function approveVersion(
  actor: Actor,
  profileId: string,
  number: number,
  body: Body<(typeof profileRoutes)['approve']>,
  now = new Date(),
): Promise<Version> {
  requireRole(actor, 'teacher', 'owner');
  return inTransaction(async (tx) => {
    const record = await heldVersion(actor, profileId, number, tx);
    await requireOtherEyes(actor, record, 'approve', tx);
    requireState(record.version, 'in-review', 'approved');
    const kilnId = requireKiln(record.version);
    const cautions = await versionCautions(actor, { ...record.version, kilnId }, tx);
    requireReasons(cautions, body.overrides);
    return move(actor, record, 'approved', 'approved', { overrides: body.overrides }, now, tx);
  });
}

/** Gives a version back to its author, a draft again, with remarks on the whole and on segments. */
export async function returnVersion(
  actor: Actor,
  profileId: string,
  number: number,
  body: Body<(typeof profileRoutes)['return']>,
  now = new Date(),
): Promise<Version> {
  requireRole(actor, 'teacher', 'owner');
  return inTransaction(async (tx) => {
    const record = await heldVersion(actor, profileId, number, tx);
    await requireOtherEyes(actor, record, 'return', tx);
    requireState(record.version, 'in-review', 'returned');
    const last = record.version.profile.segments.length - 1;
    const beyond: Issue[] = body.segments.flatMap(({ segment }, index) =>
      segment > last ? [{ path: `segments.${index}.segment`, message: `the last segment is ${last}` }] : [],
    );
    if (beyond.length > 0) throw notValid('A remark is on a segment that is not there.', beyond);
    const words = { note: body.remark, segmentRemarks: body.segments };
    return move(actor, record, 'draft', 'returned', words, now, tx);
  });
}

/** Takes an approved version out of use. It stays readable, and what was fired from it keeps referring to it. */
export async function retireVersion(
  actor: Actor,
  profileId: string,
  number: number,
  body: Body<(typeof profileRoutes)['retire']>,
  now = new Date(),
): Promise<Version> {
  requireRole(actor, 'teacher', 'owner', 'technician');
  return inTransaction(async (tx) => {
    const record = await heldVersion(actor, profileId, number, tx);
    requireState(record.version, 'approved', 'retired');
    return move(actor, record, 'retired', 'retired', { note: body.reason }, now, tx);
  });
}

async function move(
  actor: Actor,
  record: VersionRecord,
  state: Version['state'],
  what: NewEvent['what'],
  words: Words,
  now: Date,
  tx: Tx,
): Promise<Version> {
  const { studioId, userId } = actor;
  const { version, profileId } = record;
  await writeState(studioId, version, state, tx);
  await insertEvent(
    {
      note: '',
      overrides: [],
      segmentRemarks: [],
      ...words,
      studioId,
      id: randomUUID(),
      versionId: version.id,
      what,
      byId: userId,
      at: now,
    },
    tx,
  );
  await touchProfile(studioId, profileId, now, tx);
  await recordEvent(tx, { studioId, actorId: userId }, what, 'profile-version', version.id, {
    number: version.number,
    sha256: version.sha256,
  });
  return (await readableVersion(actor, profileId, version.number, tx)).version;
}

/** Two pairs of eyes: neither the author nor who last changed the content judges it, unless the studio says so. */
async function requireOtherEyes(
  actor: Actor,
  { version, editedById }: VersionRecord,
  verb: string,
  tx: Tx,
): Promise<void> {
  if (version.authorId !== actor.userId && editedById !== actor.userId) return;
  if ((await studioRules(actor.studioId, tx)).authorsApprove) return;
  throw notAllowed(`You wrote or changed this version. Somebody else has to ${verb} it.`);
}

function requireState(version: Version, wanted: Version['state'], participle: string): void {
  if (version.state !== wanted)
    throw wrongState(
      `Version ${version.number} is ${stateInWords(version.state)}; only one that is ${stateInWords(wanted)} can be ${participle}.`,
    );
}

/** Without a kiln nothing can be computed, so nothing could be checked. */
function requireKiln(version: Version): string {
  if (version.kilnId === null)
    throw notValid('This version names no kiln, so its cautions cannot be computed. Choose a kiln first.', [
      { path: 'kilnId', message: 'a kiln is needed' },
    ]);
  return version.kilnId;
}

function requireReasons(
  cautions: readonly Caution[],
  overrides: readonly { code: string; segment: number | null }[],
): void {
  const answered = (caution: Caution) =>
    overrides.some(({ code, segment }) => code === caution.code && segment === caution.segment);
  const missing = cautions.filter((caution) => caution.severity === 'stop' && !answered(caution));
  if (missing.length === 0) return;
  throw new HoldfastError(
    'not-valid',
    `${missing.length === 1 ? 'One caution' : `${missing.length} cautions`} would stop this firing. Approve with a written reason for each, or return the version.`,
    {
      errors: missing.map(({ code, segment, text }) => ({
        path: 'overrides',
        message: `${code}${segment === null ? '' : `, segment ${segment}`}: ${text}`,
      })),
      extra: { missing },
    },
  );
}
