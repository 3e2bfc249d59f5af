/** A stretch in which something changes faster than it should. */
export interface FastStretch {
  /** Place at which it was first noticed. */
  at: number;
  /** Largest rate in it, °C/h, as a size. */
  rateCPerH: number;
  /** Temperature at that rate. */
  tempC: number;
}

export interface FastQuery {
  timeS: ArrayLike<number>;
  tempC: ArrayLike<number>;
  direction: 'heating' | 'cooling';
  fromC: number;
  toC: number;
  /** Length over which a rate is taken: shorter jolts do no harm. */
  windowS: number;
  maxRateCPerH: number;
  /** Whether a place counts at all. */
  counts?: (at: number) => boolean;
}

/**
 * Looks for the fastest change of a temperature within a range. The rate at a moment is the mean over the window that
 * ends there, cut off at the edges of the range, so that a jump outside the range does not count inside.
 *
 * @returns the first place above the limit with the largest rate found anywhere; null if it never is
 */
export function fastestIn(query: FastQuery): FastStretch | null {
  const { timeS, tempC, direction, fromC, toC, windowS, maxRateCPerH, counts = () => true } = query;
  const sign = direction === 'heating' ? 1 : -1;
  const clip = (value: number) => Math.min(toC, Math.max(fromC, value));
  let first = -1;
  let largest = 0;
  let largestAtC = NaN;
  let begin = 0;
  for (let at = 1; at < timeS.length; at += 1) {
    const nowS = timeS[at] ?? 0;
    const nowC = tempC[at] ?? NaN;
    while (begin < at - 1 && (timeS[begin + 1] ?? Infinity) <= nowS - windowS) begin += 1;
    if (!counts(at) || clip(nowC) === clip(tempC[at - 1] ?? NaN)) continue;
    const insideS = insideFor(query, begin, at);
    const rate = (sign * (clip(nowC) - clip(tempC[begin] ?? NaN)) * 3600) / Math.max(insideS, windowS / 2);
    if (rate > largest) {
      largest = rate;
      largestAtC = nowC;
    }
    if (rate > maxRateCPerH && first === -1) first = at;
  }
  return first === -1 ? null : { at: first, rateCPerH: largest, tempC: largestAtC };
}

/** Time between two places during which the temperature was inside the range, straight between moments. */
function insideFor({ timeS, tempC, fromC, toC }: FastQuery, begin: number, end: number): number {
  let insideS = 0;
  for (let at = begin + 1; at <= end; at += 1) {
    const stepS = (timeS[at] ?? 0) - (timeS[at - 1] ?? 0);
    const [a = NaN, b = NaN] = [tempC[at - 1], tempC[at]];
    const [low, high] = a < b ? [a, b] : [b, a];
    if (high === low) insideS += low >= fromC && high <= toC ? stepS : 0;
    else insideS += (stepS * Math.max(0, Math.min(high, toC) - Math.max(low, fromC))) / (high - low);
  }
  return insideS;
}
