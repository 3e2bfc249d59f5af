import type { ThermocoupleType } from '../logs/schema';

export const TOLERANCE_CLASSES = ['1', '2', '3', 'special', 'standard'] as const;
/** `1`..`3` of IEC 60584-1; `special` and `standard` of ASTM E230. */
export type ToleranceClass = (typeof TOLERANCE_CLASSES)[number];

/** The larger of `absC` and `share`·|t|, over fromC..toC. */
interface Tolerance {
  absC: number;
  share: number;
  fromC: number;
  toC: number;
}

const row = (absC: number, share: number, fromC: number, toC: number): Tolerance => ({
  absC,
  share,
  fromC,
  toC,
});

/**
 * New, unused material, reference junction at 0 °C. From vendors' reproductions of IEC 60584-1 and ASTM E230 (listed in the
 * reference fixture, with where they disagree); the standards themselves were not seen.
 */
const TABLE: Record<ThermocoupleType, Partial<Record<ToleranceClass, Tolerance>>> = {
  K: {
    1: row(1.5, 0.004, -40, 1000),
    2: row(2.5, 0.0075, -40, 1200),
    3: row(2.5, 0.015, -200, 40),
    standard: row(2.2, 0.0075, 0, 1260),
    special: row(1.1, 0.004, 0, 1260),
  },
  N: {
    1: row(1.5, 0.004, -40, 1000),
    2: row(2.5, 0.0075, -40, 1200),
    3: row(2.5, 0.015, -200, 40),
    standard: row(2.2, 0.0075, 0, 1260),
    special: row(1.1, 0.004, 0, 1260),
  },
  J: {
    1: row(1.5, 0.004, -40, 750),
    2: row(2.5, 0.0075, -40, 750),
    standard: row(2.2, 0.0075, 0, 760),
    special: row(1.1, 0.004, 0, 760),
  },
  E: {
    1: row(1.5, 0.004, -40, 800),
    2: row(2.5, 0.0075, -40, 900),
    3: row(2.5, 0.015, -200, 40),
    standard: row(1.7, 0.005, 0, 870),
    special: row(1, 0.004, 0, 870),
  },
  T: {
    1: row(0.5, 0.004, -40, 350),
    2: row(1, 0.0075, -40, 350),
    3: row(1, 0.015, -200, 40),
    standard: row(1, 0.0075, 0, 370),
    special: row(0.5, 0.004, 0, 370),
  },
  R: {
    1: row(1, 0, 0, 1600),
    2: row(1.5, 0.0025, 0, 1600),
    standard: row(1.5, 0.0025, 0, 1480),
    special: row(0.6, 0.001, 0, 1480),
  },
  S: {
    1: row(1, 0, 0, 1600),
    2: row(1.5, 0.0025, 0, 1600),
    standard: row(1.5, 0.0025, 0, 1480),
    special: row(0.6, 0.001, 0, 1480),
  },
  B: {
    2: row(0, 0.0025, 600, 1700),
    3: row(4, 0.005, 600, 1700),
    standard: row(0, 0.005, 870, 1700),
    special: row(0, 0.0025, 870, 1700),
  },
};

/**
 * Permitted deviation ±°C of a new thermocouple at `tempC`, or null where the class does not cover the type or the temperature.
 * Class 1 of R and S widens above 1100 °C by 0.003·(t − 1100) (from memory of IEC 60584-1).
 */
export function toleranceC(
  type: ThermocoupleType,
  toleranceClass: ToleranceClass,
  tempC: number,
): number | null {
  const entry = TABLE[type][toleranceClass];
  if (!entry || !(tempC >= entry.fromC && tempC <= entry.toC)) return null;
  const widening = toleranceClass === '1' && (type === 'R' || type === 'S') ? Math.max(0, tempC - 1100) : 0;
  return Math.max(entry.absC, entry.share * Math.abs(tempC)) + 0.003 * widening;
}
