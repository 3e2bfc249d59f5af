import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import type { Handout, HandoutCaution, handoutRoutes } from '~/lib/contracts/classes';
import { instantSchema, type ListQuery } from '~/lib/contracts/common';
import type { Version } from '~/lib/contracts/profiles';
import { SAFETY_NOTES, safetyNotesFor } from '~/lib/profile/safety';
import type { Caution } from '~/lib/thermal/estimate-schema';
import { hasRole, requireRole, type Actor } from '../auth/actor';
import { inTransaction, type Tx } from '../database';
import { HoldfastError, notAllowed, notFound, notValid, wrongState } from '../errors';
import { decodeCursor, page } from '../http/pagination';
import { recordEvent } from '../repositories/audit';
import {
  findHandout,
  insertAcknowledgement,
  insertHandout,
  listHandouts as listRows,
  listOffers,
  lockHandout,
  writeWithdrawal,
  type HandoutRecord,
} from '../repositories/handouts';
import { isUuid } from '../repositories/row';
import { getClass } from './classes';
import { versionCautions } from './estimates';
import { kilnFor } from './kilns';
import { requirePeople } from './people';
import { stateInWords, versionById } from './version-access';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;

/** Teachers and owners see every handout; anybody else those that are for them, without the other readers. */
const onlyFor = (actor: Actor): string | null => (hasRole(actor, 'teacher', 'owner') ? null : actor.userId);

function stateAt(handout: HandoutRecord, now: Date): Handout['state'] {
  if (handout.withdrawnAt !== null) return 'withdrawn';
  if (now.getTime() < Date.parse(handout.fromAt)) return 'ahead';
  return now.getTime() <= Date.parse(handout.untilAt) ? 'in-force' : 'over';
}
const shown = (handout: HandoutRecord, now: Date): Handout => ({ ...handout, state: stateAt(handout, now) });

export async function listHandouts(actor: Actor, query: ListQuery, now = new Date()) {
  const after = decodeCursor(query.cursor);
  if (after && !instantSchema.safeParse(after.sort).success)
    throw new HoldfastError('malformed', 'This cursor is of another list. Start the list again without it.');
  const rows = await listRows({
    studioId: actor.studioId,
    onlyUserId: onlyFor(actor),
    limit: query.limit + 1,
    after: after && { createdAt: String(after.sort), id: after.id },
    q: query.q || undefined,
  });
  return page(
    rows.map((row) => shown(row, now)),
    query.limit,
    (handout) => handout.createdAt,
  );
}

export async function getHandout(actor: Actor, id: string, now = new Date(), tx?: Tx): Promise<Handout> {
  const handout = isUuid(id) ? await findHandout(actor.studioId, onlyFor(actor), id, tx) : null;
  if (!handout) throw notFound('handout');
  return shown(handout, now);
}

/**
 * Hands an approved version to a class, to people, or both. A class is who is in it when the handout is read: who joins
 * later reads it too. The cautions are computed for this kiln now and kept, so that what was acknowledged stays known.
 */
export async function createHandout(
  actor: Actor,
  body: Body<(typeof handoutRoutes)['create']>,
  now = new Date(),
): Promise<Handout> {
  requireRole(actor, 'teacher', 'owner');
  requireReaders(body);
  return inTransaction(async (tx) => {
    const { version } = await versionById(actor, body.profileVersionId, tx);
    if (version.state !== 'approved')
      throw wrongState(
        `Version ${version.number} is ${stateInWords(version.state)}; only an approved one is handed out.`,
      );
    const kiln = await kilnFor(actor, body.kilnId, tx);
    if (kiln.archivedAt !== null) throw wrongState(`${kiln.name} is archived. Choose a kiln that is in use.`);
    await requireOpenClass(actor, body.classId, tx);
    await requirePeople(actor, body.personIds, tx);
    const cautions = await versionCautions(actor, { ...version, kilnId: kiln.id }, tx);
    requireNoNewStop(version, cautions, kiln.name);
    const { classId, note, personIds, profileVersionId } = body;
    const id = randomUUID();
    await insertHandout(
      {
        studioId: actor.studioId,
        id,
        profileVersionId,
        kilnId: kiln.id,
        classId,
        fromAt: new Date(body.fromAt),
        untilAt: new Date(body.untilAt),
        note,
        cautions: [...cautions, ...safetyCautions(version)],
        handedOutById: actor.userId,
        createdAt: now,
        personIds,
      },
      tx,
    );
    await trail(tx, actor, 'handed-out', id);
    return getHandout(actor, id, now, tx);
  });
}

/**
 * Keeps that the actor, whom the handout is for, has read its cautions.
 *
 * @param cautions how many were read; it must be as many as the handout shows, and where it is left out it is
 */
export async function acknowledgeHandout(
  actor: Actor,
  id: string,
  cautions: number | undefined,
  now = new Date(),
): Promise<Handout> {
  return inTransaction(async (tx) => {
    const handout = await heldHandout(actor, id, tx);
    const state = stateAt(handout, now);
    if (!handout.people.some((person) => person.id === actor.userId))
      throw notAllowed('Only those a handout is for acknowledge it.');
    if (state === 'withdrawn' || state === 'over')
      throw wrongState(
        `This handout is ${state === 'over' ? 'over' : 'withdrawn'}; nothing is to be acknowledged.`,
      );
    const shownCautions = handout.cautions.length;
    if (cautions !== undefined && cautions !== shownCautions)
      throw wrongState(
        `This handout shows ${shownCautions} cautions, ${cautions} were acknowledged. Read all of them.`,
      );
    const { studioId, userId } = actor;
    await insertAcknowledgement({ studioId, handoutId: id, userId, cautions: shownCautions, at: now }, tx);
    await trail(tx, actor, 'acknowledged', id);
    return getHandout(actor, id, now, tx);
  });
}

export async function withdrawHandout(
  actor: Actor,
  id: string,
  reason: string,
  now = new Date(),
): Promise<Handout> {
  requireRole(actor, 'teacher', 'owner');
  return inTransaction(async (tx) => {
    const handout = await heldHandout(actor, id, tx);
    if (handout.withdrawnAt !== null) throw wrongState('This handout was withdrawn already.');
    const withdrawal = { withdrawnAt: now, withdrawnReason: reason, withdrawnById: actor.userId };
    await writeWithdrawal(actor.studioId, id, withdrawal, tx);
    await trail(tx, actor, 'withdrawn', id);
    return getHandout(actor, id, now, tx);
  });
}

/**
 * The handout that lets somebody who is no technician fire a version in a kiln at a moment: in force then, and its
 * cautions acknowledged. Says what is missing where there is none.
 */
export async function handoutForRun(
  actor: Actor,
  run: { readonly versionId: string; readonly kilnId: string; readonly at: Date },
  tx?: Tx,
): Promise<string> {
  const offers = (await listOffers(actor.studioId, actor.userId, run.versionId, tx)).filter(
    (offer) => offer.kilnId === run.kilnId,
  );
  if (offers.length === 0)
    throw notAllowed('This version was not handed out to you for this kiln. Ask a technician to fire it.');
  const { version } = await versionById(actor, run.versionId, tx);
  if (version.state === 'retired')
    throw wrongState(`Version ${version.number} is retired. Ask for a handout of one that is in force.`);
  const inForce = offers.filter((offer) => offer.fromAt <= run.at && run.at <= offer.untilAt);
  if (inForce.length === 0)
    throw wrongState('The handout is not in force at that moment. Choose a start within its dates.');
  const ready = inForce.find((offer) => offer.acknowledged);
  if (!ready) throw wrongState('Read and acknowledge the cautions of the handout first.');
  return ready.id;
}

/** The handout that a technician plans a run under: one of the studio's, of the version that is fired. */
export async function handoutNamed(actor: Actor, id: string, versionId: string, tx?: Tx): Promise<string> {
  const handout = await findHandout(actor.studioId, null, id, tx);
  if (!handout) throw notFound('handout');
  if (handout.version.id !== versionId)
    throw wrongState('This handout is of another version than the one to be fired.');
  if (handout.withdrawnAt !== null) throw wrongState('This handout was withdrawn. Choose one that stands.');
  return id;
}

async function heldHandout(actor: Actor, id: string, tx: Tx): Promise<HandoutRecord> {
  const handout = isUuid(id) ? await lockHandout(actor.studioId, onlyFor(actor), id, tx) : null;
  if (!handout) throw notFound('handout');
  return handout;
}

function requireReaders(body: Body<(typeof handoutRoutes)['create']>): void {
  if (body.classId === null && body.personIds.length === 0)
    throw notValid('A handout is for a class, for people, or both. Name at least one.', [
      { path: 'classId', message: 'a class or a person is needed' },
    ]);
  if (Date.parse(body.untilAt) <= Date.parse(body.fromAt))
    throw notValid('The handout ends before it begins.', [
      { path: 'untilAt', message: `must be after ${body.fromAt}` },
    ]);
}

async function requireOpenClass(actor: Actor, classId: string | null, tx: Tx): Promise<void> {
  if (classId === null) return;
  const one = await getClass(actor, classId, tx);
  if (one.archivedAt !== null) throw wrongState(`${one.name} is archived. Choose a class that is running.`);
}

/** What would stop the firing in this kiln must have been answered with a reason when the version was approved. */
function requireNoNewStop(version: Version, cautions: readonly Caution[], kilnName: string): void {
  const reasons = version.events.flatMap((event) => (event.what === 'approved' ? event.overrides : []));
  const unanswered = cautions.filter(
    ({ code, segment, severity }) =>
      severity === 'stop' && !reasons.some((reason) => reason.code === code && reason.segment === segment),
  );
  const first = unanswered[0];
  if (first)
    throw wrongState(
      `In ${kilnName} this version has a caution that nobody approved: ${first.text} Have a version approved for this kiln.`,
    );
}

function safetyCautions({ profile, load }: Version): HandoutCaution[] {
  return safetyNotesFor(profile, load).map((code) => ({
    code,
    severity: 'note',
    segment: null,
    atS: null,
    text: `${SAFETY_NOTES[code].title}. ${SAFETY_NOTES[code].text}`,
    source: 'common practice',
  }));
}

const trail = (tx: Tx, { studioId, userId }: Actor, what: string, id: string) =>
  recordEvent(tx, { studioId, actorId: userId }, what, 'handout', id);
