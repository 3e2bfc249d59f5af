import { describe, expect, it } from 'vitest';
import { zoneOffset } from '~/lib/planning';
import { cautionsOf, type CautionContext } from '~/lib/thermal/cautions';
import { aProfile } from '../helpers/profiles';
import { noContext, type SimulationStory, toldSimulation } from '../helpers/simulations';

const found = (story: SimulationStory, code: string, context: CautionContext = noContext) =>
  cautionsOf(toldSimulation(story), context).filter((caution) => caution.code === code);

describe('a kiln that cannot follow', () => {
  const profile = aProfile({ toC: 400, rateCPerH: 190 }, { toC: 1000, rateCPerH: 300, holdS: 3600 });
  // The second ramp begins at 2 h and is planned to end at 4 h.
  const lagging = (lagC: number, lateS: number) =>
    found(
      {
        profile,
        chamberC: (atS) => (atS <= 7200 ? 20 + (190 * atS) / 3600 : 400 + (atS - 7200) / 12 - lagC),
        moments: { 1: { kilnLimited: true, largestLagC: lagC, rampEndS: 14400 + lateS, endS: 14400 } },
      },
      'kiln-cannot-follow',
    );

  it('comes to be far behind', () => {
    const [caution] = lagging(42, 2100);
    expect(caution).toMatchObject({ severity: 'warn', segment: 1, atS: 7200 });
    expect(caution?.text).toMatch(/300.°C\/h.*42.°C behind.*35.min late/);
  });

  it('is not one that is a little behind and in time', () => {
    expect(lagging(10, 600)).toEqual([]);
    expect(lagging(10.5, 0)).toHaveLength(1);
    expect(lagging(5, 800)).toHaveLength(1);
  });

  it('is not one that the pattern heats beyond what is asked', () => {
    expect(lagging(-83, 0)).toEqual([]);
  });

  it('never gets there, and stops the approval', () => {
    const [caution] = found(
      { profile, chamberC: (atS) => Math.min(940, 20 + atS / 15), moments: { 1: { arrived: false } } },
      'kiln-cannot-follow',
    );
    expect(caution).toMatchObject({ severity: 'stop', segment: 1 });
    expect(caution?.text).toMatch(/does not get to 1000.°C.*940.°C/);
  });

  it('cannot rise with its heating off', () => {
    const upwards = aProfile({ toC: 500, rateCPerH: 'coast' });
    const [caution] = found({ profile: upwards, moments: { 0: { arrived: false } } }, 'kiln-cannot-follow');
    expect(caution?.text).toContain('heating off');
  });

  it('may be told to go flat-out without reproach', () => {
    const fast = aProfile({ toC: 800, rateCPerH: 'flat-out' });
    expect(
      found({ profile: fast, moments: { 0: { kilnLimited: true, largestLagC: 400 } } }, 'kiln-cannot-follow'),
    ).toEqual([]);
  });
});

describe('a burning pattern', () => {
  const burning = (aboveC: number, heatKW: number) => {
    const told = toldSimulation({
      profile: aProfile({ toC: 300, rateCPerH: 280 }, { toC: 600, rateCPerH: 150, holdS: 600 }),
      chamberC: (atS) =>
        atS <= 3600 ? 20 + (280 * atS) / 3600 : Math.min(600, 300 + (150 * (atS - 3600)) / 3600) + aboveC,
    });
    const patternHeatKW = told.patternHeatKW.fill(heatKW);
    return cautionsOf({ ...told, patternHeatKW }, noContext).filter(
      ({ code }) => code === 'burning-heats-kiln',
    );
  };

  it('drives the kiln above what is asked of it', () => {
    const [caution] = burning(83, 6.1);
    expect(caution).toMatchObject({ severity: 'warn', segment: 1 });
    expect(caution?.text).toMatch(/83.°C above.*6\.1.kW/);
    expect(burning(30, 6.1)).toMatchObject([{ severity: 'note' }]);
  });

  it('is not blamed for little, nor for what it does not heat', () => {
    expect(burning(20, 6.1)).toEqual([]);
    expect(burning(83, 0.4)).toEqual([]);
  });
});

describe('a programmer that cannot hold it', () => {
  const three = aProfile({ toC: 200 }, { toC: 500, rateCPerH: 600 }, { toC: 800 });

  it('takes fewer segments', () => {
    expect(
      found({ profile: three, kiln: { programmerSegments: 2 } }, 'programmer-cannot-hold-it'),
    ).toMatchObject([{ severity: 'warn', segment: 2 }]);
    expect(found({ profile: three, kiln: { programmerSegments: 3 } }, 'programmer-cannot-hold-it')).toEqual(
      [],
    );
  });

  it('takes lower rates', () => {
    expect(
      found({ profile: three, kiln: { programmerMaxRateCPerH: 599 } }, 'programmer-cannot-hold-it'),
    ).toMatchObject([{ segment: 1 }]);
    expect(
      found({ profile: three, kiln: { programmerMaxRateCPerH: 600 } }, 'programmer-cannot-hold-it'),
    ).toEqual([]);
    expect(found({ profile: three }, 'programmer-cannot-hold-it')).toEqual([]);
  });
});

describe('opening the kiln', () => {
  const opening = (toC: number, attended = true) =>
    found(
      {
        profile: aProfile({ toC: 900 }, { stage: 'cooling', toC, rateCPerH: 200, attended }),
        openableS: 60000,
      },
      'opens-hot',
    );

  it('above 200 °C stops the approval', () => {
    expect(opening(240)).toMatchObject([{ severity: 'stop', segment: 1 }]);
    expect(opening(200)[0]?.severity).toBe('warn');
  });

  it('at its opening temperature is in order', () => {
    expect(opening(125)).toHaveLength(1);
    expect(opening(120)).toEqual([]);
  });

  it('is not done where nobody attends to it', () => {
    expect(opening(240, false)).toEqual([]);
  });
});

describe('attended moments', () => {
  const profile = aProfile(
    { toC: 260, rateCPerH: 120, holdS: 3600, drain: true },
    { toC: 860, rateCPerH: 150, holdS: 0 },
  );
  // Rises 2 h, holds 1 h: somebody is needed from the 2nd to the 3rd hour.
  const startedAt = (instant: string): CautionContext => ({
    ...noContext,
    startMs: Date.parse(instant),
    offsetMinutesAt: zoneOffset('Europe/Berlin'),
    attendedHours: { fromMinute: 8 * 60, toMinute: 20 * 60 },
  });

  it('at night are warned of, by the studio’s clock', () => {
    // 23:30 in Berlin; there at 01:30.
    const [caution] = found({ profile }, 'attended-at-night', startedAt('2026-01-14T22:30:00Z'));
    expect(caution).toMatchObject({ severity: 'warn', segment: 0, atS: 7200 });
    expect(caution?.text).toContain('1:30');
    expect(caution?.text).toContain('8:00 to 20:00');
  });

  it('that end after hours are warned of at their end', () => {
    // Starts at 17:30 local: there at 19:30, done at 20:30.
    expect(found({ profile }, 'attended-at-night', startedAt('2026-01-14T16:30:00Z'))).toMatchObject([
      { atS: 10800 },
    ]);
  });

  it('within the hours are not', () => {
    expect(found({ profile }, 'attended-at-night', startedAt('2026-01-14T16:00:00Z'))).toEqual([]);
  });

  it('are not judged before there is a date', () => {
    expect(
      found({ profile }, 'attended-at-night', { ...startedAt('2026-01-14T22:30:00Z'), startMs: null }),
    ).toEqual([]);
  });

  it('move with the clocks', () => {
    // 05:30 winter time is 06:30 summer time; two hours later is 07:30 or 08:30.
    expect(found({ profile }, 'attended-at-night', startedAt('2026-01-14T04:30:00Z'))).toHaveLength(1);
    expect(found({ profile }, 'attended-at-night', startedAt('2026-07-14T04:30:00Z'))).toEqual([]);
  });
});
