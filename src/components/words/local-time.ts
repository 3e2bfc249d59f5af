/** Between an instant and what stands in a `datetime-local` field, in the studio's time zone. */
const parts = new Map<string, Intl.DateTimeFormat>();

function wallClockMs(instantMs: number, timeZone: string): number {
  let format = parts.get(timeZone);
  if (!format) {
    format = new Intl.DateTimeFormat('en-GB', {
      timeZone,
      hourCycle: 'h23',
      year: 'numeric',
      month: '2-digit',
      day: '2-digit',
      hour: '2-digit',
      minute: '2-digit',
      second: '2-digit',
    });
    parts.set(timeZone, format);
  }
  const of = Object.fromEntries(
    format.formatToParts(instantMs).map((part) => [part.type, Number(part.value)]),
  );
  return Date.UTC(of.year ?? 0, (of.month ?? 1) - 1, of.day, of.hour, of.minute, of.second);
}

/** `2026-12-05T06:00` for an instant, in a zone. */
export const localFieldValue = (instant: string | Date, timeZone: string): string =>
  new Date(wallClockMs(new Date(instant).getTime(), timeZone)).toISOString().slice(0, 16);

/**
 * The instant of a local time `2026-12-05T06:00` in a zone, RFC 3339 in UTC; null if it is not one. A time that the
 * clocks skip in spring is taken as the hour after; one that comes twice in autumn is the first.
 */
export function instantOfLocal(local: string, timeZone: string): string | null {
  if (!/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2})?$/.test(local)) return null;
  const wantedMs = Date.parse(`${local}Z`);
  if (Number.isNaN(wantedMs)) return null;
  const offsets = [wantedMs - 86_400_000, wantedMs + 86_400_000].map((ms) => wallClockMs(ms, timeZone) - ms);
  const candidates = offsets.map((offset) => wantedMs - offset);
  const exact = candidates.filter((ms) => wallClockMs(ms, timeZone) === wantedMs);
  const chosenMs = exact.length ? Math.min(...exact) : wantedMs - Math.min(...offsets);
  return new Date(chosenMs).toISOString();
}
