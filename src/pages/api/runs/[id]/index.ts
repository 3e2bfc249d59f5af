import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getRun, updateRun } from '~/lib/server/services/runs';

export const GET = endpoint(routes.runs.get, ({ actor, params }) => getRun(actor, params.id));
export const PATCH = endpoint(routes.runs.update, ({ actor, params, revision, body }) =>
  updateRun(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
