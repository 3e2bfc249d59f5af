import { QueryTypes } from 'sequelize';
import { runSchema, type Run } from '~/lib/contracts/runs';
import { profileSchema } from '~/lib/profile/schema';
import { kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { RunCounterRow, RunRecorderRow, RunRow } from '../models/run';

/** The profile, kiln and load as they were when the run began: what its estimate and review are computed from. */
export const frozenSchema = z.strictObject({
  profile: profileSchema,
  kiln: kilnPlateSchema,
  load: loadSchema,
});
export type Frozen = z.infer<typeof frozenSchema>;

/** A run as its services see it: what the API answers with, and what only the server needs. */
export interface RunRecord {
  readonly studioId: string;
  readonly run: Run;
  readonly frozen: Frozen | null;
  readonly currentLogId: string | null;
  readonly timeOfDayZone: string;
}

const iso = (column: string) => `to_char(${column} at time zone 'UTC', 'YYYY-MM-DD"T"HH24:MI:SS.MS"Z"')`;

/** Everything the API shows of a run, in one statement a page: no query per row. */
const SELECT = `
  select r.studio_id as "studioId", r.id, r.number, r.state, r.revision, r.frozen, r.current_log_id as "currentLogId", s.time_zone as "timeOfDayZone",
    json_build_object('id', k.id, 'name', k.name) as kiln,
    json_build_object('id', p.id, 'name', p.name, 'version', v.number, 'versionId', v.id, 'state', vs.state) as profile,
    coalesce(r.frozen -> 'profile', v.profile) as plan,
    coalesce(r.frozen -> 'load', r.load, v.load) as load,
    ${iso('r.planned_start_at')} as "plannedStartAt", ${iso('r.started_at')} as "startedAt",
    ${iso('r.finished_at')} as "finishedAt", ${iso('r.closed_at')} as "closedAt",
    r.broken_off_reason as "brokenOffReason", r.note, r.handout_id as "handoutId",
    (select coalesce(json_agg(json_build_object('id', u.id, 'name', u.name) order by u.name), '[]')
       from run_recorders rr join users u on u.id = rr.user_id
      where rr.studio_id = r.studio_id and rr.run_id = r.id) as recorders,
    (select coalesce(json_agg(json_build_object('id', l.id, 'fileName', f.file_name, 'bytes', f.bytes,
              'createdAt', ${iso('l.created_at')}, 'current', l.id = r.current_log_id) order by l.created_at, l.id), '[]')
       from logs l join uploads f on f.studio_id = l.studio_id and f.id = l.upload_id
      where l.studio_id = r.studio_id and l.run_id = r.id) as logs,
    (select l.review ->> 'verdict' from logs l where l.studio_id = r.studio_id and l.id = r.current_log_id) as verdict,
    (select count(*)::int from findings f where f.studio_id = r.studio_id and f.run_id = r.id) as findings,
    (select count(*)::int from findings f where f.studio_id = r.studio_id and f.run_id = r.id and f.state = 'open') as "openFindings",
    case when r.signed_off_by is null then null else json_build_object('by', json_build_object('id', so.id, 'name', so.name),
      'at', ${iso('r.closed_at')}, 'remark', r.sign_off_remark) end as "signOff"
  from runs r
  join studios s on s.id = r.studio_id
  join kilns k on k.studio_id = r.studio_id and k.id = r.kiln_id
  join profile_versions v on v.studio_id = r.studio_id and v.id = r.profile_version_id
  join version_states vs on vs.studio_id = v.studio_id and vs.version_id = v.id
  join profiles p on p.studio_id = r.studio_id and p.id = v.profile_id
  left join users so on so.id = r.signed_off_by
  where r.studio_id = $studioId`;

function recordOf(row: Record<string, unknown>): RunRecord {
  const { studioId, frozen, currentLogId, timeOfDayZone, ...run } = row;
  return {
    studioId: studioId as string,
    run: runSchema.parse(run),
    frozen: frozen === null ? null : frozenSchema.parse(frozen),
    currentLogId: currentLogId as string | null,
    timeOfDayZone: timeOfDayZone as string,
  };
}

export interface RunFilter {
  readonly studioId: string;
  /** Only runs that this person records. */
  readonly recorderId?: string | undefined;
  readonly state?: string | undefined;
  readonly kilnId?: string | undefined;
  readonly profileId?: string | undefined;
  /** Part of a name, or a run's number. */
  readonly q?: string | undefined;
  readonly beforeNumber?: number | undefined;
  readonly limit: number;
}

/** Runs, newest number first. */
export async function listRuns(filter: RunFilter, tx?: Tx): Promise<RunRecord[]> {
  const where = [
    filter.state && 'r.state = $state',
    filter.kilnId && 'r.kiln_id = $kilnId',
    filter.profileId && 'v.profile_id = $profileId',
    filter.beforeNumber !== undefined && 'r.number < $beforeNumber',
    filter.recorderId &&
      'exists (select 1 from run_recorders rr where rr.studio_id = r.studio_id and rr.run_id = r.id and rr.user_id = $recorderId)',
    filter.q && "(p.name ilike $like escape '!' or k.name ilike $like escape '!' or r.number::text = $q)",
  ].filter(Boolean);
  const rows = await database().query<Record<string, unknown>>(
    `${[SELECT, ...where].join(' and ')} order by r.number desc limit $limit`,
    {
      type: QueryTypes.SELECT,
      ...(tx ? { transaction: tx } : {}),
      bind: { ...filter, like: filter.q ? `%${filter.q.replace(/[!%_]/g, '!$&')}%` : null },
    },
  );
  return rows.map(recordOf);
}

export async function findRun(studioId: string, id: string, tx?: Tx): Promise<RunRecord | null> {
  const rows = await database().query<Record<string, unknown>>(`${SELECT} and r.id = $id`, {
    type: QueryTypes.SELECT,
    ...(tx ? { transaction: tx } : {}),
    bind: { studioId, id },
  });
  const row = rows[0];
  return row ? recordOf(row) : null;
}

/** Holds the run's row until the transaction ends, so that two who act on it act one after the other. */
export async function lockRun(studioId: string, id: string, tx: Tx): Promise<RunRecord | null> {
  const row = await RunRow.findOne({
    where: { studioId, id },
    lock: tx.LOCK.UPDATE,
    transaction: tx,
    attributes: ['id'],
  });
  return row ? findRun(studioId, id, tx) : null;
}

/** The next run number of a studio; concurrent calls wait for each other. */
export async function takeRunNumber(studioId: string, tx: Tx): Promise<number> {
  await database().query(
    `insert into run_counters (studio_id, last_number) values ($studioId, 1)
     on conflict (studio_id) do update set last_number = run_counters.last_number + 1`,
    { bind: { studioId }, transaction: tx },
  );
  const counter = await RunCounterRow.findOne({ where: { studioId }, transaction: tx, rejectOnEmpty: true });
  return counter.lastNumber;
}

export interface NewRun {
  readonly studioId: string;
  readonly id: string;
  readonly kilnId: string;
  readonly profileVersionId: string;
  readonly handoutId: string | null;
  readonly load: object | null;
  readonly plannedStartAt: Date;
  readonly note: string;
  readonly createdBy: string;
  readonly recorderIds: readonly string[];
}

export async function insertRun(run: NewRun, tx: Tx): Promise<void> {
  const { recorderIds, ...row } = run;
  const number = await takeRunNumber(run.studioId, tx);
  await RunRow.create(
    {
      ...row,
      number,
      state: 'planned',
      frozen: null,
      startedAt: null,
      finishedAt: null,
      closedAt: null,
      currentLogId: null,
      signedOffBy: null,
    },
    { transaction: tx },
  );
  await replaceRecorders(run.studioId, run.id, recorderIds, tx);
}

export async function replaceRecorders(
  studioId: string,
  runId: string,
  userIds: readonly string[],
  tx: Tx,
): Promise<void> {
  await RunRecorderRow.destroy({ where: { studioId, runId }, transaction: tx });
  await RunRecorderRow.bulkCreate(
    [...new Set(userIds)].map((userId) => ({ studioId, runId, userId })),
    { transaction: tx, validate: true },
  );
}

export interface RunChange {
  state?: string;
  kilnId?: string;
  load?: object | null;
  frozen?: Frozen;
  plannedStartAt?: Date;
  startedAt?: Date;
  finishedAt?: Date;
  closedAt?: Date;
  brokenOffReason?: string;
  note?: string;
  currentLogId?: string;
  signedOffBy?: string;
  signOffRemark?: string;
}

/** Writes a change and counts the revision up. The caller holds the row by `lockRun`. */
export async function updateRun(studioId: string, id: string, change: RunChange, tx: Tx): Promise<void> {
  await RunRow.update(change, { where: { studioId, id }, transaction: tx });
  await RunRow.increment('revision', { where: { studioId, id }, transaction: tx });
}
