import { meSchema } from '~/lib/contracts/auth';
import { idSchema, nameSchema, revisionSchema } from '~/lib/contracts/common';
import { furnaceSchema, kilnSchema, tariffSchema } from '~/lib/contracts/equipment';
import { versionSchema } from '~/lib/contracts/profiles';
import { profileSchema } from '~/lib/profile/schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { z } from '~/lib/zod';

/**
 * What the profile editor is given. For an existing version: `profile` and `version`; for a new profile: both null and
 * `begin` holds what it starts from. It is first kept on the server when the first change is made.
 */
export const profileEditorPropsSchema = z.strictObject({
  profile: z.strictObject({ id: idSchema, name: z.string(), revision: revisionSchema }).nullable(),
  version: versionSchema.nullable(),
  begin: z
    .strictObject({
      name: nameSchema,
      kilnId: idSchema.nullable(),
      profile: profileSchema,
      load: loadSchema.nullable(),
    })
    .nullable()
    .default(null),
  /** Kilns this person may choose among; the version's own among them, archived or not. */
  kilns: z.array(kilnSchema),
  furnaces: z.array(furnaceSchema).default([]),
  /** Empty for who may not see prices. */
  tariffs: z.array(tariffSchema).default([]),
  me: meSchema,
  authorName: z.string().default(''),
  /** Highest version number of the profile, and whether there is a draft among them already. */
  latestNumber: z.number().int().min(1).default(1),
  /** The studio lets an author approve their own version. */
  mayApproveOwn: z.boolean().default(false),
  ambientC: z.number().default(20),
  /** Hours of the day in which someone is there, minutes from local midnight. */
  attendedHours: z
    .strictObject({
      fromMinute: z.number().int().min(0).max(1440),
      toMinute: z.number().int().min(0).max(1440),
    })
    .nullable()
    .default(null),
});
export type ProfileEditorProps = z.infer<typeof profileEditorPropsSchema>;
/** What a page hands over; what has a default may be left out. */
export type ProfileEditorInput = z.input<typeof profileEditorPropsSchema>;
