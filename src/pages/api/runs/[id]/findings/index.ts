import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { addFinding, listFindings } from '~/lib/server/services/findings';

export const GET = endpoint(routes.findings.list, ({ actor, params, query }) =>
  listFindings(actor, params.id, query),
);
export const POST = endpoint(routes.findings.create, ({ actor, params, body }) =>
  addFinding(actor, params.id, body, new Date()),
);
export const ALL = methodNotAllowed({ GET, POST });
