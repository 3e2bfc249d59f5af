import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { versionNumber } from '~/lib/server/services/version-access';
import { retireVersion } from '~/lib/server/services/version-review';

export const POST = endpoint(routes.profiles.retire, ({ actor, params, body }) =>
  retireVersion(actor, params.id, versionNumber(params.n), body),
);
export const ALL = methodNotAllowed({ POST });
