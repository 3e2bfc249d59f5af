import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { estimateFiring } from '~/lib/server/services/estimates';

export const POST = endpoint(routes.estimates.estimate, ({ actor, body, query }) =>
  estimateFiring(actor, body, query),
);
export const ALL = methodNotAllowed({ POST });
