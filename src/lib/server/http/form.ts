import type { z } from '~/lib/zod';
import { HoldfastError, notValid } from '../errors';
import { issuesOf } from './problem';

const MAX_FORM_BYTES = 256 * 1024;

/** What a plain HTML form sent, as text; a page parses it by a schema of the contract. */
export class Form {
  constructor(private readonly fields: URLSearchParams) {}

  /** The value of a field without surrounding space; '' where it was not sent. */
  text(name: string): string {
    return (this.fields.get(name) ?? '').trim();
  }

  /** As typed, for what may begin or end with a space: passwords. */
  raw(name: string): string {
    return this.fields.get(name) ?? '';
  }

  all(name: string): string[] {
    return this.fields.getAll(name);
  }

  has(name: string): boolean {
    return this.fields.has(name);
  }
}

/** Reads `application/x-www-form-urlencoded`, counting bytes as they stream. */
export async function readForm(request: Request): Promise<Form> {
  const type = request.headers.get('content-type') ?? '';
  if (!/^application\/x-www-form-urlencoded\s*(;|$)/i.test(type))
    throw new HoldfastError(
      'wrong-type',
      'This page takes plain forms only. Go back, reload the page and try again.',
    );
  const decoder = new TextDecoder();
  let text = '';
  let bytes = 0;
  for await (const chunk of request.body ?? []) {
    bytes += (chunk as Uint8Array).byteLength;
    if (bytes > MAX_FORM_BYTES)
      throw new HoldfastError('too-large', `A form may hold ${MAX_FORM_BYTES} bytes here.`);
    text += decoder.decode(chunk, { stream: true });
  }
  return new Form(new URLSearchParams(text + decoder.decode()));
}

/** Parses by a schema of the contract; what does not fit is refused with the field's name. */
export function parseForm<S extends z.ZodType>(schema: S, value: unknown): z.output<S> {
  const result = schema.safeParse(value);
  if (result.success) return result.data;
  throw notValid('Some fields need another look.', issuesOf(result.error));
}

export type Attempt<T> =
  | { readonly ok: true; readonly value: T }
  | {
      readonly ok: false;
      readonly status: number;
      readonly message: string;
      /** By field. */
      readonly errors: Readonly<Record<string, string>>;
    };

/** Refusals that the form itself can tell; all else goes on to the middleware. */
const TOLD_BY_THE_FORM: ReadonlySet<string> = new Set([
  'malformed',
  'wrong-credentials',
  'not-allowed',
  'wrong-state',
  'stale-revision',
  'not-valid',
  'too-many',
  'too-large',
]);

/** Does what a form asks; an expected refusal comes back as words for the page, so that nothing typed is lost. */
export async function attempt<T>(work: () => Promise<T>): Promise<Attempt<T>> {
  try {
    return { ok: true, value: await work() };
  } catch (error) {
    if (!(error instanceof HoldfastError) || !TOLD_BY_THE_FORM.has(error.code)) throw error;
    const errors = Object.fromEntries(
      (error.options.errors ?? []).map((issue) => [issue.path, issue.message] as const),
    );
    return { ok: false, status: error.status, message: error.message, errors };
  }
}

/** The change that a form for putting away or bringing back asks for. */
export const archivingOf = (form: Form): { revision: number; change: { archived: boolean } } => ({
  revision: Number(form.text('revision')),
  change: { archived: form.text('action') === 'archive' },
});

/**
 * Does what the form of a page for putting away or bringing back asks, by the thing's service; null where the page is only
 * looked at. The value says which of the two it was.
 */
export async function archivingPosted(
  request: Request,
  update: (revision: number, change: { archived: boolean }) => Promise<unknown>,
): Promise<Attempt<'archived' | 'brought-back'> | null> {
  if (request.method !== 'POST') return null;
  const { revision, change } = archivingOf(await readForm(request));
  return attempt(async () => {
    await update(revision, change);
    return change.archived ? 'archived' : 'brought-back';
  });
}
