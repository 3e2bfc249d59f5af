import type { z } from '~/lib/zod';

/** An island's props, parsed at its border. Astro hands every island a `children` of its own, which is none of ours. */
export function islandProps<S extends z.ZodType>(schema: S, given: object): z.output<S> {
  const own = Object.entries(given).filter(([name]) => name !== 'children');
  return schema.parse(Object.fromEntries(own));
}
