import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cardSizes, neededPx, placeCards } from '~/components/islands/strip/card-layout';
import { reachesOf } from '~/components/islands/strip/Handle';
import { leader, leaderDown, pathOf } from '~/components/islands/strip/leader';
import { stripScales, valueAtTime } from '~/components/islands/strip/scales';
import { axisTop, ruleDegrees, ruleTime } from '~/components/islands/strip/ticks';

const limits = { minPx: 140, maxPx: 260, gapPx: 16 };
const box = { leftPx: 60, topPx: 30, widthPx: 1200, heightPx: 400 };
const view = { fromS: 0, toS: 54_000, minC: 0, maxC: 1000 };

const stretchesOf = (lengths: readonly number[]) => {
  let at = 0;
  return lengths.map((length) => ({ fromPx: at, toPx: (at += length) }));
};

describe('cards beneath the strip', () => {
  it('stand in order and never over one another, whatever their stretches', () => {
    fc.assert(
      fc.property(fc.array(fc.integer({ min: 0, max: 900 }), { minLength: 1, maxLength: 24 }), (lengths) => {
        const stretches = stretchesOf(lengths);
        const axisPx = Math.max(stretches[stretches.length - 1]?.toPx ?? 0, neededPx(lengths.length, limits));
        const sizes = cardSizes(stretches, axisPx, limits);
        const middles = stretches.map((stretch) => (stretch.fromPx + stretch.toPx) / 2);
        const placed = placeCards(middles, sizes, { fromPx: 0, toPx: axisPx, gapPx: limits.gapPx });
        placed.forEach((card, index) => {
          expect(card.sizePx).toBeGreaterThanOrEqual(limits.minPx - 1e-6);
          expect(card.startPx).toBeGreaterThanOrEqual(-1e-6);
          expect(card.startPx + card.sizePx).toBeLessThanOrEqual(axisPx + 1e-6);
          const next = placed[index + 1];
          if (next)
            expect(next.startPx - card.startPx - card.sizePx).toBeGreaterThanOrEqual(limits.gapPx - 1e-6);
        });
      }),
    );
  });

  it('stand centred under their stretch where there is room', () => {
    const placed = placeCards([200, 600, 1000], [150, 150, 150], { fromPx: 0, toPx: 1200, gapPx: 16 });
    expect(placed.map((card) => card.startPx + card.sizePx / 2)).toEqual([200, 600, 1000]);
  });

  it('share a crowded place evenly: two cards that want the same middle stand to either side of it', () => {
    const placed = placeCards([500, 500], [100, 100], { fromPx: 0, toPx: 1000, gapPx: 20 });
    expect(placed.map((card) => card.startPx)).toEqual([390, 510]);
  });

  it('are as near to their stretches in sum of squares as any placing found by search', () => {
    const middles = [40, 60, 300];
    const sizes = [80, 80, 80];
    const bounds = { fromPx: 0, toPx: 400, gapPx: 10 };
    const cost = (starts: readonly number[]) =>
      starts.reduce((sum, start, index) => sum + (start + 40 - (middles[index] ?? 0)) ** 2, 0);
    const ours = cost(placeCards(middles, sizes, bounds).map((card) => card.startPx));
    let best = Infinity;
    for (let a = 0; a <= 140; a += 2)
      for (let b = a + 90; b <= 230; b += 2)
        for (let c = b + 90; c <= 320; c += 2) best = Math.min(best, cost([a, b, c]));
    expect(ours).toBeLessThanOrEqual(best + 1e-9);
  });

  it('are as wide as their stretch, within limits, and shrink evenly when they do not fit', () => {
    const wide = cardSizes(stretchesOf([100, 200, 600]), 2000, limits);
    expect(wide).toEqual([140, 184, 260]);
    const tight = cardSizes(stretchesOf([100, 200, 600]), 500, limits);
    expect(tight.reduce((sum, size) => sum + size, 0)).toBeCloseTo(500 - 2 * 16, 6);
    expect(Math.min(...tight)).toBe(140);
  });
});

describe('leaders', () => {
  it('leave the stretch and meet the card squarely, and are straight where the two are in line', () => {
    const points = leader(300, 200, 400, 40);
    expect(points[0]).toEqual({ x: 300, y: 400 });
    expect(points[1]?.x).toBe(300);
    expect(points[points.length - 2]?.x).toBe(200);
    expect(points[points.length - 1]).toEqual({ x: 200, y: 440 });
    expect(leader(300, 300, 400, 40)).toHaveLength(2);
  });

  it('of an upright strip run sideways', () => {
    expect(leaderDown(300, 200, 90, 40)[0]).toEqual({ x: 90, y: 300 });
    expect(
      pathOf([
        { x: 1, y: 2 },
        { x: 3, y: 4 },
      ]),
    ).toBe('M1.0 2.0L3.0 4.0');
  });

  it('do not cross when cards keep their order', () => {
    const first = leader(100, 40, 0, 40);
    const second = leader(110, 200, 0, 40);
    first.forEach((point, index) => expect(point.x).toBeLessThan(second[index]?.x ?? 0));
  });
});

describe('the scales of the strip', () => {
  it('put time to the right and heat upwards, or upright: time downwards and heat to the right', () => {
    const across = stripScales('across', view, box);
    expect(across.point(0, 0)).toEqual({ x: 60, y: 430 });
    expect(across.point(54_000, 1000)).toEqual({ x: 1260, y: 30 });
    const down = stripScales('down', view, box);
    expect(down.point(0, 0)).toEqual({ x: 60, y: 30 });
    expect(down.point(54_000, 1000)).toEqual({ x: 1260, y: 430 });
  });

  it('give back the moment and temperature of every point', () => {
    for (const flow of ['across', 'down'] as const) {
      const scales = stripScales(flow, view, box);
      const { x, y } = scales.point(12_345, 678);
      const back = scales.at(x, y);
      expect(back.timeS).toBeCloseTo(12_345, 6);
      expect(back.tempC).toBeCloseTo(678, 6);
    }
  });

  it('read a curve between its points and say nothing outside them', () => {
    expect(valueAtTime([0, 10, 20], [0, 100, 50], 15)).toBe(75);
    expect(valueAtTime([0, 10, 20], [0, 100, 50], 21)).toBeNull();
    expect(valueAtTime([], [], 0)).toBeNull();
  });
});

describe('the ruling of the paper', () => {
  it('labels every 2 h and 200 °C on a strip of a day at the bench, with a line each hour and each 100 °C', () => {
    const time = ruleTime(0, 15 * 3600, 1170);
    expect(time.stepLabelled).toBe(7200);
    expect(time.coarse[1]).toBe(3600);
    const heat = ruleDegrees(0, 1000, 370);
    expect(heat.labelled).toEqual([0, 200, 400, 600, 800, 1000]);
    expect(heat.coarse).toHaveLength(11);
  });

  it('keeps labels apart at every length, and every labelled line is a coarse one', () => {
    fc.assert(
      fc.property(
        fc.integer({ min: 60, max: 14 * 86_400 }),
        fc.integer({ min: 150, max: 3000 }),
        (toS, lengthPx) => {
          const ruling = ruleTime(0, toS, lengthPx);
          const pxPerS = lengthPx / toS;
          if (toS * pxPerS > 100 && ruling.stepLabelled < 4 * 86_400)
            expect(ruling.stepLabelled * pxPerS).toBeGreaterThanOrEqual(100 - 1e-6);
          for (const label of ruling.labelled) expect(ruling.coarse).toContain(label);
        },
      ),
    );
  });

  it('ends the axis on a full hundred with room above the peak', () => {
    expect(axisTop(900)).toBe(1000);
    expect(axisTop(980)).toBe(1100);
    expect(axisTop(60)).toBe(200);
  });
});

describe('handles of the curve', () => {
  it('are as large as a fingertip where there is room, and where two are near neither covers the other', () => {
    const reaches = reachesOf([
      { x: 0, y: 0 },
      { x: 100, y: 0 },
      { x: 130, y: 0 },
    ]);
    expect(reaches).toEqual([22, 15, 15]);
    expect(reachesOf([{ x: 5, y: 5 }])).toEqual([22]);
  });
});
