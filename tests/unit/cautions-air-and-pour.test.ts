import { describe, expect, it } from 'vitest';
import { cautionsOf, type PouringFurnace } from '~/lib/thermal/cautions';
import type { LoadInput } from '~/lib/thermal/load-schema';
import { aProfile } from '../helpers/profiles';
import { noContext, type SimulationStory, toldSimulation } from '../helpers/simulations';

const found = (story: SimulationStory, code: string, furnace: PouringFurnace | null = null) =>
  cautionsOf(toldSimulation(story), { ...noContext, furnace }).filter((caution) => caution.code === code);

const shellWith = (pattern: object | null, pour?: object): LoadInput => ({
  moulds: [
    {
      material: 'fused-silica-shell',
      massKg: 2,
      wallM: 0.008,
      thinnestSectionM: 0.004,
      label: 'torso',
      pattern: pattern && { material: 'pla', massKg: 0.2, ...pattern },
    },
  ],
  ...(pour ? { pour: { metal: 'tin-bronze-90-10', chargeKg: 6, pourC: 1180, carryS: 10, ...pour } } : {}),
});

const burnout = aProfile({ toC: 700, rateCPerH: 200, vent: 'closed' });

describe('a burnout starved of air', () => {
  const code = 'burnout-starved';
  const asks = (share: number): SimulationStory => ({
    profile: burnout,
    load: shellWith({}),
    airNeededKgPerS: () => 1e-3,
    airInKgPerS: () => 1e-3 * (1 - share),
  });

  it('is one in which more than a tenth of the gas finds no air', () => {
    expect(found(asks(0.11), code)).toMatchObject([{ severity: 'note', segment: 0 }]);
    expect(found(asks(0.09), code)).toEqual([]);
    expect(found(asks(0.35), code)).toMatchObject([{ severity: 'warn' }]);
  });

  it('says how much air burning takes and how much comes in, and that the vent is closed', () => {
    // 1e-3 kg/s of air of 1.204 kg/m³ is 3.0 m³/h
    expect(found(asks(0.5), code)[0]?.text).toMatch(
      /3.m³\/h of air; 1\.5.m³\/h comes in.*50 %.*vent is closed/,
    );
  });

  it('is none where there is hardly anything to burn', () => {
    expect(found({ ...asks(0.5), airNeededKgPerS: () => 1e-8, airInKgPerS: () => 0 }, code)).toEqual([]);
  });
});

describe('gas at its peak', () => {
  const code = 'offgas-peak';
  // 16.8 MJ/kg of PLA: a quarter of 2 MJ in each m³ of air is 0.0298 kg; with 1.204e-2 kg/s (10 l/s) of air 17.9 g/min
  const gives = (gPerMin: number, chamberC = 400): SimulationStory => ({
    profile: burnout,
    load: shellWith({}),
    chamberC: () => chamberC,
    moulds: [{ gasGPerMin: () => gPerMin }],
    airInKgPerS: () => 1.204e-2,
  });

  it('is noted above a quarter of what makes air flammable, warned of above the whole (NFPA 86; Burgess and Wheeler)', () => {
    expect(found(gives(17.5), code)).toEqual([]);
    expect(found(gives(18.3), code)).toMatchObject([{ severity: 'note' }]);
    expect(found(gives(70), code)).toMatchObject([{ severity: 'note' }]);
    expect(found(gives(73), code)).toMatchObject([{ severity: 'warn' }]);
    expect(found(gives(36), code)[0]?.text).toMatch(/36.g\/min.*400.°C.*50 %/);
  });

  it('burns as it comes in a hot chamber', () => {
    expect(found(gives(73, 650), code)).toEqual([]);
  });
});

describe('carbon in gypsum', () => {
  const code = 'sulphur-risk';
  const flask = (left: number, coreC: number, material = 'gypsum-investment'): SimulationStory => ({
    profile: burnout,
    load: {
      moulds: [{ form: 'flask', material, massKg: 1, pattern: { material: 'pattern-wax', massKg: 0.05 } }],
    },
    moulds: [{ coreC: () => coreC, patternLeftShare: () => left }],
  });

  it('is a risk above 700 °C, and stops a firing 50 °C above that', () => {
    expect(found(flask(0.02, 705), code)).toMatchObject([{ severity: 'warn' }]);
    expect(found(flask(0.02, 699), code)).toEqual([]);
    expect(found(flask(0.02, 751), code)).toMatchObject([{ severity: 'stop' }]);
    expect(found(flask(0.02, 720), code)[0]?.text).toMatch(/2 % of the pattern, 0\.99 g.*720.°C.*700.°C/);
  });

  it('is none once the pattern is burned out, nor in a mould without gypsum', () => {
    expect(found(flask(0.005, 740), code)).toEqual([]);
    expect(found(flask(0.02, 740, 'phosphate-investment'), code)).toEqual([]);
  });
});

describe('the metal', () => {
  const code = 'metal-not-ready';
  const held = aProfile({ toC: 800, rateCPerH: 400 }, { stage: 'casting-hold', toC: 800, holdS: 3600 });
  const furnace = (fields: object = {}): PouringFurnace => ({
    name: 'Little furnace',
    energy: 'electric',
    ratedKW: 6,
    efficiencyShare: 0.6,
    capacityKg: 10,
    maxC: 1200,
    ...fields,
  });
  const story = (pour: object = {}): SimulationStory => ({ profile: held, load: shellWith(null, pour) });

  it('is ready in a furnace that is hot, large and quick enough', () => {
    expect(found(story(), code, furnace())).toEqual([]);
  });

  it('cannot be poured above the furnace’s limit, nor weigh more than it holds', () => {
    expect(found(story(), code, furnace({ maxC: 1180 }))).toEqual([]);
    expect(found(story(), code, furnace({ maxC: 1179 }))).toMatchObject([{ severity: 'stop' }]);
    expect(found(story({ chargeKg: 10 }), code, furnace())).toEqual([]);
    expect(found(story({ chargeKg: 10.1 }), code, furnace())[0]?.text).toMatch(/holds 10.*kg.*10\.1/);
  });

  it('has to come with superheat left: tin bronze is liquid from 999 °C (CDA)', () => {
    expect(found(story({ pourC: 1060, carryS: 0 }), code)).toEqual([]);
    expect(found(story({ pourC: 1028, carryS: 0 }), code)).toMatchObject([{ severity: 'warn' }]);
    expect(found(story({ pourC: 998, carryS: 0 }), code)).toMatchObject([{ severity: 'stop' }]);
  });

  it('comes late from a furnace too weak, and too late when the hold has ended', () => {
    // lit with the kiln, which takes two hours to 800 °C; the hold lasts one more
    const [late] = found(story(), code, furnace({ ratedKW: 1.1 }));
    expect(late).toMatchObject({ severity: 'note' });
    const [tooLate] = found(story(), code, furnace({ ratedKW: 0.6 }));
    expect(tooLate).toMatchObject({ severity: 'warn' });
    expect(tooLate?.text).toMatch(/after the hold has ended/);
  });
});

describe('a mould at the pour', () => {
  const code = 'mould-cold-at-pour';
  const at = (toC: number, sectionM: number | null): SimulationStory => {
    const load = shellWith(null, {});
    return {
      profile: aProfile({ toC, rateCPerH: 400 }, { stage: 'casting-hold', toC, holdS: 3600 }),
      load: {
        ...load,
        moulds: (load.moulds ?? []).map((mould) => ({ ...mould, thinnestSectionM: sectionM })),
      },
    };
  };

  it('is too cold for a thin section and hot enough for a thick one', () => {
    expect(found(at(200, 0.002), code)).toMatchObject([{ severity: 'warn', segment: 1 }]);
    expect(found(at(200, 0.002), code)[0]?.text).toMatch(/2.mm section of “torso” likely misruns/);
    expect(found(at(850, 0.008), code)).toEqual([]);
  });

  it('is not judged where nobody says how thin its sections are', () => {
    expect(found(at(200, null), code)).toEqual([]);
  });

  it('that never comes to its temperature is said to', () => {
    const story = at(800, 0.004);
    expect(found({ ...story, moulds: [{ coreC: () => 500 }] }, code)[0]?.text).toMatch(/never comes/);
  });
});
