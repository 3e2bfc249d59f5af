import { describe, expect, it } from 'vitest';
import { DRAPER_POINT_C, glow } from '~/lib/units';

const channels = (hex: string) => [1, 3, 5].map((at) => parseInt(hex.slice(at, at + 2), 16));

describe('the glow of a hot body', () => {
  it('cannot be seen below the Draper point', () => {
    expect(glow(20).alpha).toBe(0);
    expect(glow(DRAPER_POINT_C).alpha).toBe(0);
    expect(glow(DRAPER_POINT_C + 1).alpha).toBeGreaterThan(0);
    expect(glow(Number.NaN).alpha).toBe(0);
  });

  it('grows stronger and yellower all the way up', () => {
    let before = glow(540);
    for (let tempC = 560; tempC <= 1400; tempC += 20) {
      const now = glow(tempC);
      expect(now.alpha).toBeGreaterThan(before.alpha);
      expect(channels(now.hex)[0]).toBe(255);
      expect(channels(now.hex)[1]).toBeGreaterThanOrEqual(channels(before.hex)[1] ?? NaN);
      before = now;
    }
    expect(before.alpha).toBe(1);
  });

  it('has no blue in it at firing temperatures', () => {
    for (let tempC = 530; tempC <= 1300; tempC += 50) expect(channels(glow(tempC).hex)[2]).toBe(0);
  });
});
