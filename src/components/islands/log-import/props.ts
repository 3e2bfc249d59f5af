import { idSchema } from '~/lib/contracts/common';
import { z } from '~/lib/zod';

export const logImportPropsSchema = z.strictObject({
  runId: idSchema,
  /** The studio's zone, offered first where a file's zone is asked for. */
  timeZone: z.string(),
  maxBytes: z.number(),
  /** There is a log already; another is added beside it. */
  again: z.boolean().default(false),
});
export type LogImportProps = z.input<typeof logImportPropsSchema>;
