import { routes } from '~/lib/contracts';
import { materials } from '~/lib/materials';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';

export const GET = endpoint(routes.materials.list, () => Promise.resolve(materials));
export const ALL = methodNotAllowed({ GET });
