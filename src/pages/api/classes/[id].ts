import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getClass, updateClass } from '~/lib/server/services/classes';

export const GET = endpoint(routes.classes.get, ({ actor, params }) => getClass(actor, params.id));
export const PATCH = endpoint(routes.classes.update, ({ actor, params, revision, body }) =>
  updateClass(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
