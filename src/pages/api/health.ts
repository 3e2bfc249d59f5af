import { routes } from '~/lib/contracts';
import { Answer, methodNotAllowed, publicEndpoint } from '~/lib/server/http/endpoint';
import { health } from '~/lib/server/services/health';

export const GET = publicEndpoint(routes.site.health, async () => {
  const state = await health();
  return state.status === 'ok' ? state : new Answer(state, 503, { 'retry-after': '5' });
});
export const ALL = methodNotAllowed({ GET });
