import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getProfile, updateProfile } from '~/lib/server/services/profiles';

export const GET = endpoint(routes.profiles.get, ({ actor, params }) => getProfile(actor, params.id));
export const PATCH = endpoint(routes.profiles.update, ({ actor, params, revision, body }) =>
  updateProfile(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
