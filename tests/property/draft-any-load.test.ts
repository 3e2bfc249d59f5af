import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { materials } from '~/lib/materials';
import { issuesOf } from '~/lib/profile/validate';
import { profileSchema } from '~/lib/profile/schema';
import { draftOf } from '~/lib/thermal/draft/draft';
import { type KilnPlate, kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { type Load, loadSchema } from '~/lib/thermal/load-schema';
import { noContext } from '../helpers/simulations';

const LONG = process.env['HOLDFAST_LONG'] ? 20 : 1;
const AMBIENT_C = 20;

const number = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true, noDefaultInfinity: true });
const perhaps = <T>(of: fc.Arbitrary<T>) => fc.option(of, { nil: null });

/** Kilns that studios fire moulds in, strong enough for their size (70 W a litre and more). */
const kilns: fc.Arbitrary<KilnPlate> = fc
  .record({
    sideM: number(0.3, 0.8),
    lining: fc.constantFrom('brick', 'fibre', 'brick-and-fibre'),
    maxC: fc.integer({ min: 1000, max: 1300 }),
    powerPerLitreW: number(70, 130),
    gas: fc.boolean(),
  })
  .map(({ sideM, lining, maxC, powerPerLitreW, gas }) => {
    const powerKW = sideM ** 3 * powerPerLitreW;
    const common = {
      innerWidthM: sideM,
      innerDepthM: sideM,
      innerHeightM: sideM,
      lining,
      liningM: 0.15,
      maxC,
    };
    return kilnPlateSchema.parse(
      gas
        ? { energy: 'gas', burnerKW: powerKW * 3, fuel: 'propane', ...common }
        : { energy: 'electric', ratedKW: powerKW, ...common },
    );
  });

const pattern = fc.record({
  material: fc.constantFrom(...materials.patterns.map(({ id }) => id)),
  share: number(0.01, 0.15),
  thickestM: perhaps(number(0.001, 0.005)),
  hollow: fc.boolean(),
});

const mould = fc
  .record({
    material: fc.constantFrom(...materials.moulds),
    massKg: number(0.2, 8),
    waterShare: number(0, 1),
    wallM: number(0.005, 0.014),
    slimness: number(1, 2),
    thinnestSectionM: perhaps(number(0.001, 0.012)),
    pattern: perhaps(pattern),
  })
  .map(({ material, massKg, waterShare, wallM, slimness, thinnestSectionM, pattern: own }) => {
    const densityKgPerM3 = material.form === 'flask' ? 1100 : 1650;
    const diameterM = Math.cbrt((4 * massKg) / densityKgPerM3 / Math.PI / slimness);
    return {
      form: material.form,
      material: material.id,
      massKg,
      waterKg: massKg * waterShare * (material.form === 'flask' ? 0.35 : 0.04),
      ...(material.form === 'shell' ? { wallM } : { diameterM }),
      thinnestSectionM,
      pattern: own && {
        material: own.material,
        massKg: massKg * own.share * (own.material === 'eps-foam' ? 0.05 : 1),
        thickestM: own.thickestM,
        hollow: own.hollow,
      },
    };
  });

const pour = fc
  .record({ metal: fc.constantFrom(...materials.metals), chargeKg: number(2, 30) })
  .map(({ metal, chargeKg }) => {
    const top = metal.properties.pourLightToC;
    return { metal: metal.id, chargeKg, pourC: 'value' in top ? top.value : 1100, carryS: 10 };
  });

const loads: fc.Arbitrary<Load> = fc
  .record({ moulds: fc.array(mould, { minLength: 1, maxLength: 3 }), pour: perhaps(pour) })
  .map((load) => loadSchema.parse(load));

describe('a drafted profile, whatever the load and the kiln', () => {
  it('can be kept, says why of each segment, and raises no caution that stops it but where the load cannot be fired well', () => {
    fc.assert(
      fc.property(loads, kilns, (load, kiln) => {
        const { profile, because, against, cautions } = draftOf({
          load,
          kiln,
          ambientC: AMBIENT_C,
          context: noContext,
        });
        expect(profileSchema.safeParse(profile).success).toBe(true);
        expect(issuesOf(profile)).toEqual([]);
        profile.segments.forEach((_, index) => {
          const said = because.filter(({ segment }) => segment === index);
          expect(said.length).toBeGreaterThan(0);
          for (const { text, source } of said) expect(text.length * source.length).toBeGreaterThan(0);
        });
        const stops = cautions.filter(({ severity }) => severity === 'stop').map(({ text }) => text);
        if (against.length === 0) expect(stops).toEqual([]);
      }),
      // without shrinking: each case takes a tenth of a second
      { numRuns: 120 * LONG, endOnFailure: true },
    );
  }, 240_000);
});
