import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getKiln, updateKiln } from '~/lib/server/services/kilns';

export const GET = endpoint(routes.kilns.get, ({ actor, params }) => getKiln(actor, params.id));
export const PATCH = endpoint(routes.kilns.update, ({ actor, params, revision, body }) =>
  updateKiln(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
