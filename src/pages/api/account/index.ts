import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { updateAccount } from '~/lib/server/services/accounts';

export const PATCH = endpoint(routes.auth.updateAccount, ({ actor, body }) => updateAccount(actor, body));
export const ALL = methodNotAllowed({ PATCH });
