import { describe, expect, it } from 'vitest';
import { heatWorkH } from '~/lib/review/heat-work';
import { AT, bump, kindsOf, later, madeChannel, ON_PLAN, reviewMade, START_MS } from './review-made-log';

describe('alignment', () => {
  it('goes by the clock where that agrees with the log', () => {
    const { alignment } = reviewMade();
    expect(alignment).toMatchObject({ method: 'clock', startOffsetS: 0, runStartMs: START_MS });
    expect(alignment.confidence).toBeGreaterThan(0.95);
  });

  it.each([-1500, 1500, 7200])('fits the first ramp where the clock is %d s off', (offS) => {
    const { alignment } = reviewMade({}, { plannedStartMs: START_MS + offS * 1000 });
    expect(alignment.method).toBe('fit');
    expect(Math.abs(alignment.startOffsetS)).toBeLessThan(30);
  });

  it('counts from the first sample, before or after the start', () => {
    const before = reviewMade({ fromS: -1800, corners: [[-1800, 20], ...ON_PLAN] }, { plannedStartMs: null });
    expect(before.alignment.startOffsetS).toBeCloseTo(1800, -1);
    const after = reviewMade({ fromS: 3000 }, { plannedStartMs: null });
    expect(after.alignment.startOffsetS).toBeCloseTo(-3000, -1);
    expect(kindsOf(after)).toEqual([]);
  });

  it('finds a log that begins after the first segment by the whole plan', () => {
    const { alignment } = reviewMade({ fromS: AT.secondRamp + 600 }, { plannedStartMs: null });
    expect(Math.abs(alignment.startOffsetS + AT.secondRamp + 600)).toBeLessThan(120);
  });

  it('obeys a person', () => {
    const { alignment } = reviewMade({}, { alignment: { method: 'person', startOffsetS: 300 } });
    expect(alignment).toMatchObject({ method: 'person', startOffsetS: 300 });
    expect(alignment.runStartMs).toBe(START_MS + 300_000);
  });
});

describe('figures', () => {
  it('of a run on plan: no deviation, no delay, every hold in band', () => {
    const { figures, segments, runEndS } = reviewMade();
    expect(figures.peakC).toBeCloseTo(920, 0);
    expect(figures.rmsC).toBeLessThan(1);
    expect(figures.delayS).toBe(0);
    expect(runEndS).toBeCloseTo(AT.end, -1);
    expect(figures.heatWorkH).toBeCloseTo(figures.plannedHeatWorkH, 1);
    expect(segments.map((s) => Math.round(s.rateCPerH ?? 0))).toEqual([150, 240, -100]);
    for (const s of segments) expect(Math.abs((s.holdS ?? 0) - s.plannedHoldS)).toBeLessThan(150);
  });

  it('of deviation are the plan’s carried along, so that lateness is none of them', () => {
    const late = reviewMade({ corners: later(ON_PLAN, AT.secondRamp, 200) });
    expect(late.figures.delayS).toBeCloseTo(200, -2);
    expect(late.figures.largestDeviationC).toBeLessThan(20);
    const bumped = reviewMade({ add: bump(AT.secondHold + 1800, 900, 20, 60) });
    expect(bumped.figures.largestDeviationC).toBeCloseTo(20, 0);
  });

  it('leave the input as it was', () => {
    const channel = madeChannel({ add: bump(AT.secondHold + 900, 600, 30, 60) });
    const copy = { timeMs: channel.timeMs.slice(), value: channel.value.slice() };
    reviewMade({}, { channels: [channel] });
    expect(channel.timeMs).toEqual(copy.timeMs);
    expect(channel.value).toEqual(copy.value);
  });

  it('throw without a control channel', () => {
    expect(() => reviewMade({}, { controlChannelId: 'none' })).toThrow(/no channel none/);
  });
});

describe('heat work', () => {
  const held = (valueC: number, hours: number) =>
    heatWorkH([0, hours * 3600], [valueC, valueC], 0, hours * 3600);

  it('is the time itself at 870 °C', () => {
    expect(held(870, 2)).toBeCloseTo(2, 9);
  });

  // Common practice, from which the convention was chosen: 820 °C for 2 h is about half an hour at 870 °C, 930 °C for 2 h
  // about ten. Limited by the rounding of those figures.
  it('makes 2 h at 820 °C about half an hour and 2 h at 930 °C about ten', () => {
    expect(Math.abs(held(820, 2) - 0.5)).toBeLessThan(0.15);
    expect(Math.abs(held(930, 2) - 10)).toBeLessThan(1.5);
  });

  it('adds up over any division of the time', () => {
    const timeS = [0, 3600, 7200];
    const valueC = [700, 900, 850];
    const whole = heatWorkH(timeS, valueC, 0, 7200, 10);
    expect(heatWorkH(timeS, valueC, 0, 2000, 10) + heatWorkH(timeS, valueC, 2000, 7200, 10)).toBeCloseTo(
      whole,
      6,
    );
  });
});

describe('the verdict', () => {
  it('says that all went well', () => {
    expect(reviewMade().verdict).toBe('Followed the plan to the end, on chamber.');
  });

  it('says what went wrong, where and by how much', () => {
    const { verdict } = reviewMade({ add: bump(AT.secondHold + 900, 1440, 19, 60) });
    expect(verdict).toMatch(
      /^Followed the plan to 320 °C, then ran 19 °C over 920 °C for 2[45] min, on chamber\.$/,
    );
  });
});
