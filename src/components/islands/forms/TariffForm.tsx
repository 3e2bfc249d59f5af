import { islandProps } from '~/lib/client/island-props';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo } from 'react';
import { useForm, useWatch } from 'react-hook-form';
import { call } from '~/lib/client/api';
import { tariffRoutes } from '~/lib/contracts/equipment';
import { METRIC } from '~/lib/units';
import { ChoiceField, Part, QuantityField, SwitchField, WordsField, type FormTools } from './fields';
import { PostForm } from './PostForm';
import { SaveBar } from './SaveBar';
import { TariffBands } from './TariffBands';
import {
  tariffFormPropsSchema,
  tariffFormSchema,
  tariffTyped,
  type TariffFormProps,
  type TariffSent,
  type TariffTyped,
} from './tariff-form';
import { useSaving } from './use-saving';

const ENERGIES = [
  { value: 'electricity', text: 'Electricity' },
  { value: 'propane', text: 'Propane' },
  { value: 'natural-gas', text: 'Natural gas' },
];
const PER_FUEL = [
  { value: 'kWh', text: 'kWh, on the higher heating value' },
  { value: 'kg', text: 'kg' },
  { value: 'm3', text: 'm³' },
];

function Price({ form }: { readonly form: FormTools<TariffTyped> }) {
  const energy = useWatch({ control: form.control, name: 'energy' });
  const currency = useWatch({ control: form.control, name: 'currency' });
  return (
    <>
      <Part title="What is metered">
        <div className="sm:col-span-2 lg:col-span-3">
          <SwitchField form={form} name="energy" label="Energy" options={ENERGIES} />
        </div>
        <WordsField
          form={form}
          name="currency"
          label="Currency"
          maxLength={3}
          hint="Three letters, like EUR."
        />
        {energy !== 'electricity' && (
          <ChoiceField form={form} name="per" label="Price is for each" options={PER_FUEL} />
        )}
        <QuantityField
          form={form}
          name="price"
          label={energy === 'electricity' ? 'Price of one kWh' : 'Price'}
          kind="number"
          unit={currency}
          hint={energy === 'electricity' ? 'Holds where no other price does.' : ''}
        />
      </Part>
      {energy === 'electricity' && <TariffBands form={form} />}
    </>
  );
}

/** A tariff with its prices by time of use: new, or to be changed. */
export default function TariffForm(given: TariffFormProps) {
  const { tariff } = useMemo(() => islandProps(tariffFormPropsSchema, given), [given]);
  const { register, control, handleSubmit, setError, formState } = useForm<TariffTyped>({
    defaultValues: tariffTyped(tariff),
    resolver: zodResolver(tariffFormSchema, undefined, { raw: true }),
  });
  const form = { register, control, errors: formState.errors, units: METRIC };
  const saving = useSaving<TariffTyped, TariffSent>(setError, async (sent) => {
    if (tariff)
      await call(tariffRoutes.update, {
        params: { id: tariff.id },
        body: { ...sent },
        revision: tariff.revision,
      });
    else await call(tariffRoutes.create, { body: sent });
    return `/tariffs?done=${tariff ? 'saved' : 'added'}`;
  });
  return (
    <PostForm onSubmit={handleSubmit((typed) => saving.submit(tariffFormSchema.parse(typed)))}>
      <Part title="Name">
        <div className="sm:col-span-2">
          <WordsField form={form} name="name" label="What the studio calls it" maxLength={120} />
        </div>
      </Part>
      <Price form={form} />
      <Part title="Carbon dioxide" hint="Empty: the factor of the materials table, with its source.">
        <QuantityField form={form} name="co2KgPerKWh" label="CO₂ of one kWh" kind="number" unit="kg" />
        <div className="sm:col-span-2">
          <WordsField form={form} name="co2Source" label="Where the figure is from" maxLength={200} />
        </div>
      </Part>
      <Part title="Note">
        <div className="sm:col-span-2 lg:col-span-3">
          <WordsField form={form} name="note" label="Note" rows={2} maxLength={2000} />
        </div>
      </Part>
      <SaveBar
        problem={saving.problem}
        faults={Object.keys(formState.errors).length}
        busy={saving.busy}
        button={tariff ? 'Save the tariff' : 'Add the tariff'}
        cancelHref="/tariffs"
      />
    </PostForm>
  );
}
