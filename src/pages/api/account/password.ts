import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { changePassword } from '~/lib/server/services/accounts';

export const POST = endpoint(routes.auth.changePassword, async ({ actor, body, context }) => {
  await changePassword(actor, body.currentPassword, body.newPassword, context.clientAddress);
  return {};
});
export const ALL = methodNotAllowed({ POST });
