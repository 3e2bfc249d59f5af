import { problemSchema, type Problem } from '~/lib/contracts/common';
import type { ParamsOf, Route } from '~/lib/contracts/route';
import type { z } from '~/lib/zod';

/** The server answered with a problem. `problem.detail` says what, where and what to do. */
export class ApiProblem extends Error {
  override readonly name = 'ApiProblem';
  constructor(readonly problem: Problem) {
    super(problem.detail || problem.title);
  }
  get status(): number {
    return this.problem.status;
  }
  get code(): string {
    return this.problem.code;
  }
}

/** No answer came: the network or the server is away. What was to be sent is still here. */
export class NoAnswer extends Error {
  override readonly name = 'NoAnswer';
  constructor(cause: unknown) {
    super('The server cannot be reached. Check the connection.', { cause });
  }
}

type In<T> = T extends z.ZodType ? z.input<T> : undefined;
type Out<T extends z.ZodType> = z.output<T>;

type CallOptions<R extends Route> = {
  readonly query?: In<R['query']>;
  readonly body?: In<R['body']>;
  /** Revision of the thing to be changed; goes out as `If-Match`. */
  readonly revision?: number;
  readonly signal?: AbortSignal;
  /** The page may be closing: let the request outlive it. */
  readonly keepalive?: boolean;
} & (keyof ParamsOf<R['path']> extends never
  ? { readonly params?: undefined }
  : { readonly params: Readonly<ParamsOf<R['path']>> });

/** `/api/kilns/{id}` with its parameters put in, each percent-encoded, and the query after it. */
export function addressOf(
  path: string,
  params: Readonly<Record<string, string>> = {},
  query: Readonly<Record<string, string | number | boolean | null | undefined>> = {},
): string {
  const filled = path.replace(/\{(\w+)\}/g, (_whole, name: string) => {
    const value = params[name];
    if (value === undefined) throw new RangeError(`the path ${path} needs ${name}`);
    return encodeURIComponent(value);
  });
  const search = new URLSearchParams();
  for (const [name, value] of Object.entries(query))
    if (value !== undefined && value !== null) search.set(name, String(value));
  const text = search.toString();
  return text === '' ? filled : `${filled}?${text}`;
}

async function problemOf(response: Response): Promise<ApiProblem> {
  const found = problemSchema.safeParse(await response.json().catch(() => null));
  if (found.success) return new ApiProblem(found.data);
  return new ApiProblem({
    type: 'about:blank',
    title: 'Unexpected answer',
    status: response.status,
    detail: `The server answered ${response.status} without saying why. Try again in a moment.`,
    code: 'unexpected-answer',
  });
}

/**
 * One call of the HTTP contract, typed by its route and parsed by the route's own schema.
 *
 * @throws {ApiProblem} when the server answers with a problem
 * @throws {NoAnswer} when there is no answer
 */
export async function call<R extends Route>(route: R, options: CallOptions<R>): Promise<Out<R['response']>> {
  const headers: Record<string, string> = { accept: 'application/json' };
  if (options.body !== undefined) headers['content-type'] = 'application/json';
  if (options.revision !== undefined) headers['if-match'] = `"${options.revision}"`;
  let response: Response;
  try {
    response = await fetch(
      addressOf(
        route.path,
        options.params,
        options.query as Record<string, string | number | boolean | undefined>,
      ),
      {
        method: route.method,
        headers,
        credentials: 'same-origin',
        ...(options.body === undefined ? {} : { body: JSON.stringify(options.body) }),
        ...(options.signal ? { signal: options.signal } : {}),
        ...(options.keepalive ? { keepalive: true } : {}),
      },
    );
  } catch (cause) {
    if (options.signal?.aborted) throw cause;
    throw new NoAnswer(cause);
  }
  if (!response.ok) throw await problemOf(response);
  return route.response.parse(await response.json()) as Out<R['response']>;
}

/** What to tell a person about something that went wrong. */
export function sentenceFor(error: unknown): string {
  if (error instanceof ApiProblem || error instanceof NoAnswer) return error.message;
  return 'Something went wrong in this page. Reload it and try again.';
}
