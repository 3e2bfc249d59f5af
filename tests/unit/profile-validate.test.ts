import { describe, expect, it } from 'vitest';
import { validateProfile } from '~/lib/profile/validate';
import { aProfile } from '../helpers/profiles';

const pathsOf = (input: unknown, context = {}) => {
  const validated = validateProfile(input, context);
  return validated.ok ? [] : validated.issues.map((issue) => issue.path);
};
const plain = { stage: 'burnout', toC: 700, rateCPerH: 100, holdS: 0 };
const withSegment = (fields: object) => ({ startC: 20, segments: [plain, { ...plain, ...fields }] });

describe('a profile from outside', () => {
  it('gets what it leaves out', () => {
    const validated = validateProfile({ startC: 20, segments: [plain] });
    expect(validated).toEqual({ ok: true, profile: aProfile({ toC: 700 }) });
  });

  it.each([
    [{ toC: 3000 }, 'segments.1.toC'],
    [{ toC: -21 }, 'segments.1.toC'],
    [{ toC: Number.NaN }, 'segments.1.toC'],
    [{ toC: Infinity }, 'segments.1.toC'],
    [{ rateCPerH: 0.5 }, 'segments.1.rateCPerH'],
    [{ rateCPerH: 2001 }, 'segments.1.rateCPerH'],
    [{ rateCPerH: 'fast' }, 'segments.1.rateCPerH'],
    [{ holdS: -1 }, 'segments.1.holdS'],
    [{ holdS: 7 * 86400 + 1 }, 'segments.1.holdS'],
    [{ stage: 'glazing' }, 'segments.1.stage'],
    [{ instruction: 'x'.repeat(501) }, 'segments.1.instruction'],
  ])('with %o is refused at its place', (fields, path) => {
    expect(pathsOf(withSegment(fields))).toEqual([path]);
  });

  it.each([
    [{ toC: 1400 }],
    [{ toC: -20 }],
    [{ rateCPerH: 1 }],
    [{ rateCPerH: 2000 }],
    [{ rateCPerH: 'flat-out' }],
    [{ rateCPerH: 'coast' }],
    [{ holdS: 7 * 86400 }],
  ])('with %o is still valid', (fields) => {
    const startC = 'rateCPerH' in fields && fields.rateCPerH === 1 ? 690 : 20;
    expect(pathsOf({ startC, segments: [{ ...plain, ...fields }] })).toEqual([]);
  });

  it('has 1 to 64 segments', () => {
    expect(pathsOf({ startC: 20, segments: [] })).toEqual(['segments']);
    expect(pathsOf({ startC: 20, segments: Array.from({ length: 64 }, () => plain) })).toEqual([]);
    expect(pathsOf({ startC: 20, segments: Array.from({ length: 65 }, () => plain) })).toEqual(['segments']);
  });

  it('takes 14 days at most, its ramps counted', () => {
    const week = { ...plain, holdS: 7 * 86400 };
    const level = { startC: 700, segments: [week, week] };
    expect(pathsOf(level)).toEqual([]);
    expect(pathsOf({ ...level, startC: 699 })).toEqual(['segments']);
    expect(
      pathsOf(
        { startC: 20, segments: [{ ...plain, rateCPerH: 'coast', toC: 0 }] },
        { kilnRampsS: [15 * 86400] },
      ),
    ).toEqual(['segments']);
  });

  it('stays within the kiln’s limit', () => {
    expect(pathsOf(withSegment({ toC: 1000 }), { kilnMaxC: 1000 })).toEqual([]);
    expect(pathsOf(withSegment({ toC: 1001 }), { kilnMaxC: 1000 })).toEqual(['segments.1.toC']);
  });

  it('reports everything that is wrong, not only the first', () => {
    expect(
      pathsOf({ startC: 2000, segments: [{ ...plain, toC: 3000, holdS: -5 }], extra: 1 }).sort(),
    ).toEqual(['', 'segments.0.holdS', 'segments.0.toC', 'startC']);
  });

  it.each([null, 'profile', [], 7, { __proto__: null }])('is not %o', (input) => {
    expect(validateProfile(input).ok).toBe(false);
  });
});
