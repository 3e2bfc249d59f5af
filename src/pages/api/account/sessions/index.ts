import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { ownSessions } from '~/lib/server/services/sessions';

export const GET = endpoint(routes.auth.sessions, async ({ actor }) => ({
  items: await ownSessions(actor),
  nextCursor: null,
}));
export const ALL = methodNotAllowed({ GET });
