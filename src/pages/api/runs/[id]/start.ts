import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { startRun } from '~/lib/server/services/runs';

export const POST = endpoint(routes.runs.start, ({ actor, params, body }) =>
  startRun(actor, params.id, body, new Date()),
);
export const ALL = methodNotAllowed({ POST });
