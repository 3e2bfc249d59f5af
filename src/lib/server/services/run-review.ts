import type { Run } from '~/lib/contracts/runs';
import type { Actor } from '../auth/actor';
import type { Tx } from '../database';
import { deleteComputedFindings, insertFindings, listFindings } from '../repositories/findings';
import { updateRun, type Frozen, type RunChange, type RunRecord } from '../repositories/runs';
import { keepDecisions, type Reviewed } from './log-review';

/** More findings than any review shows; what people decided on them is looked up in one go. */
const MANY = 10_000;

/** Makes a reviewed log the run's current one: replaces the computed findings, freezes the plan, moves the state on. */
export async function settleRun(
  actor: Actor,
  record: RunRecord,
  change: { logId: string; frozen: Frozen; reviewed: Reviewed },
  tx: Tx,
): Promise<void> {
  const { studioId } = actor;
  const { run } = record;
  const before = await listFindings(studioId, run.id, { limit: MANY }, tx);
  const findings = keepDecisions(before, change.reviewed.findings, (finding) =>
    finding.decidedAt ? new Date(finding.decidedAt) : null,
  );
  await deleteComputedFindings(studioId, run.id, tx);
  await insertFindings(studioId, run.id, findings, tx);
  await updateRun(
    studioId,
    run.id,
    {
      ...stateAfterLog(run, change.reviewed),
      currentLogId: change.logId,
      frozen: record.frozen ?? change.frozen,
    },
    tx,
  );
}

/** A log is evidence that the firing began; one that holds the last hold, that it ended. */
function stateAfterLog(run: Run, reviewed: Reviewed): RunChange {
  const { startMs } = reviewed.alignment;
  const ended = reviewed.review.endsAfterLastHold;
  const finishedAt = new Date(startMs + reviewed.review.runEndS * 1000);
  if (run.state === 'planned') {
    return ended
      ? { state: 'cooling-down', startedAt: new Date(startMs), finishedAt }
      : { state: 'under-way', startedAt: new Date(startMs) };
  }
  return run.state === 'under-way' && ended ? { state: 'cooling-down', finishedAt } : {};
}
