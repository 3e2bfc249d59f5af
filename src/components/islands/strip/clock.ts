/** The strip speaks of instants in the studio's own time zone, whatever the reader's device is set to. */

const formats = new Map<string, Intl.DateTimeFormat>();

function format(zone: string, name: string, options: Intl.DateTimeFormatOptions): Intl.DateTimeFormat {
  const key = `${zone} ${name}`;
  const known = formats.get(key);
  if (known) return known;
  const made = new Intl.DateTimeFormat('en-GB', { timeZone: zone, ...options });
  formats.set(key, made);
  return made;
}

/** `08:53` */
export const clockTime = (atMs: number, zone: string): string =>
  format(zone, 'clock', { hour: '2-digit', minute: '2-digit', hourCycle: 'h23' }).format(atMs);

/** `Saturday` */
export const weekday = (atMs: number, zone: string): string =>
  format(zone, 'weekday', { weekday: 'long' }).format(atMs);

/** `Saturday 5 December` */
export const dayAndDate = (atMs: number, zone: string): string =>
  format(zone, 'day', { weekday: 'long', day: 'numeric', month: 'long' }).format(atMs).replace(',', '');

/** `Sun 6 Dec` */
export const shortDay = (atMs: number, zone: string): string =>
  format(zone, 'short', { weekday: 'short', day: 'numeric', month: 'short' }).format(atMs).replace(',', '');

/** What a wall clock in the zone shows at an instant, as if it were UTC: ms since the epoch. */
export function wallClockMs(atMs: number, zone: string): number {
  const parts = format(zone, 'parts', {
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
    second: 'numeric',
    hourCycle: 'h23',
  }).formatToParts(atMs);
  const read = (type: string): number => Number(parts.find((part) => part.type === type)?.value ?? 0);
  return Date.UTC(read('year'), read('month') - 1, read('day'), read('hour'), read('minute'), read('second'));
}

/** Offset of the zone from UTC at an instant, in ms: positive east of Greenwich. */
export const zoneOffsetMs = (atMs: number, zone: string): number =>
  wallClockMs(atMs, zone) - Math.floor(atMs / 1000) * 1000;

/**
 * The instant at which a wall clock in the zone shows a given date and time.
 *
 * Where the clock shows it twice (autumn) the first is taken; where it leaps over it (spring), the instant that the
 * offset before the leap gives.
 */
export function instantOfWallClock(wallMs: number, zone: string): number {
  const before = zoneOffsetMs(wallMs - 24 * 3600_000, zone);
  const after = zoneOffsetMs(wallMs + 24 * 3600_000, zone);
  for (const offsetMs of [Math.max(before, after), Math.min(before, after)]) {
    const atMs = wallMs - offsetMs;
    if (wallClockMs(atMs, zone) === wallMs) return atMs;
  }
  return wallMs - before;
}

/** The next instant at which the zone's clock shows `hour`:00, at least `leadMs` from now. */
export function nextClockHour(nowMs: number, zone: string, hour: number, leadMs = 0): number {
  const day = 24 * 3600_000;
  const midnight = Math.floor(wallClockMs(nowMs, zone) / day) * day;
  for (let days = 0; days < 4; days += 1) {
    const atMs = instantOfWallClock(midnight + days * day + hour * 3600_000, zone);
    if (atMs >= nowMs + leadMs) return atMs;
  }
  return instantOfWallClock(midnight + 4 * day + hour * 3600_000, zone);
}

export interface ClockTick {
  /** Run time, seconds. */
  readonly atS: number;
  readonly text: string;
  /** The day it begins, at the first tick after midnight. */
  readonly day: string | null;
}

/**
 * Round times of the local clock within a stretch of a run.
 *
 * @param startMs instant of the run's start
 * @param stepS distance of the labels on the clock; a day is divided by it evenly or it is whole days
 */
export function clockTicks(
  startMs: number,
  fromS: number,
  toS: number,
  stepS: number,
  zone: string,
): ClockTick[] {
  const ticks: ClockTick[] = [];
  const fromMs = startMs + fromS * 1000;
  const toMs = startMs + toS * 1000;
  const stepMs = stepS * 1000;
  let wallMs = Math.ceil(wallClockMs(fromMs, zone) / stepMs) * stepMs;
  let day = '';
  for (let count = 0; count < 400; count += 1, wallMs += stepMs) {
    const atMs = instantOfWallClock(wallMs, zone);
    if (atMs > toMs + 500) break;
    if (atMs < fromMs - 500 || wallClockMs(atMs, zone) !== wallMs) continue;
    const today = shortDay(atMs, zone);
    ticks.push({
      atS: (atMs - startMs) / 1000,
      text: clockTime(atMs, zone),
      day: day !== '' && today !== day ? today : null,
    });
    day = today;
  }
  return ticks;
}
