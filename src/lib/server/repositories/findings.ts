import { QueryTypes } from 'sequelize';
import { findingSchema, type Finding } from '~/lib/contracts/runs';
import { database, type Tx } from '../database';
import { FindingRow } from '../models/finding';

const iso = (column: string) => `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;

const SELECT = `
  select f.id, f.revision, f.kind, f.severity, f.origin, f.state, f.channel_id as "channelId", f.segment,
    f.start_s as "startS", f.end_s as "endS", f.peak_c as "peakC", f.by_c as "byC", f.by_s as "byS", f.by_c_per_h as "byCPerH",
    f.hold_lost_s as "holdLostS", f.expected, f.text, f.remark, f.follow_up as "followUp",
    case when u.id is null then null else json_build_object('id', u.id, 'name', u.name) end as "decidedBy",
    ${iso('f.decided_at')} as "decidedAt"
  from findings f left join users u on u.id = f.decided_by
  where f.studio_id = $studioId and f.run_id = $runId`;

export interface FindingPage {
  readonly limit: number;
  readonly after?: { readonly startS: number; readonly id: string } | undefined;
}

/** Findings of a run by time. */
export async function listFindings(
  studioId: string,
  runId: string,
  page: FindingPage,
  tx?: Tx,
): Promise<Finding[]> {
  const after = page.after ? 'and (f.start_s, f.id) > ($startS, $id)' : '';
  const rows = await database().query(`${SELECT} ${after} order by f.start_s, f.id limit $limit`, {
    type: QueryTypes.SELECT,
    ...(tx ? { transaction: tx } : {}),
    bind: {
      studioId,
      runId,
      limit: page.limit,
      startS: page.after?.startS ?? null,
      id: page.after?.id ?? null,
    },
  });
  return rows.map((row) => findingSchema.parse(row));
}

export async function findFinding(
  studioId: string,
  runId: string,
  id: string,
  tx?: Tx,
): Promise<Finding | null> {
  const rows = await database().query(`${SELECT} and f.id = $id`, {
    type: QueryTypes.SELECT,
    ...(tx ? { transaction: tx } : {}),
    bind: { studioId, runId, id },
  });
  return rows[0] ? findingSchema.parse(rows[0]) : null;
}

export async function lockFinding(
  studioId: string,
  runId: string,
  id: string,
  tx: Tx,
): Promise<Finding | null> {
  const row = await FindingRow.findOne({
    where: { studioId, runId, id },
    lock: tx.LOCK.UPDATE,
    transaction: tx,
    attributes: ['id'],
  });
  return row ? findFinding(studioId, runId, id, tx) : null;
}

export type NewFinding = Omit<Finding, 'revision' | 'decidedBy' | 'decidedAt'> & {
  readonly logId: string | null;
  readonly decidedBy?: string | null;
  readonly decidedAt?: Date | null;
};

export async function insertFindings(
  studioId: string,
  runId: string,
  findings: readonly NewFinding[],
  tx: Tx,
): Promise<void> {
  const rows = findings.map((finding) => ({
    ...finding,
    studioId,
    runId,
    decidedBy: finding.decidedBy ?? null,
    decidedAt: finding.decidedAt ?? null,
  }));
  await FindingRow.bulkCreate(rows, { transaction: tx, validate: true });
}

/** Removes what was computed for a run before it is computed anew; what people added stays. */
export async function deleteComputedFindings(studioId: string, runId: string, tx: Tx): Promise<void> {
  await FindingRow.destroy({ where: { studioId, runId, origin: 'computed' }, transaction: tx });
}

export interface FindingChange {
  state?: Finding['state'];
  remark?: string;
  followUp?: Finding['followUp'];
  decidedBy?: string | null;
  decidedAt?: Date | null;
}

export async function updateFinding(
  studioId: string,
  id: string,
  change: FindingChange,
  tx: Tx,
): Promise<void> {
  await FindingRow.update(change, { where: { studioId, id }, transaction: tx });
  await FindingRow.increment('revision', { where: { studioId, id }, transaction: tx });
}
