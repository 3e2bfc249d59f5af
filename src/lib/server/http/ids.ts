import { idSchema } from '~/lib/contracts/common';
import { notFound } from '../errors';

/** A path parameter as an id; what is no id names nothing, so it is 404 like any other absent thing. */
export function requireId(text: string, what: string): string {
  const id = idSchema.safeParse(text.toLowerCase());
  if (!id.success) throw notFound(what);
  return id.data;
}
