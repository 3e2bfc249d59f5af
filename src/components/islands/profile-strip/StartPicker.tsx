import { useId, useState } from 'react';
import { clockTime, instantOfWallClock, wallClockMs, weekday } from '../strip/clock';

const asInput = (wallMs: number): string => new Date(wallMs).toISOString().slice(0, 16);

/** When the firing is taken to begin, for the clock on the strip and for prices by time of use. */
export function StartPicker(props: {
  readonly startMs: number;
  readonly zone: string;
  readonly onChange: (startMs: number) => void;
}) {
  const { startMs, zone } = props;
  const [open, setOpen] = useState(false);
  const id = useId();
  const choose = (text: string): void => {
    const wallMs = Date.parse(`${text}Z`);
    if (Number.isFinite(wallMs)) props.onChange(instantOfWallClock(wallMs, zone));
  };
  return (
    <div
      className="start-picker"
      onKeyDown={(event) => {
        if (event.key === 'Escape') setOpen(false);
      }}
    >
      <span>
        Start{' '}
        <button
          type="button"
          className="link"
          aria-expanded={open}
          aria-controls={id}
          onClick={() => setOpen(!open)}
        >
          {`${clockTime(startMs, zone)}, ${weekday(startMs, zone)}`}
        </button>
      </span>
      <div id={id} className="start-picker-panel" hidden={!open}>
        <label className="label">
          Start of the firing, local time
          <input
            className="input"
            type="datetime-local"
            value={asInput(wallClockMs(startMs, zone))}
            onChange={(event) => choose(event.currentTarget.value)}
          />
        </label>
        <p className="hint">For this view only. A run has its own start.</p>
      </div>
    </div>
  );
}
