import { QueryTypes } from 'sequelize';
import { profileDetailSchema, type ProfileDetail } from '~/lib/contracts/profiles';
import { plannedCurve } from '~/lib/profile/planned';
import { profileSchema, type Profile } from '~/lib/profile/schema';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { ProfileRow } from '../models/profile';
import { instantOf, likeAnywhere } from './row';
import { VERSIONS_FOR_PERSON } from './visibility';
import type { Viewer } from './versions';

const summaryOf = (v: string) => `json_build_object('id', ${v}.id, 'number', ${v}.number, 'state', ${v}.state,
  'revision', ${v}.revision, 'sha256', ${v}.sha256, 'authorId', ${v}.author_id,
  'createdAt', ${instantOf(`${v}.created_at`)}, 'kilnId', ${v}.kiln_id)`;

/** Versions of a profile that the viewer sees, with their states. */
const versionsOf = (viewer: Viewer) => `
  select v.*, s.state, s.revision from profile_versions v
  join version_states s on s.studio_id = v.studio_id and s.version_id = v.id
  where v.studio_id = p.studio_id and v.profile_id = p.id
  ${viewer === null ? '' : `and v.id in (${VERSIONS_FOR_PERSON})`}`;

/** Everything the list shows, in one statement a page. A profile of which the viewer sees no version is not there. */
const select = (viewer: Viewer, withVersions: boolean) => `
  select p.id, p.name, p.revision, json_build_object('id', u.id, 'name', u.name) as author,
    ${instantOf('p.created_at')} as "createdAt", ${instantOf('p.updated_at')} as "updatedAt",
    ${instantOf('p.archived_at')} as "archivedAt", ${summaryOf('latest')} as latest, latest.profile,
    ${withVersions ? `(select json_agg(${summaryOf('one')} order by one.number) from (${versionsOf(viewer)}) one)` : `'[]'::json`} as versions
  from profiles p
  join users u on u.id = p.author_id
  join lateral (${versionsOf(viewer)} order by v.number desc limit 1) latest on true
  where p.studio_id = $studioId`;

const rowSchema = z.looseObject({ profile: profileSchema });

function detailOf(row: Record<string, unknown>): ProfileDetail {
  const { profile } = rowSchema.parse(row);
  return profileDetailSchema.parse({ ...row, ...figuresOf(profile) });
}

/** For the list: highest temperature asked for, and planned time where no segment leaves it to the kiln. */
function figuresOf(profile: Profile) {
  const open = profile.segments.some((segment) => typeof segment.rateCPerH === 'string');
  return {
    peakC: profile.segments.reduce((peakC, segment) => Math.max(peakC, segment.toC), profile.startC),
    plannedS: open ? null : plannedCurve(profile).durationS,
    segments: profile.segments.length,
  };
}

export interface ProfileFilter {
  readonly studioId: string;
  readonly viewer: Viewer;
  readonly limit: number;
  readonly after: { readonly updatedAt: string; readonly id: string } | null;
  readonly q?: string | undefined;
  /** Profiles that have a version in this state. */
  readonly state?: string | undefined;
  readonly archived: 'no' | 'yes' | 'all';
}

/** Profiles, the one last worked on first. */
export async function listProfiles(filter: ProfileFilter): Promise<ProfileDetail[]> {
  const { viewer, after, archived, q } = filter;
  const where = [
    archived !== 'all' && `p.archived_at is ${archived === 'yes' ? 'not' : ''} null`,
    q && '(p.name ilike $like or u.name ilike $like)',
    filter.state && `exists (select 1 from (${versionsOf(viewer)}) any_one where any_one.state = $state)`,
    after && '(p.updated_at, p.id) < ($updatedAt::timestamptz, $id::uuid)',
  ].filter(Boolean);
  const rows = await database().query<Record<string, unknown>>(
    `${[select(viewer, false), ...where].join(' and ')} order by p.updated_at desc, p.id desc limit $limit`,
    {
      type: QueryTypes.SELECT,
      bind: {
        studioId: filter.studioId,
        userId: viewer,
        limit: filter.limit,
        ...(q ? { like: likeAnywhere(q) } : {}),
        ...(filter.state ? { state: filter.state } : {}),
        ...after,
      },
    },
  );
  return rows.map(detailOf);
}

export async function findProfile(
  studioId: string,
  viewer: Viewer,
  id: string,
  tx?: Tx,
): Promise<ProfileDetail | null> {
  const rows = await database().query<Record<string, unknown>>(`${select(viewer, true)} and p.id = $id`, {
    type: QueryTypes.SELECT,
    bind: { studioId, userId: viewer, id },
    ...(tx ? { transaction: tx } : {}),
  });
  const row = rows[0];
  return row ? detailOf(row) : null;
}

/** Holds a profile until the transaction ends, so that versions are numbered one after the other. */
export async function lockProfile(
  studioId: string,
  viewer: Viewer,
  id: string,
  tx: Tx,
): Promise<ProfileDetail | null> {
  const row = await ProfileRow.findOne({
    attributes: ['id'],
    where: { studioId, id },
    transaction: tx,
    lock: tx.LOCK.NO_KEY_UPDATE,
  });
  return row ? findProfile(studioId, viewer, id, tx) : null;
}

export async function insertProfile(
  profile: {
    readonly studioId: string;
    readonly id: string;
    readonly name: string;
    readonly authorId: string;
    readonly createdAt: Date;
  },
  tx: Tx,
): Promise<void> {
  await ProfileRow.create({ ...profile, updatedAt: profile.createdAt }, { transaction: tx });
}

/** Writes name and archive, counts the revision up; the caller holds the profile. */
export async function writeProfile(
  studioId: string,
  id: string,
  change: { readonly name: string; readonly archivedAt: Date | null; readonly revision: number },
  now: Date,
  tx: Tx,
): Promise<void> {
  await ProfileRow.update(
    { ...change, revision: change.revision + 1, updatedAt: now },
    { where: { studioId, id }, transaction: tx },
  );
}

/** Moves a profile to the front of the list because one of its versions changed. */
export async function touchProfile(studioId: string, id: string, now: Date, tx: Tx): Promise<void> {
  await ProfileRow.update({ updatedAt: now }, { where: { studioId, id }, transaction: tx });
}
