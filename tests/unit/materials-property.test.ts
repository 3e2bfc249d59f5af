import { describe, expect, it } from 'vitest';
import { constant, curve, defaultLayers, findMaterial, valueAt, withOverride } from '~/lib/materials';

const bent = curve(
  [
    [100, 1],
    [200, 3],
    [400, 2],
  ],
  'W/(m·K)',
  'made up',
  'derived',
);

describe('a property over temperature', () => {
  it.each([
    [100, 1],
    [150, 2],
    [200, 3],
    [300, 2.5],
    [400, 2],
  ])('at %d °C lies on the straight line between its points', (tempC, expected) => {
    expect(valueAt(bent, tempC)).toBeCloseTo(expected, 12);
  });

  it('keeps its end values outside its points', () => {
    expect(valueAt(bent, -50)).toBe(1);
    expect(valueAt(bent, 1300)).toBe(2);
  });

  it('is the same at every temperature if constant', () => {
    expect(valueAt(constant(7, 'm', 'made up', 'derived'), 900)).toBe(7);
  });

  it('gives way to the studio’s own figure', () => {
    const shell = findMaterial('moulds', 'fused-silica-shell');
    const own = withOverride(shell?.properties ?? {}, { densityKgPerM3: 1500 }, 'densityKgPerM3');
    expect(own).toMatchObject({ value: 1500, unit: 'kg/m³' });
    expect(own?.source).toMatch(/own/);
    expect(withOverride(shell?.properties ?? {}, {}, 'densityKgPerM3')).toBe(
      shell?.properties.densityKgPerM3,
    );
    expect(withOverride(shell?.properties ?? {}, {}, 'constructor')).toBeUndefined();
  });
});

describe('the layers of a kiln’s wall', () => {
  it.each(['brick', 'fibre', 'brick-and-fibre'] as const)(
    'add up to the thickness of a %s lining',
    (lining) => {
      const layers = defaultLayers(lining, 0.15, 1200);
      const casing = layers[layers.length - 1];
      expect(casing?.material).toBe('casing-steel');
      expect(layers.slice(0, -1).reduce((sum, layer) => sum + layer.thicknessM, 0)).toBeCloseTo(0.15, 12);
      const known = layers.map((layer) => findMaterial('linings', layer.material)?.id);
      expect(known).toEqual(layers.map((layer) => layer.material));
      for (const layer of layers) expect(layer.thicknessM, layer.material).toBeGreaterThan(0);
    },
  );

  it('have a hot face that stands the kiln’s highest temperature', () => {
    expect(defaultLayers('brick', 0.1, 1230)[0]?.material).toBe('firebrick-23');
    expect(defaultLayers('brick', 0.1, 1300)[0]?.material).toBe('firebrick-26');
  });
});
