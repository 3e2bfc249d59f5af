import { describe, expect, it } from 'vitest';
import { gridOf } from '~/lib/review/grid';
import { regressionOf } from '~/lib/review/regress';
import type { ReviewChannel } from '~/lib/review/types';
import { AT, kindsOf, later, madeChannel, ON_PLAN, reviewMade, type Corners } from './review-made-log';

/** The second ramp pushed to another rate for so long, then on at the plan's. */
function pushed(rateCPerH: number, lastsS: number): Corners {
  const beginS = AT.secondRamp + 2400;
  const gainedC = (rateCPerH * lastsS) / 3600;
  const restS = ((920 - 480 - gainedC) / 240) * 3600;
  const arriveS = beginS + lastsS + restS;
  const rest = later(ON_PLAN, AT.secondHold, arriveS - AT.secondHold);
  return [...rest.slice(0, 3), [beginS, 480], [beginS + lastsS, 480 + gainedC], ...rest.slice(3)];
}

describe('a heating ramp', () => {
  it('is too steep beyond 1.25 times its rate, for five minutes', () => {
    expect(kindsOf(reviewMade({ corners: pushed(320, 1500) }))).toEqual(['too-steep']);
    expect(kindsOf(reviewMade({ corners: pushed(290, 1500) }))).toEqual([]);
    // The weight of a push in a least-squares slope passes a half when it fills the window's half: at twice the excess
    // that is allowed, the regression is over the limit for as long as the push lasts.
    expect(kindsOf(reviewMade({ corners: pushed(360, 360) }))).toEqual(['too-steep']);
    expect(kindsOf(reviewMade({ corners: pushed(360, 240) }))).toEqual([]);
    const [finding] = reviewMade({ corners: pushed(400, 1500) }).findings;
    expect(finding?.byCPerH).toBeCloseTo(160, -1);
  });

  it('is too steep for a material at more than a tenth over its limit, even if the plan asks for it', () => {
    const limited = (maxHeatingCPerH: number) =>
      reviewMade(
        {},
        {
          materialRateLimits: [
            { material: 'quartz shell', fromC: 480, toC: 640, maxHeatingCPerH, maxCoolingCPerH: null },
          ],
        },
      );
    expect(kindsOf(limited(230))).toEqual([]);
    const steep = limited(200);
    expect(kindsOf(steep)).toEqual(['too-steep']);
    expect(steep.findings[0]?.remarks).toContain('material-limit');
  });

  it('has stalled when it stands for more than twenty minutes', () => {
    const standing = (lastsS: number): Corners => {
      const beginS = AT.secondRamp + 4500;
      const rest = later(ON_PLAN, AT.secondHold, lastsS);
      return [...rest.slice(0, 3), [beginS, 620], [beginS + lastsS, 620], ...rest.slice(3)];
    };
    const long = reviewMade({ corners: standing(1800) });
    expect(kindsOf(long)).toEqual(['stalled']);
    expect(long.consequences.map((c) => [c.kind, c.because])).toEqual([['late', 0]]);
    expect(kindsOf(reviewMade({ corners: standing(840) }))).toEqual([]);
  });
});

describe('a cooling ramp', () => {
  const cooled = (rateCPerH: number): Corners => {
    const beginS = AT.thirdRamp + 1200;
    const beginC = 920 - 1200 / 36;
    const endC = beginC - rateCPerH / 2;
    const arriveS = beginS + 1800 + (endC - 720) * 36;
    const rest = later(ON_PLAN, AT.thirdHold, arriveS - AT.thirdHold);
    return [...rest.slice(0, 5), [beginS, beginC], [beginS + 1800, endC], ...rest.slice(5)];
  };

  it('is too fast beyond 1.25 times its rate', () => {
    expect(kindsOf(reviewMade({ corners: cooled(140) }))).toEqual(['cooled-too-fast']);
    expect(kindsOf(reviewMade({ corners: cooled(118) }))).toEqual([]);
  });

  it('after the run may be as fast as it likes', () => {
    const corners: Corners = [...ON_PLAN.slice(0, 7), [AT.end + 1800, 220]];
    expect(kindsOf(reviewMade({ corners }))).toEqual([]);
  });
});

describe('an opened kiln', () => {
  const opening = (byC: number) => (atS: number) => {
    const sinceS = atS - (AT.secondHold + 1800);
    if (sinceS < 0) return 0;
    return sinceS < 100 ? (-byC * sinceS) / 100 : -byC * Math.exp(-(sinceS - 100) / 300);
  };

  it('falls more than 30 °C in two minutes and comes back gradually', () => {
    const result = reviewMade({ add: opening(60), corners: later(ON_PLAN, AT.thirdRamp, 400) });
    expect(kindsOf(result)).toEqual(['opened']);
    expect(result.findings[0]?.byC).toBeCloseTo(60, 0);
    expect(result.findings[0]?.expected).toBe(false);
    // 26 °C is no opening; it is under the band for 61 s + 300 s · ln 2.6
    expect(kindsOf(reviewMade({ add: opening(26) }))).toEqual(['undershoot']);
    expect(kindsOf(reviewMade({ add: opening(19) }))).toEqual([]);
  });
});

describe('a loss of power', () => {
  const beginS = AT.secondRamp + 4500;
  /** No heat for so long at 300 °C/h down, back on the ramp within five minutes, the ramp then on from where it was. */
  const cut = (lastsS: number): Corners => {
    const fellC = lastsS / 12;
    const rest = later(ON_PLAN, AT.secondHold, lastsS + 300);
    return [
      ...rest.slice(0, 3),
      [beginS, 620],
      [beginS + lastsS, 620 - fellC],
      [beginS + lastsS + 300, 620],
      ...rest.slice(3),
    ];
  };
  const withPower = (corners: Corners, off: (atS: number) => boolean) => {
    const chamber = madeChannel({ corners });
    const value = chamber.timeMs.map((t) => (off((t - (chamber.timeMs[0] ?? 0)) / 1000) ? 0 : 55));
    const power: ReviewChannel = {
      ...chamber,
      id: 'output',
      name: 'output',
      role: 'other',
      quantity: 'power',
      value,
    };
    return reviewMade({}, { channels: [chamber, power] });
  };

  it('is told by a fall with the output at zero, of three minutes and 10 °C', () => {
    const off = (lastsS: number) => (atS: number) => atS >= beginS && atS < beginS + lastsS;
    expect(kindsOf(withPower(cut(480), off(480)))).toEqual(['power-cut']);
    expect(kindsOf(withPower(cut(90), off(90)))).toEqual([]);
  });

  it('is told without a power channel by falling as the kiln does by itself', () => {
    const cooling = (timeConstantS: number) => ({ timeConstantS, ambientC: 20 });
    // 300 °C/h at 600 °C is a time constant of two hours
    expect(kindsOf(reviewMade({ corners: cut(480) }, { cooling: cooling(7200) }))).toEqual(['power-cut']);
    expect(kindsOf(reviewMade({ corners: cut(480) }, { cooling: cooling(1800) }))).not.toContain('power-cut');
  });

  it('is none while the output is on', () => {
    expect(kindsOf(withPower(cut(480), () => false))).not.toContain('power-cut');
  });
});

describe('slopes by prefix sums', () => {
  it('are those of a direct least-squares line, gaps left out', () => {
    const timeS = Float64Array.from({ length: 400 }, (_, i) => i * 10);
    const value = timeS.map((t, i) => 20 + t / 30 + 7 * Math.sin(i * 1.7));
    const dropped = Uint8Array.from(timeS, (_, i) => (i >= 200 && i < 215 ? 1 : 0));
    const grid = gridOf(timeS, value, dropped, 120);
    const regression = regressionOf(grid);
    for (const [from, to] of [
      [0, 60],
      [100, 160],
      [150, 240],
      [330, 390],
    ] as const) {
      const nodes = Array.from({ length: to - from + 1 }, (_, k) => from + k).filter(
        (i) => grid.known[i] === 1,
      );
      const meanI = nodes.reduce((s, i) => s + i, 0) / nodes.length;
      const meanV = nodes.reduce((s, i) => s + (grid.value[i] ?? 0), 0) / nodes.length;
      const top = nodes.reduce((s, i) => s + (i - meanI) * ((grid.value[i] ?? 0) - meanV), 0);
      const bottom = nodes.reduce((s, i) => s + (i - meanI) ** 2, 0);
      expect(regression.slopeCPerH(from, to)).toBeCloseTo((top / bottom) * 360, 6);
    }
  });
});
