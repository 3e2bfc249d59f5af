import { describe, expect, it } from 'vitest';
import {
  clockTicks,
  clockTime,
  dayAndDate,
  instantOfWallClock,
  nextClockHour,
  wallClockMs,
} from '~/components/islands/strip/clock';
import { durationText, hoursAndMinutes, runTimeText } from '~/components/islands/strip/duration';

const at = (iso: string) => Date.parse(iso);
const berlin = 'Europe/Berlin';

describe('clock times on the strip are those of the studio', () => {
  it('shows an instant in the zone of the studio, not of the device', () => {
    expect(clockTime(at('2026-12-05T05:00:00Z'), berlin)).toBe('06:00');
    expect(clockTime(at('2026-12-05T05:00:00Z'), 'America/Chicago')).toBe('23:00');
    expect(dayAndDate(at('2026-12-05T05:00:00Z'), berlin)).toBe('Saturday 5 December');
  });

  it('finds the instant of a wall clock on either side of a change of the clock', () => {
    // Central European Time changes on the last Sundays of March and October at 01:00 UTC (Directive 2000/84/EC).
    expect(instantOfWallClock(Date.UTC(2026, 9, 25, 1, 0), berlin)).toBe(at('2026-10-24T23:00:00Z'));
    expect(instantOfWallClock(Date.UTC(2026, 9, 25, 2, 30), berlin)).toBe(at('2026-10-25T00:30:00Z'));
    expect(instantOfWallClock(Date.UTC(2026, 9, 25, 4, 0), berlin)).toBe(at('2026-10-25T03:00:00Z'));
    expect(instantOfWallClock(Date.UTC(2026, 2, 29, 4, 0), berlin)).toBe(at('2026-03-29T02:00:00Z'));
  });

  it('labels round hours even when the run starts at an odd minute', () => {
    const ticks = clockTicks(at('2026-12-05T05:20:00Z'), 0, 6 * 3600, 7200, berlin);
    expect(ticks.map((tick) => tick.text)).toEqual(['08:00', '10:00', '12:00']);
    expect(ticks[0]?.atS).toBe(100 * 60);
  });

  it('stretches one label by an hour in the night when the clock goes back', () => {
    const start = at('2026-10-24T20:00:00Z');
    const ticks = clockTicks(start, 0, 12 * 3600, 7200, berlin);
    expect(ticks.map((tick) => tick.text)).toEqual(['22:00', '00:00', '02:00', '04:00', '06:00', '08:00']);
    expect((ticks[3]?.atS ?? 0) - (ticks[2]?.atS ?? 0)).toBe(3 * 3600);
    expect(ticks[1]?.day).toBe('Sun 25 Oct');
  });

  it('offers the next morning at six', () => {
    expect(nextClockHour(at('2026-12-04T10:00:00Z'), berlin, 6)).toBe(at('2026-12-05T05:00:00Z'));
    expect(nextClockHour(at('2026-12-05T04:00:00Z'), berlin, 6)).toBe(at('2026-12-05T05:00:00Z'));
    expect(new Date(wallClockMs(at('2026-12-05T05:00:00Z'), berlin)).toISOString()).toBe(
      '2026-12-05T06:00:00.000Z',
    );
  });
});

describe('lengths of time', () => {
  it('are told in hours and minutes', () => {
    expect(durationText(5400)).toBe('1 h 30');
    expect(durationText(3600)).toBe('1 h 00');
    expect(durationText(2700)).toBe('45 min');
    expect(durationText(-2700)).toBe('−45 min');
    expect(durationText(0)).toBe('0 min');
    expect(durationText(30)).toBe('30 s');
    expect(hoursAndMinutes(51_240)).toEqual({ hours: 14, minutes: 14 });
  });

  it('round to the minute without ever showing 60 minutes', () => {
    expect(durationText(7199)).toBe('2 h 00');
    expect(hoursAndMinutes(7199)).toEqual({ hours: 2, minutes: 0 });
  });

  it('along the foot of the strip are run time', () => {
    expect(runTimeText(7200, 7200)).toBe('+2 h');
    expect(runTimeText(5400, 1800)).toBe('+1 h 30');
    expect(runTimeText(600, 600)).toBe('+10 min');
    expect(runTimeText(90, 30)).toBe('+1:30');
  });
});
