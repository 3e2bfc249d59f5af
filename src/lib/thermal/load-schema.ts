import { z } from '../zod';

const materialId = z
  .string()
  .min(1)
  .max(60)
  .regex(/^[a-z0-9]+(-[a-z0-9]+)*$/);
const massKg = z.number().gt(0).max(10000);
const share = z.number().min(0).max(1);

/** A studio's own numbers in place of the table's, by the table's property name, in the table's unit. */
const overrides = z
  .record(z.string().regex(/^[a-z][A-Za-z0-9]{0,59}$/), z.number().min(-1e9).max(1e9))
  .default({});

export const patternSchema = z.strictObject({
  material: materialId,
  massKg,
  /** Share of the pattern's mass that runs out when it drains; null: the material's default. */
  drainedShare: share.nullable().default(null),
  thickestM: z.number().min(0.0001).max(1).nullable().default(null),
  hollow: z.boolean().default(false),
  overrides,
});
export type Pattern = z.infer<typeof patternSchema>;

export const mouldSchema = z.strictObject({
  form: z.enum(['shell', 'flask']).default('shell'),
  material: materialId,
  count: z.number().int().min(1).max(500).default(1),
  /** Dry mass of each. */
  massKg,
  /** Free water in each. */
  waterKg: z.number().min(0).max(10000).default(0),
  wallM: z.number().min(0.001).max(0.5).nullable().default(null),
  diameterM: z.number().min(0.01).max(3).nullable().default(null),
  heightM: z.number().min(0.01).max(3).nullable().default(null),
  heatedFaces: z.union([z.literal(1), z.literal(2)]).default(1),
  thinnestSectionM: z.number().min(0.0001).max(1).nullable().default(null),
  label: z.string().max(120).default(''),
  pattern: patternSchema.nullable().default(null),
  overrides,
});
export type Mould = z.infer<typeof mouldSchema>;

export const furnitureSchema = z.strictObject({
  material: materialId,
  massKg,
  thicknessM: z.number().min(0.001).max(0.5).nullable().default(null),
  overrides,
});
export type Furniture = z.infer<typeof furnitureSchema>;

export const CHARGE_KINDS = ['ingot', 'returns', 'addition'] as const;

/** One part of a charge: ingot, returns of earlier pours, or an addition, with a note where it says more. */
const chargePartSchema = z.strictObject({
  kind: z.enum(CHARGE_KINDS),
  /** Of the table; left out: the metal of the pour. */
  metal: materialId.optional(),
  massKg,
  note: z.string().max(200).optional(),
});

/** An alloy of the studio's own, by component: mass shares by chemical symbol, and where it melts. */
const ownAlloySchema = z
  .strictObject({
    composition: z.record(z.string().regex(/^[A-Z][a-z]?$/), z.number().gt(0).max(1)),
    solidusC: z.number().min(100).max(1800),
    liquidusC: z.number().min(100).max(1800),
  })
  .refine(({ solidusC, liquidusC }) => solidusC <= liquidusC, {
    message: 'a solidus is no higher than the liquidus',
    path: ['solidusC'],
  })
  .refine(
    ({ composition }) =>
      Math.abs(Object.values(composition).reduce((sum, each) => sum + each, 0) - 1) < 0.005,
    { message: 'mass shares that add up to 1', path: ['composition'] },
  );

// What was added to a pour later is optional and has no default: kept versions must keep their canonical form and seal.
export const pourSchema = z.strictObject({
  metal: materialId,
  chargeKg: massKg,
  furnaceId: z.uuid().toLowerCase().nullable().default(null),
  pourC: z.number().min(100).max(1800),
  carryS: z.number().min(0).max(3600).default(30),
  /** Left out: a clay-graphite crucible that the charge fills. */
  crucibleKg: z.number().min(0).max(2000).optional(),
  /** What the charge is made up of; left out: all of it the metal named. */
  charge: z.array(chargePartSchema).max(40).optional(),
  /** Left out: the metal named, by the table. */
  alloy: ownAlloySchema.optional(),
});
export type Pour = z.infer<typeof pourSchema>;
export type ChargePart = z.infer<typeof chargePartSchema>;

export const loadSchema = z.strictObject({
  /** Temperature of the load when it goes in; null: that of the kiln. */
  startC: z.number().min(-20).max(1400).nullable().default(null),
  moulds: z.array(mouldSchema).max(60).default([]),
  furniture: z.array(furnitureSchema).max(60).default([]),
  pour: pourSchema.nullable().default(null),
});
/** What stands in the kiln: moulds with their patterns, furniture, and the pour that waits for them. */
export type Load = z.infer<typeof loadSchema>;
export type LoadInput = z.input<typeof loadSchema>;
