import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { setFigures } from '~/lib/server/services/studio-figures';

export const POST = endpoint(routes.materials.setFigures, ({ actor, params, body }) =>
  setFigures(actor, params.kind, params.id, body),
);
export const ALL = methodNotAllowed({ POST });
