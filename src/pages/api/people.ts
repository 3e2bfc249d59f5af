import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { peopleOfStudio } from '~/lib/server/services/people';

export const GET = endpoint(routes.people.list, ({ actor, query }) => peopleOfStudio(actor, query));
export const ALL = methodNotAllowed({ GET });
