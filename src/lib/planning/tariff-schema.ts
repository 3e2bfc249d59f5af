import { z } from '../zod';

/** A price as a decimal string, never a float: '0.3125'. */
export const priceSchema = z.string().regex(/^\d{1,9}(\.\d{1,6})?$/);
const minuteOfDay = z.number().int().min(0).max(1440);

/** A price that holds on some weekdays (1 Monday … 7 Sunday) from one local minute of the day to another. */
export const tariffBandSchema = z.strictObject({
  days: z.array(z.number().int().min(1).max(7)).min(1).max(7),
  fromMinute: minuteOfDay,
  toMinute: minuteOfDay,
  pricePerKWh: priceSchema,
});

export const tariffPlanSchema = z.strictObject({
  currency: z.string().regex(/^[A-Z]{3}$/),
  energy: z.enum(['electricity', 'propane', 'natural-gas']),
  /** Price of what is metered: kWh (electricity, gas on the higher heating value), kg or m³ of fuel. */
  per: z.enum(['kWh', 'kg', 'm3']),
  price: priceSchema,
  /** Electricity only: other prices by local time of use; where none applies, `price` does. */
  bands: z.array(tariffBandSchema).max(24).default([]),
  /** kg of CO2 per kWh, and where the number is from; null: the default of the materials table. */
  co2KgPerKWh: z.number().min(0).max(5).nullable().default(null),
  co2Source: z.string().max(200).default(''),
});
export type TariffPlan = z.infer<typeof tariffPlanSchema>;
