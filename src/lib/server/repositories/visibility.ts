import { QueryTypes } from 'sequelize';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';

/**
 * Handouts that are for one person ($userId), by name or through a class they are in now, and that stand.
 * What is over stays readable, for those who write up their run; what was withdrawn gives nothing.
 */
export const HANDOUTS_FOR_PERSON = `
  select h.id, h.profile_version_id, h.kiln_id from handouts h
  where h.studio_id = $studioId and h.withdrawn_at is null and (
    exists (select 1 from handout_people hp
      where hp.studio_id = h.studio_id and hp.handout_id = h.id and hp.user_id = $userId)
    or exists (select 1 from class_members cm
      where cm.studio_id = h.studio_id and cm.class_id = h.class_id and cm.user_id = $userId))`;

/** Versions that a handout or own work gives to one person: handed out, drafted, in an own profile, or in a run they record. */
export const VERSIONS_FOR_PERSON = `
  select h.profile_version_id as id from (${HANDOUTS_FOR_PERSON}) h
  union select pv.id from profile_versions pv
    join profiles pp on pp.studio_id = pv.studio_id and pp.id = pv.profile_id
    where pv.studio_id = $studioId and (pv.author_id = $userId or pp.author_id = $userId)
  union select r.profile_version_id from runs r
    join run_recorders rr on rr.studio_id = r.studio_id and rr.run_id = r.id
    where r.studio_id = $studioId and rr.user_id = $userId`;

const KILNS_FOR_PERSON = `
  select h.kiln_id as id from (${HANDOUTS_FOR_PERSON}) h
  union select pv.kiln_id from profile_versions pv
    join profiles pp on pp.studio_id = pv.studio_id and pp.id = pv.profile_id
    where pv.studio_id = $studioId and pv.kiln_id is not null and (pv.author_id = $userId or pp.author_id = $userId)
  union select r.kiln_id from runs r
    join run_recorders rr on rr.studio_id = r.studio_id and rr.run_id = r.id
    where r.studio_id = $studioId and rr.user_id = $userId`;

const THERMOCOUPLES_FOR_PERSON = `
  select k.thermocouple_id as id from kilns k
  where k.studio_id = $studioId and k.thermocouple_id is not null and k.id in (${KILNS_FOR_PERSON})`;

const FURNACES_FOR_PERSON = `
  select f.id from furnaces f where f.studio_id = $studioId and f.id::text in (
    select v.load -> 'pour' ->> 'furnaceId' from profile_versions v
    where v.studio_id = $studioId and v.id in (${VERSIONS_FOR_PERSON}))`;

const idsSchema = z.array(z.strictObject({ id: z.guid() }));

async function ids(sql: string, studioId: string, userId: string, tx?: Tx): Promise<string[]> {
  const rows = await database().query(sql, {
    type: QueryTypes.SELECT,
    bind: { studioId, userId },
    ...(tx ? { transaction: tx } : {}),
  });
  return idsSchema.parse(rows).map((row) => row.id);
}

export const kilnIdsFor = (studioId: string, userId: string, tx?: Tx) =>
  ids(KILNS_FOR_PERSON, studioId, userId, tx);
export const thermocoupleIdsFor = (studioId: string, userId: string, tx?: Tx) =>
  ids(THERMOCOUPLES_FOR_PERSON, studioId, userId, tx);
export const furnaceIdsFor = (studioId: string, userId: string, tx?: Tx) =>
  ids(FURNACES_FOR_PERSON, studioId, userId, tx);
