import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { meOf } from '~/lib/server/services/accounts';

export const GET = endpoint(routes.auth.me, ({ actor }) => meOf(actor.sessionId));
export const ALL = methodNotAllowed({ GET });
