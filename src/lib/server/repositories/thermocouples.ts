import {
  thermocoupleSchema,
  type Thermocouple,
  type thermocoupleInputSchema,
} from '~/lib/contracts/equipment';
import type { z } from '~/lib/zod';
import { ThermocoupleRow } from '../models/thermocouple';
import { equipmentRepository } from './equipment';
import { keptRow } from './row';

export type ThermocoupleInput = z.output<typeof thermocoupleInputSchema>;

export const thermocouples = equipmentRepository<Thermocouple, ThermocoupleInput>(
  ThermocoupleRow,
  (row) => thermocoupleSchema.parse(keptRow(row)),
  (input) => ({ ...input }),
);
