import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { abandonRun } from '~/lib/server/services/runs';

export const POST = endpoint(routes.runs.abandon, ({ actor, params, body }) =>
  abandonRun(actor, params.id, body.reason),
);
export const ALL = methodNotAllowed({ POST });
