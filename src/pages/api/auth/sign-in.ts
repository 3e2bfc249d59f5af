import { routes } from '~/lib/contracts';
import { admit, visitorOf } from '~/lib/server/auth/visitor';
import { methodNotAllowed, publicEndpoint } from '~/lib/server/http/endpoint';
import { signIn } from '~/lib/server/services/accounts';

export const POST = publicEndpoint(routes.auth.signIn, async ({ body, context }) => {
  const { sessionId, me } = await signIn(body.email, body.password, visitorOf(context));
  await admit(context, sessionId, me.user.id);
  return me;
});
export const ALL = methodNotAllowed({ POST });
