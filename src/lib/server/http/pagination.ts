import { HoldfastError } from '../errors';
import { isStorable } from './json-body';

/** A page's end as an opaque cursor: the sort value and the id of its last row. */
export function encodeCursor(sort: string | number, id: string): string {
  return Buffer.from(JSON.stringify([sort, id])).toString('base64url');
}

export function decodeCursor(cursor: string | undefined): { sort: string | number; id: string } | null {
  if (!cursor) return null;
  try {
    const value: unknown = JSON.parse(Buffer.from(cursor, 'base64url').toString('utf8'));
    if (Array.isArray(value) && value.length === 2) {
      const [sort, id] = value as [unknown, unknown];
      if (
        (typeof sort === 'number' || (typeof sort === 'string' && isStorable(sort))) &&
        typeof id === 'string' &&
        /^[0-9a-f]{8}(-[0-9a-f]{4}){3}-[0-9a-f]{12}$/.test(id)
      )
        return { sort, id };
    }
  } catch {
    // falls through to the refusal below
  }
  throw new HoldfastError(
    'malformed',
    'This cursor is not one that a list gave out. Start the list again without it.',
  );
}

/** Takes `limit + 1` rows and cuts them to a page with the cursor of the next. */
export function page<T extends { id: string }>(
  rows: readonly T[],
  limit: number,
  sortOf: (row: T) => string | number,
) {
  const items = rows.slice(0, limit);
  const last = items.at(-1);
  return { items, nextCursor: rows.length > limit && last ? encodeCursor(sortOf(last), last.id) : null };
}
