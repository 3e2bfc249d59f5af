export interface ClockShape {
  hourDigits: number;
  seconds: boolean;
  fractionDigits: number;
  twelve: boolean;
  leadingHour: number;
}

const OFFSETS_MIN: Record<string, number> = {
  Z: 0, UTC: 0, GMT: 0, WET: 0, CET: 60, MEZ: 60, CEST: 120, MESZ: 120, EET: 120, EEST: 180,
  EST: -300, EDT: -240, CST: -360, CDT: -300, MST: -420, MDT: -360, PST: -480, PDT: -420,
}; // prettier-ignore

const CLOCK =
  /^(\d{1,4})(?::|h(?=\d{2}))(\d{2})(?:(?::|m(?=\d{2}))(\d{2})(?:s(?![a-z]))?(?:[.,:](\d{1,9}))?)?(?!\d|:|[.,]\d)/;
const DOTTED_CLOCK = /^(\d{1,2})([.-])(\d{2})\2(\d{2})(?:,(\d{1,9}))?(?![\d.])/;
const COMPACT_CLOCK = /^(\d{2})(\d{2})(\d{2})?(?!\d)/;
/** AM or PM behind a clock. */
export const MERIDIEM = /^\s*([ap])\.?\s?m\.?(?![a-z])/i;
/** A zone or an offset behind a clock. */
export const OFFSET = /^\s*(?:(?:UTC|GMT)?([+\-−])(\d{1,2}):?(\d{2})?|(Z|[A-Z]{3,4}))(?![A-Za-z0-9])/;

/** A clock at the beginning of a text. */
export interface ClockFound {
  hours: number;
  restMs: number;
  shape: ClockShape;
  length: number;
  dotted: boolean;
}

/** `compact`: HHmmss is one too; `dotted`: so is HH.mm.ss. */
export function readClock(text: string, compact: boolean, dotted: boolean): ClockFound | null {
  const plain = CLOCK.exec(text);
  if (plain) return clockFound(plain[0].length, plain[1], plain[2], plain[3], plain[4], false);
  const points = dotted ? DOTTED_CLOCK.exec(text) : null;
  if (points) return clockFound(points[0].length, points[1], points[3], points[4], points[5], true);
  const tight = compact ? COMPACT_CLOCK.exec(text) : null;
  return tight ? clockFound(tight[0].length, tight[1], tight[2], tight[3], undefined, true) : null;
}

function clockFound(
  length: number,
  hours = '',
  minutes = '',
  seconds: string | undefined,
  fraction: string | undefined,
  dotted: boolean,
): ClockFound | null {
  if (Number(minutes) > 59 || Number(seconds ?? 0) > 60) return null;
  const fractionMs = fraction ? Number(`0.${fraction}`) * 1000 : 0;
  return {
    hours: Number(hours),
    restMs: Number(minutes) * 60_000 + Number(seconds ?? 0) * 1000 + fractionMs,
    length,
    dotted,
    shape: {
      hourDigits: hours.length,
      seconds: seconds !== undefined,
      fractionDigits: fraction?.length ?? 0,
      twelve: false,
      leadingHour: Number(hours),
    },
  };
}

export interface ClockRest {
  clockMs: number;
  shape: ClockShape;
  offsetMin: number | null;
  pattern: string;
}

/** What stands behind a clock: AM or PM, a zone, nothing; null if anything else does. */
export function readRest(text: string, clock: ClockFound): ClockRest | null {
  const meridiem = MERIDIEM.exec(text);
  let hours = clock.hours;
  if (meridiem) {
    if (hours < 1 || hours > 12) return null;
    hours = (hours % 12) + (meridiem[1]?.toLowerCase() === 'p' ? 12 : 0);
  }
  const after = text.slice(meridiem?.[0].length ?? 0);
  let offsetMin: number | null = null;
  if (after.trim() !== '') {
    const zone = OFFSET.exec(after);
    if (!zone || zone[0].length !== after.trimEnd().length) return null;
    offsetMin = zone[4]
      ? (OFFSETS_MIN[zone[4]] ?? NaN)
      : (zone[1] === '+' ? 1 : -1) * (Number(zone[2]) * 60 + Number(zone[3] ?? 0));
    if (!(Math.abs(offsetMin) <= 15 * 60)) return null;
  }
  const { shape } = clock;
  const hourLetter = meridiem ? 'h' : 'H';
  const pattern =
    hourLetter.repeat(Math.min(2, shape.hourDigits)) +
    (shape.seconds ? ':mm:ss' : ':mm') +
    (shape.fractionDigits ? `.${'S'.repeat(Math.min(3, shape.fractionDigits))}` : '') +
    (meridiem ? ' a' : '') +
    (offsetMin === null ? '' : 'XXX');
  return {
    clockMs: hours * 3600_000 + clock.restMs,
    shape: { ...shape, twelve: meridiem !== null },
    offsetMin,
    pattern,
  };
}
