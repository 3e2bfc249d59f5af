import { createHash } from 'node:crypto';
import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '~/lib/profile/canonical';
import { diffProfiles } from '~/lib/profile/diff';
import {
  dragCorner,
  dragHoldEnd,
  dragTarget,
  duplicateSegment,
  insertSegment,
  moveSegment,
  removeSegment,
  setRampDuration,
} from '~/lib/profile/edit';
import { plannedAt, plannedCurve } from '~/lib/profile/planned';
import { profileSchema, type Profile } from '~/lib/profile/schema';
import { sealOf, sealText } from '~/lib/profile/seal';
import { arbitraryProfile } from '../helpers/profiles';

const anyNumber = fc.double({ min: -1e6, max: 1e6, noNaN: true });
const arbitraryEdit: fc.Arbitrary<(profile: Profile) => Profile> = fc
  .tuple(fc.integer({ min: 0, max: 7 }), fc.integer({ min: -2, max: 14 }), anyNumber)
  .map(
    ([kind, index, value]) =>
      (profile) =>
        [
          () => insertSegment(profile, index),
          () => removeSegment(profile, index),
          () => moveSegment(profile, index, Math.round(value)),
          () => duplicateSegment(profile, index),
          () => dragTarget(profile, index, value),
          () => dragCorner(profile, index, value),
          () => dragHoldEnd(profile, index, value),
          () => setRampDuration(profile, index, value),
        ][kind]?.() ?? profile,
  );

describe('any edit', () => {
  it('of a valid profile gives a valid profile', () => {
    fc.assert(
      fc.property(arbitraryProfile, fc.array(arbitraryEdit, { maxLength: 10 }), (profile, edits) => {
        const edited = edits.reduce((current, edit) => edit(current), profile);
        expect(profileSchema.safeParse(edited).success).toBe(true);
      }),
      { numRuns: 300 },
    );
  });
});

describe('the planned curve', () => {
  it('is continuous, moves only forward in time, and ends at the last target', () => {
    fc.assert(
      fc.property(arbitraryProfile, (profile) => {
        const plan = plannedCurve(profile);
        for (let at = 1; at < plan.timeS.length; at += 1)
          expect(plan.timeS[at]).toBeGreaterThan(plan.timeS[at - 1] ?? NaN);
        plan.timeS.forEach((timeS, at) =>
          expect(plannedAt(plan, timeS)).toBeCloseTo(plan.valueC[at] ?? NaN, 9),
        );
        expect(plan.valueC[plan.valueC.length - 1]).toBe(profile.segments[profile.segments.length - 1]?.toC);
        expect(plan.durationS).toBe(plan.legs[plan.legs.length - 1]?.endS);
      }),
    );
  });
});

describe('the difference of two profiles', () => {
  it('lists every segment of both, once and in order', () => {
    fc.assert(
      fc.property(arbitraryProfile, arbitraryProfile, (before, after) => {
        const { segments } = diffProfiles(before, after);
        const of = (side: 'before' | 'after') =>
          segments.map((change) => change[side]).filter((at) => at !== null);
        expect(of('before')).toEqual(before.segments.map((_, at) => at));
        expect(of('after')).toEqual(after.segments.map((_, at) => at));
      }),
    );
  });

  it('is nothing only for equal profiles', () => {
    fc.assert(
      fc.property(arbitraryProfile, arbitraryProfile, (before, after) => {
        expect(diffProfiles(before, before).same).toBe(true);
        expect(diffProfiles(before, after).same).toBe(canonicalJson(before) === canonicalJson(after));
      }),
    );
  });
});

describe('the seal', () => {
  const sha256 = (text: string) => createHash('sha256').update(text, 'utf8').digest('hex');
  const reversed = (value: unknown): unknown => {
    if (Array.isArray(value)) return value.map(reversed);
    if (value === null || typeof value !== 'object') return value;
    return Object.fromEntries(
      Object.entries(value)
        .reverse()
        .map(([name, member]) => [name, reversed(member)]),
    );
  };

  it('does not depend on the order in which members were written', () => {
    fc.assert(
      fc.property(arbitraryProfile, (profile) => {
        const content = { profile, kilnId: null, load: null };
        expect(sealOf(content, sha256)).toBe(
          sealOf({ ...content, profile: reversed(profile) as Profile }, sha256),
        );
        expect(JSON.parse(sealText(content))).toEqual(JSON.parse(JSON.stringify(content)));
      }),
    );
  });

  it('changes with every change of the profile', () => {
    fc.assert(
      fc.property(arbitraryProfile, fc.double({ min: 0.001, max: 1, noNaN: true }), (profile, more) => {
        const warmer = { ...profile, startC: profile.startC + more };
        const seal = (of: Profile) => sealOf({ profile: of, kilnId: null, load: null }, sha256);
        expect(seal(warmer)).not.toBe(seal(profile));
      }),
    );
  });
});
