import { config } from '../config';
import { HoldfastError } from '../errors';

/** Connections that stay free for everybody else while logs stream in. */
const KEPT_FREE = 3;
const RETRY_AFTER_S = 15;

let taken = 0;

/**
 * Does the work of one upload, which holds a database connection for as long as its bytes take to come. Of the pool some
 * connections always stay free: what comes beyond is asked to come again, so that slow senders cannot stop the others' work.
 */
export async function withUploadSlot<T>(work: () => Promise<T>): Promise<T> {
  const most = Math.max(1, config().databaseConnections - KEPT_FREE);
  if (taken >= most)
    throw new HoldfastError(
      'too-many',
      `${taken} logs are being sent at this moment, as many as are taken at once. Send this one again in ${RETRY_AFTER_S} s.`,
      { retryAfterS: RETRY_AFTER_S },
    );
  taken++;
  try {
    return await work();
  } finally {
    taken--;
  }
}
