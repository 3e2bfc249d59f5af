import { HoldfastError } from '~/lib/server/errors';
import type { APIRoute } from 'astro';

/** Whatever no endpoint of the API answers: a problem, never a page. The access table lists no rule for it. */
export const ALL: APIRoute = () => {
  throw new HoldfastError('not-found', 'There is nothing at this address.');
};
