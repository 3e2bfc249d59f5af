import fc from 'fast-check';
import { type KilnPlate, kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { type Load, loadSchema } from '~/lib/thermal/load-schema';
import { type Profile, profileSchema } from '~/lib/profile/schema';

const number = (min: number, max: number): fc.Arbitrary<number> =>
  fc.double({ min, max, noNaN: true, noDefaultInfinity: true });

const shared = {
  innerWidthM: number(0.2, 1.2),
  innerDepthM: number(0.2, 1.2),
  innerHeightM: number(0.2, 1.5),
  lining: fc.constantFrom('brick', 'fibre', 'brick-and-fibre'),
  liningM: number(0.05, 0.25),
  maxC: number(900, 1400),
  waitBandC: fc.option(number(5, 50), { nil: null }),
  thermocoupleLagS: number(0, 300),
  thermocoupleOffsetC: number(-10, 10),
  lossFactor: number(0.6, 1.6),
  heatCapacityFactor: number(0.6, 1.6),
};

/** Kilns as a studio might describe them, electric and gas, strong and weak. */
export const kilns: fc.Arbitrary<KilnPlate> = fc.oneof(
  fc
    .record({ ...shared, ratedKW: number(2, 30), ratedPowerShare: number(0.5, 1) })
    .map((plate) => kilnPlateSchema.parse({ energy: 'electric', ...plate })),
  fc
    .record({
      ...shared,
      burnerKW: number(10, 150),
      fuel: fc.constantFrom('propane', 'natural-gas'),
      excessAirShare: number(0, 0.8),
    })
    .map((plate) => kilnPlateSchema.parse({ energy: 'gas', ...plate })),
);

const pattern = fc.record({
  material: fc.constantFrom('pla', 'paraffin', 'beeswax', 'pattern-wax', 'castable-resin', 'eps-foam', 'pvb'),
  massKg: number(0.01, 0.6),
  thickestM: fc.option(number(0.001, 0.03), { nil: null }),
});

const moulds = fc.oneof(
  fc.record({
    material: fc.constantFrom('fused-silica-shell', 'aluminosilicate-shell', 'zircon-shell'),
    massKg: number(0.3, 12),
    count: fc.integer({ min: 1, max: 4 }),
    wallM: fc.option(number(0.004, 0.02), { nil: null }),
    heatedFaces: fc.constantFrom(1, 2),
    waterKg: number(0, 1),
    pattern: fc.option(pattern, { nil: null }),
  }),
  fc.record({
    form: fc.constant('flask'),
    material: fc.constantFrom('gypsum-investment', 'plaster-silica', 'phosphate-investment'),
    massKg: number(0.5, 10),
    diameterM: fc.option(number(0.05, 0.25), { nil: null }),
    waterKg: number(0, 3),
    pattern: fc.option(pattern, { nil: null }),
  }),
);

const furniture = fc.record({
  material: fc.constantFrom('cordierite', 'mullite', 'silicon-carbide'),
  massKg: number(1, 30),
  thicknessM: fc.option(number(0.008, 0.03), { nil: null }),
});

export const loads: fc.Arbitrary<Load> = fc
  .record({ moulds: fc.array(moulds, { maxLength: 4 }), furniture: fc.array(furniture, { maxLength: 2 }) })
  .map((load) => loadSchema.parse(load));

const segment = fc.record({
  stage: fc.constantFrom('drying', 'melt-out', 'burnout', 'vitrification', 'casting-hold', 'cooling'),
  toC: number(40, 1100),
  rateCPerH: fc.oneof(
    { weight: 4, arbitrary: number(20, 900) },
    { weight: 1, arbitrary: fc.constantFrom('flat-out', 'coast') },
  ),
  holdS: number(0, 4 * 3600),
  drain: fc.boolean(),
  vent: fc.constantFrom('open', 'closed'),
  openedS: fc.option(number(1, 3600), { nil: undefined, freq: 3 }),
});

/** The same loads, with moulds that hold water that a scale shows: real numbers are drawn by size, and most are next to nothing. */
export const wetLoads: fc.Arbitrary<Load> = fc
  .tuple(loads, fc.array(fc.integer({ min: 10, max: 2000 }), { minLength: 4, maxLength: 4 }))
  .filter(([{ moulds }]) => moulds.length > 0)
  .map(([load, grams]) => ({
    ...load,
    moulds: load.moulds.map((mould, i) => ({ ...mould, waterKg: (grams[i] ?? 0) / 1000 })),
  }));

/** Firings of one to five segments from room temperature, in any order of heating and cooling. */
export const profiles: fc.Arbitrary<Profile> = fc
  .array(segment, { minLength: 1, maxLength: 5 })
  .map((segments) => profileSchema.parse({ startC: 20, segments }));
