import { describe, expect, it } from 'vitest';
import { cautionsOf } from '~/lib/thermal/cautions';
import { aProfile } from '../helpers/profiles';
import { noContext, type SimulationStory, toldSimulation } from '../helpers/simulations';

const found = (story: SimulationStory, code: string) =>
  cautionsOf(toldSimulation(story), noContext).filter((caution) => caution.code === code);
const shell = { material: 'fused-silica-shell', massKg: 2 };
const clay = { material: 'aluminosilicate-shell', massKg: 2 };
const flask = { form: 'flask' as const, material: 'gypsum-investment', massKg: 2 };
const ramp = (rateCPerH: number, toC = 900) => aProfile({ toC, rateCPerH, holdS: 7200 });

describe('steam in the wall', () => {
  const wet = (rateCPerH: number, dryAtS: number) =>
    found(
      {
        profile: ramp(rateCPerH),
        load: { moulds: [{ ...shell, waterKg: 0.2 }] },
        moulds: [{ waterKg: (atS) => Math.max(0, 0.2 * (1 - atS / dryAtS)) }],
      },
      'steam-in-wall',
    );

  it('is water behind a face above 100 °C that heats faster than wet ware stands', () => {
    const [caution] = wet(150, 7200);
    expect(caution).toMatchObject({ severity: 'warn', segment: 0 });
    expect(caution?.text).toMatch(/150.°C\/h.*100.°C\/h is the limit/);
  });

  it('stops the approval at several times the limit in a wet wall', () => {
    expect(wet(400, 7200)[0]?.severity).toBe('stop');
    expect(wet(400, 1200)[0]?.severity).toBe('warn');
  });

  it('is none in a shell that is dry to the touch, and is in a block', () => {
    const damp = (waterKg: number, mould: typeof shell) =>
      found(
        {
          profile: ramp(400),
          load: { moulds: [{ ...mould, waterKg }] },
          moulds: [{ waterKg: () => waterKg }],
        },
        'steam-in-wall',
      );
    expect(damp(0.02, shell)).toEqual([]);
    expect(damp(0.021, shell)).toHaveLength(1);
    expect(damp(0.01, flask)).toHaveLength(1);
  });

  it('is none at the limit itself', () => {
    expect(wet(99, 7200)).toEqual([]);
  });

  it('is none once the wall is dry', () => {
    // At 150 °C/h the face is at 100 °C after 32 minutes.
    expect(wet(150, 1900)).toEqual([]);
    expect(found({ profile: ramp(400), load: { moulds: [shell] } }, 'steam-in-wall')).toEqual([]);
  });
});

describe('too steep for the wall', () => {
  const lagging = (mould: typeof clay, differenceC: number) =>
    found(
      {
        profile: ramp(100),
        load: { moulds: [mould] },
        moulds: [{ coreC: (atS) => 20 + atS / 36 - differenceC }],
      },
      'too-steep-for-wall',
    );

  // Green aluminosilicate: 3.5 MPa × 0.8 / (1/3 × 15 GPa × 5e-6) = 112 °C.
  it('goes by the stress that the wall stands', () => {
    expect(lagging(clay, 111)).toEqual([]);
    expect(lagging(clay, 114)).toMatchObject([{ severity: 'note' }]);
    expect(lagging(clay, 330)).toMatchObject([{ severity: 'note' }]);
    expect(lagging(clay, 340)).toMatchObject([{ severity: 'warn' }]);
    expect(lagging(clay, 200)[0]?.text).toMatch(/200.°C hotter outside.*112.°C/);
  });

  it('lets fused silica off, which hardly expands', () => {
    expect(lagging(shell, 400)).toEqual([]);
  });

  it('goes by the rate that drained shells stand', () => {
    const at = (rateCPerH: number) =>
      found({ profile: ramp(rateCPerH), load: { moulds: [clay] } }, 'too-steep-for-wall');
    expect(at(620)).toEqual([]);
    expect(at(640)).toMatchObject([{ severity: 'warn' }]);
  });

  it('is a note only while wet ware dries, and nothing once it is dry', () => {
    const drying = (waterKg: number) =>
      found(
        {
          profile: ramp(90, 95),
          load: { moulds: [{ ...flask, waterKg }] },
          moulds: [{ waterKg: () => waterKg }],
        },
        'too-steep-for-wall',
      );
    expect(drying(0.5)).toMatchObject([{ severity: 'note' }]);
    expect(drying(0)).toEqual([]);
  });
});

describe('inversions', () => {
  const through = (rateCPerH: number, mould: object = flask) =>
    found(
      {
        profile: aProfile({ toC: 500, rateCPerH: 50 }, { toC: 700, rateCPerH }),
        load: { moulds: [{ ...flask, ...mould }] },
      },
      'inversion-too-fast',
    );

  it('of quartz is taken at 150 °C/h at most', () => {
    expect(through(150)).toEqual([]);
    const [caution] = through(200);
    expect(caution).toMatchObject({ severity: 'warn', segment: 1 });
    expect(caution?.text).toMatch(/quartz inversion.*200.°C\/h/);
  });

  it('is none in a mould that has no quartz', () => {
    expect(through(400, { form: 'shell', material: 'fused-silica-shell' })).toEqual([]);
  });

  it('of cristobalite is looked for in its own range', () => {
    const fast = aProfile({ toC: 300, rateCPerH: 140 }, { toC: 700, rateCPerH: 100 });
    expect(found({ profile: fast, load: { moulds: [flask] } }, 'inversion-too-fast')).toMatchObject([
      { segment: 0 },
    ]);
    expect(
      found(
        { profile: fast, load: { moulds: [{ ...flask, material: 'plaster-silica' }] } },
        'inversion-too-fast',
      ),
    ).toEqual([]);
  });

  it('counts the rate of the mould, not of the chamber', () => {
    expect(
      found(
        {
          profile: ramp(400, 700),
          load: { moulds: [flask] },
          moulds: [{ surfaceC: (atS) => 20 + (90 * atS) / 3600 }],
        },
        'inversion-too-fast',
      ),
    ).toEqual([]);
  });
});

describe('cooling', () => {
  const cooling = (rateCPerH: number, mould = flask, peakC = 732, holdS = 3600) =>
    found(
      {
        profile: aProfile({ toC: peakC, rateCPerH: 80, holdS }, { stage: 'cooling', toC: 100, rateCPerH }),
        load: { moulds: [mould] },
      },
      'cooling-too-fast',
    );

  it('of quartz through 573 °C is 50 °C/h at most', () => {
    expect(cooling(50)).toEqual([]);
    expect(cooling(60)[0]?.text).toMatch(/60.°C\/h.*50.°C\/h is the limit/);
  });

  it('of a shell is free until it has turned to cristobalite', () => {
    expect(cooling(200, shell as typeof flask, 1000)).toEqual([]);
    // Above 1100 °C on the way up for 38 min and on the way down for 15 min.
    expect(cooling(200, shell as typeof flask, 1150, 60)).toEqual([]);
    expect(cooling(200, shell as typeof flask, 1150, 7200)).toHaveLength(1);
    expect(cooling(55, shell as typeof flask, 1150, 7200)).toEqual([]);
  });
});

describe('a core behind at the end of a hold', () => {
  const behind = (shortC: number, stage: 'burnout' | 'drying' = 'burnout') =>
    found(
      {
        profile: aProfile({ stage, toC: 800, rateCPerH: 200, holdS: 3600 }),
        load: { moulds: [shell] },
        moulds: [{ coreC: (atS) => Math.min(800 - shortC, 20 + atS / 18) }],
      },
      'core-behind-at-hold-end',
    );

  it('is noted above 10 °C and warned of above 25 °C', () => {
    expect(behind(10)).toEqual([]);
    expect(behind(11)).toMatchObject([{ severity: 'note', segment: 0 }]);
    expect(behind(26)).toMatchObject([{ severity: 'warn' }]);
  });

  it('is looked for on the way down too', () => {
    const story = {
      profile: aProfile(
        { toC: 900, rateCPerH: 200 },
        { stage: 'casting-hold' as const, toC: 600, rateCPerH: 200, holdS: 1800 },
      ),
      load: { moulds: [shell] },
    };
    expect(found({ ...story, moulds: [{ coreC: () => 640 }] }, 'core-behind-at-hold-end')).toMatchObject([
      { segment: 1, severity: 'warn' },
    ]);
    expect(found({ ...story, moulds: [{ coreC: () => 605 }] }, 'core-behind-at-hold-end')).toEqual([]);
  });

  it('does not matter while things dry', () => {
    expect(behind(300, 'drying')).toEqual([]);
  });
});

describe('heat work', () => {
  const worked = (
    heatWorkH: number,
    stage: 'vitrification' | 'melt-out' = 'vitrification',
    mould: object = shell,
  ) => {
    const story = {
      profile: aProfile({ stage, toC: 850, rateCPerH: 200, holdS: 3600 }),
      load: { moulds: [{ ...shell, ...mould }] },
      moulds: [{ heatWorkH: (atS: number) => (heatWorkH * Math.min(atS, 18540)) / 18540 }],
    };
    return { short: found(story, 'heat-work-short'), over: found(story, 'oversintered') };
  };

  it('short of the target is noted, below a fifth of it warned of', () => {
    expect(worked(0.51).short).toEqual([]);
    expect(worked(0.4).short).toMatchObject([{ severity: 'note' }]);
    expect(worked(0.05).short).toMatchObject([{ severity: 'warn' }]);
    expect(worked(0.4).short[0]?.source).toContain('No published value');
  });

  it('is not asked of a melt-out, nor of plaster', () => {
    expect(worked(0.01, 'melt-out').short).toEqual([]);
    expect(worked(0.01, 'vitrification', flask).short).toEqual([]);
  });

  it('far too large makes a shell dense', () => {
    expect(worked(140).over).toEqual([]);
    expect(worked(170).over).toMatchObject([{ severity: 'warn', segment: 0 }]);
  });
});

describe('cristobalite', () => {
  const held = (peakC: number, holdS: number, mould: object = shell) =>
    found(
      {
        profile: aProfile({ toC: peakC, rateCPerH: 600, holdS }),
        load: { moulds: [{ ...shell, ...mould }] },
        kiln: { maxC: 1300 },
      },
      'cristobalite',
    );

  it('grows in more than an hour above 1100 °C', () => {
    expect(held(1150, 2 * 3600)).toMatchObject([{ severity: 'warn' }]);
    expect(held(1150, 0.5 * 3600)).toEqual([]);
    expect(held(1095, 20 * 3600)).toEqual([]);
  });

  it('is alarming above 1200 °C', () => {
    expect(held(1210, 2 * 3600)[0]?.severity).toBe('stop');
  });

  it('is no matter of a mould without fused silica', () => {
    expect(held(1150, 2 * 3600, { form: 'flask', material: 'phosphate-investment' })).toEqual([]);
  });
});
