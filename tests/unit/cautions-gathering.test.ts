import { describe, expect, it } from 'vitest';
import { CAUTION_CODES, cautionSchema } from '~/lib/thermal/estimate-schema';
import { cautionsOf } from '~/lib/thermal/cautions';
import { fastestIn } from '~/lib/thermal/cautions/window-rate';
import { aProfile } from '../helpers/profiles';
import { noContext, toldSimulation } from '../helpers/simulations';

describe('the cautions of a firing', () => {
  const profile = aProfile(
    { toC: 300, rateCPerH: 400, holdS: 600 },
    { toC: 1250, rateCPerH: 600, holdS: 7200 },
    { stage: 'cooling', toC: 300, rateCPerH: 300, attended: true },
  );
  const moulds = [1, 2, 3].map((massKg) => ({
    form: 'flask' as const,
    material: 'gypsum-investment',
    massKg,
    waterKg: 0.3,
    pattern: { material: 'castable-resin', massKg: 0.1, thickestM: 0.01 },
  }));
  const simulation = toldSimulation({
    profile,
    load: { moulds },
    moulds: moulds.map(() => ({ waterKg: () => 0.3, patternLeftShare: () => 0.3, coreC: () => 90 })),
  });
  const cautions = cautionsOf(simulation, noContext);

  it('keep to their schema and name their source', () => {
    for (const caution of cautions) {
      expect(cautionSchema.safeParse(caution).success).toBe(true);
      expect(CAUTION_CODES).toContain(caution.code);
      expect(caution.source.length).toBeGreaterThan(5);
      expect(caution.text).toMatch(/\d/);
      expect(caution.text).not.toMatch(/NaN|undefined|Infinity|!/);
      expect(caution.text).toMatch(/^[A-Z“]/);
      expect(caution.text).toMatch(/\.$/);
    }
  });

  it('are one of a kind in each segment, however many moulds there are', () => {
    const keys = cautions.map(({ code, segment }) => `${code} ${segment}`);
    expect(new Set(keys).size).toBe(keys.length);
    expect(cautions.length).toBeGreaterThan(6);
  });

  it('come gravest first', () => {
    const ranks = cautions.map(({ severity }) => ['stop', 'warn', 'note'].indexOf(severity));
    expect(ranks).toEqual([...ranks].sort());
  });

  it('do not change the simulation, and are the same each time', () => {
    expect(cautionsOf(simulation, noContext)).toEqual(cautions);
  });

  it('are none for a gentle firing of a dry shell', () => {
    const gentle = toldSimulation({
      profile: aProfile(
        { toC: 870, rateCPerH: 150, holdS: 3600 },
        { stage: 'cooling', toC: 100, rateCPerH: 'coast' },
      ),
      load: { moulds: [{ material: 'fused-silica-shell', massKg: 2 }] },
    });
    expect(cautionsOf(gentle, noContext)).toEqual([]);
  });
});

describe('the fastest change within a range', () => {
  const straight = (rateCPerH: number, stepS: number) => {
    const timeS = Array.from({ length: Math.floor(36000 / stepS) }, (_, at) => at * stepS);
    return { timeS, tempC: timeS.map((atS) => 20 + (rateCPerH * atS) / 3600) };
  };
  const query = { direction: 'heating' as const, fromC: 100, toC: 200, windowS: 300, maxRateCPerH: 100 };

  it.each([10, 60, 240, 600])('is the rate itself on a straight ramp sampled every %d s', (stepS) => {
    expect(fastestIn({ ...query, ...straight(180, stepS) })?.rateCPerH).toBeCloseTo(180, 6);
    expect(fastestIn({ ...query, ...straight(99, stepS) })).toBeNull();
    expect(fastestIn({ ...query, ...straight(-180, stepS) })).toBeNull();
  });

  it('does not count a jump outside the range', () => {
    const timeS = [0, 600, 660, 6000, 12000];
    expect(fastestIn({ ...query, timeS, tempC: [20, 30, 95, 150, 190] })).toBeNull();
    expect(fastestIn({ ...query, timeS, tempC: [20, 100, 160, 190, 195] })).not.toBeNull();
  });
});
