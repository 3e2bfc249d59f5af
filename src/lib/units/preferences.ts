import { z } from '../zod';

/** What units a studio or a person reads and types. Everything is kept in °C, kilograms and metres whatever they choose. */
export const unitPreferencesSchema = z.strictObject({
  temperature: z.enum(['C', 'F']),
  mass: z.enum(['kg', 'lb']),
  length: z.enum(['mm', 'in']),
});
export type UnitPreferences = z.infer<typeof unitPreferencesSchema>;

export const METRIC: UnitPreferences = { temperature: 'C', mass: 'kg', length: 'mm' };
