import { expect, it } from 'vitest';
import { materials, valueAt } from '~/lib/materials';
import { FIGURE_KINDS, figureIssues } from '~/lib/materials/studio-figures';

const taken = (kind: (typeof FIGURE_KINDS)[number], material: string, name: string, value: number) =>
  figureIssues(kind, material, { [name]: value }).length === 0;

it('no own figure is beyond what its property can mean: emissivity, Poisson’s ratio, tortuosity', () => {
  // By definition: 0 < ε ≤ 1; −1 < ν < 0.5 of any isotropic solid, and ceramics are not below 0; τ ≥ 1.
  expect(taken('furniture', 'cordierite', 'emissivity', 1.01)).toBe(false);
  expect(taken('furniture', 'cordierite', 'emissivity', 0)).toBe(false);
  expect(taken('furniture', 'cordierite', 'emissivity', 1)).toBe(true);
  expect(taken('moulds', 'fused-silica-shell', 'emissivity', 1.01)).toBe(false);
  expect(taken('moulds', 'fused-silica-shell', 'poissonRatio', 0.51)).toBe(false);
  expect(taken('moulds', 'fused-silica-shell', 'poissonRatio', 0.3)).toBe(true);
  expect(taken('moulds', 'fused-silica-shell', 'tortuosity', 0.9)).toBe(false);
  expect(taken('moulds', 'fused-silica-shell', 'tortuosity', 1.5)).toBe(true);
});

it('every figure of the table is itself within its bounds', () => {
  for (const kind of FIGURE_KINDS)
    for (const { id, properties } of materials[kind])
      for (const [name, property] of Object.entries(properties))
        expect({ id, name, issues: figureIssues(kind, id, { [name]: valueAt(property, 500) }) }).toEqual({
          id,
          name,
          issues: [],
        });
});
