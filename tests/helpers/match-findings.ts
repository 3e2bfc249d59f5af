import type { Label } from './labelled-log';

/** What is compared of a finding. */
export interface Found {
  kind: string;
  startS: number;
  endS: number;
}

export interface Match {
  /** Pairs of indexes, found to label. */
  right: Map<number, number>;
  missed: Label[];
  false: Found[];
}

function sharedShare(a: Found, startS: number, endS: number): number {
  const both = Math.max(0, Math.min(a.endS, endS) - Math.max(a.startS, startS));
  const either = Math.max(a.endS, endS) - Math.min(a.startS, startS);
  return either > 0 ? both / either : 1;
}

/** How well a finding answers a label, 0 for not: by overlap, by both ends within 5 minutes, a point within 3 minutes. */
export function likeness(found: Found, label: Label): number {
  if (found.kind !== label.kind) return 0;
  let best = 0;
  for (const [startS, endS] of [[label.startS, label.endS] as [number, number], ...(label.alt ?? [])]) {
    if (label.point || endS - startS < 60) {
      const ends = [found.startS - startS, found.endS - startS, found.endS - endS].map(Math.abs);
      const around = found.startS <= startS && found.endS >= startS && found.endS - found.startS < 1800;
      const offS = around ? 0 : Math.min(...ends);
      if (offS <= 180) best = Math.max(best, 1 - offS / 400);
    }
    const share = sharedShare(found, startS, endS);
    if (share >= 0.3) best = Math.max(best, share);
    if (Math.abs(found.startS - startS) <= 300 && Math.abs(found.endS - endS) <= 300)
      best = Math.max(best, 0.3 + 0.3 * share);
  }
  return best;
}

/** Pairs findings and labels one to one, the best likeness first. */
export function matchFindings(found: readonly Found[], labels: readonly Label[]): Match {
  const pairs = found
    .flatMap((f, i) => labels.map((l, j) => ({ i, j, like: likeness(f, l) })))
    .filter((p) => p.like > 0);
  pairs.sort((a, b) => b.like - a.like);
  const right = new Map<number, number>();
  const taken = new Set<number>();
  for (const { i, j } of pairs) {
    if (right.has(i) || taken.has(j)) continue;
    right.set(i, j);
    taken.add(j);
  }
  return {
    right,
    missed: labels.filter((_, j) => !taken.has(j)),
    false: found.filter((_, i) => !right.has(i)),
  };
}
