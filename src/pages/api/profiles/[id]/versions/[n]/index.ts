import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { versionNumber } from '~/lib/server/services/version-access';
import { getVersion, saveDraft } from '~/lib/server/services/versions';

export const GET = endpoint(routes.profiles.getVersion, ({ actor, params }) =>
  getVersion(actor, params.id, versionNumber(params.n)),
);
export const PUT = endpoint(routes.profiles.putVersion, ({ actor, params, revision, body }) =>
  saveDraft(actor, params.id, versionNumber(params.n), revision, body),
);
export const ALL = methodNotAllowed({ GET, PUT });
