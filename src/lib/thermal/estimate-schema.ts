import { z } from '../zod';

const n = z.number();
const series = z.array(z.number());

export const CAUTION_CODES = [
  'above-kiln-limit',
  'above-material-limit',
  'above-thermocouple-limit',
  'kiln-cannot-follow',
  'steam-in-wall',
  'pattern-expands-first',
  'no-drain-step',
  'burnout-incomplete',
  'burnout-starved',
  'offgas-peak',
  'burning-heats-kiln',
  'too-steep-for-wall',
  'inversion-too-fast',
  'core-behind-at-hold-end',
  'heat-work-short',
  'oversintered',
  'cristobalite',
  'sulphur-risk',
  'cooling-too-fast',
  'mould-cold-at-pour',
  'metal-not-ready',
  'attended-at-night',
  'opens-hot',
  'programmer-cannot-hold-it',
] as const;

export const cautionSchema = z.strictObject({
  code: z.enum(CAUTION_CODES),
  severity: z.enum(['stop', 'warn', 'note']),
  /** Index of the segment, or null where it concerns the whole firing. */
  segment: z.number().int().min(0).nullable(),
  /** Seconds from the start, or null. */
  atS: n.nullable(),
  text: z.string(),
  source: z.string(),
});
export type Caution = z.infer<typeof cautionSchema>;

export const moneySchema = z.strictObject({
  amount: z.string().regex(/^-?\d+(\.\d+)?$/),
  currency: z.string().length(3),
});

const fillSchema = z.strictObject({
  judgement: z.enum(['likely-fills', 'may-misrun', 'likely-misruns']),
  /** How long metal goes on flowing in the thinnest section, s: best guess and the range it may well lie in. */
  flowsS: n,
  flowsFromS: n,
  flowsToS: n,
  /** How long filling the mould is taken to last, s. */
  fillS: n,
  /** Superheat as the metal enters, and what the trade pours such sections with, °C. */
  superheatC: n,
  usualSuperheatFromC: n,
  usualSuperheatToC: n,
});

export const pourEstimateSchema = z.strictObject({
  /** Into charge and crucible; into the charge alone; what the component sum may be off by. */
  heatKWh: n,
  chargeKWh: n,
  chargeErrorKWh: n,
  /** Electricity, or fuel on its higher heating value; null: no furnace is chosen. */
  inputKWh: n.nullable(),
  fuelKg: n,
  fuelM3: n,
  co2Kg: n.nullable(),
  cost: moneySchema.nullable(),
  meltS: n.nullable(),
  /** Seconds from the kiln's start at which the furnace is lit and the metal is ready; null: no furnace, or nothing to be ready for. */
  furnaceStartS: n.nullable(),
  metalReadyS: n.nullable(),
  /** When mould and metal are both ready; null: never. */
  atS: n.nullable(),
  metalAtPourC: n,
  liquidusC: n,
  /** How long the metal may be carried before it has hardly any superheat, s. */
  metalWindowS: n,
  moulds: z.array(
    z.strictObject({ mould: z.number().int(), coreLeavingC: n, coreAtPourC: n, fill: fillSchema.nullable() }),
  ),
});
/** The pour that a firing leads to. Every figure is an estimate. */
export type PourEstimate = z.infer<typeof pourEstimateSchema>;

export const estimateSegmentSchema = z.strictObject({
  plannedStartS: n,
  plannedEndS: n,
  startS: n,
  rampEndS: n,
  endS: n,
  energyKWh: n,
  kilnLimited: z.boolean(),
  /** How much longer the hold would have to last for the shown mould's core to be within 10 °C of it, s; null: it is, or nothing is held. */
  soakMoreS: n.nullable(),
});

export const estimateSchema = z.strictObject({
  plannedS: n,
  predictedS: n,
  /** Electricity, or fuel on its higher heating value. */
  energyKWh: n,
  fuelKg: n,
  fuelM3: n,
  co2Kg: n,
  cost: moneySchema.nullable(),
  peakC: n,
  /** The mould core is within 10 °C of the casting hold's target (of the highest hold where no segment is a casting hold); null: never. */
  readyS: n.nullable(),
  /** Seconds from the start at which the chamber is at the kiln's opening temperature; null: not within the horizon computed. */
  openableS: n.nullable(),
  segments: z.array(estimateSegmentSchema),
  /** Which mould of the load `mouldSurfaceC` to `heatWorkH` are for (the slowest unless asked); null: no mould. */
  mould: z.number().int().nullable(),
  curve: z.strictObject({
    timeS: series,
    plannedC: series,
    chamberC: series,
    mouldSurfaceC: series,
    mouldCoreC: series,
    powerKW: series,
    patternLeftShare: series,
    waterLeftKg: series,
    gasGPerMin: series,
    heatWorkH: series,
  }),
  energy: z.strictObject({
    inKWh: n,
    wallsKWh: n,
    loadKWh: n,
    lossesKWh: n,
    ventKWh: n,
    reactionsKWh: n,
    patternKWh: n,
    imbalance: n,
  }),
  /** The highest cone that the shown mould's core brings down, "about cone n"; null: not even 019. */
  cone: z.string().nullable(),
  /** What the lines of moulds bear of energy and cost, by mass with water and pattern. */
  split: z.array(
    z.strictObject({
      mould: z.number().int(),
      massKg: n,
      share: n,
      energyKWh: n,
      cost: moneySchema.nullable(),
    }),
  ),
  /** Null where the load has no pour. */
  pour: pourEstimateSchema.nullable(),
  cautions: z.array(cautionSchema),
});
/** What the models say of one firing: times, energy, curves, cautions. Every figure is an estimate. */
export type Estimate = z.infer<typeof estimateSchema>;
