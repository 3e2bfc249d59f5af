import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createClass, listClasses } from '~/lib/server/services/classes';

export const GET = endpoint(routes.classes.list, ({ actor, query }) => listClasses(actor, query));
export const POST = endpoint(routes.classes.create, ({ actor, body }) => createClass(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
