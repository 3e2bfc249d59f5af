import { describe, expect, it } from 'vitest';
import { plannedAt, plannedCurve, segmentAt } from '~/lib/profile/planned';
import { aProfile } from '../helpers/profiles';

describe('the planned curve', () => {
  // 20 → 260 °C at 120 °C/h is 2 h, held 1 h; 260 → 860 at 150 °C/h is 4 h, held 2 h; down to 460 at 100 °C/h is 4 h.
  const plan = plannedCurve(
    aProfile(
      { toC: 260, rateCPerH: 120, holdS: 3600 },
      { toC: 860, rateCPerH: 150, holdS: 7200 },
      { toC: 460, rateCPerH: 100 },
    ),
  );

  it('has its corners where the arithmetic puts them', () => {
    expect(plan.timeS).toEqual([0, 7200, 10800, 25200, 32400, 46800]);
    expect(plan.valueC).toEqual([20, 260, 260, 860, 860, 460]);
    expect(plan.durationS).toBe(13 * 3600);
  });

  it.each([
    [-60, 20],
    [0, 20],
    [3600, 140],
    [9000, 260],
    [18000, 560],
    [46800, 460],
    [99999, 460],
  ])('stands at %d s at %d °C', (atS, expectedC) => {
    expect(plannedAt(plan, atS)).toBeCloseTo(expectedC, 9);
  });

  it('knows in which segment a moment lies', () => {
    expect(segmentAt(plan, 0)).toBe(0);
    expect(segmentAt(plan, 10799)).toBe(0);
    expect(segmentAt(plan, 10800)).toBe(1);
    expect(segmentAt(plan, 99999)).toBe(2);
  });

  it('falls as well as it rises', () => {
    expect(plan.legs.map((leg) => leg.slopeCPerH)).toEqual([120, 150, -100]);
  });

  it('takes flat-out and coast from the kiln, and says so', () => {
    const { legs, durationS } = plannedCurve(
      aProfile({ toC: 800, rateCPerH: 'flat-out', holdS: 600 }, { toC: 100, rateCPerH: 'coast' }),
      [5400, 36000],
    );
    expect(legs.map((leg) => leg.slopeFrom)).toEqual(['kiln', 'kiln']);
    expect(legs[0]?.slopeCPerH).toBeCloseTo(520, 9);
    expect(durationS).toBe(5400 + 600 + 36000);
  });

  it('marks an assumption where no kiln has been asked', () => {
    const { legs } = plannedCurve(aProfile({ toC: 420, rateCPerH: 'flat-out' }, { toC: 500, rateCPerH: 80 }));
    expect(legs[0]).toMatchObject({ slopeFrom: 'assumption', rampEndS: 7200 });
    expect(legs[1]?.slopeFrom).toBe('profile');
  });

  it('gives a level stretch no ramp', () => {
    const { timeS, valueC } = plannedCurve(aProfile({ toC: 20, holdS: 3600 }, { toC: 20, holdS: 0 }));
    expect(timeS).toEqual([0, 3600]);
    expect(valueC).toEqual([20, 20]);
  });
});
