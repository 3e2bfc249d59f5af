import { useFieldArray } from 'react-hook-form';
import { messageAt, QuantityField, WordsField, type FormTools } from './fields';
import { DAYS, EVERY_DAY, type TariffTyped } from './tariff-form';

type Tools = FormTools<TariffTyped>;

function Days({ form, index }: { readonly form: Tools; readonly index: number }) {
  const error = messageAt(form.errors, `bands.${index}.days`);
  return (
    <fieldset>
      <legend className="label mb-1">On</legend>
      <div className="flex flex-wrap gap-1.5">
        {DAYS.map((day, at) => (
          <label
            key={day}
            className="chip has-checked:border-ink has-checked:bg-ink has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-hot"
          >
            <input
              type="checkbox"
              className="sr-only"
              value={String(at + 1)}
              {...form.register(`bands.${index}.days`)}
            />
            <span aria-hidden="true">{day.slice(0, 3)}</span>
            <span className="sr-only">{day}</span>
          </label>
        ))}
      </div>
      {error && <p className="error mt-1">{error}</p>}
    </fieldset>
  );
}

/** Prices that hold at some hours of some days. */
export function TariffBands({ form }: { readonly form: Tools }) {
  const bands = useFieldArray({ control: form.control, name: 'bands' });
  return (
    <section className="border-t border-line py-5">
      <h2 className="section-title">Prices by time of use</h2>
      <p className="hint mb-3">Local time. A price may run past midnight, from 22:00 to 06:00.</p>
      <ol className="grid gap-2.5">
        {bands.fields.map((band, index) => (
          <li key={band.id} className="sheet grid gap-3 p-3">
            <Days form={form} index={index} />
            <div className="grid gap-3 sm:grid-cols-[8rem_8rem_10rem_auto] sm:items-end">
              <WordsField form={form} name={`bands.${index}.fromMinute`} label="From" maxLength={5} />
              <WordsField form={form} name={`bands.${index}.toMinute`} label="To" maxLength={5} />
              <QuantityField
                form={form}
                name={`bands.${index}.pricePerKWh`}
                label="Price of one kWh"
                kind="number"
              />
              <button type="button" className="btn sm:justify-self-start" onClick={() => bands.remove(index)}>
                Take out<span className="sr-only"> price {index + 1}</span>
              </button>
            </div>
          </li>
        ))}
      </ol>
      {bands.fields.length < 24 && (
        <button
          type="button"
          className="btn btn-small mt-2"
          onClick={() =>
            bands.append({ days: EVERY_DAY, fromMinute: '22:00', toMinute: '06:00', pricePerKWh: '' })
          }
        >
          Add a price
        </button>
      )}
    </section>
  );
}
