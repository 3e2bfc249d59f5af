import { Op, QueryTypes } from 'sequelize';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';
import { ThrottleModel } from '../models/throttle';

/** How a bucket slows down: so many failures are free, then each doubles the wait, up to a longest one. */
export interface Pace {
  readonly freeFailures: number;
  readonly longestWaitS: number;
  /** Failures are forgotten after this long without another. */
  readonly forgetAfterS: number;
}

/**
 * Counts one attempt as failed before it is made, so that attempts made at once cannot outrun the count. Gives the
 * seconds still to wait, and counts nothing, where the bucket is closed; else 0.
 */
export async function reserveAttempt(tx: Tx, key: string, pace: Pace): Promise<number> {
  const taken = await database().query(
    `insert into throttles as t (key, failures, last_failure_at, opens_at)
     values ($key, 1, clock_timestamp(), clock_timestamp())
     on conflict (key) do update set
       failures = case when t.last_failure_at < clock_timestamp() - make_interval(secs => $forget)
                       then 1 else t.failures + 1 end,
       last_failure_at = clock_timestamp(),
       opens_at = clock_timestamp() + case
         when t.last_failure_at < clock_timestamp() - make_interval(secs => $forget) or t.failures < $free
         then interval '0' else make_interval(secs => least($longest, power(2, least(t.failures - $free, 20)))) end
       where t.opens_at <= clock_timestamp()
     returning 1`,
    {
      bind: { key, forget: pace.forgetAfterS, free: pace.freeFailures, longest: pace.longestWaitS },
      type: QueryTypes.SELECT,
      transaction: tx,
    },
  );
  if (taken.length > 0) return 0;
  const rows = await database().query(
    `select greatest(1, ceil(extract(epoch from opens_at - clock_timestamp())))::int as wait_s
       from throttles where key = $key`,
    { bind: { key }, type: QueryTypes.SELECT, transaction: tx },
  );
  return z.object({ wait_s: z.number() }).parse(rows[0] ?? { wait_s: 1 }).wait_s;
}

/** Takes back one reserved attempt that did not fail. */
export async function returnAttempt(tx: Tx, key: string): Promise<void> {
  await database().query(
    `update throttles set failures = greatest(0, failures - 1), opens_at = clock_timestamp() where key = $key`,
    { bind: { key }, transaction: tx },
  );
}

export const forgetFailures = (tx: Tx, key: string): Promise<number> =>
  ThrottleModel.destroy({ where: { key }, transaction: tx });

export const deleteThrottlesBefore = (tx: Tx, before: Date): Promise<number> =>
  ThrottleModel.destroy({ where: { lastFailureAt: { [Op.lt]: before } }, transaction: tx });
