import { QueryTypes } from 'sequelize';
import { unitsSchema } from '~/lib/contracts/common';
import { z } from '~/lib/zod';
import { database, type Tx } from '../database';

const rulesSchema = z.strictObject({
  timeZone: z.string(),
  units: unitsSchema,
  /** Whether an author may approve their own version: a studio of one. */
  authorsApprove: z.boolean(),
  /** When people are there, in local minutes of the day. */
  attendedFromMinute: z.number().int(),
  attendedUntilMinute: z.number().int(),
});
/** How a studio works, as far as reviews and estimates go by it. */
export type StudioRules = z.infer<typeof rulesSchema>;

export async function studioRules(studioId: string, tx?: Tx): Promise<StudioRules> {
  const rows = await database().query(
    `select time_zone as "timeZone",
       json_build_object('temperature', temperature_unit, 'mass', mass_unit, 'length', length_unit) as units,
       authors_approve as "authorsApprove",
       attended_from_minute as "attendedFromMinute", attended_until_minute as "attendedUntilMinute"
     from studios where id = $studioId`,
    { type: QueryTypes.SELECT, bind: { studioId }, ...(tx ? { transaction: tx } : {}) },
  );
  return rulesSchema.parse(rows[0]);
}
