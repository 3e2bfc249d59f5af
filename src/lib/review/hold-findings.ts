import { candidate, endIn, type Bench, type Candidate } from './bench';
import type { FiredLeg } from './segments';
import { coveredS, type Span } from './spans';

/** Run time at which a leg should have arrived within its band, on its own ramp; null where the plan gives none. */
export function plannedArrivalS(one: FiredLeg): number | null {
  const { leg } = one;
  if (leg.pace === 'coast' || leg.rampS === null) return null;
  const deltaC = Math.abs(leg.toC - leg.fromC);
  const share = deltaC > 0 && leg.pace === 'rate' ? Math.max(0, deltaC - leg.bandC) / deltaC : 1;
  return one.startS + leg.rampS * share;
}

/**
 * `late`: arrival after the planned one, on the leg's own ramp, by more than max(`lateMinS`, `lateShare` of the ramp).
 * A leg that the programmer left before the kiln arrived is late until then. Span: from planned to real arrival.
 */
export function lateLegs(bench: Bench): Candidate[] {
  return bench.fired.flatMap((one) => {
    const plannedS = plannedArrivalS(one);
    const reachedS = one.arrivedS ?? one.endS;
    if (plannedS === null || reachedS === null) return [];
    const byS = reachedS - plannedS;
    if (byS <= Math.max(bench.limits.lateMinS, bench.limits.lateShare * (one.leg.rampS ?? 0))) return [];
    return [
      candidate({
        kind: 'late',
        channelId: bench.input.controlChannelId,
        segment: one.leg.index,
        startS: plannedS,
        endS: reachedS,
        byS,
        holdLostS: Math.max(0, one.leg.holdS - (endIn(bench, one) - reachedS)),
      }),
    ];
  });
}

/** How far a hold may differ from its plan, seconds. */
export function holdToleranceS(bench: Pick<Bench, 'limits'>, plannedS: number): number {
  return Math.max(bench.limits.holdToleranceS, bench.limits.holdToleranceShare * plannedS);
}

/**
 * `hold-short` and `hold-long`: the time from arrival within 3 °C to when the programmer moved on, against the planned
 * hold. Time that other findings took is theirs: it makes no hold long, and an arrival that fell into it none short.
 * @param taken spans, with their reach, of findings on the control channel
 */
export function holdLengths(bench: Bench, late: readonly Candidate[], taken: readonly Span[]): Candidate[] {
  return bench.fired.flatMap((one) => {
    const { leg } = one;
    if (one.arrivedS === null) return [];
    const endS = endIn(bench, one);
    const tolS = holdToleranceS(bench, leg.holdS);
    const ended = one.endS !== null;
    const nearS = one.nearS ?? one.arrivedS;
    const heldS = endS - nearS + coveredS({ startS: one.arrivedS, endS: nearS }, taken);
    const lateHere = late.some((l) => l.segment === leg.index);
    const countedBefore = lateHere ? Math.max(0, nearS - Math.max(one.rampEndS, one.startS)) : 0;
    const hold = (kind: 'hold-short' | 'hold-long', byS: number) =>
      candidate({
        kind,
        channelId: bench.input.controlChannelId,
        segment: leg.index,
        startS: one.arrivedS ?? one.startS,
        endS,
        byS,
        holdLostS: kind === 'hold-short' ? -byS : null,
      });
    if (ended && heldS + countedBefore < leg.holdS - tolS) return [hold('hold-short', heldS - leg.holdS)];
    const ownS = endS - nearS - coveredS({ startS: nearS, endS }, taken);
    return ownS > leg.holdS + tolS ? [hold('hold-long', ownS - leg.holdS)] : [];
  });
}

/**
 * `ended-early`: the log's last sample lies in or before the last hold, nothing seen after it, and more than
 * max(`endedToleranceS`, `endedToleranceShare`) of that hold is missing. A point in time: the last sample.
 */
export function endedEarly(
  bench: Bench,
  legCount: number,
  lastHold: { index: number; holdS: number } | null,
): Candidate[] {
  const last = bench.fired[bench.fired.length - 1];
  if (!last || !lastHold) return [];
  const reached = bench.fired.find((one) => one.leg.index === lastHold.index);
  if (reached?.endS != null) return [];
  if (reached && reached.leg.index < legCount - 1 && bench.fired.length > reached.leg.index + 1) return [];
  const countedFromS = reached?.nearS ?? reached?.arrivedS;
  const heldS = countedFromS == null ? 0 : bench.logEndS - countedFromS;
  const missingS = lastHold.holdS - heldS;
  const tolS = Math.max(bench.limits.endedToleranceS, bench.limits.endedToleranceShare * lastHold.holdS);
  if (missingS <= tolS) return [];
  return [
    candidate({
      kind: 'ended-early',
      channelId: bench.input.controlChannelId,
      segment: last.leg.index,
      startS: bench.logEndS,
      endS: bench.logEndS,
      byS: -missingS,
    }),
  ];
}
