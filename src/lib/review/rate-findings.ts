import { candidate, endIn, type Bench, type Candidate } from './bench';
import { indexAt, timeAt } from './grid';
import type { FiredLeg } from './segments';
import { joined, overlaps, stretches, type Span, type Stretch } from './spans';
import type { MaterialRateLimit } from './types';

/** Slopes that rise over their limit again so soon are the same push. */
const SAME_PUSH_S = 120;

/**
 * `too-steep` and `cooled-too-fast`: the centred regression, its window wholly inside one ramp and clear of what explains
 * it, beyond max(rate × `steepFactor`, rate + `steepMarginCPerH`) for `steepMinS`; or, whatever the plan asks, beyond a
 * material's limit by more than `materialShare`. Coasts only against materials.
 */
export function steepRamps(bench: Bench, explained: readonly Span[]): Candidate[] {
  return bench.fired.flatMap((one) => {
    const byPlan =
      one.leg.rateCPerH === null
        ? []
        : steepParts(bench, one, explained, planLimit(bench, one.leg.rateCPerH));
    const byMaterial = (bench.input.materialRateLimits ?? []).flatMap((limit) =>
      steepParts(bench, one, explained, materialLimit(bench, one, limit)),
    );
    return merged(byPlan, byMaterial);
  });
}

type LimitAt = (index: number) => { limitCPerH: number; askedCPerH: number };

function planLimit(bench: Bench, rateCPerH: number): LimitAt {
  const { steepFactor, steepMarginCPerH } = bench.limits;
  const limit = {
    limitCPerH: Math.max(rateCPerH * steepFactor, rateCPerH + steepMarginCPerH),
    askedCPerH: rateCPerH,
  };
  return () => limit;
}

const NO_LIMIT = { limitCPerH: Number.POSITIVE_INFINITY, askedCPerH: 0 };

function materialLimit(bench: Bench, one: FiredLeg, limit: MaterialRateLimit): LimitAt {
  const maxCPerH = one.leg.direction > 0 ? limit.maxHeatingCPerH : limit.maxCoolingCPerH;
  if (maxCPerH === null) return () => NO_LIMIT;
  const inZone = { limitCPerH: maxCPerH * (1 + bench.limits.materialShare), askedCPerH: maxCPerH };
  return (i) => {
    const atC = bench.smooth.value[i]!;
    return atC >= limit.fromC && atC <= limit.toC ? inZone : NO_LIMIT;
  };
}

function steepParts(bench: Bench, one: FiredLeg, explained: readonly Span[], limitAt: LimitAt): Candidate[] {
  const { leg } = one;
  if (leg.direction === 0) return [];
  const steep = (i: number) => leg.direction * bench.slopes[i]! > limitAt(i).limitCPerH;
  const parts = joined(
    rampStretches(bench, one, explained, steep),
    Math.round(SAME_PUSH_S / bench.smooth.stepS),
  );
  return parts
    .filter(
      (part) => timeAt(bench.smooth, part.to) - timeAt(bench.smooth, part.from) >= bench.limits.steepMinS,
    )
    .map((part) => {
      let byCPerH = 0;
      for (let i = part.from; i <= part.to; i++) {
        byCPerH = Math.max(byCPerH, leg.direction * bench.slopes[i]! - limitAt(i).askedCPerH);
      }
      return candidate({
        kind: leg.direction > 0 ? 'too-steep' : 'cooled-too-fast',
        channelId: bench.input.controlChannelId,
        segment: leg.index,
        startS: timeAt(bench.smooth, part.from),
        endS: timeAt(bench.smooth, part.to),
        byCPerH,
      });
    });
}

/** Stretches of nodes in a leg's ramp whose regression window lies in the ramp, is clear of `explained`, and for which `holds`. */
function rampStretches(
  bench: Bench,
  one: FiredLeg,
  explained: readonly Span[],
  holds: (index: number) => boolean,
): Stretch[] {
  const halfS = bench.slopeWindowS / 2;
  const endS = Math.min(one.arrivedS ?? endIn(bench, one), endIn(bench, one));
  if (endS - one.startS < bench.slopeWindowS) return [];
  const from = indexAt(bench.smooth, one.startS + halfS);
  const to = indexAt(bench.smooth, endS - halfS);
  const clear = (i: number) => {
    const atS = timeAt(bench.smooth, i);
    return !explained.some((span) => overlaps(span, { startS: atS - halfS, endS: atS + halfS }));
  };
  return stretches(from, to, (i) => holds(i) && clear(i));
}

/** One finding where plan and material object to the same push. */
function merged(byPlan: readonly Candidate[], byMaterial: readonly Candidate[]): Candidate[] {
  const out = [...byPlan];
  for (const part of byMaterial) {
    const same = out.findIndex((o) => overlaps(o, part));
    const whole = same < 0 ? part : out[same]!;
    const joint: Candidate = {
      ...whole,
      startS: Math.min(whole.startS, part.startS),
      endS: Math.max(whole.endS, part.endS),
      byCPerH: Math.max(whole.byCPerH ?? 0, part.byCPerH ?? 0),
      remarks: ['material-limit'],
    };
    if (same < 0) out.push(joint);
    else out[same] = joint;
  }
  return out;
}

/**
 * `stalled`: on a heating ramp with a rate, the regression below `stalledShare` of the plan's rate for `stalledMinS` while
 * more than the band below the target. Reach: until the kiln is back within the band of its programmer's setpoint.
 */
export function stalls(bench: Bench, explained: readonly Span[]): Candidate[] {
  return bench.fired.flatMap((one) => {
    const { leg } = one;
    if (leg.direction <= 0 || leg.rateCPerH === null) return [];
    const limitCPerH = leg.rateCPerH * bench.limits.stalledShare;
    const stalled = (i: number) =>
      bench.slopes[i]! < limitCPerH && leg.toC - bench.smooth.value[i]! > leg.bandC;
    const parts = joined(
      rampStretches(bench, one, explained, stalled),
      Math.round(SAME_PUSH_S / bench.smooth.stepS),
    );
    return parts
      .filter(
        (part) => timeAt(bench.smooth, part.to) - timeAt(bench.smooth, part.from) >= bench.limits.stalledMinS,
      )
      .map((part) => {
        const startS = timeAt(bench.smooth, part.from);
        const endS = timeAt(bench.smooth, part.to);
        return candidate({
          kind: 'stalled',
          channelId: bench.input.controlChannelId,
          segment: leg.index,
          startS,
          endS,
          reachS: caughtUpS(bench, one, part.to),
          peakC: bench.smooth.value[part.to]!,
          byC: Math.max(
            0,
            (leg.rateCPerH! * (endS - startS)) / 3600 -
              (bench.smooth.value[part.to]! - bench.smooth.value[part.from]!),
          ),
          byS: endS - startS,
        });
      });
  });
}

/** When, after a stall, the kiln is within the band of its setpoint again. */
function caughtUpS(bench: Bench, one: FiredLeg, from: number): number {
  const to = indexAt(bench.smooth, endIn(bench, one));
  for (let i = from; i <= to; i++) {
    if (Math.abs(bench.setpoint[i]! - bench.smooth.value[i]!) <= one.leg.bandC)
      return timeAt(bench.smooth, i);
  }
  return endIn(bench, one);
}
