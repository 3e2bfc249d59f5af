import { describe, expect, it } from 'vitest';
import { localMinute, offsetSpans, zoneOffset } from '~/lib/planning';

/**
 * Instants at which clocks are changed in 2026, by the rules themselves.
 * European Union: directive 2000/84/EC, 01:00 UTC on the last Sundays of March and October.
 * United States: Energy Policy Act of 2005, 02:00 local on the second Sunday of March and the first of November.
 * Lord Howe Island (half an hour): first Sundays of April and October at 02:00 local, New South Wales law.
 */
const CHANGES = [
  { timeZone: 'Europe/Berlin', at: '2026-03-29T01:00:00Z', before: 60, after: 120 },
  { timeZone: 'Europe/Berlin', at: '2026-10-25T01:00:00Z', before: 120, after: 60 },
  { timeZone: 'America/Chicago', at: '2026-03-08T08:00:00Z', before: -360, after: -300 },
  { timeZone: 'America/Chicago', at: '2026-11-01T07:00:00Z', before: -300, after: -360 },
  { timeZone: 'Australia/Lord_Howe', at: '2026-04-04T15:00:00Z', before: 660, after: 630 },
  { timeZone: 'Australia/Lord_Howe', at: '2026-10-03T15:30:00Z', before: 630, after: 660 },
];

describe('changes of the clocks', () => {
  it.each(CHANGES)('in $timeZone at $at', ({ timeZone, at, before, after }) => {
    const changeMs = Date.parse(at);
    const fromMs = changeMs - 9.3 * 3600_000;
    const toMs = changeMs + 50 * 3600_000;
    expect(offsetSpans(fromMs, toMs, zoneOffset(timeZone))).toEqual([
      { fromMs, toMs: changeMs, offsetMinutes: before },
      { fromMs: changeMs, toMs, offsetMinutes: after },
    ]);
  });

  it('has no change where there is none', () => {
    const [fromMs, toMs] = [Date.parse('2026-01-01T00:00:00Z'), Date.parse('2026-12-31T00:00:00Z')];
    expect(offsetSpans(fromMs, toMs, zoneOffset('Asia/Kathmandu'))).toEqual([
      { fromMs, toMs, offsetMinutes: 345 },
    ]);
  });

  it('knows the weekday: 1 January 2000 was a Saturday', () => {
    expect(localMinute(Date.parse('2000-01-01T12:34:00Z'), 0)).toEqual({ weekday: 6, minute: 754 });
    expect(localMinute(Date.parse('1969-12-31T23:59:00Z'), 0)).toEqual({ weekday: 3, minute: 1439 });
    expect(localMinute(Date.parse('2026-10-25T23:30:00Z'), 60)).toEqual({ weekday: 1, minute: 30 });
  });
});
