import { useFieldArray } from 'react-hook-form';
import { ChoiceField, QuantityField, type FormTools } from './fields';
import type { KilnFormProps, KilnTyped } from './kiln-form';

/** Layers of the wall where the studio knows them better than kind and thickness say. */
export function LiningLayers(props: {
  readonly form: FormTools<KilnTyped>;
  readonly linings: KilnFormProps['linings'];
}) {
  const { form, linings } = props;
  const layers = useFieldArray({ control: form.control, name: 'liningLayers' });
  const options = linings.map((lining) => ({ value: lining.id, text: lining.name }));
  return (
    <fieldset>
      <legend className="label">Layers of the wall, if known</legend>
      <p className="hint mb-2">
        From the hot face outwards, the casing included. Empty: as lining and thickness say.
      </p>
      <ol className="grid gap-2.5">
        {layers.fields.map((layer, index) => (
          <li key={layer.id} className="sheet grid gap-3 p-3 sm:grid-cols-[1fr_10rem_auto] sm:items-end">
            <ChoiceField
              form={form}
              name={`liningLayers.${index}.material`}
              label={`Layer ${index + 1}`}
              options={options}
            />
            <QuantityField
              form={form}
              name={`liningLayers.${index}.thicknessM`}
              label="Thickness"
              kind="length"
            />
            <button type="button" className="btn" onClick={() => layers.remove(index)}>
              Take out<span className="sr-only"> layer {index + 1}</span>
            </button>
          </li>
        ))}
      </ol>
      {layers.fields.length < 6 && (
        <button
          type="button"
          className="btn btn-small mt-2"
          onClick={() => layers.append({ material: linings[0]?.id ?? '', thicknessM: '' })}
        >
          Add a layer
        </button>
      )}
    </fieldset>
  );
}
