import { useEffect, useId, useRef, useState, type KeyboardEvent, type ReactNode } from 'react';

type Read<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly issue: string };

interface QuantityInputProps<T> {
  readonly label: string;
  /** The value as it is shown while nothing is being typed. */
  readonly text: string;
  readonly unit?: ReactNode;
  readonly parse: (typed: string) => Read<T>;
  /** The value in words, with its unit, as it was understood. */
  readonly understood: (value: T) => string;
  readonly onCommit: (value: T) => void;
  /** Names the field for arrow keys between cards. */
  readonly field?: string;
  /** In a form, with its name above it, rather than within a card. */
  readonly boxed?: boolean;
  readonly inputMode?: 'text' | 'decimal';
  /** What an emptied field means; without it an empty field is an issue. */
  readonly onClear?: () => void;
  readonly placeholder?: string;
}

/** Rest in typing after which what stands there is taken, if it is understood. */
const REST_MS = 700;

/** A number with its unit that takes what people type, in any unit, and says what it understood. */
export function QuantityInput<T>(props: QuantityInputProps<T>) {
  const { text, parse, onCommit, onClear } = props;
  const [typed, setTyped] = useState<string | null>(null);
  const inputId = useId();
  const hintId = `${inputId}-hint`;
  const timer = useRef<ReturnType<typeof setTimeout> | null>(null);
  const read = typed === null || (typed.trim() === '' && onClear) ? null : parse(typed);
  const hint = read === null ? null : read.ok ? `understood as ${props.understood(read.value)}` : read.issue;
  const isIssue = read !== null && !read.ok;

  const stop = (): void => {
    if (timer.current !== null) clearTimeout(timer.current);
    timer.current = null;
  };
  useEffect(() => stop, []);

  const commit = (from: string): void => {
    stop();
    if (from.trim() === '' && onClear) onClear();
    else {
      const found = parse(from);
      if (found.ok) onCommit(found.value);
    }
  };
  const onChange = (next: string): void => {
    setTyped(next);
    stop();
    timer.current = setTimeout(() => commit(next), REST_MS);
  };
  const finish = (): void => {
    if (typed !== null && typed !== text) commit(typed);
    stop();
    setTyped(null);
  };
  const onKeyDown = (event: KeyboardEvent<HTMLInputElement>): void => {
    if (event.key === 'Escape' && typed !== null) {
      event.stopPropagation();
      stop();
      setTyped(null);
    }
    if (event.key === 'Enter' && typed !== null && typed !== text) {
      event.preventDefault();
      event.stopPropagation();
      if (isIssue) return;
      finish();
      event.currentTarget.select();
    }
  };
  const shown = typed ?? text;
  return (
    <span className="quantity" data-boxed={props.boxed || undefined}>
      {props.boxed ? (
        <label className="label" htmlFor={inputId}>
          {props.label}
        </label>
      ) : null}
      <input
        id={inputId}
        className={props.boxed ? 'input num' : 'quantity-input num'}
        type="text"
        inputMode={props.inputMode ?? 'text'}
        autoComplete="off"
        spellCheck={false}
        aria-label={props.boxed ? undefined : props.label}
        aria-invalid={isIssue || undefined}
        aria-describedby={hint === null ? undefined : hintId}
        data-field={props.field}
        data-typing={typed === null ? undefined : 'yes'}
        placeholder={props.placeholder}
        size={props.boxed ? undefined : Math.max(2, (shown || props.placeholder || '').length)}
        value={shown}
        onFocus={(event) => event.currentTarget.select()}
        onChange={(event) => onChange(event.currentTarget.value)}
        onBlur={finish}
        onKeyDown={onKeyDown}
      />
      {props.unit === undefined ? null : <span className="unit">{props.unit}</span>}
      {hint === null ? null : (
        <span id={hintId} className="quantity-hint" data-issue={isIssue || undefined} role="status">
          {hint}
        </span>
      )}
    </span>
  );
}
