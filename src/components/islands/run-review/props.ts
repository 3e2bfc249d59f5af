import { meSchema } from '~/lib/contracts/auth';
import { findingSchema, reviewSchema, runSchema, seriesSchema } from '~/lib/contracts/runs';
import { z } from '~/lib/zod';

/** What the review of a run is given by its page; everything after that the island fetches itself. */
export const runReviewPropsSchema = z.strictObject({
  run: runSchema,
  review: reviewSchema,
  findings: z.array(findingSchema),
  series: seriesSchema,
  me: meSchema,
  /** Revision of the log's alignment, for laying it by hand. */
  logRevision: z.number().int(),
  mayDecide: z.boolean(),
  mayAlign: z.boolean(),
});
export type RunReviewProps = z.infer<typeof runReviewPropsSchema>;
