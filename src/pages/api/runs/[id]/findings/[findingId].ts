import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { decideFinding } from '~/lib/server/services/findings';

export const PATCH = endpoint(routes.findings.update, ({ actor, params, revision, body }) =>
  decideFinding(actor, params.id, params.findingId, revision, body, new Date()),
);
export const ALL = methodNotAllowed({ PATCH });
