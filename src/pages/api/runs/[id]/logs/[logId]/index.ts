import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { alignLog, getLog } from '~/lib/server/services/logs';

export const GET = endpoint(routes.logs.get, ({ actor, params }) => getLog(actor, params.id, params.logId));
export const PATCH = endpoint(routes.logs.align, ({ actor, params, revision, body }) =>
  alignLog(actor, params.id, params.logId, revision, body.alignment),
);
export const ALL = methodNotAllowed({ GET, PATCH });
