import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { materialsFor } from '~/lib/server/services/studio-figures';

export const GET = endpoint(routes.materials.list, ({ actor }) => materialsFor(actor));
export const ALL = methodNotAllowed({ GET });
