import { profileSchema } from '../profile/schema';
import { loadSchema } from '../thermal/load-schema';
import { z } from '../zod';
import { idSchema } from './common';
import { defineRoute } from './route';

export const draftSchema = z.strictObject({
  profile: profileSchema,
  /** Why each segment is as it is: at least one for each, in order. */
  because: z.array(
    z.strictObject({ segment: z.number().int().min(0), text: z.string(), source: z.string() }),
  ),
  /** Why no profile fires this load well; usually empty. */
  against: z.array(z.strictObject({ text: z.string(), source: z.string() })),
});
export type DraftedProfile = z.infer<typeof draftSchema>;

export const draftRoutes = {
  draft: defineRoute({
    method: 'POST',
    path: '/api/drafts',
    summary: 'A profile to begin from, drafted for a load in a kiln; nothing is kept',
    body: z.strictObject({
      load: loadSchema,
      kilnId: idSchema,
      ambientC: z.number().min(-30).max(50).default(20),
    }),
    response: draftSchema,
    problems: [422],
  }),
};
