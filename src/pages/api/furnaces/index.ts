import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createFurnace, listFurnaces } from '~/lib/server/services/furnaces';

export const GET = endpoint(routes.furnaces.list, ({ actor, query }) => listFurnaces(actor, query));
export const POST = endpoint(routes.furnaces.create, ({ actor, body }) => createFurnace(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
