/** Minutes that local time is ahead of UTC at an instant. */
export type OffsetMinutesAt = (utcMs: number) => number;

const MINUTE_MS = 60_000;
const DAY_MS = 24 * 60 * MINUTE_MS;

/**
 * Offsets of an IANA time zone. Depends on the zone's rules alone, not on the machine's own zone or language.
 *
 * @throws RangeError if there is no such zone
 */
export function zoneOffset(timeZone: string): OffsetMinutesAt {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    calendar: 'iso8601',
    numberingSystem: 'latn',
    hourCycle: 'h23',
    year: 'numeric',
    month: 'numeric',
    day: 'numeric',
    hour: 'numeric',
    minute: 'numeric',
  });
  return (utcMs) => {
    const parts: Record<string, number> = {};
    for (const { type, value } of format.formatToParts(utcMs)) parts[type] = Number(value);
    const { year = 0, month = 1, day = 1, hour = 0, minute = 0 } = parts;
    return Date.UTC(year, month - 1, day, hour, minute) / MINUTE_MS - Math.floor(utcMs / MINUTE_MS);
  };
}

/** Local weekday (1 Monday … 7 Sunday) and minute of the day. */
export function localMinute(utcMs: number, offsetMinutes: number): { weekday: number; minute: number } {
  const localMs = utcMs + offsetMinutes * MINUTE_MS;
  const day = Math.floor(localMs / DAY_MS);
  // 1 January 1970 was a Thursday.
  const weekday = (((day + 3) % 7) + 7) % 7;
  return { weekday: weekday + 1, minute: Math.floor((localMs - day * DAY_MS) / MINUTE_MS) };
}

/** A stretch of time in which local time keeps one distance from UTC. */
export interface OffsetSpan {
  fromMs: number;
  toMs: number;
  offsetMinutes: number;
}

/**
 * Cuts a stretch of time where the clocks are changed. A zone that changes twice within a day would be missed; none does.
 */
export function offsetSpans(fromMs: number, toMs: number, offsetMinutesAt: OffsetMinutesAt): OffsetSpan[] {
  const spans: OffsetSpan[] = [];
  let beginMs = fromMs;
  let offsetMinutes = offsetMinutesAt(fromMs);
  for (let atMs = fromMs; atMs < toMs;) {
    const nextMs = Math.min(toMs, atMs + DAY_MS);
    const nextOffset = offsetMinutesAt(nextMs);
    if (nextOffset !== offsetMinutes) {
      const changeMs = changeBetween(atMs, nextMs, offsetMinutes, offsetMinutesAt);
      spans.push({ fromMs: beginMs, toMs: changeMs, offsetMinutes });
      beginMs = changeMs;
      offsetMinutes = nextOffset;
    }
    atMs = nextMs;
  }
  if (toMs > beginMs || spans.length === 0) spans.push({ fromMs: beginMs, toMs, offsetMinutes });
  return spans;
}

/** First whole minute at which the offset is no longer what it was. */
function changeBetween(
  beforeMs: number,
  afterMs: number,
  before: number,
  offsetMinutesAt: OffsetMinutesAt,
): number {
  let low = Math.floor(beforeMs / MINUTE_MS);
  let high = Math.ceil(afterMs / MINUTE_MS);
  while (high - low > 1) {
    const middle = Math.floor((low + high) / 2);
    if (offsetMinutesAt(middle * MINUTE_MS) === before) low = middle;
    else high = middle;
  }
  return high * MINUTE_MS;
}
