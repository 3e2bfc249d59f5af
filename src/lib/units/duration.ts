import { parseNumber } from './number';
import { notUnderstood, type Parsed, plainText, understood } from './parsed';

const SECONDS: Readonly<Record<string, number>> = {
  d: 86400,
  day: 86400,
  days: 86400,
  h: 3600,
  hr: 3600,
  hrs: 3600,
  hour: 3600,
  hours: 3600,
  m: 60,
  min: 60,
  mins: 60,
  minute: 60,
  minutes: 60,
  s: 1,
  sec: 1,
  secs: 1,
  second: 1,
  seconds: 1,
};

/** The next smaller unit, which a bare number after a unit is taken to be in: "1 h 30". */
const SMALLER: Readonly<Record<number, number>> = { 86400: 3600, 3600: 60, 60: 1 };

const EXAMPLES = 'write it like 1 h 30 min, 1:30 or 90 min';

/**
 * Reads a length of time: "1 h 30", "1h30", "1:30" (hours and minutes), "1:30:00", "90 min", "1.5h", "1,5 h", "2 d 4 h".
 *
 * @param assumed what a bare number counts
 * @returns seconds, not negative
 */
export function parseDuration(text: string, assumed: 'h' | 'min'): Parsed {
  const plain = plainText(text).toLowerCase();
  if (plain === '') return notUnderstood(`Nothing entered: ${EXAMPLES}.`);
  if (plain.includes(':')) return parseClock(plain);
  const bare = parseNumber(plain);
  if (bare.ok)
    return bare.value >= 0
      ? understood(bare.value * (assumed === 'h' ? 3600 : 60))
      : notUnderstood('A time cannot be negative.');
  return parseWithUnits(plain);
}

function parseClock(text: string): Parsed {
  const match = /^(\d{1,4}):([0-5]\d)(?::([0-5]\d))?(?:\s*h)?$/.exec(text);
  if (match === null) return notUnderstood(`“${text}” is not a time: ${EXAMPLES}.`);
  return understood(Number(match[1]) * 3600 + Number(match[2]) * 60 + Number(match[3] ?? 0));
}

function parseWithUnits(text: string): Parsed {
  const part = /([\d.,]+)\s*([a-z]*)\s*/y;
  let totalS = 0;
  let unitS = Infinity;
  while (part.lastIndex < text.length) {
    const match = part.exec(text);
    if (match === null) return notUnderstood(`“${text}” is not a time: ${EXAMPLES}.`);
    const amount = parseNumber(match[1] ?? '');
    if (!amount.ok) return amount;
    const name = match[2] ?? '';
    const nextS = name === '' ? SMALLER[unitS] : Object.hasOwn(SECONDS, name) ? SECONDS[name] : undefined;
    if (nextS === undefined || nextS >= unitS) return notUnderstood(`“${text}” is not a time: ${EXAMPLES}.`);
    totalS += amount.value * nextS;
    unitS = nextS;
  }
  return understood(Math.round(totalS * 1000) / 1000);
}
