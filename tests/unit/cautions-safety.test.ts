import { describe, expect, it } from 'vitest';
import { safetyNotesAt, safetyNotesFor } from '~/lib/profile/safety';
import { loadSchema, type LoadInput } from '~/lib/thermal/load-schema';
import { aProfile } from '../helpers/profiles';

const load = (input: LoadInput) => loadSchema.parse(input);
const shell = { material: 'fused-silica-shell', massKg: 2 };
const firing = aProfile(
  { stage: 'melt-out', toC: 260, drain: true, holdS: 1800 },
  { stage: 'burnout', toC: 750, holdS: 3600 },
  { stage: 'casting-hold', toC: 850, holdS: 3600, attended: true },
  { stage: 'cooling', toC: 100, rateCPerH: 'coast', attended: true },
);
const drying = aProfile({ stage: 'drying', toC: 90, attended: true });

describe('the dangers of a firing', () => {
  it('hold fumes wherever a pattern is in it', () => {
    expect(safetyNotesFor(firing, null)).toContain('fumes');
    expect(safetyNotesFor(drying, null)).not.toContain('fumes');
    const withPattern = load({ moulds: [{ ...shell, pattern: { material: 'pla', massKg: 0.1 } }] });
    expect(safetyNotesFor(drying, withPattern)).toContain('fumes');
  });

  it('hold molten metal where it is poured', () => {
    expect(safetyNotesFor(firing, null)).toContain('molten-metal');
    expect(safetyNotesFor(drying, null)).not.toContain('molten-metal');
    const poured = load({ pour: { metal: 'tin-bronze-90-10', chargeKg: 8, pourC: 1100 } });
    expect(safetyNotesFor(drying, poured)).toEqual(expect.arrayContaining(['molten-metal', 'unknown-scrap']));
  });

  it('name zinc and lead for the metals that hold them', () => {
    const pouring = (metal: string) =>
      safetyNotesFor(firing, load({ pour: { metal, chargeKg: 8, pourC: 1150 } }));
    expect(pouring('red-brass')).toContain('zinc-and-lead');
    expect(pouring('tin-bronze-90-10')).not.toContain('zinc-and-lead');
    expect(pouring('scrap-of-some-kind')).not.toContain('zinc-and-lead');
  });

  it('hold an unattended kiln unless somebody is there throughout', () => {
    expect(safetyNotesFor(firing, null)).toContain('unattended');
    expect(safetyNotesFor(drying, null)).not.toContain('unattended');
  });

  it('always hold hot work and that figures are estimates', () => {
    expect(safetyNotesFor(drying, null)).toEqual(expect.arrayContaining(['hot-work', 'estimates']));
  });
});

describe('the dangers at a moment', () => {
  it('are fumes while the pattern leaves, and hot work where it is drained', () => {
    expect(safetyNotesAt(firing, null, 0)).toEqual(['fumes', 'hot-work']);
    expect(safetyNotesAt(firing, null, 1)).toEqual(['fumes', 'unattended']);
  });

  it('are metal at the casting hold, and dust when the kiln is unpacked', () => {
    expect(safetyNotesAt(firing, null, 2)).toEqual(['hot-work', 'molten-metal', 'unknown-scrap']);
    expect(safetyNotesAt(firing, null, 3)).toEqual(['hot-work', 'silica-dust']);
  });

  it('are none where there is no segment', () => {
    expect(safetyNotesAt(firing, null, 4)).toEqual([]);
  });
});
