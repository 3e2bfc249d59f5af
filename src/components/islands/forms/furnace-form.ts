import { unitsSchema } from '~/lib/contracts/common';
import { furnaceInputSchema, furnaceSchema, type Furnace } from '~/lib/contracts/equipment';
import { FUELS } from '~/lib/thermal/kiln-schema';
import type { UnitPreferences } from '~/lib/units';
import { z } from '~/lib/zod';
import { fieldText, quantity, quantityOrNull, rangeOf } from './quantity';

export const furnaceFormPropsSchema = z.strictObject({
  furnace: furnaceSchema.nullable(),
  units: unitsSchema,
  tariffs: z.array(z.strictObject({ id: z.string(), name: z.string() })),
});
export type FurnaceFormProps = z.input<typeof furnaceFormPropsSchema>;

const text = z.string();
const typedSchema = z.object({
  energy: z.enum(['electric', 'gas']),
  name: text,
  ratedKW: text,
  burnerKW: text,
  fuel: z.enum(FUELS),
  efficiencyShare: text,
  capacityKg: text,
  maxC: text,
  tariffId: text,
  note: text,
});
export type FurnaceTyped = z.input<typeof typedSchema>;

const [electricSchema, gasSchema] = furnaceInputSchema.options;

/** From what was typed to the furnace of the contract. */
export function furnaceFormSchema(units: UnitPreferences) {
  const shape = electricSchema.shape;
  const common = {
    name: z.string().trim().min(1, 'Give the furnace a name.').max(120),
    efficiencyShare: quantityOrNull('percent', units, rangeOf(shape.efficiencyShare)),
    capacityKg: quantity('mass', units, rangeOf(shape.capacityKg)),
    maxC: quantity('temperature', units, rangeOf(shape.maxC)),
    tariffId: z.string().transform((id) => (id === '' ? null : id)),
    note: z.string().max(2000),
  };
  const readers = {
    electric: z.object({
      energy: z.literal('electric'),
      ...common,
      ratedKW: quantity('number', units, rangeOf(shape.ratedKW)),
    }),
    gas: z.object({
      energy: z.literal('gas'),
      ...common,
      burnerKW: quantity('number', units, rangeOf(gasSchema.shape.burnerKW)),
      fuel: z.enum(FUELS),
    }),
  };
  return typedSchema.transform((typed, context) => {
    const result = readers[typed.energy].safeParse(typed);
    if (result.success) return result.data;
    for (const issue of result.error.issues)
      context.addIssue({ code: 'custom', message: issue.message, path: issue.path });
    return z.NEVER;
  });
}
export type FurnaceSent = z.output<ReturnType<typeof furnaceFormSchema>>;

/** What stands in the fields at first. */
export function furnaceTyped(furnace: Furnace | null, units: UnitPreferences): FurnaceTyped {
  return {
    energy: furnace?.energy ?? 'electric',
    name: furnace?.name ?? '',
    ratedKW: furnace?.energy === 'electric' ? fieldText(furnace.ratedKW, 'number', units) : '',
    burnerKW: furnace?.energy === 'gas' ? fieldText(furnace.burnerKW, 'number', units) : '',
    fuel: furnace?.energy === 'gas' ? furnace.fuel : 'propane',
    efficiencyShare: fieldText(furnace?.efficiencyShare, 'percent', units),
    capacityKg: fieldText(furnace?.capacityKg, 'mass', units),
    maxC: fieldText(furnace?.maxC, 'temperature', units),
    tariffId: furnace?.tariffId ?? '',
    note: furnace?.note ?? '',
  };
}
