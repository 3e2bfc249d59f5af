import { furnaceSchema, type Furnace, type furnaceInputSchema } from '~/lib/contracts/equipment';
import type { z } from '~/lib/zod';
import { FurnaceRow } from '../models/furnace';
import { equipmentRepository } from './equipment';
import { keptRow } from './row';

export type FurnaceInput = z.output<typeof furnaceInputSchema>;

/** Columns that only one energy has. */
export const FURNACE_COLUMNS_OF = { electric: ['ratedKW'], gas: ['burnerKW', 'fuel'] } as const;
const none = { ratedKW: null, burnerKW: null, fuel: null };

export const furnaces = equipmentRepository<Furnace, FurnaceInput>(
  FurnaceRow,
  (row) =>
    furnaceSchema.parse(
      keptRow(row, ...FURNACE_COLUMNS_OF[row['energy'] === 'electric' ? 'gas' : 'electric']),
    ),
  (input) => ({ ...none, ...input }),
);
