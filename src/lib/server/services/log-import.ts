import { randomUUID } from 'node:crypto';
import type { Log } from '~/lib/contracts/logs';
import { parseMapping, type LogQuestion, type Mapping } from '~/lib/logs/schema';
import type { LogReading, Refusal } from '~/lib/logs/types';
import type { Actor } from '../auth/actor';
import { inTransaction, isDuplicate, type Tx } from '../database';
import { HoldfastError, notFound, notValid, wrongState } from '../errors';
import type { TakeFile } from '../http/multipart';
import { findLog, insertLog, mappingKey, type StoredReport } from '../repositories/logs';
import { discardSamples } from '../repositories/samples';
import { findUpload, insertUpload, readUpload, UploadWriter, type Upload } from '../repositories/uploads';
import type { RunRecord } from '../repositories/runs';
import { LogReadingSession } from './log-reading';
import { reviewLog } from './log-review';
import { logView } from './logs';
import { isUuid, mayWriteRun, readableRun, writableRun } from './run-access';
import { settleRun } from './run-review';
import { emptyLoad, frozenNow } from './runs';
import { withUploadSlot } from './upload-slots';

export interface Imported {
  readonly log: Log;
  /** False where the same bytes with the same mapping were read before: the first report again. */
  readonly created: boolean;
}

/** Hands the file of a request to `take`, then gives the fields that stood beside it. */
export type Receive = (take: TakeFile) => Promise<Map<string, string>>;

/** What an upload came to before anything is committed. */
type Outcome =
  { kind: 'imported'; log: Log } | { kind: 'questions'; uploadId: string; questions: LogQuestion[] };

/**
 * Takes a log in one pass: its bytes are kept, hashed, read and stored while they arrive, in one transaction, so that a
 * process that dies leaves no half log, and an answer of 201 means that all of it is on disk.
 */
export async function importLog(actor: Actor, runId: string, receive: Receive): Promise<Imported> {
  const run = await runForLog(actor, runId);
  try {
    const outcome = await withUploadSlot(() => inTransaction((tx) => takeUpload(actor, run, receive, tx)));
    return settled(outcome);
  } catch (error) {
    if (error instanceof KeptBefore) return readKeptAs(actor, run, error);
    throw error;
  }
}

/** Answers the questions about a kept file: reads it again without its being sent again. */
export async function answerQuestions(
  actor: Actor,
  runId: string,
  logId: string,
  mapping: Mapping,
): Promise<Imported> {
  const run = await runForLog(actor, runId);
  const log = isUuid(logId) ? await findLog(actor.studioId, { runId, id: logId }) : null;
  const uploadId = log?.uploadId ?? logId;
  const upload = isUuid(uploadId) ? await findUpload(actor.studioId, { id: uploadId }) : null;
  if (!upload || upload.runId !== runId) throw notFound('log');
  return readKept(actor, run, upload, { ...log?.mapping, ...mapping });
}

async function runForLog(actor: Actor, runId: string): Promise<RunRecord> {
  const record = await readableRun(actor, runId);
  if (!mayWriteRun(actor, record.run))
    throw new HoldfastError(
      'not-allowed',
      'Only a technician and those who record this run may add its log.',
    );
  if (record.run.state === 'broken-off')
    throw wrongState(`Run ${record.run.number} was broken off; it takes no log.`);
  return record;
}

/** Thrown out of the transaction when the bytes turn out to be kept already; what was written again is rolled back. */
class KeptBefore extends Error {
  constructor(
    readonly sha256: string,
    readonly mapping: Mapping,
  ) {
    super('these bytes are kept already');
  }
}

async function readKeptAs(actor: Actor, run: RunRecord, { sha256, mapping }: KeptBefore): Promise<Imported> {
  const upload = await findUpload(actor.studioId, { runId: run.run.id, sha256 });
  if (!upload) throw notFound('log');
  return readKept(actor, run, upload, mapping);
}

async function takeUpload(actor: Actor, run: RunRecord, receive: Receive, tx: Tx): Promise<Outcome> {
  const { studioId } = actor;
  const uploadId = randomUUID();
  const writer = new UploadWriter({ studioId, uploadId }, tx);
  let session = new LogReadingSession(readingKey(actor, run), {}, tx);
  let fileName = 'log.csv';
  const fields = await receive(async (name, bytes) => {
    fileName = name;
    for await (const part of bytes) {
      await writer.append(part);
      await session.push(part);
      if (session.refusal) throw refused(session.refusal);
    }
  }).finally(() => Promise.all([writer.settled(), session.settled()]));
  const mapping = mappingOf(fields.get('mapping'));
  const sha256 = await writer.finish();
  if (await findUpload(studioId, { runId: run.run.id, sha256 }, tx)) throw new KeptBefore(sha256, mapping);

  const upload: Upload = { id: uploadId, runId: run.run.id, fileName, bytes: writer.bytes, sha256 };
  let reading: LogReading;
  if (mappingKey(mapping) === '{}') {
    reading = await session.end();
  } else {
    await discardSamples(studioId, session.logId, tx);
    ({ session, reading } = await readParts(actor, run, upload, mapping, tx));
  }
  try {
    await insertUpload({ ...upload, studioId, uploadedBy: actor.userId }, tx);
  } catch (error) {
    // The same file sent twice at once: the other one was first.
    if (isDuplicate(error)) throw new KeptBefore(sha256, mapping);
    throw error;
  }
  return conclude(actor, run, upload, mapping, session, reading, tx);
}

async function readKept(actor: Actor, run: RunRecord, upload: Upload, mapping: Mapping): Promise<Imported> {
  const before = await findLog(actor.studioId, { uploadId: upload.id, mappingKey: mappingKey(mapping) });
  if (before) return { log: logView(before), created: false };
  const outcome = await inTransaction(async (tx) => {
    const { session, reading } = await readParts(actor, run, upload, mapping, tx);
    return conclude(actor, run, upload, mapping, session, reading, tx);
  });
  return settled(outcome);
}

async function readParts(actor: Actor, run: RunRecord, upload: Upload, mapping: Mapping, tx: Tx) {
  const session = new LogReadingSession(readingKey(actor, run), mapping, tx);
  try {
    for await (const part of readUpload(actor.studioId, upload.id, tx)) {
      await session.push(part);
      if (session.refusal) throw refused(session.refusal);
    }
    return { session, reading: await session.end() };
  } finally {
    await session.settled();
  }
}

/** Turns a reading into rows, or into the questions it leaves; `again` reads the kept bytes once more. */
async function conclude(
  actor: Actor,
  run: RunRecord,
  upload: Upload,
  mapping: Mapping,
  session: LogReadingSession,
  reading: LogReading,
  tx: Tx,
  readings = 1,
): Promise<Outcome> {
  if ('report' in reading) return store(actor, run, upload, mapping, session, reading.report, tx);
  if ('refusal' in reading) throw refused(reading.refusal);
  await discardSamples(actor.studioId, session.logId, tx);
  if ('questions' in reading) return { kind: 'questions', uploadId: upload.id, questions: reading.questions };
  if (readings > 3) throw new Error('a log asked to be read again and again');
  const next = await readParts(actor, run, upload, { ...mapping, ...reading.again }, tx);
  return conclude(actor, run, upload, mapping, next.session, next.reading, tx, readings + 1);
}

async function store(
  actor: Actor,
  run: RunRecord,
  upload: Upload,
  mapping: Mapping,
  session: LogReadingSession,
  report: Extract<LogReading, { ok: true }>['report'],
  tx: Tx,
): Promise<Outcome> {
  const held = await writableRun(actor, run.run.id, tx);
  if (held.run.state === 'broken-off')
    throw wrongState(`Run ${held.run.number} was broken off; it takes no log.`);
  const frozen = held.frozen ?? (await frozenNow(actor, held, tx));
  const { controlChannel, channels, ...rest } = report;
  const named = channels.map((channel) => ({ ...channel, id: randomUUID() }));
  const stored: StoredReport = {
    ...rest,
    logId: session.logId,
    sha256: upload.sha256,
    channels: named,
    controlChannelId: controlChannel === null ? null : (named[controlChannel]?.id ?? null),
  };
  const reviewed = reviewLog({
    frozen: { ...frozen, load: frozen.load ?? emptyLoad() },
    report: stored,
    series: session.series(),
    plannedStartMs: Date.parse(held.run.startedAt ?? held.run.plannedStartAt),
    alignment: { method: 'auto' },
    logId: session.logId,
  });
  if (!reviewed) {
    throw notValid(
      'The file holds no temperatures, so there is nothing to lay over the plan. Export it with at least one thermocouple column.',
    );
  }
  await insertLog(
    {
      studioId: actor.studioId,
      id: session.logId,
      runId: run.run.id,
      uploadId: upload.id,
      mapping,
      report: stored,
      alignment: reviewed.alignment,
      review: reviewed.review,
      createdBy: actor.userId,
    },
    tx,
  );
  await settleRun(actor, held, { logId: session.logId, frozen, reviewed }, tx);
  const log = await findLog(actor.studioId, { id: session.logId }, tx);
  if (!log) throw new Error('a log vanished within its own transaction');
  return { kind: 'imported', log: logView(log) };
}

function settled(outcome: Outcome): Imported {
  if (outcome.kind === 'imported') return { log: outcome.log, created: true };
  const fields = outcome.questions.map((question) => question.field).join(', ');
  throw new HoldfastError(
    'not-valid',
    `This file can be read in more than one way; say which: ${fields}. It is kept, and need not be sent again.`,
    {
      extra: { logId: outcome.uploadId, questions: outcome.questions },
    },
  );
}

const readingKey = (actor: Actor, run: RunRecord) => ({
  studioId: actor.studioId,
  timeZone: run.timeOfDayZone,
  plannedStartMs: Date.parse(run.run.startedAt ?? run.run.plannedStartAt),
});

function mappingOf(text: string | undefined): Mapping {
  const parsed = parseMapping(text);
  if (parsed.ok) return parsed.mapping;
  throw notValid('The mapping beside the file is not valid.', parsed.issues);
}

/** What is no log at all is of the wrong type; what is one but holds nothing to read is not valid. */
function refused(refusal: Refusal): HoldfastError {
  const wrongType = ['not-text', 'spreadsheet', 'image', 'archive', 'document'].includes(refusal.code);
  return new HoldfastError(wrongType ? 'wrong-type' : 'not-valid', refusal.detail);
}
