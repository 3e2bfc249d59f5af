/** One line of a thermocouple's calibration sheet: at `atC` it reads `offsetC` too high (the correction with its sign turned). */
export interface CalibrationPoint {
  atC: number;
  offsetC: number;
}

/**
 * True temperature, °C, of a reading: reading − offset, the offset interpolated linearly between the points of the sheet and held
 * constant beyond its ends (common practice). Points in any order; without any, the reading itself. NaN stays NaN.
 */
export function calibratedC(points: readonly CalibrationPoint[], readingC: number): number {
  const sorted = [...points].sort((a, b) => a.atC - b.atC);
  const above = sorted.findIndex(({ atC }) => atC >= readingC);
  const upper = sorted[above < 0 ? sorted.length - 1 : above];
  const lower = sorted[above < 0 ? sorted.length - 1 : Math.max(0, above - 1)];
  if (!upper || !lower) return readingC;
  const spanC = upper.atC - lower.atC;
  const share = spanC > 0 ? Math.min(1, Math.max(0, (readingC - lower.atC) / spanC)) : 0;
  return readingC - (lower.offsetC + share * (upper.offsetC - lower.offsetC));
}
