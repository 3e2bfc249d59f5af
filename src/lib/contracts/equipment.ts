import { electricKilnSchema, FUELS, gasKilnSchema } from '../thermal/kiln-schema';
import { tariffPlanSchema } from '../planning/tariff-schema';
import { z } from '../zod';
import { idSchema, instantSchema, listOf, listQuerySchema, nameSchema, revisionSchema } from './common';
import { defineRoute } from './route';

/** What every kept thing answers with beside its own fields. */
const kept = {
  id: idSchema,
  // As it was kept, under whatever rule for names then held.
  name: z.string(),
  revision: revisionSchema,
  createdAt: instantSchema,
  updatedAt: instantSchema,
  archivedAt: instantSchema.nullable(),
};
const listWithArchived = listQuerySchema.extend({ archived: z.enum(['no', 'yes', 'all']).default('no') });

const kilnOwn = {
  name: nameSchema,
  note: z.string().max(2000).default(''),
  thermocoupleId: idSchema.nullable().default(null),
  tariffId: idSchema.nullable().default(null),
};
export const kilnInputSchema = z.discriminatedUnion('energy', [
  electricKilnSchema.extend(kilnOwn),
  gasKilnSchema.extend(kilnOwn),
]);
export const kilnSchema = z.discriminatedUnion('energy', [
  electricKilnSchema.extend({ ...kilnOwn, ...kept }),
  gasKilnSchema.extend({ ...kilnOwn, ...kept }),
]);
export type Kiln = z.infer<typeof kilnSchema>;
/** A kiln described on the spot, for an estimate: as it would be added, a name not needed. */
export const describedKilnSchema = z.discriminatedUnion('energy', [
  electricKilnSchema.extend({ ...kilnOwn, name: nameSchema.optional() }),
  gasKilnSchema.extend({ ...kilnOwn, name: nameSchema.optional() }),
]);
/** PATCH merges into the kiln and the whole is then validated as `kilnInputSchema`. */
const patchSchema = z.record(z.string().max(60), z.unknown());

export const thermocoupleInputSchema = z.strictObject({
  name: nameSchema,
  type: z.enum(['B', 'E', 'J', 'K', 'N', 'R', 'S', 'T']),
  toleranceClass: z.enum(['1', '2', '3', 'special', 'standard']).default('2'),
  sheathM: z.number().min(0.0005).max(0.05).nullable().default(null),
  /** Highest temperature it may be used at, °C; null: as its type and size allow. */
  maxC: z.number().min(100).max(1800).nullable().default(null),
  calibration: z
    .array(z.strictObject({ atC: z.number().min(-200).max(1800), offsetC: z.number().min(-100).max(100) }))
    .max(50)
    .default([]),
  note: z.string().max(2000).default(''),
});
export const thermocoupleSchema = thermocoupleInputSchema.extend(kept);
export type Thermocouple = z.infer<typeof thermocoupleSchema>;

const furnaceCommon = {
  name: nameSchema,
  efficiencyShare: z.number().min(0.01).max(1).nullable().default(null),
  capacityKg: z.number().gt(0).max(5000),
  maxC: z.number().min(100).max(1800),
  tariffId: idSchema.nullable().default(null),
  note: z.string().max(2000).default(''),
};
const electricFurnace = z.strictObject({
  energy: z.literal('electric'),
  ...furnaceCommon,
  ratedKW: z.number().min(0.1).max(1000),
});
const gasFurnace = z.strictObject({
  energy: z.literal('gas'),
  ...furnaceCommon,
  burnerKW: z.number().min(0.1).max(3000),
  fuel: z.enum(FUELS),
});
export const furnaceInputSchema = z.discriminatedUnion('energy', [electricFurnace, gasFurnace]);
export const furnaceSchema = z.discriminatedUnion('energy', [
  electricFurnace.extend(kept),
  gasFurnace.extend(kept),
]);
export type Furnace = z.infer<typeof furnaceSchema>;

export const tariffInputSchema = z.strictObject({
  name: nameSchema,
  plan: tariffPlanSchema,
  note: z.string().max(2000).default(''),
});
export const tariffSchema = tariffInputSchema.extend(kept);
export type Tariff = z.infer<typeof tariffSchema>;

/** The five calls that every kind of equipment has. `archived: true` in a PATCH archives, `false` brings back. */
function equipmentRoutes<const Name extends string, I extends z.ZodType, O extends z.ZodType>(
  noun: Name,
  title: string,
  input: I,
  output: O,
) {
  return {
    list: defineRoute({
      method: 'GET',
      path: `/api/${noun}`,
      summary: `List ${title}`,
      query: listWithArchived,
      response: listOf(output),
    }),
    create: defineRoute({
      method: 'POST',
      path: `/api/${noun}`,
      summary: `Add to ${title}`,
      body: input,
      status: 201,
      response: output,
    }),
    get: defineRoute({
      method: 'GET',
      path: `/api/${noun}/{id}`,
      summary: `One of ${title}`,
      response: output,
    }),
    update: defineRoute({
      method: 'PATCH',
      path: `/api/${noun}/{id}`,
      summary: `Change one of ${title}`,
      body: patchSchema,
      revision: true,
      response: output,
    }),
  };
}

export const kilnRoutes = equipmentRoutes('kilns', 'kilns', kilnInputSchema, kilnSchema);
export const furnaceRoutes = equipmentRoutes('furnaces', 'furnaces', furnaceInputSchema, furnaceSchema);
export const thermocoupleRoutes = equipmentRoutes(
  'thermocouples',
  'thermocouples',
  thermocoupleInputSchema,
  thermocoupleSchema,
);
export const tariffRoutes = equipmentRoutes('tariffs', 'tariffs', tariffInputSchema, tariffSchema);
