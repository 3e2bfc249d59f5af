import type { z } from '~/lib/zod';
import type { HoldfastError } from '../errors';
import { PROBLEMS, type Issue } from '../errors';

/** The one place where an error becomes an answer: problem details of RFC 9457, never a stack trace. */
export function problemResponse(error: HoldfastError): Response {
  const [status, title] = PROBLEMS[error.code];
  const headers: Record<string, string> = {
    'content-type': 'application/problem+json',
    'cache-control': 'no-store',
  };
  if (error.options.retryAfterS !== undefined)
    headers['retry-after'] = String(Math.ceil(error.options.retryAfterS));
  const body = {
    type: `/problems/${error.code}`,
    title,
    status,
    detail: error.message,
    code: error.code,
    ...(error.options.errors?.length ? { errors: error.options.errors } : {}),
    ...(error.options.current === undefined ? {} : { current: error.options.current }),
    ...error.options.extra,
  };
  return new Response(JSON.stringify(body), { status, headers });
}

/** Paths and sentences of a failed parse, at most fifty. */
export function issuesOf(error: z.ZodError): Issue[] {
  return error.issues.flatMap(issuesIn).slice(0, 50);
}

/** A field that may not be there is named by its own path, not by that of the thing it is in. */
function issuesIn(issue: z.core.$ZodIssue): Issue[] {
  const at = (...more: readonly string[]) => [...issue.path.map(String), ...more].join('.');
  return issue.code === 'unrecognized_keys'
    ? issue.keys.map((key) => ({ path: at(key), message: 'no such field here' }))
    : [{ path: at(), message: issue.message }];
}
