import { islandProps } from '~/lib/client/island-props';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { call } from '~/lib/client/api';
import { furnaceRoutes } from '~/lib/contracts/equipment';
import { ChoiceField, Part, QuantityField, SwitchField, WordsField, type FormTools } from './fields';
import {
  furnaceFormPropsSchema,
  furnaceFormSchema,
  furnaceTyped,
  type FurnaceFormProps,
  type FurnaceSent,
  type FurnaceTyped,
} from './furnace-form';
import { PostForm } from './PostForm';
import { SaveBar } from './SaveBar';
import { useSaving } from './use-saving';

const ENERGIES = [
  { value: 'electric', text: 'Electric' },
  { value: 'gas', text: 'Gas' },
];
const FUEL_OPTIONS = [
  { value: 'propane', text: 'Propane' },
  { value: 'natural-gas', text: 'Natural gas' },
];

function Heat({ form }: { readonly form: FormTools<FurnaceTyped> }) {
  const energy = useWatch({ control: form.control, name: 'energy' });
  return (
    <Part title="Heat">
      <div className="sm:col-span-2 lg:col-span-3">
        <SwitchField form={form} name="energy" label="Heated by" options={ENERGIES} />
      </div>
      {energy === 'electric' ? (
        <QuantityField form={form} name="ratedKW" label="Rated power" kind="number" unit="kW" />
      ) : (
        <>
          <QuantityField
            form={form}
            name="burnerKW"
            label="Burner input at full fire"
            kind="number"
            unit="kW"
          />
          <ChoiceField form={form} name="fuel" label="Fuel" options={FUEL_OPTIONS} />
        </>
      )}
      <QuantityField
        form={form}
        name="efficiencyShare"
        label="Heat into the metal, if known"
        kind="percent"
      />
      <QuantityField form={form} name="capacityKg" label="Largest charge" kind="mass" />
      <QuantityField form={form} name="maxC" label="Highest temperature" kind="temperature" />
    </Part>
  );
}

/** A melting furnace: new, or to be changed. */
export default function FurnaceForm(given: FurnaceFormProps) {
  const props = useMemo(() => islandProps(furnaceFormPropsSchema, given), [given]);
  const { furnace, units } = props;
  const schema = useMemo(() => furnaceFormSchema(units), [units]);
  const { register, control, handleSubmit, setError, formState } = useForm<FurnaceTyped>({
    defaultValues: furnaceTyped(furnace, units),
    resolver: zodResolver(schema, undefined, { raw: true }),
  });
  const form = { register, control, errors: formState.errors, units };
  const saving = useSaving<FurnaceTyped, FurnaceSent>(setError, async (sent) => {
    if (furnace)
      await call(furnaceRoutes.update, {
        params: { id: furnace.id },
        body: { ...sent },
        revision: furnace.revision,
      });
    else await call(furnaceRoutes.create, { body: sent });
    return `/furnaces?done=${furnace ? 'saved' : 'added'}`;
  });
  const tariffs = [
    { value: '', text: 'No cost' },
    ...props.tariffs.map((tariff) => ({ value: tariff.id, text: tariff.name })),
  ];
  return (
    <PostForm onSubmit={handleSubmit((typed) => saving.submit(schema.parse(typed)))}>
      <Part title="Name">
        <div className="sm:col-span-2">
          <WordsField form={form} name="name" label="What the studio calls it" maxLength={120} />
        </div>
      </Part>
      <Heat form={form} />
      <Part title="Goes with it">
        <ChoiceField form={form} name="tariffId" label="Tariff" options={tariffs} />
        <div className="sm:col-span-2 lg:col-span-3">
          <WordsField form={form} name="note" label="Note" rows={2} maxLength={2000} />
        </div>
      </Part>
      <SaveBar
        problem={saving.problem}
        faults={Object.keys(formState.errors).length}
        busy={saving.busy}
        button={furnace ? 'Save the furnace' : 'Add the furnace'}
        cancelHref="/furnaces"
      />
    </PostForm>
  );
}
