import { describe, expect, it } from 'vitest';
import { AT, kindsOf, madeChannel, reviewMade, START_MS, type Made } from './review-made-log';

const inSpan = (atS: number, fromS: number, lastsS: number) => atS >= fromS && atS < fromS + lastsS;
const ON_RAMP = AT.secondRamp + 3000;

describe('a sensor', () => {
  const off = (samples: number, byC: number): Made => ({
    change: (atS, v) => v + (inSpan(atS, ON_RAMP, samples * 10) ? byC : 0),
  });

  it('spikes for at most three samples, by more than 25 °C', () => {
    expect(kindsOf(reviewMade(off(1, 40)))).toEqual(['sensor-spike']);
    expect(kindsOf(reviewMade(off(3, -60)))).toEqual(['sensor-spike']);
    expect(kindsOf(reviewMade(off(1, 22)))).toEqual([]);
    expect(kindsOf(reviewMade(off(4, 60)))).not.toContain('sensor-spike');
    const [spike] = reviewMade(off(1, 40)).findings;
    expect(spike?.startS).toBe(ON_RAMP);
    expect(spike?.byC).toBeCloseTo(40, -0.5);
  });

  it('that spikes in a hold makes no overshoot', () => {
    const made: Made = { change: (atS, v) => v + (inSpan(atS, AT.secondHold + 1800, 30) ? 90 : 0) };
    expect(kindsOf(reviewMade(made))).toEqual(['sensor-spike']);
  });

  it('is open at a marker, out of its range, or at a step of more than 150 °C that stays', () => {
    const marked = madeChannel({ change: (atS, v) => (inSpan(atS, ON_RAMP, 300) ? Number.NaN : v) });
    const openIndexes = [...marked.value.keys()].filter((i) => Number.isNaN(marked.value[i]));
    const result = reviewMade({}, { channels: [{ ...marked, openIndexes }] });
    expect(kindsOf(result)).toEqual(['sensor-open']);
    expect(result.findings[0]).toMatchObject({ startS: ON_RAMP, endS: ON_RAMP + 290, segment: 1 });
    const reads = (byC: number, lastsS: number): Made => ({
      change: (atS, v) => (inSpan(atS, ON_RAMP, lastsS) ? v + byC : v),
    });
    expect(kindsOf(reviewMade(reads(2000, 300)))).toEqual(['sensor-open']);
    expect(kindsOf(reviewMade(reads(-165, 300)))).toEqual(['sensor-open']);
    expect(kindsOf(reviewMade(reads(-140, 300)))).not.toContain('sensor-open');
    expect(kindsOf(reviewMade(reads(-165, 60)))).not.toContain('sensor-open');
  });

  it('is stuck when it reads the same for ten minutes on a ramp, not in a hold', () => {
    const stuck = (fromS: number, lastsS: number): Made => {
      let held = 0;
      return {
        // a little unrest, so that a hold is not itself frozen
        add: (atS) => 0.2 * Math.sin(atS * 3),
        change: (atS, v) => {
          if (!inSpan(atS, fromS, lastsS)) return v;
          if (atS < fromS + 10) held = v;
          return held;
        },
      };
    };
    expect(kindsOf(reviewMade(stuck(ON_RAMP, 700)))).toEqual(['sensor-stuck']);
    expect(kindsOf(reviewMade(stuck(ON_RAMP, 540)))).not.toContain('sensor-stuck');
    expect(kindsOf(reviewMade(stuck(AT.secondHold + 900, 1800)))).toEqual([]);
  });

  it('of a mould that rests is no finding', () => {
    const mould = madeChannel({ change: (_, v) => Math.min(v, 100) }, 'mould', 'mould');
    expect(kindsOf(reviewMade({}, { channels: [madeChannel(), mould] }))).toEqual([]);
  });

  it('disagrees with another in the chamber beyond 20 °C for ten minutes', () => {
    const second = (byC: number, lastsS: number, role: 'chamber' | 'mould' = 'chamber') =>
      reviewMade(
        {},
        {
          channels: [
            madeChannel(),
            madeChannel({ change: (atS, v) => v + (inSpan(atS, ON_RAMP, lastsS) ? byC : 0) }, 'second', role),
          ],
        },
      );
    const apart = second(24, 700);
    expect(kindsOf(apart)).toEqual(['channels-disagree']);
    expect(apart.findings[0]?.channelId).toBe('second');
    expect(kindsOf(second(24, 540))).toEqual([]);
    expect(kindsOf(second(18, 3600))).toEqual([]);
    expect(kindsOf(second(-60, 3600, 'mould'))).toEqual([]);
  });
});

describe('a log', () => {
  const silence = (fromS: number, lastsS: number): Made => ({
    change: (atS, v) => (atS > fromS && atS < fromS + lastsS ? null : v),
  });

  it('has a gap beyond two minutes, or five intervals', () => {
    expect(kindsOf(reviewMade(silence(ON_RAMP, 140)))).toEqual(['gap']);
    expect(kindsOf(reviewMade(silence(ON_RAMP, 110)))).toEqual([]);
    expect(kindsOf(reviewMade({ ...silence(ON_RAMP, 240), intervalS: 60 }))).toEqual([]);
    expect(kindsOf(reviewMade({ ...silence(ON_RAMP, 360), intervalS: 60 }))).toEqual(['gap']);
  });

  it('is not judged before the run and after its end', () => {
    const idle: Made = { fromS: -7200, corners: [[-7200, 20], [0, 20], ...madeCorners()] };
    const change = (atS: number, v: number) => {
      if (inSpan(atS, -3600, 600) || inSpan(atS, AT.end + 1800, 600)) return null;
      return v + (atS === -6000 || atS === AT.end + 3000 ? 300 : 0);
    };
    expect(kindsOf(reviewMade({ ...idle, change }))).toEqual([]);
  });

  it('whose clock leaps forward on a ramp is put right; in a hold it is a gap', () => {
    const leapt = (fromS: number) => {
      const chamber = madeChannel();
      const timeMs = chamber.timeMs.map((t) => (t > START_MS + fromS * 1000 ? t + 3_600_000 : t));
      return reviewMade({}, { channels: [{ ...chamber, timeMs }] });
    };
    const onRamp = leapt(ON_RAMP);
    expect(kindsOf(onRamp)).toEqual(['clock-jump']);
    expect(onRamp.leaps).toEqual([{ atMs: START_MS + ON_RAMP * 1000, shiftS: 3600 }]);
    expect(onRamp.runEndS).toBeCloseTo(AT.end, -2);
    expect(kindsOf(leapt(AT.secondHold + 1800))).toEqual(['gap']);
  });

  it('whose clock went back is told by the reader', () => {
    const clockEvents = [{ atMs: START_MS + ON_RAMP * 1000, shiftS: 3600, kind: 'backward' as const }];
    const result = reviewMade({}, { clockEvents });
    expect(result.findings).toMatchObject([{ kind: 'clock-jump', startS: ON_RAMP, byS: -3600 }]);
    const small = [{ atMs: START_MS + ON_RAMP * 1000, shiftS: 40, kind: 'backward' as const }];
    expect(kindsOf(reviewMade({}, { clockEvents: small }))).toEqual([]);
  });
});

function madeCorners(): [number, number][] {
  return [
    [AT.firstHold, 320],
    [AT.secondRamp, 320],
    [AT.secondHold, 920],
    [AT.thirdRamp, 920],
    [AT.thirdHold, 720],
    [AT.end, 720],
    [AT.end + 5400, 420],
  ];
}
