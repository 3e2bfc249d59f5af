import { QueryTypes } from 'sequelize';
import { versionSchema, type Version } from '~/lib/contracts/profiles';
import { z } from '~/lib/zod';
import type { SealedContent } from '~/lib/profile/seal';
import { database, type Tx } from '../database';
import { ProfileVersionRow, VersionEventRow, VersionStateRow } from '../models/profile';
import { instantOf } from './row';
import { VERSIONS_FOR_PERSON } from './visibility';

/** A version as services see it: what the API answers with, and what only the server needs. */
export interface VersionRecord {
  readonly version: Version;
  readonly profileId: string;
  readonly profileName: string;
  readonly profileAuthorId: string;
  readonly profileArchived: boolean;
  /** Who last changed its content. */
  readonly editedById: string;
}

/** Whose eyes it is seen with: null sees all of the studio, a person what handouts and own work give. */
export type Viewer = string | null;

const SELECT = `
  select v.id, v.number, s.state, s.revision, v.profile, v.kiln_id as "kilnId", v.load, v.sha256,
    v.author_id as "authorId", ${instantOf('v.created_at')} as "createdAt",
    (select coalesce(json_agg(json_build_object('what', e.what, 'at', ${instantOf('e.at')},
        'by', json_build_object('id', u.id, 'name', u.name), 'note', e.note, 'overrides', e.overrides,
        'segmentRemarks', e.segment_remarks) order by e.at, e.id), '[]')
      from version_events e join users u on u.id = e.by_id
      where e.studio_id = v.studio_id and e.version_id = v.id) as events,
    v.profile_id as "profileId", p.name as "profileName", p.author_id as "profileAuthorId",
    p.archived_at is not null as "profileArchived", v.edited_by_id as "editedById"
  from profile_versions v
  join version_states s on s.studio_id = v.studio_id and s.version_id = v.id
  join profiles p on p.studio_id = v.studio_id and p.id = v.profile_id
  where v.studio_id = $studioId`;

const serverOnly = z.object({
  profileId: z.guid(),
  profileName: z.string(),
  profileAuthorId: z.guid(),
  profileArchived: z.boolean(),
  editedById: z.guid(),
});

async function selectOne(
  where: string,
  bind: { studioId: string; userId: Viewer } & Record<string, unknown>,
  tx?: Tx,
): Promise<VersionRecord | null> {
  const visible = bind.userId === null ? '' : ` and v.id in (${VERSIONS_FOR_PERSON})`;
  const rows = await database().query<Record<string, unknown>>(`${SELECT} and ${where}${visible}`, {
    type: QueryTypes.SELECT,
    bind,
    ...(tx ? { transaction: tx } : {}),
  });
  const row = rows[0];
  if (!row) return null;
  const { profileId, profileName, profileAuthorId, profileArchived, editedById, ...version } = row;
  return {
    version: versionSchema.parse(version),
    ...serverOnly.parse({ profileId, profileName, profileAuthorId, profileArchived, editedById }),
  };
}

export const findVersion = (
  studioId: string,
  userId: Viewer,
  profileId: string,
  number: number,
  tx?: Tx,
): Promise<VersionRecord | null> =>
  selectOne('v.profile_id = $profileId and v.number = $number', { studioId, userId, profileId, number }, tx);

export const findVersionById = (
  studioId: string,
  userId: Viewer,
  id: string,
  tx?: Tx,
): Promise<VersionRecord | null> => selectOne('v.id = $id', { studioId, userId, id }, tx);

/** Holds the state of a version until the transaction ends: whoever changes or moves it comes one after the other. */
export async function lockVersion(
  studioId: string,
  userId: Viewer,
  profileId: string,
  number: number,
  tx: Tx,
): Promise<VersionRecord | null> {
  const row = await ProfileVersionRow.findOne({
    attributes: ['id'],
    where: { studioId, profileId, number },
    transaction: tx,
  });
  if (!row) return null;
  await VersionStateRow.findOne({
    where: { studioId, versionId: row.id },
    transaction: tx,
    lock: tx.LOCK.UPDATE,
  });
  return findVersion(studioId, userId, profileId, number, tx);
}

export interface NewVersion extends SealedContent {
  readonly studioId: string;
  readonly id: string;
  readonly profileId: string;
  readonly authorId: string;
  readonly sha256: string;
  readonly createdAt: Date;
}

/** Adds a draft with the next number of its profile; the caller holds the profile. */
export async function insertVersion(version: NewVersion, tx: Tx): Promise<number> {
  const { studioId, id, profileId } = version;
  const last = await ProfileVersionRow.max<number | null, ProfileVersionRow>('number', {
    where: { studioId, profileId },
    transaction: tx,
  });
  const number = (last ?? 0) + 1;
  await ProfileVersionRow.create({ ...version, number, editedById: version.authorId }, { transaction: tx });
  await VersionStateRow.create({ studioId, versionId: id, state: 'draft' }, { transaction: tx });
  return number;
}

/** Writes new content into a draft and counts its revision up; the caller holds the version. */
export async function writeContent(
  studioId: string,
  version: Version,
  content: SealedContent & { readonly sha256: string; readonly editedById: string },
  tx: Tx,
): Promise<void> {
  await ProfileVersionRow.update(content, { where: { studioId, id: version.id }, transaction: tx });
  await writeState(studioId, version, version.state, tx);
}

/** Moves a version on and counts its revision up; the caller holds the version. */
export async function writeState(
  studioId: string,
  version: Version,
  state: Version['state'],
  tx: Tx,
): Promise<void> {
  await VersionStateRow.update(
    { state, revision: version.revision + 1 },
    { where: { studioId, versionId: version.id }, transaction: tx },
  );
}

export type NewEvent = Pick<Version['events'][number], 'what' | 'note' | 'overrides' | 'segmentRemarks'> & {
  readonly studioId: string;
  readonly id: string;
  readonly versionId: string;
  readonly byId: string;
  readonly at: Date;
};

export async function insertEvent(event: NewEvent, tx: Tx): Promise<void> {
  await VersionEventRow.create(event, { transaction: tx });
}
