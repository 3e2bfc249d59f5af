import { describe, expect, it } from 'vitest';
import {
  findMaterial,
  inversionsOf,
  materials,
  materialsSchema,
  type Property,
  valueAt,
} from '~/lib/materials';

const NAMED_IN_THE_CONTRACT = {
  moulds: [
    'fused-silica-shell',
    'aluminosilicate-shell',
    'zircon-shell',
    'gypsum-investment',
    'phosphate-investment',
  ],
  patterns: ['pla', 'pattern-wax', 'filled-wax', 'paraffin', 'beeswax', 'castable-resin', 'eps-foam', 'pvb'],
  metals: ['tin-bronze-90-10'],
  furniture: ['cordierite'],
} as const;

const UNIT_BY_ENDING: [RegExp, string][] = [
  [/JPerKgK$/, 'J/(kg·K)'],
  [/WPerMK$/, 'W/(m·K)'],
  [/KgPerM3$/, 'kg/m³'],
  [/KgPerKWh$/, 'kg/kWh'],
  [/KJPerMol$/, 'kJ/mol'],
  [/JPerKg$/, 'J/kg'],
  [/KgPerKg$/, 'kg/kg'],
  [/PerK$/, '1/K'],
  [/C$/, '°C'],
  [/Pa$/, 'Pa'],
  [/M2$/, 'm²'],
  [/M$/, 'm'],
  [/S$/, 's'],
  [/H$/, 'h'],
];

const everyProperty = Object.values(materials)
  .flat()
  .flatMap((material) =>
    Object.entries(material.properties).map(([name, property]) => ({
      id: material.id,
      name,
      property: property,
    })),
  );

describe('the materials table', () => {
  it('keeps to its own schema', () => {
    expect(() => materialsSchema.parse(materials)).not.toThrow();
  });

  it.each(Object.entries(NAMED_IN_THE_CONTRACT))('holds the %s that the contract names', (kind, ids) => {
    for (const id of ids) expect(findMaterial(kind as keyof typeof NAMED_IN_THE_CONTRACT, id)?.id).toBe(id);
  });

  it('knows each material once', () => {
    for (const list of Object.values(materials)) {
      const ids = list.map((item) => item.id);
      expect(new Set(ids).size).toBe(ids.length);
    }
  });

  it('does not know what is not in it', () => {
    expect(findMaterial('patterns', 'butter')).toBeUndefined();
    expect(findMaterial('moulds', '__proto__')).toBeUndefined();
  });

  it('gives every property in the unit that its name ends in', () => {
    for (const { id, name, property } of everyProperty) {
      const expected = UNIT_BY_ENDING.find(([ending]) => ending.test(name));
      if (expected !== undefined) expect(property.unit, `${id}.${name}`).toBe(expected[1]);
    }
  });

  it('has curves that rise in temperature', () => {
    for (const { id, name, property } of everyProperty) {
      if (!('points' in property)) continue;
      const temps = property.points.map(([tempC]) => tempC);
      expect(temps, `${id}.${name}`).toEqual([...temps].sort((a, b) => a - b));
      expect(new Set(temps).size).toBe(temps.length);
    }
  });

  it('shares out the whole of a pattern over its kinetic steps, with char burning last in air', () => {
    for (const pattern of materials.patterns) {
      const steps = pattern.kinetics.steps;
      expect(steps.reduce((sum, step) => sum + step.massShare, 0)).toBeCloseTo(1, 9);
      const last = steps[steps.length - 1];
      expect(last?.needsAir, pattern.id).toBe(true);
      expect(steps.map((step) => step.name)).toContain(last?.follows);
    }
  });

  it('gives a flow temperature to all patterns but the thermosets', () => {
    for (const { id, behaviour, properties } of materials.patterns)
      expect(properties.flowsC === undefined, id).toBe(behaviour === 'thermoset');
  });

  it('melts each metal between its solidus and its pour', () => {
    for (const { id, composition, properties } of materials.metals) {
      const at = (property: Property) => ('value' in property ? property.value : NaN);
      expect(at(properties.solidusC), id).toBeLessThanOrEqual(at(properties.liquidusC));
      expect(at(properties.pourLightToC), id).toBeGreaterThan(at(properties.liquidusC));
      expect(at(properties.pourLightFromC), id).toBeLessThanOrEqual(at(properties.pourLightToC));
      expect(at(properties.liquidDensityKgPerM3), id).toBeLessThan(at(properties.densityKgPerM3));
      expect(Object.values(composition).reduce((sum, share) => sum + share, 0)).toBeCloseTo(1, 9);
    }
  });

  it('says what a mould contains, and with it which inversions it goes through', () => {
    const inversionNames = (id: string) =>
      inversionsOf(findMaterial('moulds', id)?.contains ?? []).map((inversion) => inversion.name);
    expect(inversionNames('fused-silica-shell')).toEqual([]);
    expect(inversionNames('gypsum-investment')).toEqual(['quartz inversion', 'cristobalite inversion']);
    expect(inversionNames('plaster-silica')).toEqual(['quartz inversion']);
  });

  it('gives every mould that holds gypsum its two steps and a ceiling for carbon', () => {
    for (const mould of materials.moulds.filter((item) => item.contains.includes('gypsum'))) {
      expect(mould.reactions).toHaveLength(2);
      const { maxC, maxWithCarbonC } = mould.properties;
      if (!maxC || !maxWithCarbonC) throw new Error(`${mould.id} has no ceiling`);
      expect(maxWithCarbonC.unit).toBe('°C');
      // From memory: carbon reduces calcium sulphate from 700-750 °C; without carbon the mould stands more.
      expect(valueAt(maxWithCarbonC, 20)).toBeLessThanOrEqual(750);
      expect(valueAt(maxWithCarbonC, 20)).toBeGreaterThanOrEqual(700);
      expect(valueAt(maxWithCarbonC, 20)).toBeLessThan(valueAt(maxC, 20));
    }
  });
});
