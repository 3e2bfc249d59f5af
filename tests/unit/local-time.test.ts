import { expect, test } from 'vitest';
import { instantOfLocal, localFieldValue } from '~/components/words/local-time';

// Where the clocks change: UK Summer Time Order 2002 (last Sundays of March and October, 01:00 UTC) and, for New York,
// the US Energy Policy Act of 2005 (second Sunday of March, first Sunday of November, 02:00 local).
test.each([
  ['Europe/London', '2026-12-05T06:00', '2026-12-05T06:00:00.000Z'],
  ['Europe/London', '2026-07-05T06:00', '2026-07-05T05:00:00.000Z'],
  ['America/New_York', '2026-12-05T06:00', '2026-12-05T11:00:00.000Z'],
  ['America/New_York', '2026-07-05T06:00', '2026-07-05T10:00:00.000Z'],
  ['Asia/Kathmandu', '2026-12-05T06:00', '2026-12-05T00:15:00.000Z'],
])('%s: %s on the wall is %s', (zone, local, instant) => {
  expect(instantOfLocal(local, zone)).toBe(instant);
  expect(localFieldValue(instant, zone)).toBe(local);
});

test('a time that the clocks skip in spring is the hour after', () => {
  expect(instantOfLocal('2026-03-29T01:30', 'Europe/London')).toBe('2026-03-29T01:30:00.000Z');
  expect(instantOfLocal('2026-03-08T02:30', 'America/New_York')).toBe('2026-03-08T07:30:00.000Z');
});

test('a time that comes twice in autumn is the first', () => {
  expect(instantOfLocal('2026-10-25T01:30', 'Europe/London')).toBe('2026-10-25T00:30:00.000Z');
  expect(instantOfLocal('2026-11-01T01:30', 'America/New_York')).toBe('2026-11-01T05:30:00.000Z');
});

test.each(['', '2026-12-05', 'tomorrow', '2026-13-05T06:00', '2026-12-05 06:00', '2026-12-05T06:00Z'])(
  'what is no local time is refused: %j',
  (text) => {
    expect(instantOfLocal(text, 'Europe/London')).toBeNull();
  },
);
