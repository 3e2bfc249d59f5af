import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import type { Run, runRoutes } from '~/lib/contracts/runs';
import { loadSchema, type Load } from '~/lib/thermal/load-schema';
import { hasRole, isOnlyStudent, requireRole, type Actor } from '../auth/actor';
import { inTransaction, type Tx } from '../database';
import { HoldfastError, notAllowed, notValid, staleRevision, wrongState } from '../errors';
import { decodeCursor, page } from '../http/pagination';
import {
  findRun,
  insertRun,
  listRuns as listRows,
  replaceRecorders,
  updateRun as writeRun,
  type Frozen,
  type RunRecord,
} from '../repositories/runs';
import { requireKnownMaterials } from './content-check';
import { kilnFor, plateOf } from './kilns';
import { loadInForce } from './studio-figures';
import { handoutForRun, handoutNamed } from './handouts';
import { requirePeople } from './people';
import { versionForRun } from './profiles';
import { lockedRun, readableRun, writableRun } from './run-access';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;

/** How far ahead of the server's clock a start or an end may lie: the phone's clock is not ours. */
const CLOCK_SLACK_MS = 5 * 60_000;

export async function listRuns(actor: Actor, query: z.output<(typeof runRoutes)['list']['query']>) {
  const after = decodeCursor(query.cursor);
  if (after && !isRunNumber(after.sort))
    throw new HoldfastError('malformed', 'This cursor is of another list. Start the list again without it.');
  const records = await listRows({
    studioId: actor.studioId,
    recorderId: isOnlyStudent(actor) ? actor.userId : undefined,
    state: query.state,
    kilnId: query.kilnId,
    profileId: query.profileId,
    q: query.q || undefined,
    beforeNumber: after?.sort as number | undefined,
    limit: query.limit + 1,
  });
  return page(
    records.map((record) => record.run),
    query.limit,
    (run) => run.number,
  );
}

const isRunNumber = (sort: unknown): boolean => Number.isInteger(sort) && Math.abs(Number(sort)) < 2 ** 31;

/** A kiln that a run may be planned in. */
async function kilnInUse(actor: Actor, id: string, tx: Tx) {
  const kiln = await kilnFor(actor, id, tx);
  if (kiln.archivedAt !== null) throw wrongState(`${kiln.name} is archived. Choose a kiln that is in use.`);
  return kiln;
}

export async function getRun(actor: Actor, id: string): Promise<Run> {
  return (await readableRun(actor, id)).run;
}

/** Plans a run: a technician from any version that is not retired, a student from what was handed out and acknowledged. */
export async function createRun(actor: Actor, body: Body<(typeof runRoutes)['create']>): Promise<Run> {
  return inTransaction(async (tx) => {
    const version = await versionForRun(actor, body.profileVersionId, tx);
    if (version.state === 'retired')
      throw wrongState('This version is retired. Choose one that is in force.');
    const kiln = await kilnInUse(actor, body.kilnId, tx);
    const plannedStartAt = new Date(body.plannedStartAt);
    const technician = hasRole(actor, 'technician');
    const named =
      technician && body.handoutId ? await handoutNamed(actor, body.handoutId, version.id, tx) : null;
    requireKnownMaterials(body.load);
    const handoutId = technician
      ? named
      : await handoutForRun(actor, { versionId: version.id, kilnId: kiln.id, at: plannedStartAt }, tx);
    if (!technician && body.load)
      throw notAllowed('The load of a handed-out profile is as it was handed out.');
    const recorderIds = technician ? (body.recorderIds ?? []) : [actor.userId];
    await requirePeople(actor, recorderIds, tx);
    const id = randomUUID();
    await insertRun(
      {
        studioId: actor.studioId,
        id,
        kilnId: kiln.id,
        profileVersionId: version.id,
        handoutId,
        load: body.load ?? null,
        plannedStartAt,
        note: body.note ?? '',
        createdBy: actor.userId,
        recorderIds: recorderIds.length > 0 ? recorderIds : [actor.userId],
      },
      tx,
    );
    return reread(actor, id, tx);
  });
}

export async function updateRun(
  actor: Actor,
  id: string,
  revision: number,
  body: Body<(typeof runRoutes)['update']>,
): Promise<Run> {
  return inTransaction(async (tx) => {
    const { run } = await writableRun(actor, id, tx);
    if (run.revision !== revision) throw staleRevision(run);
    const { note, ...plan } = body;
    if (Object.values(plan).some((value) => value !== undefined)) {
      requireRole(actor, 'technician');
      if (run.state !== 'planned')
        throw wrongState(`Run ${run.number} has begun: its kiln, load and start stay as they were.`);
    }
    requireKnownMaterials(plan.load);
    if (plan.kilnId !== undefined && plan.kilnId !== run.kiln.id) await kilnInUse(actor, plan.kilnId, tx);
    if (plan.recorderIds !== undefined) {
      await requirePeople(actor, plan.recorderIds, tx);
      await replaceRecorders(actor.studioId, id, plan.recorderIds, tx);
    }
    await writeRun(
      actor.studioId,
      id,
      {
        ...(note === undefined ? {} : { note }),
        ...(plan.kilnId === undefined ? {} : { kilnId: plan.kilnId }),
        ...(plan.load === undefined ? {} : { load: plan.load }),
        ...(plan.plannedStartAt === undefined ? {} : { plannedStartAt: new Date(plan.plannedStartAt) }),
      },
      tx,
    );
    return reread(actor, id, tx);
  });
}

export async function startRun(
  actor: Actor,
  id: string,
  body: Body<(typeof runRoutes)['start']>,
  now: Date,
): Promise<Run> {
  return inTransaction(async (tx) => {
    const record = await writableRun(actor, id, tx);
    const { run } = record;
    if (run.state !== 'planned')
      throw wrongState(`Run ${run.number} is ${words(run.state)}; only a planned run can be started.`);
    const startedAt = instantNotAhead(body.startedAt, now, 'startedAt');
    if (!hasRole(actor, 'technician')) {
      await handoutForRun(
        actor,
        { versionId: run.profile.versionId, kilnId: run.kiln.id, at: startedAt },
        tx,
      );
    }
    await writeRun(
      actor.studioId,
      id,
      { state: 'under-way', startedAt, frozen: await frozenNow(actor, record, tx) },
      tx,
    );
    return reread(actor, id, tx);
  });
}

export async function finishRun(
  actor: Actor,
  id: string,
  body: Body<(typeof runRoutes)['finish']>,
  now: Date,
): Promise<Run> {
  return inTransaction(async (tx) => {
    const { run } = await writableRun(actor, id, tx);
    if (run.state !== 'under-way')
      throw wrongState(`Run ${run.number} is ${words(run.state)}; only a run under way can be finished.`);
    const finishedAt = instantNotAhead(body.finishedAt, now, 'finishedAt');
    if (run.startedAt && finishedAt.getTime() < Date.parse(run.startedAt)) {
      throw notValid('The end lies before the start.', [
        { path: 'finishedAt', message: `must not be before ${run.startedAt}` },
      ]);
    }
    await writeRun(actor.studioId, id, { state: 'cooling-down', finishedAt }, tx);
    return reread(actor, id, tx);
  });
}

export async function abandonRun(actor: Actor, id: string, reason: string): Promise<Run> {
  return inTransaction(async (tx) => {
    const { run } = await writableRun(actor, id, tx);
    if (run.state === 'closed' || run.state === 'broken-off')
      throw wrongState(`Run ${run.number} is ${words(run.state)} already.`);
    await writeRun(actor.studioId, id, { state: 'broken-off', brokenOffReason: reason }, tx);
    return reread(actor, id, tx);
  });
}

/** Closes a run with a remark. Technicians and teachers read logs for a living; who recorded it does not judge it. */
export async function signOffRun(actor: Actor, id: string, remark: string, now: Date): Promise<Run> {
  requireRole(actor, 'technician', 'teacher');
  return inTransaction(async (tx) => {
    const { run } = await lockedRun(actor, id, tx);
    if (run.state !== 'cooling-down') {
      throw wrongState(
        `Run ${run.number} is ${words(run.state)}; a review is signed once the firing has ended.`,
      );
    }
    await writeRun(
      actor.studioId,
      id,
      { state: 'closed', closedAt: now, signedOffBy: actor.userId, signOffRemark: remark },
      tx,
    );
    return reread(actor, id, tx);
  });
}

/** What a run that begins now is fired from, kept with it for good. */
export async function frozenNow(actor: Actor, record: RunRecord, tx: Tx): Promise<Frozen> {
  const kiln = await kilnFor(actor, record.run.kiln.id, tx);
  const load = await loadInForce(actor, record.run.load ?? emptyLoad(), tx);
  return { profile: record.run.plan, kiln: plateOf(kiln), load };
}

export const emptyLoad = (): Load => loadSchema.parse({});

async function reread(actor: Actor, id: string, tx: Tx): Promise<Run> {
  const record = await findRun(actor.studioId, id, tx);
  if (!record) throw new Error(`run ${id} vanished within its own transaction`);
  return record.run;
}

function instantNotAhead(text: string | undefined, now: Date, path: string): Date {
  const instant = text === undefined ? now : new Date(text);
  if (instant.getTime() > now.getTime() + CLOCK_SLACK_MS) {
    throw notValid('This moment is still to come.', [
      { path, message: `must not be after ${now.toISOString()}` },
    ]);
  }
  return instant;
}

const WORDS: Record<Run['state'], string> = {
  planned: 'planned',
  'under-way': 'under way',
  'cooling-down': 'cooling down',
  closed: 'closed',
  'broken-off': 'broken off',
};
const words = (state: Run['state']): string => WORDS[state];
