import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getSeries } from '~/lib/server/services/series';

export const GET = endpoint(routes.review.series, ({ actor, params, query }) =>
  getSeries(actor, params.id, query),
);
export const ALL = methodNotAllowed({ GET });
