import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/gypsum-dehydration.json' with { type: 'json' };
import { gypsumReactions } from '~/lib/materials/reactions';
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
    const [low, high] = reference.handbookRangeKJPerKg;
    expect(both / 1000).toBeGreaterThan(low ?? NaN);
    expect(both / 1000).toBeLessThan(high ?? NaN);
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
