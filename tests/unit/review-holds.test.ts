import { describe, expect, it } from 'vitest';
import { AT, bump, kindsOf, later, ON_PLAN, PLAN, reviewMade, type Corners } from './review-made-log';

describe('a hold', () => {
  it('on plan gives no finding, whatever the programmer', () => {
    expect(kindsOf(reviewMade())).toEqual([]);
    expect(kindsOf(reviewMade({}, { waitBandC: null }))).toEqual([]);
  });

  it('is overshot when more than 10 °C over for a minute, not for less, not by less', () => {
    // 20 °C over with edges of a minute: above 10 °C for just as long as the bump lasts
    const over = (lastsS: number, byC: number) =>
      reviewMade({ add: bump(AT.secondHold + 900, lastsS, byC, 60) });
    expect(kindsOf(over(80, 20))).toEqual(['overshoot']);
    expect(kindsOf(over(40, 20))).toEqual([]);
    expect(kindsOf(over(1800, 9.5))).toEqual([]);
    const [finding] = over(1800, 15).findings;
    expect(finding?.peakC).toBeCloseTo(935, 0);
    expect(finding?.byC).toBeCloseTo(15, 0);
    expect(finding?.segment).toBe(1);
  });

  it('is undershot when more than 10 °C under for five minutes', () => {
    const under = (lastsS: number) => reviewMade({ add: bump(AT.secondHold + 900, lastsS, -20, 120) });
    expect(kindsOf(under(330))).toEqual(['undershoot']);
    expect(kindsOf(under(270))).toEqual([]);
  });

  it('is short or long beyond a tenth of it', () => {
    const shifted = (byS: number) => reviewMade({ corners: later(ON_PLAN, AT.thirdRamp, byS) });
    // 5400 s planned: the tolerance is 540 s
    expect(kindsOf(shifted(-620))).toEqual(['hold-short']);
    expect(kindsOf(shifted(-460))).toEqual([]);
    expect(kindsOf(shifted(640))).toEqual(['hold-long']);
    expect(kindsOf(shifted(460))).toEqual([]);
    expect(shifted(-1200).findings[0]?.byS).toBeCloseTo(-1200 + (3 / 240) * 3600, -2);
  });

  it('that was short on a programmer that runs by the clock, because the kiln came late, is the lateness', () => {
    const corners: Corners = ON_PLAN.map(([t, v]) => [t === AT.secondHold ? t + 2400 : t, v]);
    const byClock = reviewMade({ corners }, { waitBandC: null });
    expect(kindsOf(byClock)).toEqual(['late']);
    expect(byClock.findings[0]?.holdLostS).toBeGreaterThan(1800);
  });

  it('over a time that another finding took is not long', () => {
    // the programmer stops its clock while the kiln is 20 °C under
    const add = bump(AT.secondHold + 900, 1500, -20, 240);
    const result = reviewMade({ corners: later(ON_PLAN, AT.thirdRamp, 1400), add });
    expect(kindsOf(result)).toEqual(['undershoot']);
  });

  it('band may be the studio’s own, by stage', async () => {
    const { DEFAULT_THRESHOLDS } = await import('~/lib/review/thresholds');
    const thresholds = { ...DEFAULT_THRESHOLDS, stageBandC: { vitrification: 25 } };
    const made = { add: bump(AT.secondHold + 900, 900, 20, 60) };
    expect(kindsOf(reviewMade(made))).toEqual(['overshoot']);
    expect(kindsOf(reviewMade(made, { thresholds }))).toEqual([]);
  });
});

describe('the end of a log', () => {
  it('is early when more than a tenth of the last hold is missing', () => {
    // 3600 s planned, counted from within 3 °C, which at 100 °C/h is 108 s before the corner: 360 s may be missing
    expect(kindsOf(reviewMade({ toS: AT.end - 490 }))).toEqual(['ended-early']);
    expect(kindsOf(reviewMade({ toS: AT.end - 150 }))).toEqual([]);
  });

  it('before the last hold is early, and nothing is said of what was not reached', () => {
    const result = reviewMade({ toS: AT.secondRamp + 3000 });
    expect(kindsOf(result)).toEqual(['ended-early']);
    expect(result.findings[0]?.segment).toBe(1);
    expect(result.segments.at(-1)?.arrivedS).toBeNull();
    expect(result.figures.delayS).toBeNull();
  });

  it('after a last hold cut short, with cooling seen, is a short hold', () => {
    expect(kindsOf(reviewMade({ corners: later(ON_PLAN, AT.end, -1200) }))).toEqual(['hold-short']);
  });
});

describe('lateness', () => {
  const slower = (byS: number, from: number = AT.secondHold): Corners => later(ON_PLAN, from, byS);

  it('counts beyond a tenth of the ramp, and does not shift what follows', () => {
    // the second ramp takes 9000 s: 900 s
    expect(kindsOf(reviewMade({ corners: slower(1000) }))).toEqual(['late']);
    expect(kindsOf(reviewMade({ corners: slower(780) }))).toEqual([]);
    const result = reviewMade({ corners: slower(2400) });
    expect(kindsOf(result)).toEqual(['late']);
    expect(result.figures.delayS).toBeGreaterThan(2200);
    expect(result.segments[2]?.plannedArrivalS).toBeCloseTo((result.segments[2]?.startS ?? 0) + 6840, 0);
  });

  it('is no matter on a coast', () => {
    const [a, b, c] = PLAN.segments;
    if (!a || !b || !c) throw new Error('three segments');
    const profile = { ...PLAN, segments: [a, b, { ...c, rateCPerH: 'coast' as const }] };
    expect(kindsOf(reviewMade({ corners: later(ON_PLAN, AT.thirdHold, 3000) }, { profile }))).toEqual([]);
  });

  it('of a flat-out ramp is against the prediction, and none without one', () => {
    const [a, b, c] = PLAN.segments;
    if (!a || !b || !c) throw new Error('three segments');
    const profile = { ...PLAN, segments: [a, { ...b, rateCPerH: 'flat-out' as const }, c] };
    const predicted = { timeS: ON_PLAN.map(([t]) => t), chamberC: ON_PLAN.map(([, v]) => v) };
    const corners = slower(2400);
    expect(kindsOf(reviewMade({ corners }, { profile, predicted }))).toEqual(['late']);
    expect(kindsOf(reviewMade({ corners }, { profile }))).toEqual([]);
  });
});
