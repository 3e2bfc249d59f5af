import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { getThermocouple, updateThermocouple } from '~/lib/server/services/thermocouples';

export const GET = endpoint(routes.thermocouples.get, ({ actor, params }) =>
  getThermocouple(actor, params.id),
);
export const PATCH = endpoint(routes.thermocouples.update, ({ actor, params, revision, body }) =>
  updateThermocouple(actor, params.id, revision, body),
);
export const ALL = methodNotAllowed({ GET, PATCH });
