import { meSchema } from '~/lib/contracts/auth';
import { idSchema, revisionSchema } from '~/lib/contracts/common';
import { furnaceSchema, kilnSchema, tariffSchema, thermocoupleSchema } from '~/lib/contracts/equipment';
import { versionSchema } from '~/lib/contracts/profiles';
import { studioFiguresSchema } from '~/lib/materials/studio-figures';
import { z } from '~/lib/zod';

const minuteOfDay = z.number().int().min(0).max(1440);

/** What the profile editor is given: the version to show, and what surrounds it. */
export const profileEditorPropsSchema = z.strictObject({
  profile: z.strictObject({ id: idSchema, name: z.string(), revision: revisionSchema, authorId: idSchema }),
  version: versionSchema,
  /** Kilns this person may choose among; the version's own among them, archived or not. */
  kilns: z.array(kilnSchema),
  furnaces: z.array(furnaceSchema).default([]),
  thermocouples: z.array(thermocoupleSchema).default([]),
  /** Empty for who may not see prices. */
  tariffs: z.array(tariffSchema).default([]),
  /** The studio's own figures in place of the table's. */
  studioFigures: z.array(studioFiguresSchema).default([]),
  me: meSchema,
  /** The studio lets an author approve their own version. */
  mayApproveOwn: z.boolean().default(false),
  /** Temperature of the room that estimates are made for. */
  ambientC: z.number().min(-30).max(50).default(20),
  /** Local minutes of the day between which someone is there; null: not stated. */
  attendedHours: z.strictObject({ fromMinute: minuteOfDay, toMinute: minuteOfDay }).nullable().default(null),
});
export type ProfileEditorProps = z.output<typeof profileEditorPropsSchema>;
/** What a page hands over; what has a default may be left out. */
export type ProfileEditorInput = z.input<typeof profileEditorPropsSchema>;
