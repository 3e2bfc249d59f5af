import { unitsSchema } from '~/lib/contracts/common';
import { thermocoupleInputSchema, thermocoupleSchema, type Thermocouple } from '~/lib/contracts/equipment';
import type { UnitPreferences } from '~/lib/units';
import { z } from '~/lib/zod';
import { fieldText, quantity, quantityOrNull, rangeOf } from './quantity';

export const thermocoupleFormPropsSchema = z.strictObject({
  thermocouple: thermocoupleSchema.nullable(),
  units: unitsSchema,
});
export type ThermocoupleFormProps = z.input<typeof thermocoupleFormPropsSchema>;

const shape = thermocoupleInputSchema.shape;

/** From what was typed to the thermocouple of the contract. */
export function thermocoupleFormSchema(units: UnitPreferences) {
  const point = shape.calibration.unwrap().element.shape;
  return z.object({
    name: z.string().trim().min(1, 'Give the thermocouple a name.').max(120),
    type: shape.type,
    toleranceClass: shape.toleranceClass.unwrap(),
    sheathM: quantityOrNull('length', units, rangeOf(shape.sheathM)),
    maxC: quantityOrNull('temperature', units, rangeOf(shape.maxC)),
    calibration: z.array(
      z.object({
        atC: quantity('temperature', units, rangeOf(point.atC)),
        offsetC: quantity('interval', units, rangeOf(point.offsetC)),
      }),
    ),
    note: z.string().max(2000),
  });
}
export type ThermocoupleTyped = z.input<ReturnType<typeof thermocoupleFormSchema>>;
export type ThermocoupleSent = z.output<ReturnType<typeof thermocoupleFormSchema>>;

/** What stands in the fields at first. */
export function thermocoupleTyped(kept: Thermocouple | null, units: UnitPreferences): ThermocoupleTyped {
  return {
    name: kept?.name ?? '',
    type: kept?.type ?? 'K',
    toleranceClass: kept?.toleranceClass ?? '2',
    sheathM: fieldText(kept?.sheathM, 'length', units),
    maxC: fieldText(kept?.maxC, 'temperature', units),
    calibration: (kept?.calibration ?? []).map((point) => ({
      atC: fieldText(point.atC, 'temperature', units),
      offsetC: fieldText(point.offsetC, 'interval', units),
    })),
    note: kept?.note ?? '',
  };
}
