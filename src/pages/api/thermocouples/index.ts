import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { createThermocouple, listThermocouples } from '~/lib/server/services/thermocouples';

export const GET = endpoint(routes.thermocouples.list, ({ actor, query }) => listThermocouples(actor, query));
export const POST = endpoint(routes.thermocouples.create, ({ actor, body }) =>
  createThermocouple(actor, body),
);
export const ALL = methodNotAllowed({ GET, POST });
