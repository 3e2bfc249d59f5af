import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { acknowledgeHandout } from '~/lib/server/services/handouts';

export const POST = endpoint(routes.handouts.acknowledge, ({ actor, params, body }) =>
  acknowledgeHandout(actor, params.id, body.cautions),
);
export const ALL = methodNotAllowed({ POST });
