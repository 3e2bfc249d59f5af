import type { tariffInputSchema } from '~/lib/contracts/equipment';
import { tariffSchema, type Tariff } from '~/lib/contracts/equipment';
import { priceSchema, tariffPlanSchema } from '~/lib/planning/tariff-schema';
import { METRIC } from '~/lib/units';
import { z } from '~/lib/zod';
import { fieldText, quantityOrNull, rangeOf } from './quantity';

export const tariffFormPropsSchema = z.strictObject({ tariff: tariffSchema.nullable() });
export type TariffFormProps = z.input<typeof tariffFormPropsSchema>;

export const DAYS = ['Monday', 'Tuesday', 'Wednesday', 'Thursday', 'Friday', 'Saturday', 'Sunday'] as const;
export const EVERY_DAY = ['1', '2', '3', '4', '5', '6', '7'];

/** A price as typed, with a decimal comma or point, kept as the decimal string it is. */
const price = z
  .string()
  .transform((typed) => typed.trim().replace(',', '.'))
  .refine((typed) => priceSchema.safeParse(typed).success, 'Type a price like 0.31.');

const plan = tariffPlanSchema.shape;

/** `07:30` to the minute of the day; `24:00` is the day's end. */
function minuteOf(time: string): number | null {
  const match = /^(\d{1,2}):(\d{2})$/.exec(time.trim());
  const minute = match ? Number(match[1]) * 60 + Number(match[2]) : NaN;
  return match && Number(match[2]) < 60 && minute <= 1440 ? minute : null;
}
export const timeOf = (minute: number): string =>
  `${String(Math.floor(minute / 60)).padStart(2, '0')}:${String(minute % 60).padStart(2, '0')}`;

const time = z.string().transform((typed, context) => {
  const minute = minuteOf(typed);
  if (minute !== null) return minute;
  context.addIssue('Type a time of day like 22:00.');
  return z.NEVER;
});

const bandTyped = z.object({
  days: z
    .array(z.string())
    .min(1, 'Choose at least one day.')
    .transform((days) => days.map(Number)),
  fromMinute: time,
  toMinute: time,
  pricePerKWh: price,
});

/** From what was typed to the tariff of the contract. */
export const tariffFormSchema = z
  .object({
    name: z.string().trim().min(1, 'Give the tariff a name.').max(120),
    energy: plan.energy,
    currency: z
      .string()
      .transform((typed) => typed.trim().toUpperCase())
      .pipe(z.string().regex(/^[A-Z]{3}$/, 'Three letters, like EUR.')),
    per: plan.per,
    price,
    bands: z.array(bandTyped),
    co2KgPerKWh: quantityOrNull('number', METRIC, rangeOf(plan.co2KgPerKWh)),
    co2Source: z.string().trim().max(200),
    note: z.string().max(2000),
  })
  .transform(({ name, note, ...rest }) => {
    const electric = rest.energy === 'electricity';
    const sent: z.input<typeof tariffInputSchema> = {
      name,
      note,
      plan: { ...rest, per: electric ? 'kWh' : rest.per, bands: electric ? rest.bands : [] },
    };
    return sent;
  });
export type TariffTyped = z.input<typeof tariffFormSchema>;
export type TariffSent = z.output<typeof tariffFormSchema>;

/** What stands in the fields at first. */
export function tariffTyped(tariff: Tariff | null): TariffTyped {
  const kept = tariff?.plan;
  return {
    name: tariff?.name ?? '',
    energy: kept?.energy ?? 'electricity',
    currency: kept?.currency ?? 'EUR',
    per: kept?.per ?? 'kWh',
    price: kept?.price ?? '',
    bands: (kept?.bands ?? []).map((band) => ({
      days: band.days.map(String),
      fromMinute: timeOf(band.fromMinute),
      toMinute: timeOf(band.toMinute),
      pricePerKWh: band.pricePerKWh,
    })),
    co2KgPerKWh: fieldText(kept?.co2KgPerKWh, 'number', METRIC),
    co2Source: kept?.co2Source ?? '',
    note: tariff?.note ?? '',
  };
}
