import { describe, expect, it } from 'vitest';
import { review } from '~/lib/review/review';
import type { Profile } from '~/lib/profile/schema';
import type { ReviewResult } from '~/lib/review/types';
import * as log from './review-log-faults';
import {
  between,
  pick,
  randomOf,
  randomProfile,
  randomSampling,
  simulatedFiring,
  type Fault,
  type Random,
  type SimulatedFiring,
} from './review-simulated-firing';

const seeds = (count: number, from = 1) => Array.from({ length: count }, (_, k) => from + k);

function reviewOf(firing: SimulatedFiring, plannedStartMs: number | null = firing.runStartMs): ReviewResult {
  return review({
    profile: firing.profile,
    waitBandC: firing.waitBandC,
    openAtC: 120,
    channels: firing.channels,
    controlChannelId: 'chamber',
    clockEvents: [],
    plannedStartMs,
    alignment: { method: 'auto' },
    predicted: null,
    cooling: null,
  });
}

function firingOf(random: Random, faultOf: (firing: { up: number; longest: number }) => Fault[] = () => []) {
  const profile = randomProfile(random);
  const sampling = randomSampling(random);
  const waitBandC = random() < 0.7 ? 18 : null;
  const faults = faultOf({ up: profile.segments.length - 2, longest: longestClimb(profile) });
  const withPower = random() < 0.5;
  return { ...simulatedFiring({ profile, waitBandC, sampling, faults, withPower, random }), sampling };
}

/** Index of the climb that takes longest. A push must leave room for a ten-minute window and five minutes of it in the ramp. */
function longestClimb({ startC, segments }: Profile): number {
  const hours = segments.map(({ toC, rateCPerH }, i) =>
    typeof rateCPerH === 'number' ? (toC - (segments[i - 1]?.toC ?? startC)) / rateCPerH : 0,
  );
  return hours.indexOf(Math.max(...hours));
}

describe('any clean firing', () => {
  it.each(seeds(40))('gives no finding, and its segments to four minutes (seed %d)', (seed) => {
    const firing = firingOf(randomOf(seed));
    const wrongClock =
      seed % 3 === 0 ? firing.runStartMs + 1_500_000 : seed % 3 === 1 ? firing.runStartMs : null;
    const result = reviewOf(firing, wrongClock);
    expect(result.findings).toEqual([]);
    expect(Math.abs(result.alignment.startOffsetS - firing.sampling.beforeS)).toBeLessThan(120);
    result.segments.forEach((segment, k) => {
      expect(Math.abs((segment.endS ?? Number.NaN) - (firing.legs[k]?.endS ?? 0))).toBeLessThan(240);
    });
  });

  it('is reviewed alike at any time of the epoch and in any order of channels', () => {
    const firing = firingOf(randomOf(77), ({ up }) => [
      { kind: 'overshoot', leg: up, at: 0.2, lastsS: 1200, by: 22 },
    ]);
    const moved = firing.channels.map((c) => ({ ...c, timeMs: c.timeMs.map((t) => t + 86_400_000_000) }));
    const here = reviewOf(firing);
    const there = reviewOf({ ...firing, channels: moved.reverse() }, firing.runStartMs + 86_400_000_000);
    expect(here.findings).toHaveLength(1);
    expect(there.findings).toEqual(here.findings);
    expect(there.figures).toEqual(here.figures);
  });
});

/** A fault of the kiln or its programmer by kind; where it strikes and how hard is drawn. */
function kilnFault(kind: string, random: Random, up: number, longest: number): Fault {
  const r = (low: number, high: number) => between(random, low, high);
  const hold = random() < 0.5 ? up : up + 1;
  switch (kind) {
    case 'overshoot':
      return { kind, leg: hold, at: r(0.05, 0.3), lastsS: r(900, 1500), by: r(14, 30) };
    case 'undershoot':
      return { kind, leg: hold, at: r(0.05, 0.3), lastsS: r(1200, 2000), by: r(14, 17) };
    case 'late':
      return { kind, leg: up, at: r(0, 0.2), lastsS: 1e6, by: r(0.45, 0.65) };
    case 'stalled':
      return { kind, leg: up, at: r(0.2, 0.6), lastsS: r(2200, 3600), by: 0 };
    case 'power-cut':
      return { kind, leg: up, at: r(0.2, 0.8), lastsS: r(420, 900), by: 0 };
    case 'power-cut-in-hold':
      return { kind, leg: up, at: r(0.2, 0.5), lastsS: r(420, 900), by: 0 };
    case 'opened':
      return { kind, leg: hold, at: r(0.2, 0.5), lastsS: r(90, 200), by: r(30, 60) };
    case 'too-steep':
      return { kind, leg: longest, at: r(0.1, 0.4), lastsS: r(1300, 1800), by: r(1.6, 2) };
    default:
      return { kind, leg: hold, at: 0, lastsS: 0, by: r(0.3, 0.7) };
  }
}

const KILN_KINDS = [
  'overshoot',
  'undershoot',
  'late',
  'stalled',
  'power-cut',
  'power-cut-in-hold',
  'opened',
  'too-steep',
  'hold-short',
  'hold-long',
] as const;

describe.each(KILN_KINDS)('an injected %s', (kind) => {
  it.each(seeds(8))('is found once, and nothing else (seed %d)', (seed) => {
    const random = randomOf(seed * 131 + KILN_KINDS.indexOf(kind));
    const firing = firingOf(random, ({ up, longest }) => [kilnFault(kind, random, up, longest)]);
    const done = firing.done[0];
    if (!done) throw new Error('the fault did not strike');
    const { findings } = reviewOf(firing);
    expect(findings.map((f) => f.kind)).toEqual([kind.replace('-in-hold', '')]);
    expect(findings[0]?.segment).toBe(done.leg);
    expect(findings[0]?.startS).toBeLessThan(done.endS + 900);
    expect(findings[0]?.endS).toBeGreaterThan(done.startS - 900);
    if (kind === 'overshoot') {
      const trueC = firing.trueC.subarray(Math.floor(done.startS / 2), Math.ceil(done.endS / 2));
      expect(Math.abs((findings[0]?.peakC ?? 0) - Math.max(...trueC))).toBeLessThan(1.5);
    }
  });
});

type LogFault = (firing: SimulatedFiring, random: Random) => { firing: SimulatedFiring; atS: number };

/** Faults of sensor, logger and clock, struck on the last climb or anywhere in the run. */
const LOG_FAULTS: Record<string, LogFault> = {
  'sensor-spike': (firing, random) => {
    const atS = between(random, 600, (firing.legs.at(-1)?.endS ?? 0) - 600);
    return { firing: log.spiked(firing, atS, pick(random, [-1, 1]) * between(random, 60, 180), 1), atS };
  },
  'sensor-open': (firing, random) => {
    const atS = onClimb(firing, between(random, 0.3, 0.6));
    const form = pick(random, ['marker', 'rail', 'foreign'] as const);
    return { firing: log.opened(firing, atS, atS + 420, form), atS };
  },
  'sensor-stuck': (firing, random) => {
    const atS = onClimb(firing, between(random, 0.2, 0.4));
    return { firing: log.frozen(firing, atS, atS + 1200), atS };
  },
  gap: (firing, random) => {
    const atS = between(random, 600, (firing.legs.at(-1)?.endS ?? 0) - 3600);
    return { firing: log.silent(firing, atS, atS + between(random, 800, 2400)), atS };
  },
  'clock-jump': (firing, random) => {
    const atS = onClimb(firing, between(random, 0.2, 0.6));
    return { firing: log.setForward(firing, atS, pick(random, [1800, 3600, 7200])), atS };
  },
  'ended-early': (firing, random) => {
    const last = firing.legs.at(-1);
    const atS =
      (last?.rampEndS ?? 0) + ((last?.endS ?? 0) - (last?.rampEndS ?? 0)) * between(random, 0.1, 0.6);
    return { firing: log.stopped(firing, atS), atS };
  },
  'channels-disagree': (firing, random) => {
    const atS = onClimb(firing, between(random, 0.1, 0.4));
    return { firing: log.withSecond(firing, atS, atS + 2400, pick(random, [-40, 40])), atS };
  },
};

function onClimb(firing: SimulatedFiring, share: number): number {
  const leg = firing.legs.at(-2);
  return (leg?.startS ?? 0) + share * ((leg?.rampEndS ?? 0) - (leg?.startS ?? 0));
}

describe.each(Object.keys(LOG_FAULTS))('an injected %s', (kind) => {
  it.each(seeds(8))('is found once, and nothing else (seed %d)', (seed) => {
    const random = randomOf(seed * 137 + kind.length);
    const struck = LOG_FAULTS[kind]?.(firingOf(random), random);
    if (!struck) throw new Error('no such fault');
    const { findings } = reviewOf(struck.firing);
    expect(findings.map((f) => f.kind)).toEqual([kind]);
    expect(Math.abs((findings[0]?.startS ?? 0) - struck.atS)).toBeLessThan(400);
  });
});

describe('a log that begins after the run did', () => {
  it.each(seeds(8))('is laid under the plan all the same (seed %d)', (seed) => {
    const random = randomOf(seed * 139);
    const firing = firingOf(random);
    const atS = (firing.legs[0]?.rampEndS ?? 0) * between(random, 0.1, 0.8);
    const result = reviewOf(log.startedLate(firing, atS), null);
    expect(Math.abs(result.alignment.startOffsetS + atS)).toBeLessThan(180);
    expect(result.findings).toEqual([]);
  });
});
