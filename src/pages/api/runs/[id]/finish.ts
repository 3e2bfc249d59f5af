import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { finishRun } from '~/lib/server/services/runs';

export const POST = endpoint(routes.runs.finish, ({ actor, params, body }) =>
  finishRun(actor, params.id, body, new Date()),
);
export const ALL = methodNotAllowed({ POST });
