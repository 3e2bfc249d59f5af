import { BaseError, ConnectionError } from 'sequelize';
import { HoldfastError } from '../errors';
import { log } from '../log';

/** Every error as one that may be told: an expected refusal as it is, anything else logged and named without detail. */
export function tellable(error: unknown, requestId: string): HoldfastError {
  if (error instanceof HoldfastError) {
    if (error.status >= 500) log().error({ requestId, err: loggable(error) }, error.message);
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
  log().error({ requestId, err: loggable(error) }, 'a request failed');
  return new HoldfastError(
    'internal',
    `Something failed on our side. Nothing was half done. Quote ${requestId} when you report it.`,
  );
}

/**
 * An error as it may stand in a log. One of the database carries the statement and every value in it, people's addresses
 * and hashes among them, and may quote them in its message: only what went wrong and where is kept.
 */
export function loggable(error: unknown): unknown {
  if (!(error instanceof BaseError)) return error;
  const { code, table, constraint } = ('parent' in error ? error.parent : {}) as Record<string, unknown>;
  return { type: error.name, code, table, constraint, stack: error.stack };
}
