import type { Profile, Segment } from './schema';

const FIELDS = [
  'stage',
  'toC',
  'rateCPerH',
  'holdS',
  'attended',
  'drain',
  'vent',
  'openedS',
  'openedShare',
  'instruction',
] as const;
export type SegmentField = (typeof FIELDS)[number];

export interface FieldChange {
  field: SegmentField;
  before: Segment[SegmentField];
  after: Segment[SegmentField];
}

/** One segment of the one profile beside its like in the other; null where it has none there. */
export interface SegmentChange {
  kind: 'same' | 'changed' | 'added' | 'removed';
  before: number | null;
  after: number | null;
  fields: FieldChange[];
}

export interface ProfileDiff {
  startC: { before: number; after: number } | null;
  segments: SegmentChange[];
  /** Whether there is no difference at all. */
  same: boolean;
}

/** Adding and removing together cost more than changing most of a segment, and less than changing nearly all of it. */
const GAP_COST = 0.4;
const WEIGHT: Record<SegmentField, number> = {
  stage: 0.3,
  toC: 0.25,
  rateCPerH: 0.15,
  holdS: 0.1,
  attended: 0.05,
  drain: 0.05,
  vent: 0.05,
  openedS: 0.05,
  openedShare: 0.02,
  instruction: 0.05,
};

function fieldChanges(before: Segment, after: Segment): FieldChange[] {
  return FIELDS.filter((field) => before[field] !== after[field]).map((field) => ({
    field,
    before: before[field],
    after: after[field],
  }));
}

/** 0 for the same segment, up to 1 for one that has nothing in common. A target a little off counts for less. */
function distance(before: Segment, after: Segment): number {
  return fieldChanges(before, after).reduce((sum, { field }) => {
    const share = field === 'toC' ? Math.min(1, Math.abs(before.toC - after.toC) / 100) : 1;
    return sum + WEIGHT[field] * share;
  }, 0);
}

/**
 * What changed from one profile to another: segments are set beside each other in order so that the sum of the
 * differences is smallest (edit distance), then compared field by field.
 */
export function diffProfiles(before: Profile, after: Profile): ProfileDiff {
  const segments = aligned(before.segments, after.segments).map(([from, to]) =>
    changeOf(before, after, from, to),
  );
  const startC = before.startC === after.startC ? null : { before: before.startC, after: after.startC };
  return { startC, segments, same: startC === null && segments.every((change) => change.kind === 'same') };
}

function changeOf(before: Profile, after: Profile, from: number | null, to: number | null): SegmentChange {
  const a = from === null ? undefined : before.segments[from];
  const b = to === null ? undefined : after.segments[to];
  if (a === undefined) return { kind: 'added', before: null, after: to, fields: [] };
  if (b === undefined) return { kind: 'removed', before: from, after: null, fields: [] };
  const fields = fieldChanges(a, b);
  return { kind: fields.length === 0 ? 'same' : 'changed', before: from, after: to, fields };
}

function aligned(before: readonly Segment[], after: readonly Segment[]): [number | null, number | null][] {
  const cost = costTable(before, after);
  const at = (i: number, j: number) => cost[i]?.[j] ?? Infinity;
  const pairs: [number | null, number | null][] = [];
  let [i, j] = [before.length, after.length];
  while (i > 0 || j > 0) {
    const [a, b] = [before[i - 1], after[j - 1]];
    if (a !== undefined && b !== undefined && at(i, j) === at(i - 1, j - 1) + distance(a, b)) {
      pairs.push([--i, --j]);
    } else if (j > 0 && at(i, j) === at(i, j - 1) + GAP_COST) pairs.push([null, --j]);
    else pairs.push([--i, null]);
  }
  return pairs.reverse();
}

function costTable(before: readonly Segment[], after: readonly Segment[]): number[][] {
  const cost: number[][] = [Array.from({ length: after.length + 1 }, (_, j) => j * GAP_COST)];
  before.forEach((a, i) => {
    const above = cost[i] ?? [];
    const row = [(i + 1) * GAP_COST];
    after.forEach((b, j) => {
      row.push(
        Math.min(
          (above[j] ?? Infinity) + distance(a, b),
          (above[j + 1] ?? Infinity) + GAP_COST,
          (row[j] ?? Infinity) + GAP_COST,
        ),
      );
    });
    cost.push(row);
  });
  return cost;
}
