import { useId, type ReactNode } from 'react';

/** A field with its name above it and, where needed, a word of help below. */
export function Labelled(props: {
  readonly label: string;
  readonly hint?: ReactNode;
  readonly children: (id: string, hintId: string | undefined) => ReactNode;
}) {
  const id = useId();
  const hintId = props.hint ? `${id}-hint` : undefined;
  return (
    <div className="labelled">
      <label className="label" htmlFor={id}>
        {props.label}
      </label>
      {props.children(id, hintId)}
      {props.hint ? (
        <p id={hintId} className="hint">
          {props.hint}
        </p>
      ) : null}
    </div>
  );
}

export function Choice<T extends string>(props: {
  readonly label: string;
  readonly value: T;
  readonly options: readonly { readonly value: T; readonly text: string; readonly group?: string }[];
  readonly onChange: (value: T) => void;
  readonly hint?: ReactNode;
}) {
  const groups = [...new Set(props.options.map((option) => option.group ?? ''))];
  const optionsOf = (group: string): ReactNode =>
    props.options
      .filter((option) => (option.group ?? '') === group)
      .map((option) => (
        <option key={option.value} value={option.value}>
          {option.text}
        </option>
      ));
  const choose = (text: string): void => {
    const found = props.options.find((option) => option.value === text);
    if (found) props.onChange(found.value);
  };
  return (
    <Labelled label={props.label} hint={props.hint}>
      {(id, hintId) => (
        <select
          id={id}
          className="input"
          value={props.value}
          aria-describedby={hintId}
          onChange={(event) => choose(event.currentTarget.value)}
        >
          {groups.map((group) =>
            group === '' ? (
              optionsOf(group)
            ) : (
              <optgroup key={group} label={group}>
                {optionsOf(group)}
              </optgroup>
            ),
          )}
        </select>
      )}
    </Labelled>
  );
}
