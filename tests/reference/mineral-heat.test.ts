import { describe, expect, it } from 'vitest';
import reference from '../../fixtures/references/mineral-heat.json' with { type: 'json' };
import { findMaterial, type Property, valueAt } from '~/lib/materials';

const FROM_K = 298.15;
const caseOf = (id: string) => {
  const found = reference.cases.find((one) => one.id === id);
  if (found === undefined) throw new RangeError(id);
  return found;
};

/** Heat that 1 kg takes up from 25 °C, J/kg: the table's curve, summed in small steps. */
function heatJPerKg(capacity: Property, toK: number): number {
  const steps = 400;
  const widthK = (toK - FROM_K) / steps;
  let sum = 0;
  for (let i = 0; i < steps; i += 1) sum += valueAt(capacity, FROM_K + (i + 0.5) * widthK - 273.15) * widthK;
  return sum;
}

describe(`${reference.title}`, () => {
  const each = ['mullite', 'mullite-from-oxides'].map((id) => [id, caseOf(id)] as const);
  const rows = each.flatMap(([id, one]) =>
    one.rows.map(([kelvin = NaN, jPerMol = NaN]) => [id, kelvin, jPerMol, one] as const),
  );
  it.each(rows)('a shelf of %s takes up to %d K', (_id, kelvin, jPerMol, mullite) => {
    const shelf = findMaterial('furniture', 'mullite')?.properties.heatCapacityJPerKgK;
    if (shelf === undefined) throw new Error('no mullite');
    const expected = jPerMol / mullite.molarMassKgPerMol;
    expect(Math.abs(heatJPerKg(shelf, kelvin) / expected - 1)).toBeLessThan(mullite.toleranceShare);
  });

  const iron = caseOf('iron');
  it.each(iron.rows)(`the steel of a casing at %d K: ${iron.source}`, (kelvin = NaN, jPerMolK = NaN) => {
    const steel = findMaterial('linings', 'casing-steel')?.properties.heatCapacityJPerKgK;
    if (steel === undefined) throw new Error('no steel');
    const found = valueAt(steel, kelvin - 273.15) * iron.molarMassKgPerMol;
    expect(Math.abs(found / jPerMolK - 1)).toBeLessThan(iron.toleranceShare);
  });
});
