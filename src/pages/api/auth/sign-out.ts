import { routes } from '~/lib/contracts';
import { clearSession } from '~/lib/server/auth/session-cookie';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { endSession } from '~/lib/server/services/sessions';

export const POST = endpoint(routes.auth.signOut, async ({ actor, context }) => {
  await endSession(actor, actor.sessionId);
  clearSession(context.cookies);
  return {};
});
export const ALL = methodNotAllowed({ POST });
