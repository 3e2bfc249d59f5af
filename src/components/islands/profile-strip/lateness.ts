import type { PlannedCurve } from '~/lib/profile/planned';
import type { Estimate } from '~/lib/thermal/estimate-schema';

/** Where the mould core trails the chamber most while the kiln heats: the moment and by how much; null below 5 °C. */
export function largestLag(estimate: Estimate | null): { atS: number; coreC: number; lagC: number } | null {
  if (!estimate || estimate.mould === null) return null;
  const { timeS, chamberC, mouldCoreC } = estimate.curve;
  let best: { atS: number; coreC: number; lagC: number } | null = null;
  timeS.forEach((atS, index) => {
    const coreC = mouldCoreC[index] ?? 0;
    const lagC = (chamberC[index] ?? 0) - coreC;
    if (lagC >= 5 && atS <= estimate.predictedS && (best === null || lagC > best.lagC))
      best = { atS, coreC, lagC };
  });
  return best;
}

/** Segments whose arrival the kiln is late for by five minutes or more, as it stands after the segments before. */
export function lateSegments(
  planned: PlannedCurve,
  estimate: Estimate | null,
): { index: number; plannedS: number; realS: number; behindS: number; targetC: number }[] {
  if (!estimate) return [];
  return planned.legs.flatMap((leg, index) => {
    const timed = estimate.segments[index];
    if (!timed || !timed.kilnLimited) return [];
    const behindS = timed.rampEndS - leg.rampEndS;
    const before =
      index === 0 ? 0 : (estimate.segments[index - 1]?.endS ?? 0) - (planned.legs[index - 1]?.endS ?? 0);
    if (behindS - before < 300) return [];
    return [{ index, plannedS: leg.rampEndS, realS: timed.rampEndS, behindS, targetC: leg.toC }];
  });
}
