import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { MIN_WINDOW_S, panned, within, zoomed } from '~/components/islands/strip/window';

const whole = { fromS: 0, toS: 54_000 };
const windows = fc
  .tuple(fc.integer({ min: 0, max: 50_000 }), fc.integer({ min: MIN_WINDOW_S, max: 54_000 }))
  .map(([fromS, lengthS]) => within({ fromS, toS: fromS + lengthS }, whole));

describe('a closer look at a part of the firing', () => {
  it('never leaves the firing, however it is zoomed and moved', () => {
    fc.assert(
      fc.property(
        windows,
        fc.double({ min: 0.1, max: 10, noNaN: true }),
        fc.double({ min: -3, max: 3, noNaN: true }),
        (shown, factor, share) => {
          const next = panned(zoomed(shown, whole, factor, (shown.fromS + shown.toS) / 2), whole, share);
          expect(next.fromS).toBeGreaterThanOrEqual(-1e-6);
          expect(next.toS).toBeLessThanOrEqual(whole.toS + 1e-6);
          expect(next.toS - next.fromS).toBeGreaterThanOrEqual(MIN_WINDOW_S - 1e-6);
        },
      ),
    );
  });

  it('keeps the moment under the pointer where it is while zooming in', () => {
    const shown = { fromS: 10_000, toS: 30_000 };
    const next = zoomed(shown, whole, 2, 15_000);
    expect((15_000 - next.fromS) / (next.toS - next.fromS)).toBeCloseTo(0.25, 9);
  });

  it('moving keeps its length, and stops at the end of the firing', () => {
    expect(panned({ fromS: 0, toS: 10_000 }, whole, 0.5)).toEqual({ fromS: 5_000, toS: 15_000 });
    expect(panned({ fromS: 45_000, toS: 54_000 }, whole, 1)).toEqual({ fromS: 45_000, toS: 54_000 });
  });
});
