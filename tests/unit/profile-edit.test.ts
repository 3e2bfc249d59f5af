import { describe, expect, it } from 'vitest';
import {
  dragCorner,
  dragHoldEnd,
  dragTarget,
  duplicateSegment,
  freshSegment,
  insertSegment,
  moveSegment,
  rampDurationS,
  removeSegment,
  setRampDuration,
  setSegment,
  setStart,
} from '~/lib/profile/edit';
import type { Profile } from '~/lib/profile/schema';
import { aProfile } from '../helpers/profiles';

const base = aProfile(
  { stage: 'melt-out', toC: 260, rateCPerH: 120, holdS: 3600 },
  { stage: 'burnout', toC: 860, rateCPerH: 150, holdS: 7200 },
);
const targets = (profile: Profile) => profile.segments.map((segment) => segment.toC);

describe('editing a profile', () => {
  it('leaves the profile it started from as it was', () => {
    const before = structuredClone(base);
    setSegment(base, 0, { toC: 300 });
    insertSegment(base, 1);
    dragCorner(base, 0, 9000);
    expect(base).toEqual(before);
  });

  it('puts a fresh segment half way between its neighbours', () => {
    expect(freshSegment(base, 1)).toMatchObject({ stage: 'melt-out', toC: 560, rateCPerH: 120, holdS: 0 });
    expect(targets(insertSegment(base, 1))).toEqual([260, 560, 860]);
  });

  it('goes on from the last segment at the end, no further than the kiln', () => {
    expect(targets(insertSegment(base, 2))).toEqual([260, 860, 960]);
    expect(targets(insertSegment(base, 2, undefined, { kilnMaxC: 900 }))).toEqual([260, 860, 900]);
  });

  it('keeps to 64 segments, and to one', () => {
    const full = aProfile(...Array.from({ length: 64 }, () => ({})));
    expect(insertSegment(full, 3)).toBe(full);
    expect(removeSegment(aProfile({}), 0).segments).toHaveLength(1);
    expect(targets(removeSegment(base, 0))).toEqual([860]);
  });

  it('moves and doubles segments', () => {
    expect(targets(moveSegment(base, 0, 1))).toEqual([860, 260]);
    expect(targets(moveSegment(base, 1, -5))).toEqual([860, 260]);
    expect(targets(duplicateSegment(base, 0))).toEqual([260, 260, 860]);
    expect(moveSegment(base, 7, 0)).toBe(base);
  });

  it('clamps what is typed to what is allowed', () => {
    const edited = setSegment(base, 0, { toC: 3000, rateCPerH: 9999, holdS: -5 }, { kilnMaxC: 1100 });
    expect(edited.segments[0]).toMatchObject({ toC: 1100, rateCPerH: 2000, holdS: 0 });
    expect(setStart(base, -300).startC).toBe(-20);
  });

  it('snaps a dragged target to 5 °C', () => {
    expect(targets(dragTarget(base, 1, 833.2))).toEqual([260, 835]);
    expect(targets(dragTarget(base, 1, 5000))).toEqual([260, 1400]);
  });

  it('turns a dragged corner into the rate that arrives then', () => {
    // 240 °C in 3 h is 80 °C/h; in 1.7 h 141 °C/h, which a hand means as 140.
    expect(dragCorner(base, 0, 3 * 3600).segments[0]?.rateCPerH).toBe(80);
    expect(dragCorner(base, 0, 1.7 * 3600).segments[0]?.rateCPerH).toBe(140);
    expect(dragCorner(base, 0, 0).segments[0]?.rateCPerH).toBe(2000);
    // The second ramp begins at 3 h: 600 °C until 9 h is 100 °C/h.
    expect(dragCorner(base, 1, 9 * 3600).segments[1]?.rateCPerH).toBe(100);
  });

  it('gives flat-out a rate when its corner is dragged, and a level stretch none', () => {
    const fast = setSegment(base, 0, { rateCPerH: 'flat-out' });
    expect(dragCorner(fast, 0, 2 * 3600, [1800, null]).segments[0]?.rateCPerH).toBe(120);
    const level = setSegment(base, 0, { toC: 20 });
    expect(dragCorner(level, 0, 7200)).toBe(level);
  });

  it('drags the end of a hold to 5 minutes', () => {
    expect(dragHoldEnd(base, 0, 7200 + 5000).segments[0]?.holdS).toBe(5100);
    expect(dragHoldEnd(base, 0, 0).segments[0]?.holdS).toBe(0);
  });

  it('takes a duration in place of a rate', () => {
    expect(rampDurationS(base, 0)).toBe(7200);
    const slower = setRampDuration(base, 0, 3 * 3600);
    expect(slower.segments[0]?.rateCPerH).toBe(80);
    expect(rampDurationS(slower, 0)).toBe(3 * 3600);
    expect(rampDurationS(setSegment(base, 0, { rateCPerH: 'coast' }), 0)).toBeNull();
    expect(setRampDuration(base, 0, 0)).toBe(base);
  });
});
