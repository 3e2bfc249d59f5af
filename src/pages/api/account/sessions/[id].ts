import { routes } from '~/lib/contracts';
import { clearSession } from '~/lib/server/auth/session-cookie';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { requireId } from '~/lib/server/http/ids';
import { endSession } from '~/lib/server/services/sessions';

export const DELETE = endpoint(routes.auth.endSession, async ({ actor, params, context }) => {
  await endSession(actor, requireId(params.id, 'session'));
  if (params.id === actor.sessionId) clearSession(context.cookies);
  return {};
});
export const ALL = methodNotAllowed({ DELETE });
