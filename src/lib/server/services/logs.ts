import type { Log } from '~/lib/contracts/logs';
import type { AlignmentRequest } from '~/lib/review/types';
import type { Actor } from '../auth/actor';
import { inTransaction } from '../database';
import { notFound, staleRevision, wrongState } from '../errors';
import { findLog, lockLog, updateLogReview, type LogRecord } from '../repositories/logs';
import { readAllSamples } from '../repositories/samples';
import { findUpload, readUpload } from '../repositories/uploads';
import { reviewLog } from './log-review';
import { isUuid, readableRun, writableRun } from './run-access';
import { settleRun } from './run-review';
import { SeriesBuffer } from './series-buffer';

/** The import report as the API gives it. */
export function logView(record: LogRecord): Log {
  const { method, confidence, startOffsetS } = record.alignment;
  return {
    ...record.report,
    startOffsetS,
    alignment: { method, confidence },
    runId: record.runId,
    fileName: record.fileName,
    revision: record.revision,
    mapping: record.mapping,
  };
}

export async function getLog(actor: Actor, runId: string, logId: string): Promise<Log> {
  return logView(await visibleLog(actor, runId, logId));
}

async function visibleLog(actor: Actor, runId: string, logId: string): Promise<LogRecord> {
  await readableRun(actor, runId);
  const log = isUuid(logId) ? await findLog(actor.studioId, { runId, id: logId }) : null;
  if (!log) throw notFound('log');
  return log;
}

/** The kept bytes as a stream that waits for its reader. */
export async function originalOf(actor: Actor, runId: string, logId: string) {
  const log = await visibleLog(actor, runId, logId);
  const upload = await findUpload(actor.studioId, { id: log.uploadId });
  if (!upload) throw notFound('log');
  const parts = readUpload(actor.studioId, upload.id);
  const stream = new ReadableStream<Uint8Array>({
    async pull(controller) {
      const next = await parts.next();
      if (next.done) controller.close();
      else controller.enqueue(next.value);
    },
    async cancel() {
      await parts.return(undefined);
    },
  });
  return { stream, bytes: upload.bytes, fileName: upload.fileName };
}

/** Lays the log on the plan by hand, or by itself again, and reviews it anew. Decisions stay with what they were made on. */
export async function alignLog(
  actor: Actor,
  runId: string,
  logId: string,
  revision: number,
  alignment: AlignmentRequest,
): Promise<Log> {
  return inTransaction(async (tx) => {
    const record = await writableRun(actor, runId, tx);
    const log = isUuid(logId) ? await lockLog(actor.studioId, runId, logId, tx) : null;
    if (!log) throw notFound('log');
    if (log.revision !== revision) throw staleRevision(logView(log));
    if (!record.frozen) throw wrongState('This run has no plan to lay the log on.');
    const buffer = new SeriesBuffer();
    for await (const block of readAllSamples(actor.studioId, logId, tx)) buffer.add(block);
    const reviewed = reviewLog({
      frozen: record.frozen,
      report: log.report,
      series: buffer.finish(),
      plannedStartMs: Date.parse(record.run.plannedStartAt),
      alignment,
      logId,
    });
    if (!reviewed) throw wrongState('This log holds no temperatures.');
    await updateLogReview(actor.studioId, logId, reviewed, tx);
    if (record.currentLogId === logId)
      await settleRun(actor, record, { logId, frozen: record.frozen, reviewed }, tx);
    const after = await findLog(actor.studioId, { id: logId }, tx);
    if (!after) throw new Error('a log vanished within its own transaction');
    return logView(after);
  });
}
