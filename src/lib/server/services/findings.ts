import { randomUUID } from 'node:crypto';
import type { z } from '~/lib/zod';
import type { ListQuery } from '~/lib/contracts/common';
import type { Finding, findingRoutes } from '~/lib/contracts/runs';
import { requireRole, type Actor } from '../auth/actor';
import { inTransaction } from '../database';
import { notFound, notValid, staleRevision } from '../errors';
import { decodeCursor, page } from '../http/pagination';
import {
  findFinding,
  insertFindings,
  listFindings as listRows,
  lockFinding,
  updateFinding as writeFinding,
} from '../repositories/findings';
import { findLog } from '../repositories/logs';
import { isUuid, lockedRun, readableRun } from './run-access';

type Body<R extends { body: z.ZodType }> = z.output<R['body']>;

export async function listFindings(actor: Actor, runId: string, query: ListQuery) {
  await readableRun(actor, runId);
  const after = decodeCursor(query.cursor);
  const rows = await listRows(actor.studioId, runId, {
    limit: query.limit + 1,
    after: after ? { startS: Number(after.sort), id: after.id } : undefined,
  });
  return page(rows, query.limit, (finding) => finding.startS);
}

/** A finding that a person marks on the strip; confirmed from the start, since someone saw it. */
export async function addFinding(
  actor: Actor,
  runId: string,
  body: Body<(typeof findingRoutes)['create']>,
  now: Date,
): Promise<Finding> {
  requireRole(actor, 'technician', 'teacher');
  if (body.endS < body.startS)
    throw notValid('The finding ends before it begins.', [
      { path: 'endS', message: 'must not be before startS' },
    ]);
  return inTransaction(async (tx) => {
    const record = await lockedRun(actor, runId, tx);
    const channelId = body.channelId ?? null;
    if (channelId !== null) {
      const log = record.currentLogId ? await findLog(actor.studioId, { id: record.currentLogId }, tx) : null;
      if (!log?.report.channels.some((channel) => channel.id === channelId)) throw notFound('channel');
    }
    const id = randomUUID();
    await insertFindings(
      actor.studioId,
      runId,
      [
        {
          id,
          logId: null,
          kind: body.kind,
          severity: body.severity,
          origin: 'person',
          state: 'confirmed',
          channelId,
          segment: null,
          startS: body.startS,
          endS: body.endS,
          peakC: null,
          byC: null,
          byS: null,
          byCPerH: null,
          holdLostS: null,
          expected: false,
          text: '',
          remark: body.remark,
          followUp: null,
          decidedBy: actor.userId,
          decidedAt: now,
        },
      ],
      tx,
    );
    const finding = await findFinding(actor.studioId, runId, id, tx);
    if (!finding) throw new Error('a finding vanished within its own transaction');
    return finding;
  });
}

/** Confirms, dismisses, remarks or sets a follow-up. Dismissing needs no reason; the remark keeps one if given. */
export async function decideFinding(
  actor: Actor,
  runId: string,
  findingId: string,
  revision: number,
  body: Body<(typeof findingRoutes)['update']>,
  now: Date,
): Promise<Finding> {
  requireRole(actor, 'technician', 'teacher');
  return inTransaction(async (tx) => {
    await readableRun(actor, runId, tx);
    const finding = isUuid(findingId) ? await lockFinding(actor.studioId, runId, findingId, tx) : null;
    if (!finding) throw notFound('finding');
    if (finding.revision !== revision) throw staleRevision(finding);
    const decided =
      body.state === undefined
        ? {}
        : body.state === 'open'
          ? { decidedBy: null, decidedAt: null }
          : { decidedBy: actor.userId, decidedAt: now };
    await writeFinding(
      actor.studioId,
      findingId,
      {
        ...(body.state === undefined ? {} : { state: body.state }),
        ...(body.remark === undefined ? {} : { remark: body.remark }),
        ...(body.followUp === undefined ? {} : { followUp: body.followUp }),
        ...decided,
      },
      tx,
    );
    const after = await findFinding(actor.studioId, runId, findingId, tx);
    if (!after) throw new Error('a finding vanished within its own transaction');
    return after;
  });
}
