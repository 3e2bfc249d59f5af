import { routes } from '~/lib/contracts';
import { admit } from '~/lib/server/auth/visitor';
import { methodNotAllowed, publicEndpoint } from '~/lib/server/http/endpoint';
import { setUp } from '~/lib/server/services/setup';

export const POST = publicEndpoint(routes.auth.setUp, async ({ body, context }) => {
  const { sessionId, me } = await setUp(body, context.request.headers.get('user-agent'));
  await admit(context, sessionId, me.user.id);
  return me;
});
export const ALL = methodNotAllowed({ POST });
