import { describe, expect, it } from 'vitest';
import { findMaterial } from '~/lib/materials';
import { alloyEnthalpyJPerKg } from '~/lib/thermal/melt/alloy-heat';
import { carriedC, carriedUntilS } from '~/lib/thermal/melt/carry';
import { fillOf, usualSuperheatK } from '~/lib/thermal/melt/fill';
import { crucibleSize, meltingOf, usualCrucibleKg } from '~/lib/thermal/melt/melting';
import { alloyOf } from '~/lib/thermal/melt/charge';
import { flowsForS, type PourWall, wallAfterS } from '~/lib/thermal/melt/pour-wall';

function bronze() {
  const metal = findMaterial('metals', 'tin-bronze-90-10');
  if (!metal) throw new Error('no bronze');
  return alloyOf(metal);
}

const SILICA: PourWall = {
  wallM: 0.008,
  densityKgPerM3: 1650,
  conductivityWPerMK: [
    [0, 0.45],
    [1000, 0.8],
  ],
  heatCapacityJPerKgK: [
    [25, 740],
    [300, 960],
    [600, 1080],
    [900, 1170],
    [1100, 1220],
  ],
  emissivity: 0.6,
  convectionWPerM2K: 10,
  ambientC: 20,
};

const even = (tempC: number, cells = 20): Float64Array => new Float64Array(cells).fill(tempC);

describe('a mould out of the kiln', () => {
  it('an 8 mm silica shell at 900 °C loses 4 to 5 K a second at first (radiation and convection over its heat capacity, by hand)', () => {
    const after = wallAfterS(SILICA, even(900), 1);
    const meanC = after.reduce((sum, tempC) => sum + tempC, 0) / after.length;
    expect(900 - meanC).toBeGreaterThan(4);
    expect(900 - meanC).toBeLessThan(5);
  });

  it('a thick wall under a constant skin loss follows the semi-infinite solution (Carslaw and Jaeger 2.9, constant flux)', () => {
    // a film to a room so cold and thin that the flux hardly changes: q = h·(T − T_room) with T nearly constant
    const conductivityWPerMK = 1;
    const wall: PourWall = {
      ...SILICA,
      wallM: 0.2,
      conductivityWPerMK,
      heatCapacityJPerKgK: 1000,
      densityKgPerM3: 2000,
      emissivity: 0,
      convectionWPerM2K: 5,
    };
    const forS = 3600;
    const cells = 400;
    const after = wallAfterS(wall, even(500, cells), forS);
    const diffusivity = conductivityWPerMK / (2000 * 1000);
    // convection to a semi-infinite body, Incropera eq. 5.63: at depth x
    const x = 0.2 / cells / 2;
    const s = Math.sqrt(diffusivity * forS);
    const h = 5 / conductivityWPerMK;
    const theta =
      erfc(x / (2 * s)) - Math.exp(h * x + h * h * diffusivity * forS) * erfc(x / (2 * s) + h * s);
    expect(after[0]).toBeCloseTo(500 - theta * 480, 0);
  });
});

describe('metal against a wall', () => {
  it('a thick cold wall freezes it in the time of Chvorinov: t = (π/4)·[ρLM/(T_m − T_0)]²/(kρc)', () => {
    // Flemings, Solidification Processing, eq. 1-9 (recalled): no superheat, pure metal, semi-infinite mould
    const wall: PourWall = {
      ...SILICA,
      wallM: 0.12,
      conductivityWPerMK: 0.8,
      densityKgPerM3: 1900,
      heatCapacityJPerKgK: 1050,
      emissivity: 0,
      convectionWPerM2K: 0,
    };
    const latentJPerKg = 190e3;
    const halfM = 0.005;
    const meltsC = 1000;
    const metal = { massKgPerM2: 8000 * halfM, contactWPerM2K: 1e6, tempOf: () => meltsC };
    const expected =
      ((Math.PI / 4) * ((8000 * latentJPerKg * halfM) / (meltsC - 25)) ** 2) / (0.8 * 1900 * 1050);
    const found = flowsForS(wall, even(25, 300), metal, latentJPerKg, 0);
    expect(Math.abs(found / expected - 1)).toBeLessThan(0.03);
  });
});

describe('a crucible carried', () => {
  const carried = {
    alloy: { composition: { Cu: 1 }, solidusC: 1084.6, liquidusC: 1084.6 },
    chargeKg: 5,
    crucibleKg: 2,
    liquidDensityKgPerM3: 8020,
    pourC: 1250,
    ambientC: 20,
  };

  it('loses what its surfaces radiate and convect at first (by hand)', () => {
    const { innerM, outerM, heightM } = crucibleSize(5 / 8020);
    const topM2 = (Math.PI / 4) * innerM ** 2;
    const outM2 = Math.PI * outerM * heightM + (Math.PI / 4) * outerM ** 2;
    const lostW =
      (0.6 * topM2 + 0.85 * outM2) * 5.670374e-8 * (1523.15 ** 4 - 293.15 ** 4) + 10 * (topM2 + outM2) * 1230;
    // copper liquid 32.8444 J/(mol·K) (NIST WebBook), crucible 1000 J/(kg·K)
    const capacity = (5 * 32.8444) / 0.063546 + 2 * 1000;
    expect(1250 - carriedC(carried, 1)).toBeCloseTo(lostW / capacity, 1);
  });

  it('cools ever more slowly, and no time is none', () => {
    expect(carriedC(carried, 0)).toBe(1250);
    const first = 1250 - carriedC(carried, 20);
    const second = carriedC(carried, 20) - carriedC(carried, 40);
    expect(second).toBeLessThan(first);
    expect(second).toBeGreaterThan(0);
  });

  it('the time to a temperature and the temperature after a time agree', () => {
    expect(carriedC(carried, carriedUntilS(carried, 1180))).toBeCloseTo(1180, 1);
  });

  it('stands at the melting point until its heat of fusion is gone', () => {
    const fromS = carriedUntilS(carried, 1085);
    const untilS = carriedUntilS(carried, 1084);
    // 13,138 J/mol (JANAF) over 0.063546 kg/mol, 5 kg, at the loss of 1084.6 °C
    const rate = 1 / (carriedUntilS(carried, 1085) - carriedUntilS(carried, 1086));
    const capacity = (5 * 32.8444) / 0.063546 + 2 * 1000;
    expect((untilS - fromS) / ((5 * 13_138) / 0.063546 / (rate * capacity))).toBeCloseTo(1, 1);
  });
});

describe('common practice, no source', () => {
  it('five kilograms of bronze melt in about half an hour in a small fuel furnace', () => {
    const melt = {
      alloy: bronze(),
      chargeKg: 5,
      crucibleKg: usualCrucibleKg(5, 8000),
      startC: 20,
      pourC: 1150,
    };
    const furnace = { energy: 'gas', burnerKW: 25, fuel: 'propane', efficiencyShare: null } as const;
    const minutes = (meltingOf(melt, furnace).durationS ?? 0) / 60;
    expect(minutes).toBeGreaterThan(20);
    expect(minutes).toBeLessThan(40);
  });

  const poured = (sectionM: number, shellC: number, metalC: number) =>
    fillOf({
      alloy: bronze(),
      liquidDensityKgPerM3: 8000,
      metalC,
      sectionM,
      castKg: 3,
      wall: SILICA,
      wallC: even(shellC),
    }).judgement;

  it('a wall of 2 mm needs a hot shell: it fills at 900 °C, it may not at 500 °C, and not at all cold', () => {
    expect(poured(0.002, 900, 1200)).toBe('likely-fills');
    expect(poured(0.002, 500, 1120)).toBe('may-misrun');
    expect(poured(0.002, 25, 1120)).toBe('likely-misruns');
  });

  it('a section of 12 mm fills in a warm shell', () => {
    expect(poured(0.012, 500, 1120)).toBe('likely-fills');
  });

  it('thinner sections are poured hotter', () => {
    expect(usualSuperheatK(0.002)).toEqual([180, 230]);
    expect(usualSuperheatK(0.005)).toEqual([120, 180]);
    expect(usualSuperheatK(0.02)).toEqual([80, 120]);
  });
});

describe('the melt', () => {
  const melt = { alloy: bronze(), chargeKg: 4, crucibleKg: 2, startC: 20, pourC: 1150 };

  it('is charge and crucible, from the furnace’s input by its efficiency', () => {
    const found = meltingOf(melt, { energy: 'electric', ratedKW: 3, efficiencyShare: 0.5 });
    const charge = 4 * (alloyEnthalpyJPerKg(bronze(), 1150) - alloyEnthalpyJPerKg(bronze(), 20));
    expect(found.chargeKWh).toBeCloseTo(charge / 3.6e6, 9);
    expect(found.heatKWh).toBeCloseTo((charge + 2 * 1000 * 1130) / 3.6e6, 9);
    expect(found.inputKWh).toBeCloseTo(found.heatKWh / 0.5, 9);
    expect(found.durationS).toBeCloseTo((found.heatKWh / 0.5 / 3) * 3600, 6);
    expect(found.chargeErrorKWh).toBeCloseTo(0.05 * found.chargeKWh, 9);
  });

  it('without a furnace has a heat and no time', () => {
    expect(meltingOf(melt, null)).toMatchObject({ inputKWh: null, durationS: null, fuelKg: 0 });
  });
});

/** Complementary error function, Abramowitz and Stegun 7.1.26, error below 1.5e-7. */
function erfc(x: number): number {
  const t = 1 / (1 + 0.3275911 * x);
  const series =
    t * (0.254829592 + t * (-0.284496736 + t * (1.421413741 + t * (-1.453152027 + t * 1.061405429))));
  return series * Math.exp(-x * x);
}
