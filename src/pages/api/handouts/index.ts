import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createHandout, listHandouts } from '~/lib/server/services/handouts';

export const GET = endpoint(routes.handouts.list, ({ actor, query }) => listHandouts(actor, query));
export const POST = endpoint(routes.handouts.create, ({ actor, body }) => createHandout(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
