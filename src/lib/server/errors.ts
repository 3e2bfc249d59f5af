/** Every way a call can be refused, with the HTTP status it has outside. */
export const PROBLEMS = {
  malformed: [400, 'The request could not be read'],
  'not-signed-in': [401, 'Sign in first'],
  'wrong-credentials': [401, 'Address or password is not right'],
  'foreign-origin': [403, 'The request does not come from this site'],
  'not-allowed': [403, 'Your role does not allow this'],
  'not-found': [404, 'There is nothing here that you can see'],
  'method-not-allowed': [405, 'This method is not offered here'],
  'wrong-state': [409, 'The present state does not allow this'],
  'stale-revision': [412, 'Somebody saved a newer revision'],
  'too-large': [413, 'Too large'],
  'wrong-type': [415, 'This content type is not taken here'],
  'not-valid': [422, 'Understood, but not valid'],
  'revision-missing': [428, 'Say which revision you are changing'],
  'too-many': [429, 'Too many attempts'],
  internal: [500, 'Something failed on our side'],
  unavailable: [503, 'The service is not ready'],
} as const satisfies Record<string, readonly [number, string]>;

export type ProblemCode = keyof typeof PROBLEMS;

export interface Issue {
  /** Where in the body: `segments.2.toC`. */
  path: string;
  message: string;
}

export interface HoldfastErrorOptions {
  errors?: readonly Issue[];
  /** On 412: the newer thing. */
  current?: unknown;
  /** On 429 and 503: seconds until another try makes sense. */
  retryAfterS?: number;
  /** Further members of the problem document, such as `questions` of a log that can be read in two ways. */
  extra?: Readonly<Record<string, unknown>>;
  cause?: unknown;
}

/**
 * The one error that services throw for an expected refusal. `detail` is a sentence for the person: what was found,
 * what was expected, what to do.
 */
export class HoldfastError extends Error {
  readonly code: ProblemCode;
  readonly options: HoldfastErrorOptions;

  constructor(code: ProblemCode, detail: string, options: HoldfastErrorOptions = {}) {
    super(detail, options.cause === undefined ? undefined : { cause: options.cause });
    this.name = 'HoldfastError';
    this.code = code;
    this.options = options;
  }

  get status(): number {
    return PROBLEMS[this.code][0];
  }
}

export const notFound = (what: string) =>
  new HoldfastError('not-found', `No such ${what}, or it is not visible to you.`);
export const notAllowed = (detail: string) => new HoldfastError('not-allowed', detail);
export const wrongState = (detail: string) => new HoldfastError('wrong-state', detail);
export const notValid = (detail: string, errors: readonly Issue[] = []) =>
  new HoldfastError('not-valid', detail, { errors });
export const staleRevision = (current: unknown) =>
  new HoldfastError(
    'stale-revision',
    'Somebody saved a newer revision meanwhile. Yours is not lost: compare, then save again.',
    { current },
  );
