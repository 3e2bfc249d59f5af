import { clockEventSchema, importReportSchema, mappingSchema, type Mapping } from '~/lib/logs/schema';
import { reviewSchema } from '~/lib/contracts/runs';
import { z } from '~/lib/zod';
import type { Tx } from '../database';
import { LogChannelRow, LogRow, UploadRow } from '../models/log';

/** How a reading lies on the plan, and what is known of its clock. */
export const alignmentSchema = z.strictObject({
  method: z.enum(['clock', 'fit', 'person']),
  confidence: z.number(),
  startOffsetS: z.number(),
  /** Run second 0, ms since 1970. */
  startMs: z.number(),
  /** Forward leaps of the logger's clock found by the review: later instants are moved back by `shiftS`. */
  leaps: z.array(z.strictObject({ atMs: z.number(), shiftS: z.number() })),
  clockEvents: z.array(clockEventSchema),
});
export type StoredAlignment = z.infer<typeof alignmentSchema>;

/** What the review computed, without the findings, which are rows of their own. */
export const storedReviewSchema = reviewSchema
  .omit({ runId: true, logId: true, startAt: true, alignment: true })
  .extend({
    carried: z.strictObject({ timeS: z.array(z.number()), valueC: z.array(z.number()) }),
    runEndS: z.number(),
    /** The log holds the end of the last hold. */
    endsAfterLastHold: z.boolean(),
  });
export type StoredReview = z.infer<typeof storedReviewSchema>;

const storedReportSchema = importReportSchema.omit({ startOffsetS: true, alignment: true });
export type StoredReport = z.infer<typeof storedReportSchema>;

export interface LogRecord {
  readonly id: string;
  readonly runId: string;
  readonly uploadId: string;
  readonly fileName: string;
  readonly revision: number;
  readonly mapping: Mapping;
  readonly report: StoredReport;
  readonly alignment: StoredAlignment;
  readonly review: StoredReview;
}

/** The mapping as text with its names in order: the same answers give the same key. */
export function mappingKey(mapping: Mapping): string {
  const names = Object.keys(mapping).sort() as (keyof Mapping)[];
  return JSON.stringify(
    Object.fromEntries(
      names.filter((name) => mapping[name] !== undefined).map((name) => [name, mapping[name]]),
    ),
  );
}

async function recordOf(row: LogRow, tx?: Tx): Promise<LogRecord> {
  const upload = await UploadRow.findOne({
    where: { studioId: row.studioId, id: row.uploadId },
    attributes: ['fileName'],
    rejectOnEmpty: true,
    ...(tx ? { transaction: tx } : {}),
  });
  return {
    id: row.id,
    runId: row.runId,
    uploadId: row.uploadId,
    fileName: upload.fileName,
    revision: row.revision,
    mapping: mappingSchema.parse(JSON.parse(row.mappingKey)),
    report: storedReportSchema.parse(row.report),
    alignment: alignmentSchema.parse(row.alignment),
    review: storedReviewSchema.parse(row.review),
  };
}

type Where = { runId: string; id: string } | { id: string } | { uploadId: string; mappingKey: string };

export async function findLog(studioId: string, where: Where, tx?: Tx): Promise<LogRecord | null> {
  const row = await LogRow.findOne({ where: { studioId, ...where }, ...(tx ? { transaction: tx } : {}) });
  return row ? recordOf(row, tx) : null;
}

/** As `findLog`, holding the row until the transaction ends. */
export async function lockLog(
  studioId: string,
  runId: string,
  id: string,
  tx: Tx,
): Promise<LogRecord | null> {
  const row = await LogRow.findOne({ where: { studioId, runId, id }, lock: tx.LOCK.UPDATE, transaction: tx });
  return row ? recordOf(row, tx) : null;
}

export interface NewLog {
  readonly studioId: string;
  readonly id: string;
  readonly runId: string;
  readonly uploadId: string;
  readonly mapping: Mapping;
  readonly report: StoredReport;
  readonly alignment: StoredAlignment;
  readonly review: StoredReview;
  readonly createdBy: string;
}

export async function insertLog(log: NewLog, tx: Tx): Promise<void> {
  const { mapping, ...row } = log;
  await LogRow.create({ ...row, mappingKey: mappingKey(mapping) }, { transaction: tx });
  const channels = log.report.channels.map((channel, position) => ({
    studioId: log.studioId,
    id: channel.id,
    logId: log.id,
    position,
    name: channel.name.slice(0, 200),
    quantity: channel.quantity,
    role: channel.role,
    unit: channel.unit.slice(0, 20),
  }));
  await LogChannelRow.bulkCreate(channels, { transaction: tx, validate: true });
}

export async function updateLogReview(
  studioId: string,
  id: string,
  change: { alignment: StoredAlignment; review: StoredReview },
  tx: Tx,
): Promise<void> {
  await LogRow.update(change, { where: { studioId, id }, transaction: tx });
  await LogRow.increment('revision', { where: { studioId, id }, transaction: tx });
}
