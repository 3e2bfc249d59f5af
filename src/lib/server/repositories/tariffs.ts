import { tariffSchema, type Tariff, type tariffInputSchema } from '~/lib/contracts/equipment';
import type { z } from '~/lib/zod';
import { TariffRow } from '../models/tariff';
import { equipmentRepository } from './equipment';
import { keptRow } from './row';

export type TariffInput = z.output<typeof tariffInputSchema>;
const PLAN = ['currency', 'energy', 'per', 'price', 'bands', 'co2KgPerKWh', 'co2Source'] as const;

export const tariffs = equipmentRepository<Tariff, TariffInput>(
  TariffRow,
  (row) =>
    tariffSchema.parse({
      ...keptRow(row, ...PLAN),
      plan: Object.fromEntries(PLAN.map((name) => [name, row[name]])),
    }),
  ({ plan, ...own }) => ({ ...own, ...plan }),
);
