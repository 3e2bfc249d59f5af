import { z } from '../zod';

/** How far a figure may be trusted: read in a publication, recalled from one, handed down in the trade, or worked out from stated inputs. */
export const CONFIDENCES = ['published', 'memory', 'common-practice', 'derived'] as const;
export const confidenceSchema = z.enum(CONFIDENCES);
export type Confidence = z.infer<typeof confidenceSchema>;

const provenance = {
  unit: z.string().max(30),
  source: z.string().min(1).max(300),
  confidence: confidenceSchema,
};

const constantSchema = z.strictObject({ value: z.number(), ...provenance });
const curveSchema = z.strictObject({
  /** [°C, value] in rising temperature; straight lines between, constant outside. */
  points: z.array(z.tuple([z.number(), z.number()])).min(2),
  ...provenance,
});
/** One property of one material: a constant or a curve over temperature, with its unit, source and confidence. */
export const propertySchema = z.union([constantSchema, curveSchema]);
export type Property = z.infer<typeof propertySchema>;

/** Minerals and glasses whose behaviour on heating a mould takes from what it contains. */
export const MINERALS = [
  'fused-silica',
  'quartz',
  'cristobalite',
  'gypsum',
  'mullite',
  'zircon',
  'magnesium-phosphate',
] as const;
export const mineralSchema = z.enum(MINERALS);
export type Mineral = z.infer<typeof mineralSchema>;

const identity = {
  id: z.string().regex(/^[a-z0-9]+(-[a-z0-9]+)*$/),
  name: z.string().min(1).max(80),
  note: z.string().max(400),
};

/** One Arrhenius step: dα/dt = A·exp(−E/RT)·f(α), α the share of this step's own mass that has gone. */
export const kineticStepSchema = z.strictObject({
  name: z.string(),
  /** Share of the undrained, ash-free pattern mass that this step takes away; the shares of a set add up to 1. */
  massShare: z.number().gt(0).max(1),
  activationKJPerMol: z.number().gt(0),
  preExponentialPerS: z.number().gt(0),
  /** `first-order`: f = 1 − α. `random-scission`: f = 2(√α − α), started at α = 1e-4. */
  model: z.enum(['first-order', 'random-scission']),
  /** Name of the step whose residue this one burns; null: it runs beside the others from the start. */
  follows: z.string().nullable(),
  /** Runs only as fast as air reaches it. */
  needsAir: z.boolean(),
  source: z.string(),
  confidence: confidenceSchema,
});
export type KineticStep = z.infer<typeof kineticStepSchema>;

export const kineticSetSchema = z.strictObject({
  name: z.string(),
  atmosphere: z.enum(['air', 'nitrogen']),
  steps: z.array(kineticStepSchema).min(1),
});
export type KineticSet = z.infer<typeof kineticSetSchema>;

/** `melts`: runs like a liquid. `softens`: a polymer that flows slowly. `collapses`: foam. `thermoset`: never flows. */
export const PATTERN_BEHAVIOURS = ['melts', 'softens', 'collapses', 'thermoset'] as const;

export const patternMaterialSchema = z.strictObject({
  ...identity,
  behaviour: z.enum(PATTERN_BEHAVIOURS),
  properties: z.strictObject({
    densityKgPerM3: propertySchema,
    /** Where it loses its stiffness: glass transition of a polymer, softening of a wax. */
    softensC: propertySchema,
    /** Where it is liquid; the thermosets have none. */
    meltsC: propertySchema.optional(),
    /** Core temperature above which the pattern runs out; the thermosets have none. */
    flowsC: propertySchema.optional(),
    /** Share of its mass that runs out of a mould with a way out. */
    drainedShare: propertySchema,
    drainTimeS: propertySchema.optional(),
    liquidDensityKgPerM3: propertySchema.optional(),
    /** Linear, as a solid. */
    expansionPerK: propertySchema,
    /** Growth in volume from room temperature until it flows (to burning, for a thermoset). */
    expansionVolumeShare: propertySchema,
    heatCapacityJPerKgK: propertySchema,
    conductivityWPerMK: propertySchema,
    heatOfFusionJPerKg: propertySchema.optional(),
    heatOfCombustionJPerKg: propertySchema,
    airKgPerKg: propertySchema,
    ashShare: propertySchema,
    burnedOutC: propertySchema,
    /** Thickness above which a solid piece of it pushes on the mould. */
    pushesAboveM: propertySchema.optional(),
  }),
  kinetics: kineticSetSchema,
  /** Other published sets for the same material, to show how far sources differ. */
  otherKinetics: z.array(kineticSetSchema),
});
export type PatternMaterial = z.infer<typeof patternMaterialSchema>;

export const ZONES = [
  'drying',
  'steam',
  'organics',
  'dehydroxylation',
  'cristobalite',
  'quartz',
  'whole',
] as const;

/** A limit on how fast a mould may be taken through a range of temperature. */
export const rateLimitSchema = z.strictObject({
  zone: z.enum(ZONES),
  direction: z.enum(['heating', 'cooling']),
  fromC: z.number(),
  toC: z.number(),
  maxRateCPerH: z.number().gt(0),
  /** Holds only while the mould still has this: free water, a pattern, cristobalite grown in the firing. Null: always. */
  onlyWith: z.enum(['water', 'pattern', 'devitrified']).nullable(),
  source: z.string(),
  confidence: confidenceSchema,
});
export type RateLimit = z.infer<typeof rateLimitSchema>;

/** A change on heating that takes up heat and gives off mass, completed between two temperatures. */
export const reactionSchema = z.strictObject({
  name: z.string(),
  fromC: z.number(),
  toC: z.number(),
  /** Heat taken up by the complete change, per kg of dry mould as set. */
  heatJPerKg: z.number(),
  /** Mass given off by the complete change, as a share of the dry mould as set. */
  massShare: z.number().min(0).max(1),
  gas: z.enum(['water', 'ammonia-and-water']),
  source: z.string(),
  confidence: confidenceSchema,
});
export type Reaction = z.infer<typeof reactionSchema>;

export const mouldMaterialSchema = z.strictObject({
  ...identity,
  form: z.enum(['shell', 'flask']),
  binder: z.enum(['silica', 'gypsum', 'phosphate']),
  contains: z.array(mineralSchema).min(1),
  properties: z.strictObject({
    densityKgPerM3: propertySchema,
    conductivityWPerMK: propertySchema,
    wetConductivityWPerMK: propertySchema.optional(),
    heatCapacityJPerKgK: propertySchema,
    emissivity: propertySchema,
    porosityShare: propertySchema,
    /** How much longer the way of vapour through its pores is, and narrower: free diffusivity × porosity over it. */
    tortuosity: propertySchema,
    permeabilityM2: propertySchema.optional(),
    maxC: propertySchema,
    /** Above it, carbon left in a gypsum mould breaks the binder down and gives off sulphur dioxide. */
    maxWithCarbonC: propertySchema.optional(),
    greenStrengthPa: propertySchema,
    /** Share of the green strength that is left while steam-wet. */
    wetStrengthShare: propertySchema.optional(),
    firedStrengthPa: propertySchema,
    youngPa: propertySchema,
    poissonRatio: propertySchema,
    expansionPerK: propertySchema,
    typicalWallM: propertySchema.optional(),
    coatM: propertySchema.optional(),
    /** Free water of a fresh mould per kg of dry mould. */
    freshWaterShare: propertySchema.optional(),
    heatWorkReferenceC: propertySchema.optional(),
    heatWorkActivationKJPerMol: propertySchema.optional(),
    heatWorkTargetH: propertySchema.optional(),
    heatWorkMostH: propertySchema.optional(),
    cristobaliteFromC: propertySchema.optional(),
    cristobaliteAfterH: propertySchema.optional(),
  }),
  rateLimits: z.array(rateLimitSchema),
  reactions: z.array(reactionSchema),
});
export type MouldMaterial = z.infer<typeof mouldMaterialSchema>;

export const metalMaterialSchema = z.strictObject({
  ...identity,
  /** Mass shares by chemical symbol, adding up to 1: the nominal composition. */
  composition: z.record(z.string(), z.number().gt(0).max(1)),
  properties: z.strictObject({
    solidusC: propertySchema,
    liquidusC: propertySchema,
    densityKgPerM3: propertySchema,
    liquidDensityKgPerM3: propertySchema,
    /** Mean from room temperature to the solidus. */
    heatCapacityJPerKgK: propertySchema,
    liquidHeatCapacityJPerKgK: propertySchema,
    heatOfFusionJPerKg: propertySchema,
    pourLightFromC: propertySchema,
    pourLightToC: propertySchema,
    pourHeavyFromC: propertySchema,
    pourHeavyToC: propertySchema,
    /** Where zinc in it boils off as fume. */
    zincFumeFromC: propertySchema.optional(),
  }),
});
export type MetalMaterial = z.infer<typeof metalMaterialSchema>;

export const liningMaterialSchema = z.strictObject({
  ...identity,
  properties: z.strictObject({
    densityKgPerM3: propertySchema,
    conductivityWPerMK: propertySchema,
    heatCapacityJPerKgK: propertySchema,
    emissivity: propertySchema,
    maxC: propertySchema,
  }),
});
export type LiningMaterial = z.infer<typeof liningMaterialSchema>;

export const furnitureMaterialSchema = z.strictObject({
  ...identity,
  properties: z.strictObject({
    densityKgPerM3: propertySchema,
    conductivityWPerMK: propertySchema,
    heatCapacityJPerKgK: propertySchema,
    emissivity: propertySchema,
    maxC: propertySchema,
  }),
});
export type FurnitureMaterial = z.infer<typeof furnitureMaterialSchema>;

export const fuelMaterialSchema = z.strictObject({
  ...identity,
  properties: z.strictObject({
    /** Higher heating value: the water of burning condensed. */
    higherHeatingJPerKg: propertySchema.optional(),
    lowerHeatingJPerKg: propertySchema.optional(),
    gasDensityKgPerM3: propertySchema.optional(),
    airKgPerKg: propertySchema.optional(),
    /** On the higher heating value. */
    co2KgPerKWh: propertySchema,
  }),
  /** Share of the higher heating value left for the kiln, by flue temperature and excess air; null: not a fuel that is burned. */
  availableHeat: z
    .strictObject({
      fluesC: z.array(z.number()),
      excessAirShares: z.array(z.number()),
      /** One row per flue temperature, one column per excess air. */
      shares: z.array(z.array(z.number())),
      source: z.string(),
      confidence: confidenceSchema,
    })
    .nullable(),
});
export type FuelMaterial = z.infer<typeof fuelMaterialSchema>;

/** The whole table, as `GET /api/materials` answers it. */
export const materialsSchema = z.strictObject({
  patterns: z.array(patternMaterialSchema),
  moulds: z.array(mouldMaterialSchema),
  metals: z.array(metalMaterialSchema),
  linings: z.array(liningMaterialSchema),
  furniture: z.array(furnitureMaterialSchema),
  fuels: z.array(fuelMaterialSchema),
});
export type Materials = z.infer<typeof materialsSchema>;
