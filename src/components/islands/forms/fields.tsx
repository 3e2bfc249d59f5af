import type { ReactNode } from 'react';
import {
  useWatch,
  type Control,
  type FieldErrors,
  type FieldValues,
  type Path,
  type UseFormRegister,
} from 'react-hook-form';
import type { UnitPreferences } from '~/lib/units';
import { assumedUnit, understoodAs, type Kind } from './quantity';

export interface FormTools<T extends FieldValues> {
  readonly register: UseFormRegister<T>;
  readonly control: Control<T>;
  readonly errors: FieldErrors<T>;
  readonly units: UnitPreferences;
}

interface FieldProps<T extends FieldValues> {
  readonly form: FormTools<T>;
  readonly name: Path<T>;
  readonly label: string;
  readonly hint?: string;
}

/** The message for a field by its dotted path. */
export function messageAt(errors: object, path: string): string | undefined {
  let at: unknown = errors;
  for (const key of path.split('.')) at = (at as Record<string, unknown> | undefined)?.[key];
  const message = (at as { message?: unknown } | undefined)?.message;
  return typeof message === 'string' ? message : undefined;
}

const idOf = (name: string): string => `field-${name.replaceAll('.', '-')}`;

function describedBy(id: string, has: { hint: boolean; error: boolean; understood?: boolean }) {
  const ids = [has.error && `${id}-error`, has.understood && `${id}-understood`, has.hint && `${id}-hint`];
  return ids.filter(Boolean).join(' ') || undefined;
}

function Frame(props: {
  readonly id: string;
  readonly label: string;
  readonly hint?: string | undefined;
  readonly error?: string | undefined;
  readonly understood?: string | null;
  readonly children: ReactNode;
}) {
  const { id, label, hint, error, understood = null, children } = props;
  return (
    <div className="min-w-0">
      <label htmlFor={id} className="label mb-1">
        {label}
      </label>
      {children}
      {understood !== null && (
        <p id={`${id}-understood`} className="hint mt-1">
          understood as <span className="num text-ink">{understood}</span>
        </p>
      )}
      {error && (
        <p id={`${id}-error`} className="error mt-1">
          {error}
        </p>
      )}
      {hint && (
        <p id={`${id}-hint`} className="hint mt-1">
          {hint}
        </p>
      )}
    </div>
  );
}

export function WordsField<T extends FieldValues>(
  props: FieldProps<T> & { readonly maxLength?: number; readonly rows?: number },
) {
  const { form, name, label, hint, maxLength, rows } = props;
  const id = idOf(name);
  const error = messageAt(form.errors, name);
  const common = {
    id,
    className: 'input',
    maxLength,
    autoComplete: 'off',
    'aria-invalid': error ? true : undefined,
    'aria-describedby': describedBy(id, { hint: Boolean(hint), error: Boolean(error) }),
    ...form.register(name),
  };
  return (
    <Frame id={id} label={label} hint={hint} error={error}>
      {rows ? <textarea rows={rows} {...common} /> : <input type="text" {...common} />}
    </Frame>
  );
}

/** A number with its unit. Another unit may be typed; what was understood is shown. */
export function QuantityField<T extends FieldValues>(
  props: FieldProps<T> & { readonly kind: Kind; readonly unit?: string },
) {
  const { form, name, label, hint, kind, unit = assumedUnit(kind, form.units) } = props;
  const id = idOf(name);
  const typed = String(useWatch({ control: form.control, name }) ?? '');
  const error = messageAt(form.errors, name);
  const understood = error ? null : understoodAs(typed, kind, form.units);
  return (
    <Frame id={id} label={label} hint={hint} error={error} understood={understood}>
      <div className="relative">
        <input
          id={id}
          type="text"
          inputMode={kind === 'number' || kind === 'percent' ? 'decimal' : 'text'}
          autoComplete="off"
          className={`input num ${unit.length > 3 ? 'pr-16' : 'pr-12'}`}
          aria-invalid={error ? true : undefined}
          aria-describedby={describedBy(id, {
            hint: Boolean(hint),
            error: Boolean(error),
            understood: understood !== null,
          })}
          {...form.register(name)}
        />
        <span
          aria-hidden="true"
          className="pointer-events-none absolute inset-y-0 right-2.5 flex items-center text-xs text-ink-2"
        >
          {unit}
        </span>
      </div>
    </Frame>
  );
}

export interface Option {
  readonly value: string;
  readonly text: string;
}

export function ChoiceField<T extends FieldValues>(
  props: FieldProps<T> & { readonly options: readonly Option[] },
) {
  const { form, name, label, hint, options } = props;
  const id = idOf(name);
  const error = messageAt(form.errors, name);
  return (
    <Frame id={id} label={label} hint={hint} error={error}>
      <select
        id={id}
        className="input"
        aria-invalid={error ? true : undefined}
        aria-describedby={describedBy(id, { hint: Boolean(hint), error: Boolean(error) })}
        {...form.register(name)}
      >
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.text}
          </option>
        ))}
      </select>
    </Frame>
  );
}

/** Two or three choices side by side. */
export function SwitchField<T extends FieldValues>(
  props: FieldProps<T> & { readonly options: readonly Option[] },
) {
  const { form, name, label, options } = props;
  return (
    <fieldset>
      <legend className="label mb-1">{label}</legend>
      <div className="inline-flex overflow-hidden rounded-md border border-ink">
        {options.map((option) => (
          <label
            key={option.value}
            className="cursor-pointer border-l border-ink px-4 py-1.5 text-sm first:border-l-0 has-checked:bg-ink has-checked:font-semibold has-checked:text-paper has-focus-visible:outline-2 has-focus-visible:outline-hot"
          >
            <input type="radio" value={option.value} className="sr-only" {...form.register(name)} />
            {option.text}
          </label>
        ))}
      </div>
    </fieldset>
  );
}

/** A part of a form with its heading. */
export function Part(props: {
  readonly title: string;
  readonly hint?: string;
  readonly children: ReactNode;
}) {
  return (
    <section className="border-t border-line py-5">
      <h2 className="section-title">{props.title}</h2>
      {props.hint && <p className="hint mt-0.5">{props.hint}</p>}
      <div className="mt-3 grid items-start gap-x-5 gap-y-4 sm:grid-cols-2 lg:grid-cols-3">
        {props.children}
      </div>
    </section>
  );
}
