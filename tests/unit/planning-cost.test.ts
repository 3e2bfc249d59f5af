import { describe, expect, it } from 'vitest';
import { co2Of, costOf, fuelOf, splitCost, tariffFits, zoneOffset } from '~/lib/planning';
import { tariffPlanSchema, type TariffPlan } from '~/lib/planning/tariff-schema';
import { loadSchema } from '~/lib/thermal/load-schema';

const plan = (fields: object): TariffPlan =>
  tariffPlanSchema.parse({ currency: 'EUR', energy: 'electricity', per: 'kWh', price: '0.30', ...fields });

const NIGHT = { days: [1, 2, 3, 4, 5, 6, 7], fromMinute: 22 * 60, toMinute: 6 * 60, pricePerKWh: '0.10' };
const night = plan({ bands: [NIGHT] });
const berlin = zoneOffset('Europe/Berlin');

/** 10 kW for as many hours as the firing takes. */
const tenKW = (hours: number) => ({ timeS: [0, hours * 3600], energyKWh: [0, hours * 10] });
const at = (instant: string) => Date.parse(instant);

describe('the cost of a firing', () => {
  it('is energy times price where there is one price', () => {
    expect(costOf(plan({}), tenKW(4), 0, berlin)).toEqual({
      cost: { amount: '12.00', currency: 'EUR' },
      parts: [{ price: '0.30', amount: 40 }],
    });
  });

  it('follows the hours of the day', () => {
    // 20:00 to 08:00 local in winter: 2 h dear, 8 h cheap, 2 h dear.
    const { cost, parts } = costOf(night, tenKW(12), at('2026-01-14T19:00:00Z'), berlin);
    expect(parts).toEqual([
      { price: '0.30', amount: 40 },
      { price: '0.10', amount: 80 },
    ]);
    expect(cost.amount).toBe('20.00');
  });

  it('has nine cheap hours in the night in which the clocks go back', () => {
    const { cost } = costOf(night, tenKW(9), at('2026-10-24T20:00:00Z'), berlin);
    expect(cost.amount).toBe('9.00');
  });

  it('has seven cheap hours in the night in which the clocks go forward', () => {
    const { cost } = costOf(night, tenKW(8), at('2026-03-28T21:00:00Z'), berlin);
    expect(cost.amount).toBe(((70 * 10 + 10 * 30) / 100).toFixed(2));
  });

  it('gives a band that passes midnight to the day it began on', () => {
    const fridayNight = plan({ bands: [{ ...NIGHT, days: [5] }] });
    // Friday 2026-01-16 23:00 to Saturday 07:00 local: 7 h cheap, 1 h dear.
    expect(costOf(fridayNight, tenKW(8), at('2026-01-16T22:00:00Z'), berlin).cost.amount).toBe('10.00');
    // Saturday night is dear throughout.
    expect(costOf(fridayNight, tenKW(8), at('2026-01-17T22:00:00Z'), berlin).cost.amount).toBe('24.00');
  });

  it('counts the energy when it was used, not spread evenly', () => {
    const frontLoaded = { timeS: [0, 3600, 7200], energyKWh: [0, 9, 10] };
    // 05:00 to 07:00 local: the first hour is cheap.
    expect(costOf(night, frontLoaded, at('2026-01-15T04:00:00Z'), berlin).cost.amount).toBe('1.20');
  });

  it('meters fuel by mass or by volume', () => {
    // 50.3 MJ/kg: 503 MJ are 10 kg.
    const fuelKWh = 503 / 3.6;
    const curve = { timeS: [0, 3600], energyKWh: [0, fuelKWh] };
    const propane = plan({ energy: 'propane', per: 'kg', price: '2.50' });
    expect(costOf(propane, curve, 0, berlin).cost.amount).toBe('25.00');
    const { fuelKg, fuelM3 } = fuelOf('propane', fuelKWh);
    expect(fuelKg).toBeCloseTo(10, 9);
    expect(fuelM3).toBeCloseTo(10 / 1.89, 9);
    const byVolume = plan({ energy: 'propane', per: 'm3', price: '1.89' });
    expect(costOf(byVolume, curve, 0, berlin).cost.amount).toBe('10.00');
  });

  it('is nothing for nothing', () => {
    expect(costOf(night, { timeS: [0], energyKWh: [0] }, 0, berlin).cost.amount).toBe('0.00');
    expect(costOf(plan({}), { timeS: [], energyKWh: [] }, 0, berlin).cost.amount).toBe('0.00');
  });

  it('needs a tariff for what the kiln burns', () => {
    expect(tariffFits(night, { energy: 'electric' })).toBe(true);
    expect(tariffFits(night, { energy: 'gas', fuel: 'propane' })).toBe(false);
    expect(tariffFits(plan({ energy: 'propane' }), { energy: 'gas', fuel: 'natural-gas' })).toBe(false);
  });
});

describe('carbon dioxide', () => {
  it('goes by the studio’s own factor where there is one', () => {
    const own = plan({ co2KgPerKWh: 0.05, co2Source: 'Supplier, 2025' });
    expect(co2Of('electricity', 100, own)).toEqual({ co2Kg: 5, kgPerKWh: 0.05, source: 'Supplier, 2025' });
  });

  it('goes by the table’s otherwise, with its source', () => {
    const { co2Kg, source } = co2Of('propane', 100, null);
    expect(co2Kg).toBeCloseTo(21.45, 9);
    expect(source).toContain('40 CFR 98');
    expect(co2Of('propane', 100, plan({ co2KgPerKWh: 0.05 })).co2Kg).toBeCloseTo(21.45, 9);
  });
});

describe('what each piece bears', () => {
  it('goes by mass, water and pattern counted, and adds up', () => {
    const load = loadSchema.parse({
      moulds: [
        {
          material: 'fused-silica-shell',
          massKg: 2,
          waterKg: 0.5,
          count: 2,
          pattern: { material: 'pla', massKg: 0.5 },
        },
        { material: 'gypsum-investment', massKg: 4 },
      ],
      furniture: [{ material: 'cordierite', massKg: 20 }],
    });
    const shares = splitCost({ amount: '10.01', currency: 'EUR' }, load);
    expect(shares.map((share) => share.massKg)).toEqual([6, 4]);
    expect(shares.map((share) => share.cost.amount)).toEqual(['6.01', '4.00']);
  });
});
