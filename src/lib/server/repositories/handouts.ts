import { QueryTypes } from 'sequelize';
import { handoutSchema, type Handout } from '~/lib/contracts/classes';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { HandoutAcknowledgementRow, HandoutPersonRow, HandoutRow } from '../models/handout';
import { instantOf, likeAnywhere } from './row';

/** A handout without the state, which depends on the moment it is looked at. */
export type HandoutRecord = Omit<Handout, 'state'>;
const recordSchema = handoutSchema.omit({ state: true });

/** Named one by one, or in the class now. */
const isFor = (userId: string) => `(
  exists (select 1 from handout_people hp
    where hp.studio_id = h.studio_id and hp.handout_id = h.id and hp.user_id = ${userId})
  or exists (select 1 from class_members cm
    where cm.studio_id = h.studio_id and cm.class_id = h.class_id and cm.user_id = ${userId}))`;

/** Everything the API shows of a handout, in one statement a page. $onlyUserId: a reader's view, in which nobody else is named. */
const SELECT = `
  select h.id, json_build_object('id', p.id, 'name', p.name) as profile,
    json_build_object('id', v.id, 'number', v.number, 'state', s.state, 'profile', v.profile, 'load', v.load,
      'sha256', v.sha256) as version,
    json_build_object('id', k.id, 'name', k.name) as kiln,
    case when c.id is null then null else json_build_object('id', c.id, 'name', c.name) end as class,
    (select coalesce(json_agg(json_build_object('id', u.id, 'name', u.name, 'acknowledgedAt', ${instantOf('a.at')})
        order by lower(u.name), u.id), '[]')
      from memberships m join users u on u.id = m.user_id
      left join handout_acknowledgements a
        on a.studio_id = h.studio_id and a.handout_id = h.id and a.user_id = m.user_id
      where m.studio_id = h.studio_id and m.ended_at is null
        and ($onlyUserId::uuid is null or m.user_id = $onlyUserId::uuid) and ${isFor('m.user_id')}) as people,
    ${instantOf('h.from_at')} as "fromAt", ${instantOf('h.until_at')} as "untilAt", h.note,
    json_build_object('id', b.id, 'name', b.name) as "handedOutBy", ${instantOf('h.created_at')} as "createdAt",
    ${instantOf('h.withdrawn_at')} as "withdrawnAt", h.withdrawn_reason as "withdrawnReason", h.cautions
  from handouts h
  join profile_versions v on v.studio_id = h.studio_id and v.id = h.profile_version_id
  join version_states s on s.studio_id = v.studio_id and s.version_id = v.id
  join profiles p on p.studio_id = v.studio_id and p.id = v.profile_id
  join kilns k on k.studio_id = h.studio_id and k.id = h.kiln_id
  join users b on b.id = h.handed_out_by_id
  left join classes c on c.studio_id = h.studio_id and c.id = h.class_id
  where h.studio_id = $studioId and ($onlyUserId::uuid is null or ${isFor('$onlyUserId::uuid')})`;

export interface HandoutFilter {
  readonly studioId: string;
  /** Only the handouts that are for this person, as they see them; null: all. */
  readonly onlyUserId: string | null;
  readonly limit: number;
  readonly after: { readonly createdAt: string; readonly id: string } | null;
  readonly q?: string | undefined;
}

/** Handouts, the newest first. */
export async function listHandouts(filter: HandoutFilter): Promise<HandoutRecord[]> {
  const { after, q, ...bind } = filter;
  const where = [
    q && '(p.name ilike $like or k.name ilike $like or c.name ilike $like)',
    after && '(h.created_at, h.id) < ($createdAt::timestamptz, $afterId::uuid)',
  ].filter(Boolean);
  const rows = await database().query(
    `${[SELECT, ...where].join(' and ')} order by h.created_at desc, h.id desc limit $limit`,
    {
      type: QueryTypes.SELECT,
      bind: {
        ...bind,
        ...(q ? { like: likeAnywhere(q) } : {}),
        ...(after ? { createdAt: after.createdAt, afterId: after.id } : {}),
      },
    },
  );
  return rows.map((row) => recordSchema.parse(row));
}

export async function findHandout(
  studioId: string,
  onlyUserId: string | null,
  id: string,
  tx?: Tx,
): Promise<HandoutRecord | null> {
  const rows = await database().query(`${SELECT} and h.id = $id`, {
    type: QueryTypes.SELECT,
    bind: { studioId, onlyUserId, id },
    ...(tx ? { transaction: tx } : {}),
  });
  return rows[0] ? recordSchema.parse(rows[0]) : null;
}

/** Holds a handout until the transaction ends. */
export async function lockHandout(
  studioId: string,
  onlyUserId: string | null,
  id: string,
  tx: Tx,
): Promise<HandoutRecord | null> {
  const row = await HandoutRow.findOne({
    attributes: ['id'],
    where: { studioId, id },
    transaction: tx,
    lock: tx.LOCK.NO_KEY_UPDATE,
  });
  return row ? findHandout(studioId, onlyUserId, id, tx) : null;
}

export interface NewHandout {
  readonly studioId: string;
  readonly id: string;
  readonly profileVersionId: string;
  readonly kilnId: string;
  readonly classId: string | null;
  readonly fromAt: Date;
  readonly untilAt: Date;
  readonly note: string;
  readonly cautions: Handout['cautions'];
  readonly handedOutById: string;
  readonly createdAt: Date;
  readonly personIds: readonly string[];
}

export async function insertHandout(handout: NewHandout, tx: Tx): Promise<void> {
  const { personIds, ...row } = handout;
  const { studioId, id: handoutId } = handout;
  await HandoutRow.create(row, { transaction: tx });
  await HandoutPersonRow.bulkCreate(
    [...new Set(personIds)].map((userId) => ({ studioId, handoutId, userId })),
    { transaction: tx, validate: true },
  );
}

/** Keeps that somebody read the cautions; the first time counts. */
export async function insertAcknowledgement(
  acknowledgement: {
    readonly studioId: string;
    readonly handoutId: string;
    readonly userId: string;
    readonly cautions: number;
    readonly at: Date;
  },
  tx: Tx,
): Promise<void> {
  await HandoutAcknowledgementRow.bulkCreate([acknowledgement], {
    transaction: tx,
    validate: true,
    ignoreDuplicates: true,
  });
}

/** The caller holds the handout. */
export async function writeWithdrawal(
  studioId: string,
  id: string,
  withdrawal: {
    readonly withdrawnAt: Date;
    readonly withdrawnReason: string;
    readonly withdrawnById: string;
  },
  tx: Tx,
): Promise<void> {
  await HandoutRow.update(withdrawal, { where: { studioId, id }, transaction: tx });
}

const offerSchema = z.strictObject({
  id: z.guid(),
  kilnId: z.guid(),
  fromAt: z.date(),
  untilAt: z.date(),
  acknowledged: z.boolean(),
});
/** A handout of one version to one person, as far as a run needs to know. */
export type Offer = z.infer<typeof offerSchema>;

/** What stands of one version for one person, the newest first. */
export async function listOffers(
  studioId: string,
  userId: string,
  versionId: string,
  tx?: Tx,
): Promise<Offer[]> {
  const rows = await database().query(
    `select h.id, h.kiln_id as "kilnId", h.from_at as "fromAt", h.until_at as "untilAt",
       exists (select 1 from handout_acknowledgements a
         where a.studio_id = h.studio_id and a.handout_id = h.id and a.user_id = $userId::uuid) as acknowledged
     from handouts h
     where h.studio_id = $studioId and h.profile_version_id = $versionId and h.withdrawn_at is null
       and ${isFor('$userId::uuid')}
     order by h.created_at desc, h.id`,
    {
      type: QueryTypes.SELECT,
      bind: { studioId, userId, versionId },
      ...(tx ? { transaction: tx } : {}),
    },
  );
  return rows.map((row) => offerSchema.parse(row));
}
