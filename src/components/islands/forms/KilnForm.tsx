import { islandProps } from '~/lib/client/island-props';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { call } from '~/lib/client/api';
import { kilnRoutes } from '~/lib/contracts/equipment';
import { ChoiceField, Part, QuantityField, SwitchField, WordsField, type FormTools } from './fields';
import {
  kilnFormPropsSchema,
  kilnFormSchema,
  kilnTyped,
  type KilnFormProps,
  type KilnSent,
  type KilnTyped,
} from './kiln-form';
import { LiningLayers } from './LiningLayers';
import { PostForm } from './PostForm';
import { SaveBar } from './SaveBar';
import { useSaving } from './use-saving';

const ENERGIES = [
  { value: 'electric', text: 'Electric' },
  { value: 'gas', text: 'Gas' },
];
const LINING_OPTIONS = [
  { value: 'brick', text: 'Brick' },
  { value: 'fibre', text: 'Fibre' },
  { value: 'brick-and-fibre', text: 'Brick at the hot face, fibre behind' },
];
const FUEL_OPTIONS = [
  { value: 'propane', text: 'Propane' },
  { value: 'natural-gas', text: 'Natural gas' },
];
type Tools = FormTools<KilnTyped>;

function Plate({ form }: { readonly form: Tools }) {
  const energy = useWatch({ control: form.control, name: 'energy' });
  return (
    <Part title="On its plate" hint="Another unit may be typed: 18 in, 2300 °F.">
      <div className="sm:col-span-2 lg:col-span-3">
        <SwitchField form={form} name="energy" label="Heated by" options={ENERGIES} />
      </div>
      {energy === 'electric' ? (
        <>
          <QuantityField form={form} name="ratedKW" label="Rated power" kind="number" unit="kW" />
          <QuantityField form={form} name="voltsV" label="Plate voltage, if known" kind="number" unit="V" />
          <QuantityField
            form={form}
            name="supplyV"
            label="Measured supply, if known"
            kind="number"
            unit="V"
            hint="A lower supply than the plate's gives less power, by its square."
          />
        </>
      ) : (
        <>
          <QuantityField
            form={form}
            name="burnerKW"
            label="Burner input at full fire"
            kind="number"
            unit="kW"
            hint="On the higher heating value."
          />
          <ChoiceField form={form} name="fuel" label="Fuel" options={FUEL_OPTIONS} />
          <QuantityField form={form} name="excessAirShare" label="Excess air" kind="percent" />
        </>
      )}
      <QuantityField form={form} name="maxC" label="Highest temperature" kind="temperature" />
    </Part>
  );
}

function Chamber({ form, linings }: { readonly form: Tools; readonly linings: KilnFormProps['linings'] }) {
  return (
    <Part title="Chamber and lining" hint="Inner size, from hot face to hot face.">
      <QuantityField form={form} name="innerWidthM" label="Width inside" kind="length" />
      <QuantityField form={form} name="innerDepthM" label="Depth inside" kind="length" />
      <QuantityField form={form} name="innerHeightM" label="Height inside" kind="length" />
      <ChoiceField form={form} name="lining" label="Lining" options={LINING_OPTIONS} />
      <QuantityField form={form} name="liningM" label="Lining thickness" kind="length" />
      <QuantityField
        form={form}
        name="ventM3PerH"
        label="Air through its vent, if known"
        kind="number"
        unit="m³/h"
      />
      <div className="sm:col-span-2 lg:col-span-3">
        <LiningLayers form={form} linings={linings} />
      </div>
    </Part>
  );
}

function Programmer({ form }: { readonly form: Tools }) {
  return (
    <Part title="Its programmer and the studio's limits">
      <QuantityField form={form} name="programmerSegments" label="Most segments, if limited" kind="number" />
      <QuantityField
        form={form}
        name="programmerMaxRateCPerH"
        label="Steepest rate, if limited"
        kind="rate"
      />
      <QuantityField
        form={form}
        name="waitBandC"
        label="Waits when behind by more than"
        kind="interval"
        hint="Empty: its clock runs on whatever the kiln does."
      />
      <QuantityField form={form} name="openAtC" label="May be opened below" kind="temperature" />
    </Part>
  );
}

function Known({ form }: { readonly form: Tools }) {
  const energy = useWatch({ control: form.control, name: 'energy' });
  return (
    <details className="border-t border-line">
      <summary className="section-title py-4">
        <span className="underline decoration-line-ink underline-offset-4">
          What is known beyond the plate
        </span>
      </summary>
      <div className="grid items-start gap-x-5 gap-y-4 pb-5 sm:grid-cols-2 lg:grid-cols-3">
        {energy === 'electric' && (
          <QuantityField
            form={form}
            name="ratedPowerShare"
            label="Power still delivered"
            kind="percent"
            hint="Of the rated power. Worn elements give less."
          />
        )}
        <QuantityField
          form={form}
          name="lossFactor"
          label="Heat loss, times the model's"
          kind="number"
          unit="×"
        />
        <QuantityField
          form={form}
          name="heatCapacityFactor"
          label="Heat stored, times the model's"
          kind="number"
          unit="×"
        />
        <QuantityField
          form={form}
          name="thermocoupleLagS"
          label="Lag of the thermocouple"
          kind="number"
          unit="s"
        />
        <QuantityField
          form={form}
          name="thermocoupleOffsetC"
          label="Offset of the thermocouple"
          kind="interval"
          hint="What it reads above the truth."
        />
      </div>
    </details>
  );
}

const withNone = (items: readonly { id: string; name: string }[], none: string) => [
  { value: '', text: none },
  ...items.map((item) => ({ value: item.id, text: item.name })),
];

/** A kiln from what is on its plate: new, or to be changed. */
export default function KilnForm(given: KilnFormProps) {
  const props = useMemo(() => islandProps(kilnFormPropsSchema, given), [given]);
  const { kiln, units } = props;
  const schema = useMemo(() => kilnFormSchema(units), [units]);
  const { register, control, handleSubmit, setError, formState } = useForm<KilnTyped>({
    defaultValues: kilnTyped(kiln, units),
    resolver: zodResolver(schema, undefined, { raw: true }),
  });
  const form: Tools = { register, control, errors: formState.errors, units };
  const saving = useSaving<KilnTyped, KilnSent>(setError, async (sent) => {
    const saved = kiln
      ? await call(kilnRoutes.update, { params: { id: kiln.id }, body: { ...sent }, revision: kiln.revision })
      : await call(kilnRoutes.create, { body: sent });
    return `/kilns/${saved.id}?done=${kiln ? 'saved' : 'added'}`;
  });
  return (
    <PostForm onSubmit={handleSubmit((typed) => saving.submit(schema.parse(typed)))}>
      <Part title="Name">
        <div className="sm:col-span-2">
          <WordsField form={form} name="name" label="What the studio calls it" maxLength={120} />
        </div>
      </Part>
      <Plate form={form} />
      <Chamber form={form} linings={props.linings} />
      <Programmer form={form} />
      <Part title="Goes with it">
        <ChoiceField
          form={form}
          name="thermocoupleId"
          label="Thermocouple"
          options={withNone(props.thermocouples, 'None named')}
        />
        <ChoiceField
          form={form}
          name="tariffId"
          label="Tariff"
          options={withNone(props.tariffs, 'No cost')}
        />
        <div className="sm:col-span-2 lg:col-span-3">
          <WordsField form={form} name="note" label="Note" rows={2} maxLength={2000} />
        </div>
      </Part>
      <Known form={form} />
      <SaveBar
        problem={saving.problem}
        faults={Object.keys(formState.errors).length}
        busy={saving.busy}
        button={kiln ? 'Save the kiln' : 'Add the kiln'}
        cancelHref={kiln ? `/kilns/${kiln.id}` : '/kilns'}
      />
    </PostForm>
  );
}
