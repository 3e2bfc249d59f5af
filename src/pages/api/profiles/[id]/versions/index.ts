import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createVersion } from '~/lib/server/services/versions';

export const POST = endpoint(routes.profiles.createVersion, ({ actor, params, body }) =>
  createVersion(actor, params.id, body),
);
export const ALL = methodNotAllowed({ POST });
