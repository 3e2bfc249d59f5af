import type { Run } from '~/lib/contracts/runs';
import { hasRole, type Actor } from '../auth/actor';
import type { Tx } from '../database';
import { notAllowed, notFound } from '../errors';
import { findRun, lockRun, type RunRecord } from '../repositories/runs';

const records = (actor: Actor, run: Run): boolean =>
  run.recorders.some((person) => person.id === actor.userId);

/** Technicians, teachers and owners see every run of their studio; anybody else the runs they record. */
export function mayReadRun(actor: Actor, run: Run): boolean {
  return hasRole(actor, 'technician', 'teacher', 'owner') || records(actor, run);
}

/** Technicians, and who records the run. */
export function mayWriteRun(actor: Actor, run: Run): boolean {
  return hasRole(actor, 'technician') || records(actor, run);
}

/** The run, or 404: whether it is another studio's, another student's or nobody's makes no difference outside. */
export async function readableRun(actor: Actor, id: string, tx?: Tx): Promise<RunRecord> {
  const record = isUuid(id) ? await findRun(actor.studioId, id, tx) : null;
  if (!record || !mayReadRun(actor, record.run)) throw notFound('run');
  return record;
}

/** A run that the actor may see, held until the transaction ends; what may be done to it is the caller's rule. */
export async function lockedRun(actor: Actor, id: string, tx: Tx): Promise<RunRecord> {
  const record = isUuid(id) ? await lockRun(actor.studioId, id, tx) : null;
  if (!record || !mayReadRun(actor, record.run)) throw notFound('run');
  return record;
}

/** The run held for a change in this transaction: 404 if not visible, 403 if visible but not theirs to change. */
export async function writableRun(actor: Actor, id: string, tx: Tx): Promise<RunRecord> {
  const record = await lockedRun(actor, id, tx);
  if (!mayWriteRun(actor, record.run))
    throw notAllowed('Only a technician and those who record this run may change it.');
  return record;
}

export const isUuid = (text: string): boolean =>
  /^[0-9a-f]{8}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{4}-[0-9a-f]{12}$/i.test(text);
