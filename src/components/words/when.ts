/** Instants in words, always in a stated time zone and in one locale, so that server and browser say the same. */
const LOCALE = 'en-GB';

const format = (instant: string | Date, timeZone: string, options: Intl.DateTimeFormatOptions): string =>
  new Intl.DateTimeFormat(LOCALE, { timeZone, hourCycle: 'h23', ...options }).format(new Date(instant));

/** `Saturday 5 December` and, in another year than now's, the year. */
export function dayInWords(instant: string | Date, timeZone: string, now: Date): string {
  const year = (at: string | Date) => format(at, timeZone, { year: 'numeric' });
  const day = format(instant, timeZone, { weekday: 'long', day: 'numeric', month: 'long' }).replace(',', '');
  return year(instant) === year(now) ? day : `${day} ${year(instant)}`;
}

/** `5 Dec 2026`. */
export const shortDay = (instant: string | Date, timeZone: string): string =>
  format(instant, timeZone, { day: 'numeric', month: 'short', year: 'numeric' });

/** `06:00`. */
export const clock = (instant: string | Date, timeZone: string): string =>
  format(instant, timeZone, { hour: '2-digit', minute: '2-digit' });

/** `5 Dec 2026, 06:00`. */
export const dayAndClock = (instant: string | Date, timeZone: string): string =>
  `${shortDay(instant, timeZone)}, ${clock(instant, timeZone)}`;

const localDay = (instant: string | Date, timeZone: string): number => {
  const [year, month, day] = new Intl.DateTimeFormat('en-CA', { timeZone })
    .format(new Date(instant))
    .split('-')
    .map(Number);
  return Date.UTC(year ?? 0, (month ?? 1) - 1, day ?? 1) / 86_400_000;
};

/** `today, 06:00`, `tomorrow, 06:00`, `Sat 5 Dec, 06:00`, with the year where it is not now's. */
export function near(instant: string | Date, timeZone: string, now: Date): string {
  const days = localDay(instant, timeZone) - localDay(now, timeZone);
  const time = clock(instant, timeZone);
  if (days === 0) return `today, ${time}`;
  if (days === 1) return `tomorrow, ${time}`;
  if (days === -1) return `yesterday, ${time}`;
  const sameYear =
    format(instant, timeZone, { year: 'numeric' }) === format(now, timeZone, { year: 'numeric' });
  const day = format(instant, timeZone, {
    weekday: 'short',
    day: 'numeric',
    month: 'short',
    ...(sameYear ? {} : { year: 'numeric' }),
  });
  return `${day.replace(',', '')}, ${time}`;
}
