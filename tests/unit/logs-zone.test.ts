import { describe, expect, it } from 'vitest';
import { LocalClock, ZoneOffsets } from '~/lib/logs/zone';

const MINUTE_MS = 60_000;
const utc = (text: string): number => Date.parse(`${text}Z`);
const range = (count: number): number[] => Array.from({ length: count }, (_, i) => i);

describe('offsets of a zone', () => {
  it('follow its changes to the second', () => {
    const berlin = new ZoneOffsets('Europe/Berlin');
    expect(berlin.at(utc('2026-03-29T00:59:59'))).toBe(3_600_000);
    expect(berlin.at(utc('2026-03-29T01:00:00'))).toBe(7_200_000);
    expect(berlin.offsetsOf(utc('2026-03-29T02:30:00'))).toEqual([]);
    expect(berlin.offsetsOf(utc('2026-10-25T02:30:00'))).toEqual([7_200_000, 3_600_000]);
    expect(new ZoneOffsets('Asia/Kathmandu').at(utc('2026-01-01T00:00:00'))).toBe(5.75 * 3_600_000);
    expect(new ZoneOffsets('Australia/Lord_Howe').offsetsOf(utc('2026-04-05T01:45:00'))).toHaveLength(2);
  });
});

/** What a wall clock that follows the zone shows, minute by minute, is turned back to the instants. */
function roundTrip(zone: string, fromUtc: string, minutes: number, stepMinutes: number): void {
  const offsets = new ZoneOffsets(zone);
  const clock = new LocalClock(new ZoneOffsets(zone), utc(fromUtc));
  clock.setTypicalStep(stepMinutes * MINUTE_MS);
  for (let minute = 0; minute < minutes; minute += stepMinutes) {
    const instantMs = utc(fromUtc) + minute * MINUTE_MS;
    expect(clock.toUtcMs(instantMs + offsets.at(instantMs))).toBe(instantMs);
  }
}

describe('local times in the order of the file', () => {
  it.each([
    ['Europe/Berlin', '2026-10-24T20:00:00'],
    ['Europe/Berlin', '2026-03-28T20:00:00'],
    ['America/Chicago', '2026-11-01T02:00:00'],
    ['America/Chicago', '2026-03-08T02:00:00'],
    ['Australia/Lord_Howe', '2026-04-04T10:00:00'],
    ['Africa/Casablanca', '2026-02-14T20:00:00'],
    ['Asia/Kolkata', '2026-02-14T20:00:00'],
  ])('%s through %s: nothing twice, nothing lost', (zone, from) => {
    for (const stepMinutes of [1, 7, 20]) roundTrip(zone, from, 24 * 60, stepMinutes);
  });

  it('a logger that does not follow summer time keeps its offset through the change', () => {
    for (const from of ['2026-03-28T20:00:00', '2026-10-24T20:00:00']) {
      const clock = new LocalClock(new ZoneOffsets('Europe/Berlin'), null);
      const instants = range(600).map((minute) => clock.toUtcMs(utc(from) + minute * MINUTE_MS));
      expect(instants.map((ms) => ms - (instants[0] ?? 0))).toEqual(
        range(600).map((minute) => minute * MINUTE_MS),
      );
    }
  });

  it('a log that begins in the doubled hour is taken as near to the planned start as it can be', () => {
    const first = new LocalClock(new ZoneOffsets('Europe/Berlin'), utc('2026-10-25T00:20:00'));
    const second = new LocalClock(new ZoneOffsets('Europe/Berlin'), utc('2026-10-25T01:20:00'));
    expect(first.toUtcMs(utc('2026-10-25T02:30:00'))).toBe(utc('2026-10-25T00:30:00'));
    expect(second.toUtcMs(utc('2026-10-25T02:30:00'))).toBe(utc('2026-10-25T01:30:00'));
  });
});
