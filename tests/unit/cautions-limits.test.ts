import { describe, expect, it } from 'vitest';
import { cautionsOf, type CautionContext } from '~/lib/thermal/cautions';
import { thermocoupleLimit } from '~/lib/thermal/cautions/thermocouple-limits';
import { aProfile } from '../helpers/profiles';
import { noContext, type SimulationStory, toldSimulation } from '../helpers/simulations';

const found = (story: SimulationStory, code: string, context: CautionContext = noContext) =>
  cautionsOf(toldSimulation(story), context).filter((caution) => caution.code === code);
const to = (toC: number) => aProfile({ toC: 400, rateCPerH: 200 }, { toC, rateCPerH: 100, holdS: 600 });

describe('above the kiln’s limit', () => {
  it('is a target above it, and stops the approval', () => {
    const [caution] = found({ profile: to(1210) }, 'above-kiln-limit');
    expect(caution).toMatchObject({ severity: 'stop', segment: 1, atS: 6840 });
    expect(caution?.text).toMatch(/1210.°C.*1200.°C/);
  });

  it('is not a target on it', () => {
    expect(found({ profile: to(1200) }, 'above-kiln-limit')).toEqual([]);
  });

  it('is a chamber that runs away past it', () => {
    const run = (peakC: number) =>
      found({ profile: to(1190), chamberC: (atS) => (atS < 20000 ? 800 : peakC) }, 'above-kiln-limit');
    expect(run(1206)).toMatchObject([{ severity: 'warn', segment: 1 }]);
    expect(run(1204)).toEqual([]);
  });
});

describe('above what a material stands', () => {
  const gypsum = { moulds: [{ form: 'flask' as const, material: 'gypsum-investment', massKg: 2 }] };
  const shell = { moulds: [{ material: 'fused-silica-shell', massKg: 2 }] };

  it('stops a gypsum mould above 788 °C', () => {
    const [caution] = found({ profile: to(800), load: gypsum }, 'above-material-limit');
    expect(caution).toMatchObject({ severity: 'stop', segment: 1 });
    expect(caution?.text).toContain('gypsum investment');
    expect(caution?.source).toContain('1450 °F');
    expect(found({ profile: to(788), load: gypsum }, 'above-material-limit')).toEqual([]);
  });

  it('warns of a shell a little above, and stops it far above', () => {
    const severity = (peakC: number) =>
      found({ profile: to(peakC), load: shell, kiln: { maxC: 1300 } }, 'above-material-limit')[0]?.severity;
    expect(severity(1200)).toBeUndefined();
    expect(severity(1210)).toBe('warn');
    expect(severity(1255)).toBe('stop');
  });

  it('goes by the studio’s own figure', () => {
    const load = { moulds: shell.moulds.map((mould) => ({ ...mould, overrides: { maxC: 900 } })) };
    expect(found({ profile: to(950), load }, 'above-material-limit')[0]?.source).toContain('own figure');
  });

  it('knows the steel of a drain tray and the brick of the wall', () => {
    const tray = { furniture: [{ material: 'stainless-steel', massKg: 3 }] };
    expect(found({ profile: to(950), load: tray }, 'above-material-limit')).toHaveLength(1);
    expect(found({ profile: to(920), load: tray }, 'above-material-limit')).toEqual([]);
    const fibre = { lining: 'fibre' as const, maxC: 1300 };
    expect(found({ profile: to(1210), kiln: fibre }, 'above-material-limit')[0]?.text).toContain(
      'fibre blanket',
    );
    expect(found({ profile: to(1200), kiln: fibre }, 'above-material-limit')).toEqual([]);
  });
});

describe('above what the thermocouple is made for', () => {
  const typeK = (fields = {}) => ({
    ...noContext,
    thermocouple: { type: 'K', sheathM: 0.003, maxC: null, ...fields },
  });

  it('goes by its sheath', () => {
    expect(found({ profile: to(1080) }, 'above-thermocouple-limit', typeK())).toMatchObject([
      { severity: 'warn' },
    ]);
    expect(found({ profile: to(1070) }, 'above-thermocouple-limit', typeK())).toEqual([]);
    expect(found({ profile: to(1080) }, 'above-thermocouple-limit', typeK({ sheathM: 0.006 }))).toEqual([]);
  });

  it('goes by what the studio has entered', () => {
    expect(found({ profile: to(910) }, 'above-thermocouple-limit', typeK({ maxC: 900 }))).toHaveLength(1);
    expect(found({ profile: to(900) }, 'above-thermocouple-limit', typeK({ maxC: 900 }))).toEqual([]);
  });

  it('says nothing of one that nobody has described', () => {
    expect(found({ profile: to(1190) }, 'above-thermocouple-limit')).toEqual([]);
    expect(thermocoupleLimit({ type: 'toString', sheathM: null, maxC: null })).toBeNull();
  });

  it('knows the limits of the types', () => {
    const limit = (type: string, sheathM: number | null) =>
      thermocoupleLimit({ type, sheathM, maxC: null })?.maxC;
    expect(limit('K', null)).toBe(1260);
    expect(limit('K', 0.0015)).toBe(920);
    expect(limit('S', 0.003)).toBe(1480);
    expect(limit('J', 0.006)).toBe(760);
  });
});

describe('sentences', () => {
  it('are in the units that the reader has chosen', () => {
    const context = { ...noContext, units: { temperature: 'F', mass: 'lb', length: 'in' } as const };
    expect(found({ profile: to(1210) }, 'above-kiln-limit', context)[0]?.text).toMatch(/2210.°F.*2192.°F/);
  });
});
