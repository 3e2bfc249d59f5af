/** Lines of the paper along one axis: labelled ones, coarse ones (the labelled among them) and fine ones between. */
export interface Ruling {
  readonly labelled: readonly number[];
  readonly coarse: readonly number[];
  readonly fine: readonly number[];
  readonly stepLabelled: number;
}

interface Step {
  readonly labelled: number;
  readonly coarse: number;
  readonly fine: number;
}

const MIN = 60;
const H = 3600;
const D = 24 * H;

/** Steps of time that a clock has, each with the rulings that divide it evenly. */
const TIME_STEPS_S: readonly Step[] = [
  { labelled: 10, coarse: 5, fine: 1 },
  { labelled: 30, coarse: 10, fine: 5 },
  { labelled: MIN, coarse: 30, fine: 10 },
  { labelled: 2 * MIN, coarse: MIN, fine: 15 },
  { labelled: 5 * MIN, coarse: 5 * MIN, fine: MIN },
  { labelled: 10 * MIN, coarse: 5 * MIN, fine: MIN },
  { labelled: 30 * MIN, coarse: 10 * MIN, fine: 5 * MIN },
  { labelled: H, coarse: 30 * MIN, fine: 10 * MIN },
  { labelled: 2 * H, coarse: H, fine: 15 * MIN },
  { labelled: 3 * H, coarse: H, fine: 15 * MIN },
  { labelled: 4 * H, coarse: 2 * H, fine: 30 * MIN },
  { labelled: 6 * H, coarse: 2 * H, fine: 30 * MIN },
  { labelled: 12 * H, coarse: 6 * H, fine: H },
  { labelled: D, coarse: 12 * H, fine: 2 * H },
  { labelled: 2 * D, coarse: D, fine: 4 * H },
  { labelled: 4 * D, coarse: 2 * D, fine: 12 * H },
];

/** Steps of a temperature scale, in whichever degrees are shown. */
const DEGREE_STEPS: readonly Step[] = [
  { labelled: 1, coarse: 1, fine: 0.2 },
  { labelled: 2, coarse: 1, fine: 0.2 },
  { labelled: 5, coarse: 5, fine: 1 },
  { labelled: 10, coarse: 5, fine: 1 },
  { labelled: 20, coarse: 10, fine: 2 },
  { labelled: 50, coarse: 50, fine: 10 },
  { labelled: 100, coarse: 50, fine: 10 },
  { labelled: 200, coarse: 100, fine: 20 },
  { labelled: 400, coarse: 200, fine: 40 },
  { labelled: 500, coarse: 500, fine: 100 },
  { labelled: 1000, coarse: 500, fine: 100 },
  { labelled: 2000, coarse: 1000, fine: 200 },
];

function multiples(step: number, from: number, to: number): number[] {
  const found: number[] = [];
  const slack = step * 1e-9;
  for (let index = Math.ceil((from - slack) / step); index * step <= to + slack; index += 1)
    found.push(index * step || 0);
  return found;
}

function rule(
  steps: readonly Step[],
  from: number,
  to: number,
  lengthPx: number,
  apartPx: number,
  fineApartPx: number,
): Ruling {
  const pxPer = lengthPx / Math.max(1e-9, to - from);
  const step = steps.find((candidate) => candidate.labelled * pxPer >= apartPx) ?? steps[steps.length - 1];
  if (step === undefined) throw new RangeError('a ruling needs steps');
  return {
    labelled: multiples(step.labelled, from, to),
    coarse: multiples(step.coarse, from, to),
    fine: step.fine * pxPer >= fineApartPx ? multiples(step.fine, from, to) : [],
    stepLabelled: step.labelled,
  };
}

/** Ruling of run time, seconds, so that labels stand at least `apartPx` apart. */
export const ruleTime = (fromS: number, toS: number, lengthPx: number, apartPx = 100): Ruling =>
  rule(TIME_STEPS_S, fromS, toS, lengthPx, apartPx, 4);

/** Ruling of temperature in the degrees shown (°C or °F), so that labels stand at least `apartPx` apart. */
export const ruleDegrees = (from: number, to: number, lengthPx: number, apartPx = 44): Ruling =>
  rule(DEGREE_STEPS, from, to, lengthPx, apartPx, 4);

/**
 * Top of a temperature axis: the next full hundred that leaves room above the peak for brackets.
 *
 * @param peak highest value shown, in the degrees shown
 * @param step the axis ends on a multiple of this
 */
export const axisTop = (peak: number, step = 100): number => {
  const top = Math.ceil((peak + step * 0.6) / step) * step;
  return Math.max(step * 2, top);
};
