import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { materials } from '~/lib/materials';
import { cautionsOf } from '~/lib/thermal/cautions';
import { cautionSchema } from '~/lib/thermal/estimate-schema';
import { kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { simulate } from '~/lib/thermal/simulate';
import { arbitraryProfile } from '../helpers/profiles';

const arbitraryMould = fc.record({
  form: fc.constantFrom('shell' as const, 'flask' as const),
  material: fc.constantFrom(...materials.moulds.map((mould) => mould.id)),
  massKg: fc.double({ min: 0.2, max: 20, noNaN: true }),
  waterKg: fc.constantFrom(0, 0.05, 0.6),
  count: fc.integer({ min: 1, max: 6 }),
  pattern: fc.option(
    fc.record({
      material: fc.constantFrom(...materials.patterns.map((pattern) => pattern.id)),
      massKg: fc.double({ min: 0.01, max: 2, noNaN: true }),
      thickestM: fc.constantFrom(null, 0.002, 0.012),
      hollow: fc.boolean(),
    }),
  ),
});
const arbitraryFiring = fc.record({
  profile: arbitraryProfile,
  moulds: fc.array(arbitraryMould, { maxLength: 3 }),
  maxC: fc.integer({ min: 700, max: 1400 }),
  lining: fc.constantFrom('brick' as const, 'fibre' as const, 'brick-and-fibre' as const),
  ratedKW: fc.double({ min: 1, max: 40, noNaN: true }),
});

const context = {
  startMs: Date.parse('2026-03-28T18:00:00Z'),
  offsetMinutesAt: () => 60,
  attendedHours: { fromMinute: 480, toMinute: 1200 },
  thermocouple: { type: 'K', sheathM: 0.003, maxC: null },
};

describe('whatever is fired', () => {
  it('its cautions are whole sentences with numbers and a source, one of a kind per segment, at a moment of the firing', () => {
    fc.assert(
      fc.property(arbitraryFiring, ({ profile, moulds, maxC, lining, ratedKW }) => {
        const kiln = kilnPlateSchema.parse({
          energy: 'electric',
          innerWidthM: 0.5,
          innerDepthM: 0.5,
          innerHeightM: 0.5,
          liningM: 0.115,
          lining,
          maxC,
          ratedKW,
        });
        const simulation = simulate({ profile, kiln, load: loadSchema.parse({ moulds }), ambientC: 20 });
        const cautions = cautionsOf(simulation, context);
        expect(new Set(cautions.map(({ code, segment }) => `${code} ${segment}`)).size).toBe(cautions.length);
        for (const caution of cautions) {
          expect(cautionSchema.safeParse(caution).success).toBe(true);
          expect(caution.text).toMatch(/^[A-Z“][^!]*\d[^!]*\.$/s);
          expect(caution.text).not.toMatch(/NaN|Infinity|undefined|null|–/);
          expect(caution.source).not.toBe('');
          expect(caution.segment ?? 0).toBeLessThan(profile.segments.length);
          expect(caution.atS ?? 0).toBeLessThanOrEqual(simulation.predictedS + 1);
        }
        const above = profile.segments.some((segment) => segment.toC > maxC);
        expect(
          cautions.some(({ code, severity }) => code === 'above-kiln-limit' && severity === 'stop'),
        ).toBe(above);
      }),
      { numRuns: 60 },
    );
  });
});
