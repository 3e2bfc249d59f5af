import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createTariff, listTariffs } from '~/lib/server/services/tariffs';

export const GET = endpoint(routes.tariffs.list, ({ actor, query }) => listTariffs(actor, query));
export const POST = endpoint(routes.tariffs.create, ({ actor, body }) => createTariff(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
