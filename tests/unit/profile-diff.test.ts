import { describe, expect, it } from 'vitest';
import { diffProfiles } from '~/lib/profile/diff';
import { insertSegment, moveSegment, removeSegment, setSegment, setStart } from '~/lib/profile/edit';
import { aProfile, aSegment } from '../helpers/profiles';

const base = aProfile(
  { stage: 'drying', toC: 90, rateCPerH: 60, holdS: 7200 },
  { stage: 'melt-out', toC: 260, rateCPerH: 'flat-out', holdS: 3600, drain: true },
  { stage: 'burnout', toC: 820, rateCPerH: 150, holdS: 7200, vent: 'open' },
  { stage: 'casting-hold', toC: 700, rateCPerH: 'coast', holdS: 3600 },
);
const kinds = (after: typeof base) => diffProfiles(base, after).segments.map((change) => change.kind);

describe('two versions of a profile', () => {
  it('that are alike have no difference', () => {
    expect(diffProfiles(base, structuredClone(base))).toMatchObject({ same: true, startC: null });
  });

  it('show a changed field with both values', () => {
    const diff = diffProfiles(base, setSegment(base, 2, { toC: 850, holdS: 5400 }));
    expect(diff.same).toBe(false);
    expect(diff.segments.map((change) => change.kind)).toEqual(['same', 'same', 'changed', 'same']);
    expect(diff.segments[2]?.fields).toEqual([
      { field: 'toC', before: 820, after: 850 },
      { field: 'holdS', before: 7200, after: 5400 },
    ]);
  });

  it('show one added in the middle as one added', () => {
    expect(kinds(insertSegment(base, 2, aSegment({ stage: 'burnout', toC: 500 })))).toEqual([
      'same',
      'same',
      'added',
      'same',
      'same',
    ]);
  });

  it('show one taken out as one removed', () => {
    expect(kinds(removeSegment(base, 0))).toEqual(['removed', 'same', 'same', 'same']);
  });

  it('show another order as taken out here and added there', () => {
    expect(kinds(moveSegment(base, 0, 3)).sort()).toEqual(['added', 'removed', 'same', 'same', 'same']);
  });

  it('show another start', () => {
    expect(diffProfiles(base, setStart(base, 400))).toMatchObject({
      startC: { before: 20, after: 400 },
      same: false,
    });
  });
});
