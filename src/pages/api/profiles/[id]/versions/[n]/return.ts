import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { versionNumber } from '~/lib/server/services/version-access';
import { returnVersion } from '~/lib/server/services/version-review';

export const POST = endpoint(routes.profiles.return, ({ actor, params, body }) =>
  returnVersion(actor, params.id, versionNumber(params.n), body),
);
export const ALL = methodNotAllowed({ POST });
