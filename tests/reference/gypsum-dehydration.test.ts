import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/gypsum-dehydration.json' with { type: 'json' };
import { gypsumReactions, phosphateReactions } from '~/lib/materials/reactions';
import {
  WATER_EVAPORATION_J_PER_KG,
  WATER_EVAPORATION_SLOPE_J_PER_KG_K,
  WATER_HEAT_CAPACITY_J_PER_KG_K,
} from '~/lib/thermal/constants';
import { mouldBody } from '~/lib/thermal/resolve-load';
import { loadSchema } from '~/lib/thermal/load-schema';

const { formationKJPerMol: of, molarMassGPerMol: mass } = reference;
const perKg = (kJPerMol: number): number => (kJPerMol / mass.gypsum) * 1e6;

/** CaSO4·2H2O → CaSO4·½H2O + 1½ H2O(g), and → CaSO4 + 2 H2O(g), at 25 °C: Hess's law. */
const toHemihydrate = perKg(of.hemihydrate + 1.5 * of.vapour - of.gypsum);
const toAnhydrite = perKg(of.anhydrite + 2 * of.vapour - of.gypsum);

describe(`${reference.title}: ${reference.source}`, () => {
  const [first, second] = gypsumReactions(1);

  it('takes the heat of Hess’s law in each of its two steps', () => {
    expect(Math.abs((first?.heatJPerKg ?? NaN) / toHemihydrate - 1)).toBeLessThan(reference.toleranceShare);
    const both = (first?.heatJPerKg ?? NaN) + (second?.heatJPerKg ?? NaN);
    expect(Math.abs(both / toAnhydrite - 1)).toBeLessThan(reference.toleranceShare);
  });

  it(`is near what handbooks say, which is more than Hess’s law gives: ${reference.handbook.limitedBy}`, () => {
    const both = ((first?.heatJPerKg ?? NaN) + (second?.heatJPerKg ?? NaN)) / 1000;
    const [low = NaN, high = NaN] = reference.handbook.kJPerKg;
    expect(both).toBeGreaterThan(low * (1 - reference.handbook.toleranceShare));
    expect(both).toBeLessThan(high);
  });

  it('loses one and a half, then half a molecule of water', () => {
    expect(first?.massShare).toBeCloseTo((1.5 * mass.water) / mass.gypsum, 4);
    expect(second?.massShare).toBeCloseTo((0.5 * mass.water) / mass.gypsum, 4);
  });

  it('is in the mould with the share of gypsum that it holds: more in half plaster than in flask investment', () => {
    const heatOf = (material: string): number => {
      const [mould] = loadSchema.parse({ moulds: [{ form: 'flask', material, massKg: 1 }] }).moulds;
      if (mould === undefined) throw new Error('no mould');
      const body = mouldBody(mould, { startC: 20, emissivity: 0.9, convectionWPerM2K: 5, areaRatio: 0 });
      return (
        body.reactions.reduce((sum, { heatJPerM3 }) => sum + heatJPerM3, 0) /
        (body.layers[0]?.densityKgPerM3 ?? NaN)
      );
    };
    expect(heatOf('gypsum-investment') / toAnhydrite).toBeCloseTo(0.34, 2);
    expect(heatOf('plaster-silica') / toAnhydrite).toBeCloseTo(0.54, 2);
  });
});

describe('water', () => {
  const { water } = reference;
  const perKgOfWater = (jPerMol: number): number => (jPerMol / mass.water) * 1000;
  const within = (found: number, expected: number): void =>
    expect(Math.abs(found / expected - 1)).toBeLessThan(water.toleranceShare);

  it(`evaporates at 100 °C: ${water.evaporationSource}`, () => {
    within(WATER_EVAPORATION_J_PER_KG, perKgOfWater(water.evaporationJPerMol));
  });

  it(`evaporates at 25 °C: ${water.at25Source}`, () => {
    const found = WATER_EVAPORATION_J_PER_KG + 75 * WATER_EVAPORATION_SLOPE_J_PER_KG_K;
    within(found, perKgOfWater(water.evaporationAt25JPerMol));
  });

  it(`warms from 25 to 100 °C: ${water.liquidSource}`, () => {
    within(75 * WATER_HEAT_CAPACITY_J_PER_KG_K, perKgOfWater(water.liquid25To100JPerMol));
  });
});

describe(`the bond of phosphate investments, by mass: ${reference.atomicMassSource}`, () => {
  const { Mg, N, H, P, O } = reference.atomicMassGPerMol;
  const struvite = Mg + N + 4 * H + P + 4 * O + 6 * (2 * H + O);
  const pyrophosphate = 2 * Mg + 2 * P + 7 * O;
  const [water, ammonia] = phosphateReactions(1);

  it('struvite loses five of six molecules of water', () => {
    expect(water?.massShare).toBeCloseTo((5 * (2 * H + O)) / struvite, 4);
  });

  it('two of them come to one of magnesium pyrophosphate in the end', () => {
    const lost = (water?.massShare ?? NaN) + (ammonia?.massShare ?? NaN);
    // Two shares of four digits each.
    expect(Math.abs(lost - (1 - pyrophosphate / (2 * struvite)))).toBeLessThan(1e-4);
  });
});
