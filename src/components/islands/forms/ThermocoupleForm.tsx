import { islandProps } from '~/lib/client/island-props';
import { zodResolver } from '@hookform/resolvers/zod';
import { useMemo } from 'react';
import { useFieldArray, useForm } from 'react-hook-form';
import { call } from '~/lib/client/api';
import { thermocoupleInputSchema, thermocoupleRoutes } from '~/lib/contracts/equipment';
import { TOLERANCE_NAMES } from '../../words/names';
import { ChoiceField, Part, QuantityField, WordsField, type FormTools } from './fields';
import { PostForm } from './PostForm';
import { SaveBar } from './SaveBar';
import {
  thermocoupleFormPropsSchema,
  thermocoupleFormSchema,
  thermocoupleTyped,
  type ThermocoupleFormProps,
  type ThermocoupleSent,
  type ThermocoupleTyped,
} from './thermocouple-form';
import { useSaving } from './use-saving';

const TYPES = thermocoupleInputSchema.shape.type.options.map((type) => ({
  value: type,
  text: `Type ${type}`,
}));
const CLASSES = thermocoupleInputSchema.shape.toleranceClass
  .unwrap()
  .options.map((name) => ({ value: name, text: TOLERANCE_NAMES[name] }));

function Calibration({ form }: { readonly form: FormTools<ThermocoupleTyped> }) {
  const points = useFieldArray({ control: form.control, name: 'calibration' });
  return (
    <section className="border-t border-line py-5">
      <h2 className="section-title">Calibration</h2>
      <p className="hint mb-3">How much it reads above the truth, by temperature. Empty: taken as true.</p>
      <ol className="grid max-w-xl gap-2.5">
        {points.fields.map((point, index) => (
          <li key={point.id} className="sheet grid gap-3 p-3 sm:grid-cols-[1fr_1fr_auto] sm:items-end">
            <QuantityField form={form} name={`calibration.${index}.atC`} label="At" kind="temperature" />
            <QuantityField
              form={form}
              name={`calibration.${index}.offsetC`}
              label="Reads above by"
              kind="interval"
            />
            <button type="button" className="btn" onClick={() => points.remove(index)}>
              Take out<span className="sr-only"> point {index + 1}</span>
            </button>
          </li>
        ))}
      </ol>
      {points.fields.length < 50 && (
        <button
          type="button"
          className="btn btn-small mt-2"
          onClick={() => points.append({ atC: '', offsetC: '' })}
        >
          Add a point
        </button>
      )}
    </section>
  );
}

/** A thermocouple: new, or to be changed. */
export default function ThermocoupleForm(given: ThermocoupleFormProps) {
  const { thermocouple, units } = useMemo(() => islandProps(thermocoupleFormPropsSchema, given), [given]);
  const schema = useMemo(() => thermocoupleFormSchema(units), [units]);
  const { register, control, handleSubmit, setError, formState } = useForm<ThermocoupleTyped>({
    defaultValues: thermocoupleTyped(thermocouple, units),
    resolver: zodResolver(schema, undefined, { raw: true }),
  });
  const form = { register, control, errors: formState.errors, units };
  const saving = useSaving<ThermocoupleTyped, ThermocoupleSent>(setError, async (sent) => {
    if (thermocouple)
      await call(thermocoupleRoutes.update, {
        params: { id: thermocouple.id },
        body: { ...sent },
        revision: thermocouple.revision,
      });
    else await call(thermocoupleRoutes.create, { body: sent });
    return `/thermocouples?done=${thermocouple ? 'saved' : 'added'}`;
  });
  return (
    <PostForm onSubmit={handleSubmit((typed) => saving.submit(schema.parse(typed)))}>
      <Part title="What it is">
        <WordsField form={form} name="name" label="What the studio calls it" maxLength={120} />
        <ChoiceField form={form} name="type" label="Type" options={TYPES} />
        <ChoiceField form={form} name="toleranceClass" label="Tolerance" options={CLASSES} />
        <QuantityField form={form} name="sheathM" label="Sheath diameter, if known" kind="length" />
        <QuantityField
          form={form}
          name="maxC"
          label="Used up to, if limited"
          kind="temperature"
          hint="Empty: as its type and size allow."
        />
      </Part>
      <Calibration form={form} />
      <Part title="Note">
        <div className="sm:col-span-2 lg:col-span-3">
          <WordsField form={form} name="note" label="Note" rows={2} maxLength={2000} />
        </div>
      </Part>
      <SaveBar
        problem={saving.problem}
        faults={Object.keys(formState.errors).length}
        busy={saving.busy}
        button={thermocouple ? 'Save the thermocouple' : 'Add the thermocouple'}
        cancelHref="/thermocouples"
      />
    </PostForm>
  );
}
