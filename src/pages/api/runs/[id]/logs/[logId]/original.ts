import type { APIRoute } from 'astro';
import { HoldfastError } from '~/lib/server/errors';
import { methodNotAllowed } from '~/lib/server/http/endpoint';
import { originalOf } from '~/lib/server/services/logs';

/** The file as it came, always as a download and never as something a browser would run. */
export const GET: APIRoute = async ({ locals, params }) => {
  if (!locals.actor) throw new HoldfastError('not-signed-in', 'Sign in to go on.');
  const original = await originalOf(locals.actor, params['id'] ?? '', params['logId'] ?? '');
  return new Response(original.stream, {
    headers: {
      'content-type': 'application/octet-stream',
      'content-length': String(original.bytes),
      'content-disposition': `attachment; filename*=UTF-8''${encodeURIComponent(original.fileName)}`,
      'x-content-type-options': 'nosniff',
      'cache-control': 'no-store',
    },
  });
};
export const ALL = methodNotAllowed({ GET });
