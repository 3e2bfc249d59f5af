import type { APIContext, APIRoute } from 'astro';
import { bodyMayBeLeftOut, type Method, type ParamsOf, type Route } from '~/lib/contracts/route';
import type { z } from '~/lib/zod';
import type { Actor } from '../auth/actor';
import { HoldfastError } from '../errors';
import { isStorable, readJson } from './json-body';
import { issuesOf, problemResponse } from './problem';

type Parsed<S> = S extends z.ZodType ? z.output<S> : undefined;

export interface Call<R extends Route> {
  readonly actor: Actor;
  readonly params: ParamsOf<R['path']>;
  readonly query: Parsed<R['query']>;
  readonly body: Parsed<R['body']>;
  /** The revision named in `If-Match`; 0 where the call needs none. */
  readonly revision: number;
  readonly context: APIContext;
}

export type PublicCall<R extends Route> = Omit<Call<R>, 'actor'> & { readonly actor: Actor | null };

/** What a service may answer with in place of plain data: another status than the route's usual one. */
export class Answer<T> {
  constructor(
    readonly data: T,
    readonly status: number,
    readonly headers: Readonly<Record<string, string>> = {},
  ) {}
}

type Act<C, R extends Route> = (call: C) => Promise<z.input<R['response']> | Answer<z.input<R['response']>>>;

/** Parses by the route, calls the service, answers by the route. The session is required. */
export function endpoint<R extends Route>(route: R, act: Act<Call<R>, R>): APIRoute {
  return publicEndpoint(route, (call) => {
    if (!call.actor) throw new HoldfastError('not-signed-in', 'Sign in to go on.');
    return act(call as Call<R>);
  });
}

/** As `endpoint`, for the few calls that need no session. */
export function publicEndpoint<R extends Route>(route: R, act: Act<PublicCall<R>, R>): APIRoute {
  return async (context) => {
    const call = {
      actor: context.locals.actor ?? null,
      params: context.params as ParamsOf<R['path']>,
      query: parse(route.query, queryOf(context.url), 'query') as Parsed<R['query']>,
      body: (await bodyOf(route, context.request)) as Parsed<R['body']>,
      revision: route.revision ? revisionOf(context.request) : 0,
      context,
    };
    const result = await act(call);
    const answer = result instanceof Answer ? result : new Answer(result, route.status);
    return json(route.response.parse(answer.data), answer.status, answer.headers);
  };
}

/** The body by its schema; an action whose schema asks for nothing may come without one. */
async function bodyOf(route: Route, request: Request): Promise<unknown> {
  if (!route.body) return undefined;
  return parse(route.body, await readJson(request, bodyMayBeLeftOut(route)), 'body');
}

function queryOf(url: URL): Record<string, string> {
  const query = Object.fromEntries(url.searchParams);
  if (!Object.values(query).every(isStorable))
    throw new HoldfastError('malformed', 'The query holds a NUL. Leave it out.');
  return query;
}

function parse(schema: z.ZodType | undefined, value: unknown, where: 'query' | 'body'): unknown {
  if (!schema) return undefined;
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  const issues = issuesOf(result.error);
  const first = issues[0];
  const found = first ? `${first.path || where}: ${first.message}` : where;
  throw new HoldfastError('not-valid', `The ${where} is not valid. ${found}.`, { errors: issues });
}

/** The number in `If-Match: "7"`. */
function revisionOf(request: Request): number {
  const header = request.headers.get('if-match');
  if (header === null)
    throw new HoldfastError('revision-missing', 'Send the revision you are changing as If-Match: "number".');
  const match = /^\s*"(\d{1,9})"\s*$/.exec(header);
  if (!match)
    throw new HoldfastError(
      'malformed',
      `If-Match holds '${header.slice(0, 40)}'; expected one quoted revision number.`,
    );
  return Number(match[1]);
}

/** A JSON answer; a body with a `revision` carries it as its ETag too. */
export function json(data: unknown, status = 200, headers: Readonly<Record<string, string>> = {}): Response {
  const revision =
    typeof data === 'object' && data !== null && 'revision' in data ? data.revision : undefined;
  return new Response(JSON.stringify(data), {
    status,
    headers: {
      'content-type': 'application/json',
      'cache-control': 'no-store',
      ...(typeof revision === 'number' ? { etag: `"${revision}"` } : {}),
      ...headers,
    },
  });
}

/**
 * Exported as `ALL` beside the methods of a file: HEAD is GET without the body, any other method is refused as a problem,
 * not as a page.
 */
export function methodNotAllowed(offered: Readonly<Partial<Record<Method, APIRoute>>>): APIRoute {
  const allowed = Object.keys(offered);
  return async (context) => {
    const { request } = context;
    if (request.method === 'HEAD' && offered.GET) return withoutBody(await offered.GET(context));
    const response = problemResponse(
      new HoldfastError(
        'method-not-allowed',
        `${request.method} is not offered here; ${allowed.join(', ')} ${allowed.length > 1 ? 'are' : 'is'}.`,
      ),
    );
    response.headers.set('allow', allowed.join(', '));
    return response;
  };
}

async function withoutBody(answer: Response): Promise<Response> {
  await answer.body?.cancel();
  return new Response(null, answer);
}
