import { routes } from '~/lib/contracts';
import { Answer, endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { answerQuestions } from '~/lib/server/services/log-import';

export const POST = endpoint(routes.logs.answer, async ({ actor, params, body }) => {
  const { log, created } = await answerQuestions(actor, params.id, params.logId, body.mapping);
  return new Answer(log, created ? 201 : 200);
});
export const ALL = methodNotAllowed({ POST });
