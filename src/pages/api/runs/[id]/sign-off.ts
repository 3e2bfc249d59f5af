import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { signOffRun } from '~/lib/server/services/runs';

export const POST = endpoint(routes.runs.signOff, ({ actor, params, body }) =>
  signOffRun(actor, params.id, body.remark, new Date()),
);
export const ALL = methodNotAllowed({ POST });
