import { describe, expect, it } from 'vitest';
import { cautionsOf } from '~/lib/thermal/cautions';
import type { LoadInput } from '~/lib/thermal/load-schema';
import { aProfile } from '../helpers/profiles';
import { noContext, type SimulationStory, toldSimulation } from '../helpers/simulations';

const found = (story: SimulationStory, code: string) =>
  cautionsOf(toldSimulation(story), noContext).filter((caution) => caution.code === code);
const withPattern = (pattern: object, form: 'shell' | 'flask' = 'shell'): LoadInput => ({
  moulds: [
    {
      form,
      material: form === 'shell' ? 'fused-silica-shell' : 'gypsum-investment',
      massKg: 2,
      label: 'torso',
      pattern: { material: 'pla', massKg: 0.8, ...pattern },
    },
  ],
});

describe('a pattern that expands first', () => {
  const code = 'pattern-expands-first';
  const slow = aProfile({ toC: 700, rateCPerH: 100 });
  const fast = aProfile({ toC: 700, rateCPerH: 800 });

  it('is a solid thermoset at any rate', () => {
    const resin = (fields: object) => withPattern({ material: 'castable-resin', ...fields });
    expect(found({ profile: fast, load: resin({ thickestM: 0.004 }) }, code)).toMatchObject([
      { severity: 'warn' },
    ]);
    expect(found({ profile: slow, load: resin({ thickestM: 0.004 }) }, code)[0]?.text).toMatch(
      /4.mm thick.*80.°C.*2\.5.mm/,
    );
    expect(found({ profile: slow, load: resin({ thickestM: 0.0025 }) }, code)).toEqual([]);
    expect(found({ profile: slow, load: resin({ thickestM: 0.004, hollow: true }) }, code)).toEqual([]);
  });

  it('is noted where nobody has said how thick a thermoset is', () => {
    expect(found({ profile: slow, load: withPattern({ material: 'castable-resin' }) }, code)).toMatchObject([
      { severity: 'note' },
    ]);
  });

  it('is wax warmed slowly in a shell, not wax in a hot kiln', () => {
    const wax = withPattern({ material: 'pattern-wax' });
    const [caution] = found({ profile: slow, load: wax }, code);
    expect(caution).toMatchObject({ severity: 'warn', segment: 0 });
    expect(caution?.text).toMatch(/100.°C\/h.*10 %/);
    expect(found({ profile: fast, load: wax }, code)).toEqual([]);
    expect(found({ profile: aProfile({ toC: 700, rateCPerH: 199 }), load: wax }, code)).toHaveLength(1);
    expect(found({ profile: aProfile({ toC: 700, rateCPerH: 201 }), load: wax }, code)).toEqual([]);
  });

  it('is no wax in plaster, which is melted out slowly by custom', () => {
    expect(found({ profile: slow, load: withPattern({ material: 'pattern-wax' }, 'flask') }, code)).toEqual(
      [],
    );
  });

  it('is a thick print with no way out', () => {
    const draining = aProfile({ toC: 260, rateCPerH: 100, drain: true, holdS: 3600 }, { toC: 700 });
    expect(found({ profile: slow, load: withPattern({ thickestM: 0.01 }) }, code)).toHaveLength(1);
    expect(found({ profile: draining, load: withPattern({ thickestM: 0.01 }) }, code)).toEqual([]);
    expect(found({ profile: slow, load: withPattern({ thickestM: 0.003 }) }, code)).toEqual([]);
    expect(found({ profile: slow, load: withPattern({ thickestM: 0.01, hollow: true }) }, code)).toEqual([]);
  });
});

describe('draining', () => {
  const code = 'no-drain-step';
  const drainAt = (toC: number) => aProfile({ toC, rateCPerH: 100, drain: true, holdS: 3600 }, { toC: 700 });

  it('is missing where no segment does it', () => {
    const [caution] = found({ profile: aProfile({ toC: 700 }), load: withPattern({}) }, code);
    expect(caution).toMatchObject({ severity: 'warn', segment: null });
    expect(caution?.text).toMatch(/60 % of the 800.g/);
  });

  it('is too cool where the pattern does not run yet', () => {
    expect(found({ profile: drainAt(250), load: withPattern({}) }, code)).toMatchObject([
      { segment: 0, atS: 11880 },
    ]);
    expect(found({ profile: drainAt(260), load: withPattern({}) }, code)).toEqual([]);
  });

  it('goes by the inside of the mould', () => {
    expect(
      found(
        { profile: drainAt(270), load: withPattern({}), moulds: [{ coreC: (atS) => 10 + atS / 40 }] },
        code,
      ),
    ).toHaveLength(0);
    expect(
      found(
        { profile: drainAt(270), load: withPattern({}), moulds: [{ coreC: (atS) => 10 + atS / 60 }] },
        code,
      ),
    ).toHaveLength(1);
  });

  it('is not missed for what would hardly drain', () => {
    const profile = aProfile({ toC: 700 });
    expect(found({ profile, load: withPattern({ drainedShare: 0.1 }) }, code)).toEqual([]);
    expect(found({ profile, load: withPattern({ material: 'castable-resin' }) }, code)).toEqual([]);
    expect(
      found({ profile, load: { moulds: [{ material: 'fused-silica-shell', massKg: 2 }] } }, code),
    ).toEqual([]);
  });
});

describe('a burnout that is not complete', () => {
  const code = 'burnout-incomplete';
  const left = (share: number, stage: 'burnout' | 'melt-out' = 'burnout') =>
    found(
      {
        profile: aProfile(
          { stage, toC: 600, holdS: 3600 },
          { stage: 'cooling', toC: 100, rateCPerH: 'coast' },
        ),
        load: withPattern({}),
        moulds: [{ patternLeftShare: () => share }],
      },
      code,
    );

  it('leaves carbon behind', () => {
    const [caution] = left(0.0357);
    expect(caution).toMatchObject({ severity: 'warn', segment: 0 });
    // 3.57 % less 0.2 % ash, of 800 g.
    expect(caution?.text).toMatch(/3.4 %.*27 g/);
    expect(left(0.2)[0]?.severity).toBe('stop');
  });

  it('is not one that leaves only ash', () => {
    expect(left(0.002)).toEqual([]);
    expect(left(0.0069)).toEqual([]);
    expect(left(0.0071)).toHaveLength(1);
  });

  it('is not asked of a melt-out alone', () => {
    expect(left(0.4, 'melt-out')).toEqual([]);
  });
});
