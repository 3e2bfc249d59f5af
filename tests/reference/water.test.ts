import { describe, expect, it } from 'vitest';
import air from '../../fixtures/references/water-humid-air.json' with { type: 'json' };
import { saturationGrowthPerK, saturationPa, vapourDiffusivityM2PerS } from '~/lib/thermal/humid-air';
import { kilnPlateSchema } from '~/lib/thermal/kiln-schema';
import { loadSchema, type LoadInput } from '~/lib/thermal/load-schema';
import { waterKgOf } from '~/lib/thermal/mould-recorder';
import { simulate } from '~/lib/thermal/simulate';
import type { Simulation } from '~/lib/thermal/simulation';
import { profileSchema } from '~/lib/profile/schema';
import { bodyWith, slab } from './thermal-rig';
import { AMPLE_KG_PER_S, hold, moistChamber, wetWall } from './water-rig';

const ATMOSPHERE_PA = air.atmospherePa;
const GAS_J_PER_MOL_K = 8.314462618;

/** Saturation of the steam table at one of its temperatures, Pa. */
function tablePa(tempC: number): number {
  const row = air.saturation.rows.find(([at]) => at === tempC);
  if (row?.[1] === undefined) throw new RangeError(`no ${tempC} °C in the table`);
  return row[1];
}

/** Buck's equation (1981), Pa: independent of the solver's. */
const buckPa = (tempC: number): number => 611.21 * Math.exp((17.502 * tempC) / (240.97 + tempC));

/** Temperature and evaporation, kg/(h·m²), of a wet face that has come to rest in moving air. */
function atRest(tempC: number, vapourPa: number, filmWPerM2K: number, airKgPerS = AMPLE_KG_PER_S) {
  const body = wetWall(tempC, filmWPerM2K);
  const chamber = moistChamber([body], tempC, vapourPa, airKgPerS);
  const stepS = 3600 / filmWPerM2K;
  hold(chamber, tempC, stepS, 120);
  const beforeKg = waterKgOf(body);
  hold(chamber, tempC, stepS, 10);
  return { faceC: body.tempC[0] ?? NaN, kgPerH: (beforeKg - waterKgOf(body)) * (360 / stepS) };
}

describe(`moist air: ${air.saturation.source}`, () => {
  it.each(air.saturation.rows)('saturation at %s °C', (tempC, pa) => {
    expect(Math.abs(saturationPa(tempC ?? NaN) / (pa ?? NaN) - 1)).toBeLessThan(
      air.saturation.tolerance.relative,
    );
  });

  it('is one atmosphere where water boils, and its slope is its derivative', () => {
    expect(saturationPa(100) / ATMOSPHERE_PA).toBeCloseTo(1, 3);
    const slope = (saturationPa(60.01) - saturationPa(59.99)) / 0.02 / saturationPa(60);
    expect(saturationGrowthPerK(60)).toBeCloseTo(slope, 6);
  });

  it(`diffusivity: ${air.diffusivity.source}`, () => {
    const { T_C, D_m2_s, tolerance } = air.diffusivity;
    expect(Math.abs(vapourDiffusivityM2PerS(T_C) / D_m2_s - 1)).toBeLessThan(tolerance.relative);
  });
});

describe(`a wet face in moving air comes to the wet bulb: ${air.wetBulbs.source}`, () => {
  const { kelvin } = air.wetBulbs.tolerance;

  it.each(air.wetBulbs.rows)('%s °C, relative humidity %s: %s °C', (tempC, humidity, wetBulbC) => {
    const [dryC, chartC] = [tempC ?? NaN, wetBulbC ?? NaN];
    const vapourPa = (humidity ?? NaN) * buckPa(dryC);
    const { faceC } = atRest(dryC, vapourPa, 20);
    expect(Math.abs(faceC - chartC)).toBeLessThan(kelvin);
    // The psychrometric formula, by bisection.
    let [lowC, highC] = [0, dryC];
    while (highC - lowC > 1e-6) {
      const middleC = (lowC + highC) / 2;
      const missing = 6.6e-4 * (1 + 0.00115 * middleC) * ATMOSPHERE_PA * (dryC - middleC);
      if (buckPa(middleC) - missing < vapourPa) lowC = middleC;
      else highC = middleC;
    }
    expect(Math.abs(faceC - lowC)).toBeLessThan(kelvin);
    expect(faceC).toBeLessThan(lowC);
  });

  it('whatever the film: heat and vapour go by the same', () => {
    expect(atRest(30, 0.4 * buckPa(30), 5).faceC).toBeCloseTo(atRest(30, 0.4 * buckPa(30), 50).faceC, 3);
  });

  it('notices a humidity that is a tenth off', () => {
    const off = atRest(40, 0.3 * buckPa(40), 20).faceC;
    expect(Math.abs(off - 22.2)).toBeGreaterThan(kelvin);
  });

  it(air.wetCloth.source, () => {
    const { T_C, relativeHumidity, surface_C, tolerance } = air.wetCloth;
    const { faceC } = atRest(T_C, relativeHumidity * buckPa(T_C), 20);
    expect(Math.abs(faceC - surface_C)).toBeLessThan(tolerance.kelvin);
  });
});

describe(`drying at a constant rate: ${air.constantRate.source}`, () => {
  const { T_C, humidity_kg_kg, h_W_m2K, rate_kg_h_m2, tolerance } = air.constantRate;
  const vapourPa = (ATMOSPHERE_PA * humidity_kg_kg) / (18.015 / 28.96 + humidity_kg_kg);

  it('per square metre and hour', () => {
    const { kgPerH } = atRest(T_C, vapourPa, h_W_m2K);
    expect(Math.abs(kgPerH / rate_kg_h_m2 - 1)).toBeLessThan(tolerance.relative);
  });

  it('takes the heat that the steam tables give for water evaporated there', () => {
    const { faceC, kgPerH } = atRest(T_C, vapourPa, h_W_m2K);
    const [at20, at40] = [2453.5e3, 2406.0e3];
    const latentJPerKg = at20 + ((at40 - at20) * (faceC - 20)) / 20;
    expect(Math.abs((h_W_m2K * (T_C - faceC) * 3600) / kgPerH / latentJPerKg - 1)).toBeLessThan(0.006);
  });

  it('notices a film that is 5 % off', () => {
    const { kgPerH } = atRest(T_C, vapourPa, h_W_m2K * 1.05);
    expect(Math.abs(kgPerH / rate_kg_h_m2 - 1)).toBeGreaterThan(tolerance.relative);
  });
});

describe('a receding front: shrinking core (Levenspiel, Chemical Reaction Engineering, chapter 25), film and layer in series', () => {
  const WATER_KG_PER_M3 = 200;
  const LAYER_SHARE = 0.2;
  const FILM_W_PER_M2K = 10;

  /** Kept at one temperature by heat that comes by radiation alone, without limit. */
  function dryAt(tempC: number, stepS: number, hours: number): number {
    const wall = slab({
      thicknessM: 0.02,
      k: 1e6,
      rhoC: 1.5e6,
      startC: tempC,
      cells: 40,
      filmWPerM2K: FILM_W_PER_M2K,
      exchange: 1e6,
      waterKgPerM3: WATER_KG_PER_M3,
    });
    const body = bodyWith({ ...wall, water: wall.water && { ...wall.water, dryLayerShare: LAYER_SHARE } });
    const chamber = moistChamber([body], tempC, 0.5 * tablePa(20), AMPLE_KG_PER_S);
    hold(chamber, tempC, stepS, Math.round((hours * 3600) / stepS));
    return 0.02 - waterKgOf(body) / WATER_KG_PER_M3;
  }

  /** t = d·w/(h_m·c) + d²·w/(2·D·c), c the driving density: by difference, or by Stefan's logarithm of what is not vapour. */
  function hoursTo(depthM: number, tempC: number, law: 'difference' | 'stefan'): number {
    const kelvin = tempC + 273.15;
    const diffusivity = 1.87e-10 * kelvin ** 2.072;
    const airKgPerM3 = (ATMOSPHERE_PA * 0.02896) / (GAS_J_PER_MOL_K * kelvin);
    const filmMPerS = FILM_W_PER_M2K / (airKgPerM3 * 1007 * (22.5e-6 / 26e-6) ** (2 / 3));
    const [facePa, roomPa] = [tablePa(tempC), 0.5 * tablePa(20)];
    const drivingPa =
      law === 'difference'
        ? facePa - roomPa
        : ATMOSPHERE_PA * Math.log((ATMOSPHERE_PA - roomPa) / (ATMOSPHERE_PA - facePa));
    const driving = (drivingPa * 0.018015) / (GAS_J_PER_MOL_K * kelvin);
    const seconds =
      (depthM * WATER_KG_PER_M3) / (filmMPerS * driving) +
      (depthM ** 2 * WATER_KG_PER_M3) / (2 * diffusivity * LAYER_SHARE * driving);
    return seconds / 3600;
  }

  it.each([
    [40, 60, 40],
    [60, 60, 5],
    [80, 60, 1.5],
    [90, 60, 0.8],
    [60, 600, 5],
    [80, 600, 1.5],
  ])('depth at %s °C in steps of %s s after %s h', (tempC, stepS, hours) => {
    const depthM = dryAt(tempC, stepS, hours);
    expect(depthM).toBeGreaterThan(0.003);
    expect(depthM).toBeLessThan(0.019);
    expect(Math.abs(hoursTo(depthM, tempC, 'stefan') / hours - 1)).toBeLessThan(0.01);
  });

  it('is the law of vapour densities where vapour is thin, and not where it is most of the gas', () => {
    const cold = hoursTo(dryAt(40, 60, 40), 40, 'difference') / 40;
    expect(Math.abs(cold - 1)).toBeLessThan(0.06);
    expect(hoursTo(dryAt(90, 60, 0.8), 90, 'difference') / 0.8).toBeGreaterThan(1.5);
  });
});

describe('between drying below boiling and the plateau', () => {
  it('a front falls back below boiling when the heat does, and dries on', () => {
    for (const stepS of [10, 300]) {
      const wall = slab({
        thicknessM: 0.03,
        k: 1,
        rhoC: 2e6,
        startC: 20,
        cells: 12,
        filmWPerM2K: 10,
        exchange: 0.7,
        waterKgPerM3: 400,
      });
      const body = bodyWith(wall);
      const chamber = moistChamber([body], 20, 0.5 * tablePa(20), 1e-3);
      hold(chamber, 500, stepS, 900 / stepS);
      const front = body.drying?.front ?? NaN;
      expect(Math.max(...body.tempC.slice(front))).toBeGreaterThan(97);
      hold(chamber, 100, stepS, 7200 / stepS);
      const beforeKg = waterKgOf(body);
      expect(beforeKg).toBeGreaterThan(1);
      expect(Math.max(...body.tempC.slice(body.drying?.front))).toBeLessThan(95);
      hold(chamber, 100, stepS, 3600 / stepS);
      expect(waterKgOf(body)).toBeLessThan(beforeKg - 0.01);
    }
  });

  it('air that is drawn through carries what it can: no more leaves than makes it all vapour', () => {
    // A sealed chamber dries nothing below boiling.
    expect(atRest(60, 0.5 * tablePa(20), 20, 0).kgPerH).toBe(0);
    // A trickle leaves saturated at the face's own temperature, which is then that of the chamber: G·0.622·Δ(p / (P − p)).
    const trickleKgPerS = 1e-6;
    const carried = tablePa(60) / (ATMOSPHERE_PA - tablePa(60));
    const brought = (0.5 * tablePa(20)) / (ATMOSPHERE_PA - 0.5 * tablePa(20));
    const { kgPerH } = atRest(60, 0.5 * tablePa(20), 20, trickleKgPerS);
    const expected = trickleKgPerS * 3600 * (18.015 / 28.96) * (carried - brought);
    expect(Math.abs(kgPerH / expected - 1)).toBeLessThan(0.01);
  });
});

describe('moulds dried in a kiln (common practice, no source)', () => {
  const kiln = kilnPlateSchema.parse({
    energy: 'electric',
    innerWidthM: 0.55,
    innerDepthM: 0.55,
    innerHeightM: 0.7,
    lining: 'brick-and-fibre',
    liningM: 0.14,
    maxC: 1250,
    ratedKW: 14,
  });
  const dried = (load: LoadInput, toC: number, vent: 'open' | 'closed', hours: number): Simulation =>
    simulate({
      profile: profileSchema.parse({
        startC: 20,
        segments: [{ stage: 'drying', toC, rateCPerH: 120, holdS: hours * 3600, vent }],
      }),
      kiln,
      load: loadSchema.parse(load),
      ambientC: 20,
    });
  const leftKg = ({ moulds, timeS }: Simulation, hour: number): number => {
    const at = timeS.findIndex((moment) => moment >= hour * 3600);
    return moulds[0]?.waterKg[at] ?? NaN;
  };
  const flask: LoadInput['moulds'] = [
    { form: 'flask', material: 'plaster-silica', massKg: 3, waterKg: 1.2, diameterM: 0.12 },
  ];

  it('a plaster flask held at 95 °C with the vent open loses weight for hours, ever more slowly', () => {
    const firing = dried({ moulds: flask }, 95, 'open', 12);
    const gone = [2, 4, 6, 8, 10].map((hour) => leftKg(firing, hour) - leftKg(firing, hour + 2));
    for (const kg of gone) expect(kg).toBeGreaterThan(0.02);
    expect(gone.at(-1)).toBeLessThan((gone[0] ?? NaN) * 0.8);
    expect(Math.abs(firing.energy.imbalance)).toBeLessThan(1e-9);
  });

  it('a kiln full of wet shells dries much slower with the vent closed', () => {
    const moulds = [{ material: 'fused-silica-shell', massKg: 6, waterKg: 0.5, count: 8 }];
    const lost = (vent: 'open' | 'closed'): number => 0.5 - leftKg(dried({ moulds }, 60, vent, 8), 6);
    expect(lost('closed')).toBeGreaterThan(0.01);
    expect(lost('open')).toBeGreaterThan(2 * lost('closed'));
  });

  it('no part of a wet mould cools below its wet bulb where its front comes to boil within a long step', () => {
    for (let share = 1; share <= 60; share++) {
      const load = loadSchema.parse({
        moulds: [
          {
            form: 'flask',
            material: 'gypsum-investment',
            massKg: 1.27,
            waterKg: share / 20,
            diameterM: 0.25,
          },
        ],
      });
      const profile = profileSchema.parse({
        startC: 20,
        segments: [{ stage: 'melt-out', toC: 500, rateCPerH: 100 + share, holdS: 0 }],
      });
      const steps = { toleranceC: 1.5, mostS: 600, fixedS: share % 2 === 0 ? 600 : null };
      const [trace] = simulate({ profile, kiln, load, ambientC: 20 }, steps).moulds;
      expect(Math.min(...(trace?.surfaceC ?? []), ...(trace?.coreC ?? []))).toBeGreaterThan(13.3);
    }
  });

  it('the hotter below boiling, the faster', () => {
    const lost = [40, 60, 80, 95].map((toC) => 1.2 - leftKg(dried({ moulds: flask }, toC, 'open', 6), 6));
    for (let i = 1; i < lost.length; i++) expect(lost[i]).toBeGreaterThan((lost[i - 1] ?? NaN) * 1.2);
  });
});
