import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createProfile, listProfiles } from '~/lib/server/services/profiles';

export const GET = endpoint(routes.profiles.list, ({ actor, query }) => listProfiles(actor, query));
export const POST = endpoint(routes.profiles.create, ({ actor, body }) => createProfile(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
