import { kilnSchema, type Kiln } from '~/lib/contracts/equipment';
import { unitsSchema } from '~/lib/contracts/common';
import { electricKilnSchema, FUELS, gasKilnSchema, LININGS } from '~/lib/thermal/kiln-schema';
import type { UnitPreferences } from '~/lib/units';
import { z } from '~/lib/zod';
import { fieldText, quantity, quantityOrNull, rangeOf, type Kind } from './quantity';

const choice = z.strictObject({ id: z.string(), name: z.string() });
export const kilnFormPropsSchema = z.strictObject({
  kiln: kilnSchema.nullable(),
  units: unitsSchema,
  thermocouples: z.array(choice),
  tariffs: z.array(choice),
  linings: z.array(choice),
});
export type KilnFormProps = z.input<typeof kilnFormPropsSchema>;

const text = z.string();
/** Everything a person can type, as text; which part is read depends on what heats the kiln. */
const typedSchema = z.object({
  energy: z.enum(['electric', 'gas']),
  name: text,
  innerWidthM: text,
  innerDepthM: text,
  innerHeightM: text,
  lining: z.enum(LININGS),
  liningM: text,
  liningLayers: z.array(z.object({ material: text, thicknessM: text })),
  maxC: text,
  ratedKW: text,
  voltsV: text,
  supplyV: text,
  ratedPowerShare: text,
  burnerKW: text,
  fuel: z.enum(FUELS),
  excessAirShare: text,
  ventM3PerH: text,
  waitBandC: text,
  programmerSegments: text,
  programmerMaxRateCPerH: text,
  openAtC: text,
  lossFactor: text,
  heatCapacityFactor: text,
  thermocoupleLagS: text,
  thermocoupleOffsetC: text,
  thermocoupleId: text,
  tariffId: text,
  note: text,
});
export type KilnTyped = z.input<typeof typedSchema>;

const idOrNull = z.string().transform((id) => (id === '' ? null : id));

function readersFor(units: UnitPreferences) {
  const electric = electricKilnSchema.shape;
  const gas = gasKilnSchema.shape;
  const must = (kind: Kind, schema: z.ZodType) => quantity(kind, units, rangeOf(schema));
  const may = (kind: Kind, schema: z.ZodType) => quantityOrNull(kind, units, rangeOf(schema));
  const layer = electric.liningLayers.unwrap().element.shape;
  const common = {
    name: z.string().trim().min(1, 'Give the kiln a name.').max(120),
    innerWidthM: must('length', electric.innerWidthM),
    innerDepthM: must('length', electric.innerDepthM),
    innerHeightM: must('length', electric.innerHeightM),
    lining: electric.lining,
    liningM: must('length', electric.liningM),
    liningLayers: z.array(z.object({ material: z.string(), thicknessM: must('length', layer.thicknessM) })),
    maxC: must('temperature', electric.maxC),
    ventM3PerH: may('number', electric.ventM3PerH),
    waitBandC: may('interval', electric.waitBandC),
    programmerSegments: may('number', electric.programmerSegments),
    programmerMaxRateCPerH: may('rate', electric.programmerMaxRateCPerH),
    openAtC: must('temperature', electric.openAtC),
    lossFactor: must('number', electric.lossFactor),
    heatCapacityFactor: must('number', electric.heatCapacityFactor),
    thermocoupleLagS: must('number', electric.thermocoupleLagS),
    thermocoupleOffsetC: must('interval', electric.thermocoupleOffsetC),
    thermocoupleId: idOrNull,
    tariffId: idOrNull,
    note: z.string().max(2000),
  };
  return {
    electric: z.object({
      energy: z.literal('electric'),
      ...common,
      ratedKW: must('number', electric.ratedKW),
      voltsV: may('number', electric.voltsV),
      supplyV: may('number', electric.supplyV),
      ratedPowerShare: must('percent', electric.ratedPowerShare),
    }),
    gas: z.object({
      energy: z.literal('gas'),
      ...common,
      burnerKW: must('number', gas.burnerKW),
      fuel: gas.fuel,
      excessAirShare: must('percent', gas.excessAirShare),
    }),
  };
}

/** From what was typed to the kiln of the contract. */
export function kilnFormSchema(units: UnitPreferences) {
  const readers = readersFor(units);
  return typedSchema.transform((typed, context) => {
    const result = readers[typed.energy].safeParse(typed);
    if (result.success) return result.data;
    for (const issue of result.error.issues)
      context.addIssue({ code: 'custom', message: issue.message, path: issue.path });
    return z.NEVER;
  });
}
export type KilnSent = z.output<ReturnType<typeof kilnFormSchema>>;

/** What stands in the fields at first: the kiln's values, or for a new one only what nearly every kiln shares. */
export function kilnTyped(kiln: Kiln | null, units: UnitPreferences): KilnTyped {
  const show = (kind: Kind, value: number | null | undefined) => fieldText(value, kind, units);
  const electric = kiln?.energy === 'electric' ? kiln : null;
  const gas = kiln?.energy === 'gas' ? kiln : null;
  return {
    energy: kiln?.energy ?? 'electric',
    name: kiln?.name ?? '',
    innerWidthM: show('length', kiln?.innerWidthM),
    innerDepthM: show('length', kiln?.innerDepthM),
    innerHeightM: show('length', kiln?.innerHeightM),
    lining: kiln?.lining ?? 'brick',
    liningM: show('length', kiln?.liningM),
    liningLayers: (kiln?.liningLayers ?? []).map((layer) => ({
      material: layer.material,
      thicknessM: show('length', layer.thicknessM),
    })),
    maxC: show('temperature', kiln?.maxC),
    ratedKW: show('number', electric?.ratedKW),
    voltsV: show('number', electric?.voltsV),
    supplyV: show('number', electric?.supplyV),
    ratedPowerShare: show('percent', electric?.ratedPowerShare ?? 1),
    burnerKW: show('number', gas?.burnerKW),
    fuel: gas?.fuel ?? 'propane',
    excessAirShare: show('percent', gas?.excessAirShare ?? 0.25),
    ventM3PerH: show('number', kiln?.ventM3PerH),
    waitBandC: show('interval', kiln?.waitBandC),
    programmerSegments: show('number', kiln?.programmerSegments),
    programmerMaxRateCPerH: show('rate', kiln?.programmerMaxRateCPerH),
    openAtC: show('temperature', kiln?.openAtC ?? 120),
    lossFactor: show('number', kiln?.lossFactor ?? 1),
    heatCapacityFactor: show('number', kiln?.heatCapacityFactor ?? 1),
    thermocoupleLagS: show('number', kiln?.thermocoupleLagS ?? 0),
    thermocoupleOffsetC: show('interval', kiln?.thermocoupleOffsetC ?? 0),
    thermocoupleId: kiln?.thermocoupleId ?? '',
    tariffId: kiln?.tariffId ?? '',
    note: kiln?.note ?? '',
  };
}
