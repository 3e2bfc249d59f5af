import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createKiln, listKilns } from '~/lib/server/services/kilns';

export const GET = endpoint(routes.kilns.list, ({ actor, query }) => listKilns(actor, query));
export const POST = endpoint(routes.kilns.create, ({ actor, body }) => createKiln(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
