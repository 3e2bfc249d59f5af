import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getHandout } from '~/lib/server/services/handouts';

export const GET = endpoint(routes.handouts.get, ({ actor, params }) => getHandout(actor, params.id));
export const ALL = methodNotAllowed({ GET });
