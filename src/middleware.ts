import type { APIContext, MiddlewareNext } from 'astro';
import { defineMiddleware } from 'astro:middleware';
import { randomUUID } from 'node:crypto';
import { isOpen, judge, ruleOf } from '~/lib/server/auth/access';
import { requireOwnOrigin, siteOrigin } from '~/lib/server/auth/origin';
import { clearSession, readSessionId } from '~/lib/server/auth/session-cookie';
import { HoldfastError, PROBLEMS } from '~/lib/server/errors';
import { tellable } from '~/lib/server/http/failure';
import { problemResponse } from '~/lib/server/http/problem';
import { setSecurityHeaders } from '~/lib/server/http/security-headers';
import { log } from '~/lib/server/log';
import { resolveSession } from '~/lib/server/services/sessions';

/** Every request goes through here: an id, the origin, the session, the access table, the answer or its failure. */
export const onRequest = defineMiddleware(async (context, next) => {
  // An error page being drawn for a request that came through here already.
  if (context.locals.requestId) return next();
  const startedMs = performance.now();
  context.locals.requestId = randomUUID();
  context.locals.actor = null;
  context.locals.me = null;
  context.locals.problem = null;
  const response = await answer(context, next);
  setSecurityHeaders(response.headers);
  response.headers.set('x-request-id', context.locals.requestId);
  log().info(
    {
      requestId: context.locals.requestId,
      method: context.request.method,
      route: context.routePattern,
      status: response.status,
      ms: Math.round(performance.now() - startedMs),
    },
    'request',
  );
  return response;
});

async function answer(context: APIContext, next: MiddlewareNext): Promise<Response> {
  try {
    requireOwnOrigin(context.request, siteOrigin(context.request));
    if (!needsNobody(context)) await signInFromCookie(context);
    const refusal = refuse(context);
    return refusal ?? (await next());
  } catch (error) {
    return fail(context, tellable(error, context.locals.requestId));
  }
}

const isApi = (context: APIContext): boolean => context.url.pathname.startsWith('/api/');

/** Answers that must not wait for the database, such as health. */
const needsNobody = (context: APIContext): boolean => isApi(context) && isOpen(ruleOf(context.routePattern));

async function signInFromCookie(context: APIContext): Promise<void> {
  const id = await readSessionId(context.cookies);
  if (!id) return;
  const session = await resolveSession(id);
  if (!session) return clearSession(context.cookies);
  context.locals.actor = session.actor;
  context.locals.me = session.me;
}

/** What the access table says against the request, as an answer; undefined where it may go on. */
function refuse(context: APIContext): Response | undefined {
  const { method } = context.request;
  switch (judge(context.routePattern, method, context.locals.actor?.roles ?? null)) {
    case 'allowed':
      return undefined;
    case 'wrong-method':
      // The endpoint itself says which methods it has.
      if (isApi(context)) return undefined;
      throw new HoldfastError('method-not-allowed', `${method} is not offered here; GET and POST are.`);
    case 'sign-in-first':
      if (isApi(context)) throw new HoldfastError('not-signed-in', 'Sign in to go on.');
      return context.redirect(
        `/sign-in?next=${encodeURIComponent(context.url.pathname + context.url.search)}`,
      );
    case 'wrong-role':
      throw new HoldfastError('not-allowed', 'None of your roles in this studio allows this.');
    case 'unlisted':
      throw new HoldfastError('not-found', 'There is nothing at this address.');
  }
}

/** A failure as problem details for a program, as a page for a person. */
async function fail(context: APIContext, error: HoldfastError): Promise<Response> {
  if (isApi(context)) return problemResponse(error);
  const [status, title] = PROBLEMS[error.code];
  context.locals.problem = { status, title, detail: error.message };
  const page = await context.rewrite(status >= 500 ? '/500' : '/404');
  // The framework gives these two pages their own status, whatever the failure was.
  const headers = new Headers(page.headers);
  headers.delete('x-astro-reroute');
  return new Response(page.body, { status, headers });
}
