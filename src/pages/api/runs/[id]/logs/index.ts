import { routes } from '~/lib/contracts';
import { config } from '~/lib/server/config';
import { Answer, endpoint, methodNotAllowed } from '~/lib/server/http/endpoint';
import { receiveFile } from '~/lib/server/http/multipart';
import { importLog } from '~/lib/server/services/log-import';

export const POST = endpoint(routes.logs.upload, async ({ actor, params, context }) => {
  const { log, created } = await importLog(actor, params.id, (take) =>
    receiveFile(context.request, config().maxUploadBytes, take),
  );
  return new Answer(log, created ? 201 : 200);
});
export const ALL = methodNotAllowed({ POST });
