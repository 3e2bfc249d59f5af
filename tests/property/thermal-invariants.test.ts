import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { kilnPlateSchema, type KilnPlate } from '~/lib/thermal/kiln-schema';
import { type Load, loadSchema } from '~/lib/thermal/load-schema';
import { simulate } from '~/lib/thermal/simulate';
import type { Simulation } from '~/lib/thermal/simulation';
import { type Profile, profileSchema } from '~/lib/profile/schema';
import { kilns, loads, profiles, wetLoads } from './thermal-arbitraries';

const AMBIENT_C = 20;
/** Wet bulb of a room at 20 °C and 50 % relative humidity, °C: psychrometric chart, recalled. Nothing wet cools below it. */
const WET_BULB_C = 13.8;

/** How far a firing breaks each law of nature; all zero (or below) where it breaks none. */
function breaches({
  energy,
  chamberC,
  powerKW,
  fullPowerKW,
  timeS,
  moulds,
  load,
}: Simulation): Record<string, number> {
  const worst = {
    imbalance: Math.abs(energy.imbalance) - 1e-3,
    overPower: 0,
    uphillC: 0,
    tooColdC: 0,
    growsKg: 0,
    negative: 0,
    backwardsS: 0,
  };
  let hottestC = -Infinity;
  for (let i = 0; i < timeS.length; i++) {
    const power = powerKW[i] ?? NaN;
    hottestC = Math.max(hottestC, chamberC[i] ?? NaN);
    // Where the kiln saturates is found within 1e-4 of its power.
    worst.overPower = Math.max(worst.overPower, power / fullPowerKW - 1 - 1e-4, -power / fullPowerKW - 1e-4);
    if (i > 0 && !((timeS[i] ?? NaN) > (timeS[i - 1] ?? NaN))) worst.backwardsS = 1;
    for (const { index, surfaceC, coreC, waterKg, patternLeftShare } of moulds) {
      // No part of a mould is ever hotter than the chamber has been, nor colder than the room, or than its wet bulb if it went in wet.
      const [surface, core] = [surfaceC[i] ?? NaN, coreC[i] ?? NaN];
      worst.uphillC = Math.max(worst.uphillC, surface - hottestC - 0.5, core - hottestC - 0.5);
      const coldestC = (load.moulds[index]?.waterKg ?? 0) > 0 ? WET_BULB_C : AMBIENT_C;
      worst.tooColdC = Math.max(worst.tooColdC, coldestC - 0.5 - surface, coldestC - 0.5 - core);
      for (const series of [waterKg, patternLeftShare]) {
        const value = series[i] ?? NaN;
        worst.negative = Math.max(worst.negative, -value);
        if (i > 0) worst.growsKg = Math.max(worst.growsKg, value - (series[i - 1] ?? NaN) - 1e-12);
      }
    }
  }
  return worst;
}

const FIRINGS = 500;
/** Lets the test runner hear of the worker between two firings. */
const breathe = () => new Promise((resolve) => setImmediate(resolve));

async function breaksNone(profile: Profile, kiln: KilnPlate, load: Load): Promise<void> {
  await breathe();
  const broken = breaches(simulate({ profile, kiln, load, ambientC: AMBIENT_C }));
  for (const [law, by] of Object.entries(broken)) expect(by, law).toBeLessThanOrEqual(0);
}

describe('a firing, whatever the kiln, the load and the profile', () => {
  const runs = { numRuns: FIRINGS, seed: 20260101, endOnFailure: true };

  it('closes its energy to 0.1 %, keeps within its power, lets no heat run uphill and no mass grow or go below zero', async () => {
    await fc.assert(fc.asyncProperty(profiles, kilns, loads, breaksNone), runs);
  }, 300_000);

  it('does so too where all moulds are wet', async () => {
    await fc.assert(fc.asyncProperty(profiles, kilns, wetLoads, breaksNone), runs);
  }, 300_000);

  /** A kiln switched on to hold the temperature of the room for a day. */
  const atRest = (kiln: KilnPlate, load: Load): Simulation => {
    const still = profileSchema.parse({
      startC: AMBIENT_C,
      segments: [{ stage: 'drying', toC: AMBIENT_C, rateCPerH: 60, holdS: 86400 }],
    });
    return simulate({ profile: still, kiln: { ...kiln, thermocoupleOffsetC: 0 }, load, ambientC: AMBIENT_C });
  };
  const dried = (load: Load): Load => ({
    ...load,
    moulds: load.moulds.map((mould) => ({ ...mould, waterKg: 0 })),
  });

  it('at room temperature nothing dry moves: the room is a fixed point', () => {
    fc.assert(
      fc.property(kilns, loads, (kiln, load) => {
        const { chamberC, moulds, energy } = atRest(kiln, dried(load));
        const strays = [chamberC, ...moulds.map(({ coreC }) => coreC)].flatMap((series) =>
          Array.from(series, (value) => Math.abs(value - AMBIENT_C)),
        );
        expect(Math.max(...strays)).toBeLessThan(1e-9);
        expect(Math.abs(energy.inKWh)).toBeLessThan(1e-9);
      }),
      { numRuns: 60, seed: 7 },
    );
  });

  it('what is wet in a kiln at room temperature dries, cooled to between its wet bulb and the room, and costs the heat of that', () => {
    fc.assert(
      fc.property(kilns, wetLoads, (kiln, load) => {
        const { moulds, energy } = atRest(kiln, load);
        let goneKg = 0;
        for (const { count, surfaceC, coreC, waterKg } of moulds) {
          const [mostC, leastC] = [Math.max(...surfaceC, ...coreC), Math.min(...surfaceC, ...coreC)];
          expect(mostC).toBeLessThan(AMBIENT_C + 0.01);
          expect(leastC).toBeLessThan(AMBIENT_C);
          expect(leastC).toBeGreaterThan(WET_BULB_C - 0.5);
          goneKg += count * ((waterKg[0] ?? NaN) - (waterKg.at(-1) ?? NaN));
        }
        expect(goneKg).toBeGreaterThan(0);
        // Steam tables: 2468 kJ/kg at 13.8 °C and 2453 at 20 °C.
        expect(energy.reactionsKWh * 3600).toBeGreaterThanOrEqual(goneKg * 2453 * 0.995);
        expect(energy.reactionsKWh * 3600).toBeLessThanOrEqual(goneKg * 2468 * 1.005);
        expect(Math.abs(energy.imbalance)).toBeLessThan(1e-3);
      }),
      { numRuns: 60, seed: 7 },
    );
  });

  it('more power is never slower to reach a target', () => {
    const ramp = fc.record({
      toC: fc.double({ min: 200, max: 1000, noNaN: true }),
      rateCPerH: fc.double({ min: 50, max: 900, noNaN: true }),
    });
    fc.assert(
      fc.property(
        ramp,
        fc.double({ min: 3, max: 15, noNaN: true }),
        fc.double({ min: 1.02, max: 2, noNaN: true }),
        loads,
        (leg, ratedKW, more, load) => {
          const profile = profileSchema.parse({
            startC: 20,
            segments: [{ stage: 'burnout', ...leg, holdS: 48 * 3600 }],
          });
          const bare = loadSchema.parse({
            ...load,
            moulds: load.moulds.map((mould) => ({ ...mould, pattern: null })),
          });
          const arrival = (kW: number): number => {
            const kiln = kilnPlateSchema.parse({
              energy: 'electric',
              innerWidthM: 0.5,
              innerDepthM: 0.5,
              innerHeightM: 0.6,
              lining: 'brick',
              liningM: 0.115,
              maxC: 1300,
              ratedKW: kW,
            });
            // The same elements in both, so that only the power differs.
            const plate = { ...kiln, ratedKW: 15, ratedPowerShare: kW / 15 } as KilnPlate;
            const [moments] = simulate({ profile, kiln: plate, load: bare, ambientC: AMBIENT_C }).segments;
            return moments?.arrived ? moments.rampEndS : Infinity;
          };
          const weakS = arrival(ratedKW);
          const strongS = arrival(ratedKW * more);
          if (Number.isFinite(weakS)) expect(strongS).toBeLessThanOrEqual(weakS * (1 + 1e-4) + 0.1);
        },
      ),
      { numRuns: 100, seed: 11 },
    );
  }, 120_000);
});
