import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getFurnace, updateFurnace } from '~/lib/server/services/furnaces';

export const GET = endpoint(routes.furnaces.get, ({ actor, params }) => getFurnace(actor, params.id));
export const PATCH = endpoint(routes.furnaces.update, ({ actor, params, revision, body }) =>
  updateFurnace(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
