/** Ids for `aria-describedby` of a field with a hint, an error, both or neither. */
export const describedBy = (id: string, has: { hint?: unknown; error?: unknown }): string | undefined =>
  [has.error && `${id}-error`, has.hint && `${id}-hint`].filter(Boolean).join(' ') || undefined;
