import type { Review } from '~/lib/contracts/runs';
import type { Actor } from '../auth/actor';
import { HoldfastError } from '../errors';
import { findLog } from '../repositories/logs';
import { readableRun } from './run-access';

/** Verdict, figures and segments of the run's current log. */
export async function getReview(actor: Actor, runId: string): Promise<Review> {
  const record = await readableRun(actor, runId);
  const log = record.currentLogId ? await findLog(actor.studioId, { id: record.currentLogId }) : null;
  if (!log) throw new HoldfastError('not-found', 'No log has been uploaded for this run yet.');
  const { method, confidence, startOffsetS, startMs } = log.alignment;
  const { verdict, segments, figures } = log.review;
  return {
    runId,
    logId: log.id,
    verdict,
    startAt: new Date(startMs).toISOString(),
    alignment: { method, confidence, startOffsetS },
    segments,
    figures,
  };
}
