import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createRun, listRuns } from '~/lib/server/services/runs';

export const GET = endpoint(routes.runs.list, ({ actor, query }) => listRuns(actor, query));
export const POST = endpoint(routes.runs.create, ({ actor, body }) => createRun(actor, body));
export const ALL = methodNotAllowed({ GET, POST });
