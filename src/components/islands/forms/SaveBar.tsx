/** The end of a form: what went wrong, the button, and a way out. */
export function SaveBar(props: {
  readonly problem: string | null;
  readonly faults: number;
  readonly busy: boolean;
  readonly button: string;
  readonly cancelHref: string;
}) {
  const { problem, faults, busy, button, cancelHref } = props;
  const counted = `${faults} ${faults === 1 ? 'field needs' : 'fields need'} another look.`;
  const told = problem ?? (faults > 0 ? counted : null);
  return (
    <div className="border-t border-line pt-5">
      <div role="alert">{told && <p className="notice notice-hot mb-4 font-medium">{told}</p>}</div>
      <div className="flex flex-wrap gap-2.5">
        <button type="submit" className="btn btn-primary" disabled={busy}>
          {busy ? 'Saving' : button}
        </button>
        <a className="btn" href={cancelHref}>
          Cancel
        </a>
      </div>
    </div>
  );
}
