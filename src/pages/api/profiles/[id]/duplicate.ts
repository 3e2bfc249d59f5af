import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { duplicateProfile } from '~/lib/server/services/profiles';

export const POST = endpoint(routes.profiles.duplicate, ({ actor, params, body }) =>
  duplicateProfile(actor, params.id, body),
);
export const ALL = methodNotAllowed({ POST });
