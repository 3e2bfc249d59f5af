import { z } from '../zod';

const lengthM = z.number().min(0.02).max(20);

export const LININGS = ['brick', 'fibre', 'brick-and-fibre'] as const;
export const FUELS = ['propane', 'natural-gas'] as const;

/** Fields that a kiln has whatever heats it: what stands on its plate, and what its studio knows of it. */
const common = {
  innerWidthM: lengthM,
  innerDepthM: lengthM,
  innerHeightM: lengthM,
  lining: z.enum(LININGS),
  liningM: z.number().min(0.01).max(1),
  /** Layers from hot face to casing, where the studio knows them better than `lining` and `liningM` say. */
  liningLayers: z
    .array(z.strictObject({ material: z.string().min(1).max(60), thicknessM: z.number().min(0.001).max(1) }))
    .max(6)
    .default([]),
  maxC: z.number().min(100).max(1400),
  /** Air let in at the vent while it is open, m³/h at room temperature. Null: the default of the materials table. */
  ventM3PerH: z.number().min(0).max(500).nullable().default(null),
  waitBandC: z.number().min(1).max(200).nullable().default(null),
  programmerSegments: z.number().int().min(1).max(200).nullable().default(null),
  programmerMaxRateCPerH: z.number().min(1).max(5000).nullable().default(null),
  openAtC: z.number().min(30).max(400).default(120),
  /** Fitted or known corrections: 1 is the plate. */
  lossFactor: z.number().min(0.2).max(5).default(1),
  heatCapacityFactor: z.number().min(0.2).max(5).default(1),
  thermocoupleLagS: z.number().min(0).max(1800).default(0),
  thermocoupleOffsetC: z.number().min(-100).max(100).default(0),
};

export const electricKilnSchema = z.strictObject({
  energy: z.literal('electric'),
  ...common,
  ratedKW: z.number().min(0.1).max(1000),
  /** Plate voltage, and the measured supply (equal where null). */
  voltsV: z.number().min(10).max(1000).nullable().default(null),
  supplyV: z.number().min(10).max(1000).nullable().default(null),
  ratedPowerShare: z.number().min(0.1).max(1.2).default(1),
});

export const gasKilnSchema = z.strictObject({
  energy: z.literal('gas'),
  ...common,
  /** Burner input at full fire, kW on the higher heating value. */
  burnerKW: z.number().min(0.1).max(3000),
  fuel: z.enum(FUELS),
  /** Air over the stoichiometric, as a share: 0.25 is 25 %. */
  excessAirShare: z.number().min(0).max(3).default(0.25),
});

/** What the kiln model needs to know of a kiln. */
export const kilnPlateSchema = z.discriminatedUnion('energy', [electricKilnSchema, gasKilnSchema]);
export type KilnPlate = z.infer<typeof kilnPlateSchema>;
export type KilnPlateInput = z.input<typeof kilnPlateSchema>;
