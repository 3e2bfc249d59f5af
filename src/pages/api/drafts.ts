import { routes } from '~/lib/contracts';
import { endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { draftProfile } from '~/lib/server/services/drafts';

export const POST = endpoint(routes.drafts.draft, ({ actor, body }) => draftProfile(actor, body));
export const ALL = methodNotAllowed({ POST });
