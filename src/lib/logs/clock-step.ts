/** What is known around a row whose time lies more than a minute before that of the row above it. */
export interface StepEvidence {
  /** Time of the row, of the row above it, and of the first row of the file. */
  ms: number;
  lastMs: number;
  firstMs: number;
  /** Median step between rows. */
  stepMs: number;
  /** Times count from a start. */
  counter: boolean;
  /** Times of this and the next rows. */
  afterMs: number[];
  /** Rows read so far with times in a span. */
  seen: (fromMs: number, toMs: number) => number;
  /** This and the next rows are earlier ones again, their times and their readings, which vary too much for that to be chance. */
  repeats: boolean;
  /** Per channel that is continuous by nature: its change at the step, and how much it usually changes between rows. */
  jump: { change: number; usual: number }[];
}

export type StepVerdict = 'backward' | 'restart' | 'unsorted';

/**
 * Whether a step backwards in time is a clock that was set back, a counter that began again, or rows out of order.
 *
 * Out of order: rows that repeat earlier ones; a short run after which the times leap back to where they were; rows that exactly
 * fill a hole left before. Of the others, a clock was set if the temperature carries on across the step; a counter that falls to its
 * beginning restarted whatever the temperature did meanwhile.
 */
export function judgeStep(evidence: StepEvidence): StepVerdict {
  if (evidence.repeats || returnsSoon(evidence)) return 'unsorted';
  if (evidence.counter && evidence.ms <= evidence.firstMs + Math.max(60_000, 3 * evidence.stepMs))
    return 'restart';
  if (!carriesOn(evidence)) return 'unsorted';
  return fillsHole(evidence) ? 'unsorted' : 'backward';
}

/** Within the next rows the times leap forward again to where they had been. */
function returnsSoon({ afterMs, lastMs, stepMs }: StepEvidence): boolean {
  for (let i = 1; i < afterMs.length; i++) {
    const leapMs = (afterMs[i] ?? NaN) - (afterMs[i - 1] ?? NaN);
    if (leapMs > Math.max(30_000, 5 * stepMs) && (afterMs[i] ?? NaN) >= lastMs - stepMs) return true;
  }
  return false;
}

function carriesOn({ jump }: StepEvidence): boolean {
  const known = jump.filter(({ change }) => !Number.isNaN(change));
  if (known.length === 0) return true;
  const calm = known.filter(
    ({ change, usual }) => change <= Math.max(2, 3 * (Number.isNaN(usual) ? 0 : usual)),
  );
  return calm.length * 2 >= known.length;
}

/** The row lands one step behind an earlier row, and nothing was read yet for the time that follows it. */
function fillsHole({ ms, lastMs, stepMs, seen }: StepEvidence): boolean {
  const before = seen(ms - 2 * stepMs, ms - 0.25 * stepMs);
  const reach = Math.min(lastMs - 0.5 * stepMs, ms + 20 * stepMs);
  const expected = (reach - ms) / stepMs;
  const covered = seen(ms - 0.25 * stepMs, reach);
  return before > 0 && covered < 0.25 * expected;
}
