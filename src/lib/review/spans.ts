/** A stretch of run time, seconds, `startS` ≤ `endS`. */
export interface Span {
  readonly startS: number;
  readonly endS: number;
}

/** A stretch of indexes, both ends included. */
export interface Stretch {
  readonly from: number;
  readonly to: number;
}

/** Maximal runs of indexes in [from, to] for which `holds` is true. */
export function stretches(from: number, to: number, holds: (index: number) => boolean): Stretch[] {
  const found: Stretch[] = [];
  let begun = -1;
  for (let i = from; i <= to + 1; i++) {
    const inside = i <= to && holds(i);
    if (inside && begun < 0) begun = i;
    if (!inside && begun >= 0) {
      found.push({ from: begun, to: i - 1 });
      begun = -1;
    }
  }
  return found;
}

/** Joins stretches that are at most `apart` indexes from one another; the input is in order. */
export function joined(parts: readonly Stretch[], apart: number): Stretch[] {
  const out: Stretch[] = [];
  for (const part of parts) {
    const last = out[out.length - 1];
    if (last && part.from - last.to <= apart) out[out.length - 1] = { from: last.from, to: part.to };
    else out.push(part);
  }
  return out;
}

export function overlaps(a: Span, b: Span): boolean {
  return a.startS < b.endS && b.startS < a.endS;
}

/** Seconds that two spans share. */
export function sharedS(a: Span, b: Span): number {
  return Math.max(0, Math.min(a.endS, b.endS) - Math.max(a.startS, b.startS));
}

/** Seconds of `span` that at least one of `others` covers. */
export function coveredS(span: Span, others: readonly Span[]): number {
  const inside = others
    .map((o) => ({ startS: Math.max(o.startS, span.startS), endS: Math.min(o.endS, span.endS) }))
    .filter((o) => o.endS > o.startS)
    .sort((a, b) => a.startS - b.startS);
  let totalS = 0;
  let reachedS = span.startS;
  for (const part of inside) {
    totalS += Math.max(0, part.endS - Math.max(part.startS, reachedS));
    reachedS = Math.max(reachedS, part.endS);
  }
  return totalS;
}
