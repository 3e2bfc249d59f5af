import { expect, test } from 'vitest';
import { safetyNotesFor } from '~/lib/profile/safety';
import { profileSchema, type ProfileInput } from '~/lib/profile/schema';
import { loadSchema, type LoadInput } from '~/lib/thermal/load-schema';

const profile = (...segments: ProfileInput['segments']) => profileSchema.parse({ startC: 20, segments });
const load = (input: LoadInput) => loadSchema.parse(input);
const DRYING = { stage: 'drying', toC: 95, rateCPerH: 60, holdS: 3600 } as const;
const SHELL = { material: 'fused-silica-shell', massKg: 2 } as const;

test('a pattern in the load brings fumes, whatever the stages are called', () => {
  const printed = load({ moulds: [{ ...SHELL, pattern: { material: 'pla', massKg: 0.3 } }] });
  expect(safetyNotesFor(profile(DRYING), printed)).toContain('fumes');
  expect(safetyNotesFor(profile(DRYING), load({ moulds: [SHELL] }))).not.toContain('fumes');
});

test('a burnout brings fumes even where the load is not described', () => {
  expect(safetyNotesFor(profile({ ...DRYING, stage: 'burnout' }), null)).toContain('fumes');
});

test('metal and scrap are warned of where metal is poured, and only there', () => {
  const pour = { metal: 'tin-bronze-90-10', chargeKg: 6, pourC: 1150 };
  const poured = safetyNotesFor(profile(DRYING), load({ moulds: [SHELL], pour }));
  expect(poured).toEqual(expect.arrayContaining(['molten-metal', 'unknown-scrap']));
  expect(safetyNotesFor(profile(DRYING), load({ moulds: [SHELL] }))).not.toContain('molten-metal');
});

test('silica dust is warned of wherever a mould is fired, or may be', () => {
  expect(safetyNotesFor(profile(DRYING), null)).toContain('silica-dust');
  expect(safetyNotesFor(profile(DRYING), load({ moulds: [SHELL] }))).toContain('silica-dust');
  expect(safetyNotesFor(profile(DRYING), load({}))).not.toContain('silica-dust');
});

test('a firing with somebody there at every segment is not unattended', () => {
  expect(safetyNotesFor(profile({ ...DRYING, attended: true }), null)).not.toContain('unattended');
  expect(safetyNotesFor(profile(DRYING), null)).toContain('unattended');
});

test('hot work and the limits of estimates are said of every firing', () => {
  expect(safetyNotesFor(profile(DRYING), load({}))).toEqual(
    expect.arrayContaining(['hot-work', 'estimates']),
  );
});
