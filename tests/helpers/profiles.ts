import fc from 'fast-check';
import { PROFILE_LIMITS, STAGES, type Profile, type Segment } from '~/lib/profile/schema';

const PLAIN: Segment = {
  stage: 'burnout',
  toC: 700,
  rateCPerH: 100,
  holdS: 0,
  attended: false,
  drain: false,
  vent: 'closed',
  instruction: '',
};

/** A segment with everything but what is given left plain. */
export const aSegment = (fields: Partial<Segment> = {}): Segment => ({ ...PLAIN, ...fields });

/** A profile from 20 °C with the segments given. */
export const aProfile = (...segments: Partial<Segment>[]): Profile => ({
  startC: 20,
  segments: segments.map(aSegment),
});

export const arbitrarySegment: fc.Arbitrary<Segment> = fc.record({
  stage: fc.constantFrom(...STAGES),
  toC: fc.integer({ min: PROFILE_LIMITS.minC, max: PROFILE_LIMITS.maxC }),
  rateCPerH: fc.oneof(
    fc.integer({ min: 1, max: 2000 }),
    fc.constantFrom('flat-out' as const, 'coast' as const),
  ),
  holdS: fc.integer({ min: 0, max: 12 * 3600 }),
  attended: fc.boolean(),
  drain: fc.boolean(),
  vent: fc.constantFrom('open' as const, 'closed' as const),
  instruction: fc.string({ maxLength: 40, unit: 'grapheme' }),
});

export const arbitraryProfile: fc.Arbitrary<Profile> = fc.record({
  startC: fc.integer({ min: PROFILE_LIMITS.minC, max: 200 }),
  segments: fc.array(arbitrarySegment, { minLength: 1, maxLength: 12 }),
});
