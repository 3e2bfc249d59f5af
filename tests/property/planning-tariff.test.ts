import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { costOf, priceAt, shareOut, zoneOffset } from '~/lib/planning';
import { priceStretches } from '~/lib/planning/tariff-cost';
import { tariffPlanSchema, type TariffPlan } from '~/lib/planning/tariff-schema';

const ZONES = ['Europe/Berlin', 'America/Chicago', 'Australia/Lord_Howe', 'Asia/Kathmandu', 'UTC'];

const arbitraryBand = fc
  .record({
    days: fc.uniqueArray(fc.integer({ min: 1, max: 7 }), { minLength: 1 }),
    fromMinute: fc.integer({ min: 0, max: 1439 }),
    toMinute: fc.integer({ min: 0, max: 1440 }),
    pricePerKWh: fc.constantFrom('0.05', '0.11', '0.2499', '0.4'),
  })
  .filter((band) => band.fromMinute !== band.toMinute);
const arbitraryPlan: fc.Arbitrary<TariffPlan> = fc
  .array(arbitraryBand, { maxLength: 4 })
  .map((bands) =>
    tariffPlanSchema.parse({ currency: 'EUR', energy: 'electricity', per: 'kWh', price: '0.30', bands }),
  );
/** Around the changes of the clocks of 2026, and anywhere in the year. */
const arbitraryStart = fc
  .constantFrom(
    '2026-03-07T20:00Z',
    '2026-03-28T16:10Z',
    '2026-04-04T03:00Z',
    '2026-10-24T20:30Z',
    '2026-11-01T00:00Z',
    '2026-07-01T00:00Z',
  )
  .chain((instant) =>
    fc.integer({ min: 0, max: 1440 }).map((minutes) => Date.parse(instant) + minutes * 60_000),
  );

/** Weekday and minute read off the formatted clock, without any arithmetic of ours. */
function clockOf(timeZone: string) {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    weekday: 'short',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  });
  return (utcMs: number) => {
    const [, day = '', hour = '', minute = ''] = /(\w{3})\D+(\d\d):(\d\d)/.exec(format.format(utcMs)) ?? [];
    return {
      weekday: ['Mon', 'Tue', 'Wed', 'Thu', 'Fri', 'Sat', 'Sun'].indexOf(day) + 1,
      minute: Number(hour) * 60 + Number(minute),
    };
  };
}

describe('a tariff by time of use', () => {
  it('has the price of each minute that the clock on the wall says, through every change of the clocks', () => {
    fc.assert(
      fc.property(arbitraryPlan, arbitraryStart, fc.constantFrom(...ZONES), (plan, startMs, timeZone) => {
        const clock = clockOf(timeZone);
        const stretches = priceStretches(plan, startMs, startMs + 36 * 3600_000, zoneOffset(timeZone));
        let at = 0;
        for (let minute = 0; minute < 36 * 60; minute += 7) {
          const utcMs = startMs + minute * 60_000;
          while ((stretches[at]?.toMs ?? Infinity) <= utcMs) at += 1;
          const wall = clock(utcMs);
          expect(stretches[at]?.price).toBe(priceAt(plan, wall.weekday, wall.minute));
        }
      }),
      { numRuns: 60 },
    );
  });

  it('prices every kWh once', () => {
    fc.assert(
      fc.property(
        arbitraryPlan,
        arbitraryStart,
        fc.array(fc.tuple(fc.integer({ min: 1, max: 7200 }), fc.double({ min: 0, max: 20, noNaN: true })), {
          minLength: 1,
          maxLength: 40,
        }),
        (plan, startMs, steps) => {
          const timeS = [0];
          const energyKWh = [0];
          for (const [stepS, stepKWh] of steps) {
            timeS.push((timeS[timeS.length - 1] ?? 0) + stepS);
            energyKWh.push((energyKWh[energyKWh.length - 1] ?? 0) + stepKWh);
          }
          const { cost, parts } = costOf(plan, { timeS, energyKWh }, startMs, zoneOffset('Europe/Berlin'));
          const totalKWh = energyKWh[energyKWh.length - 1] ?? 0;
          expect(parts.reduce((sum, part) => sum + part.amount, 0)).toBeCloseTo(totalKWh, 8);
          const expected = parts.reduce((sum, part) => sum + part.amount * Number(part.price), 0);
          expect(Math.abs(Number(cost.amount) - expected)).toBeLessThan(0.0051);
        },
      ),
    );
  });
});

describe('sharing out', () => {
  it('adds up to the cent and keeps the order of the weights', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 0, max: 1e7 }),
        fc.array(fc.double({ min: 0, max: 500, noNaN: true }), { minLength: 1, maxLength: 30 }),
        (cents, weights) => {
          const shares = shareOut({ amount: (cents / 100).toFixed(2), currency: 'EUR' }, weights);
          const shareCents = shares.map((share) => Math.round(Number(share.amount) * 100));
          expect(shareCents.reduce((sum, share) => sum + share, 0)).toBe(cents);
          const total = weights.reduce((sum, weight) => sum + weight, 0);
          if (total > 0.01)
            weights.forEach((weight, at) =>
              expect(Math.abs((shareCents[at] ?? NaN) - (cents * weight) / total)).toBeLessThan(
                1 + cents * 1e-4,
              ),
            );
        },
      ),
    );
  });
});
