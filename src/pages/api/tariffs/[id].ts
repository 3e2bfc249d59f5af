import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getTariff, updateTariff } from '~/lib/server/services/tariffs';

export const GET = endpoint(routes.tariffs.get, ({ actor, params }) => getTariff(actor, params.id));
export const PATCH = endpoint(routes.tariffs.update, ({ actor, params, revision, body }) =>
  updateTariff(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
