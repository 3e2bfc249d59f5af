import { kilnSchema, type Kiln, type kilnInputSchema } from '~/lib/contracts/equipment';
import type { z } from '~/lib/zod';
import { KilnRow } from '../models/kiln';
import { equipmentRepository } from './equipment';
import { keptRow } from './row';

export type KilnInput = z.output<typeof kilnInputSchema>;

/** Columns that only one energy has. */
export const KILN_COLUMNS_OF = {
  electric: ['ratedKW', 'voltsV', 'supplyV', 'ratedPowerShare'],
  gas: ['burnerKW', 'fuel', 'excessAirShare'],
} as const;
const none = Object.fromEntries(
  Object.values(KILN_COLUMNS_OF).flatMap((names) => names.map((n) => [n, null])),
);

export const kilns = equipmentRepository<Kiln, KilnInput>(
  KilnRow,
  (row) =>
    kilnSchema.parse(keptRow(row, ...KILN_COLUMNS_OF[row['energy'] === 'electric' ? 'gas' : 'electric'])),
  (input) => ({ ...none, ...input }),
);
