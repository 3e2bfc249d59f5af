import { ConnectionError } from 'sequelize';
import { HoldfastError } from '../errors';
import { log } from '../log';

/** Every error as one that may be told: an expected refusal as it is, anything else logged and named without detail. */
export function tellable(error: unknown, requestId: string): HoldfastError {
  if (error instanceof HoldfastError) {
    if (error.status >= 500) log().error({ requestId, err: error }, error.message);
    return error;
  }
  if (error instanceof ConnectionError) {
    log().error({ requestId, reason: error.message }, 'the database is away');
    return new HoldfastError(
      'unavailable',
      'The database cannot be reached at the moment. Try again shortly.',
      {
        retryAfterS: 5,
      },
    );
  }
  log().error({ requestId, err: error }, 'a request failed');
  return new HoldfastError(
    'internal',
    `Something failed on our side. Nothing was half done. Quote ${requestId} when you report it.`,
  );
}
