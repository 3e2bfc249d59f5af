import type { z } from '../zod';

export type Method = 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE';

/**
 * One call of the HTTP contract, described once: the endpoint parses by it, the client is typed by it, and the OpenAPI
 * document is generated from it. `path` names its parameters in braces, as OpenAPI does.
 */
export interface Route<
  Path extends string = string,
  Query extends z.ZodType | undefined = z.ZodType | undefined,
  Body extends z.ZodType | undefined = z.ZodType | undefined,
  Response extends z.ZodType = z.ZodType,
> {
  readonly method: Method;
  readonly path: Path;
  readonly summary: string;
  readonly status: number;
  readonly query: Query;
  readonly body: Body;
  /** Body that is not JSON: the endpoint reads the request itself. */
  readonly rawBody?: string;
  readonly response: Response;
  /** The call changes an editable thing and must carry `If-Match`. */
  readonly revision: boolean;
  /** Problem statuses beyond those every call may give. */
  readonly problems: readonly number[];
}

export function defineRoute<
  const Path extends string,
  Response extends z.ZodType,
  Query extends z.ZodType | undefined = undefined,
  Body extends z.ZodType | undefined = undefined,
>(spec: {
  method: Method;
  path: Path;
  summary: string;
  response: Response;
  status?: number;
  query?: Query;
  body?: Body;
  rawBody?: string;
  revision?: boolean;
  problems?: readonly number[];
}): Route<Path, Query, Body, Response> {
  return {
    method: spec.method,
    path: spec.path,
    summary: spec.summary,
    status: spec.status ?? 200,
    query: spec.query as Query,
    body: spec.body as Body,
    ...(spec.rawBody ? { rawBody: spec.rawBody } : {}),
    response: spec.response,
    revision: spec.revision ?? false,
    problems: spec.problems ?? [],
  };
}

/** Whether an action may come without a body: its schema asks for nothing. */
export const bodyMayBeLeftOut = ({ method, body }: Route): boolean =>
  method === 'POST' && body !== undefined && body.safeParse({}).success;

/** Names of the parameters in a path: `ParamsOf<'/api/kilns/{id}'>` is `{ id: string }`. */
export type ParamsOf<Path extends string> = Path extends `${string}{${infer Name}}${infer Rest}`
  ? { [K in Name | keyof ParamsOf<Rest>]: string }
  : Record<never, string>;
