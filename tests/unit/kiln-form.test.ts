import { expect, test } from 'vitest';
import { kilnFormSchema, kilnTyped, type KilnTyped } from '~/components/islands/forms/kiln-form';
import { fieldText, readQuantity, understoodAs } from '~/components/islands/forms/quantity';
import { kilnInputSchema } from '~/lib/contracts/equipment';

const METRIC = { temperature: 'C', mass: 'kg', length: 'mm' } as const;
const IMPERIAL = { temperature: 'F', mass: 'lb', length: 'in' } as const;

const typed = (fields: Partial<KilnTyped>): KilnTyped => ({
  ...kilnTyped(null, METRIC),
  name: 'Tall kiln',
  innerWidthM: '450',
  innerDepthM: '450',
  innerHeightM: '600',
  liningM: '114',
  maxC: '1280',
  ratedKW: '10.5',
  ...fields,
});

// 1 in is 25.4 mm, 1 lb 0.45359237 kg (international yard and pound agreement, 1959); °F from the definition of the scale.
test('what is typed in another unit than one’s own is kept as what it is', () => {
  const sent = kilnFormSchema(METRIC).parse(
    typed({ innerWidthM: '18 in', maxC: '2300 °F', liningM: '4.5"' }),
  );
  expect(sent.innerWidthM).toBeCloseTo(0.4572, 10);
  expect(sent.maxC).toBeCloseTo(1260, 10);
  expect(sent.liningM).toBeCloseTo(0.1143, 10);
});

test('a bare number is in one’s own units', () => {
  const own = {
    innerWidthM: '18',
    innerDepthM: '18',
    innerHeightM: '24',
    liningM: '4.5',
    maxC: '2300',
    openAtC: '250',
  };
  const sent = kilnFormSchema(IMPERIAL).parse(typed({ ...own, waitBandC: '18', thermocoupleOffsetC: '0' }));
  expect(sent.innerHeightM).toBeCloseTo(0.6096, 10);
  expect(sent.maxC).toBeCloseTo(1260, 10);
  // A band is a difference: 18 °F are 10 °C, nothing is subtracted.
  expect(sent.waitBandC).toBeCloseTo(10, 10);
});

test('every form that is understood is a kiln of the contract', () => {
  for (const energy of ['electric', 'gas'] as const) {
    const sent = kilnFormSchema(METRIC).parse(typed({ energy, burnerKW: '40' }));
    expect(kilnInputSchema.parse(sent).energy).toBe(energy);
  }
});

test('only the fields of what heats the kiln are asked for', () => {
  expect(
    kilnFormSchema(METRIC).safeParse(typed({ energy: 'gas', ratedKW: '', burnerKW: '40' })).success,
  ).toBe(true);
  const missing = kilnFormSchema(METRIC).safeParse(typed({ energy: 'gas', burnerKW: '' }));
  expect(missing.error?.issues.map((issue) => issue.path.join('.'))).toEqual(['burnerKW']);
});

test('a figure out of range is told at its field, in the person’s units', () => {
  const result = kilnFormSchema(IMPERIAL).safeParse(typed({ maxC: '9000' }));
  const issue = result.error?.issues.find((one) => one.path[0] === 'maxC');
  expect(issue?.message).toBe('Between 212 °F and 2552 °F is expected.');
});

test('what is kept stands in the form again as it was typed', () => {
  const kept = kilnFormSchema(METRIC).parse(
    typed({ liningLayers: [{ material: 'firebrick-23', thicknessM: '114' }] }),
  );
  const now = '2026-01-01T00:00:00Z';
  const kiln = { ...kilnInputSchema.parse(kept), id: '9e0c1b20-0000-4000-8000-000000000001', revision: 1 };
  const again = kilnTyped({ ...kiln, createdAt: now, updatedAt: now, archivedAt: null }, METRIC);
  expect(kilnFormSchema(METRIC).parse(again)).toEqual(kept);
});

test('what was understood is said only where another unit was typed', () => {
  expect(understoodAs('450', 'length', METRIC)).toBeNull();
  expect(understoodAs('18 in', 'length', METRIC)?.replace('\u202f', ' ')).toBe('457 mm');
  expect(understoodAs('2300F', 'temperature', METRIC)?.replace('\u202f', ' ')).toBe('1260 °C');
  expect(readQuantity('25 %', 'percent', METRIC)).toEqual({ ok: true, value: 0.25 });
  expect(fieldText(0.45359237, 'mass', IMPERIAL)).toBe('1');
});
