import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { withdrawHandout } from '~/lib/server/services/handouts';

export const POST = endpoint(routes.handouts.withdraw, ({ actor, params, body }) =>
  withdrawHandout(actor, params.id, body.reason),
);
export const ALL = methodNotAllowed({ POST });
