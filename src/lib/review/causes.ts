import type { Bench, Candidate } from './bench';
import { holdLengths, holdToleranceS, plannedArrivalS } from './hold-findings';
import { coveredS, sharedS, type Span } from './spans';
import type { ComputedFinding, FindingKind } from './types';

/** The order in which kinds claim what happened: one cause, one finding. */
const ORDER: readonly FindingKind[] = [
  'sensor-open',
  'sensor-spike',
  'sensor-stuck',
  'clock-jump',
  'gap',
  'channels-disagree',
  'power-cut',
  'opened',
  'stalled',
  'late',
  'too-steep',
  'cooled-too-fast',
  'overshoot',
  'undershoot',
  'hold-short',
  'hold-long',
  'ended-early',
];
const rank = (kind: FindingKind) => ORDER.indexOf(kind);

/** An excursion that begins so soon after a recovery is its swing. */
const SWING_S = 600;
const MOSTLY = 0.5;

/** What a cause holds until its effect is over. */
export const reachOf = (cause: Candidate): Span => ({ startS: cause.startS, endS: cause.reachS });

/** Kinds that set the curve itself back, so that lateness after them is theirs. */
const SET_BACK: readonly FindingKind[] = ['power-cut', 'opened', 'stalled'];
/** Kinds about what the control channel could not show. */
const BLIND: readonly FindingKind[] = ['sensor-open', 'sensor-stuck', 'gap'];

export interface Sorted {
  readonly findings: ComputedFinding[];
  readonly consequences: ComputedFinding[];
}

/** Splits candidates into causes of their own and consequences, each naming the finding that explains it. */
export function sortedByCause(bench: Bench, candidates: readonly Candidate[]): Sorted {
  const queue = [...candidates].sort((a, b) => rank(a.kind) - rank(b.kind) || a.startS - b.startS);
  const kept: Candidate[] = [];
  const owed: { of: Candidate; to: Candidate }[] = [];
  for (const one of queue) {
    const cause = kept.find((other) => explains(bench, other, one)) ?? null;
    if (cause) owed.push({ of: one, to: cause });
    else kept.push(one);
  }
  // Lateness that another cause explains makes a hold short all the same.
  const late = candidates.filter((one) => one.kind === 'late');
  const control = kept.filter((one) => one.channelId === bench.input.controlChannelId && one.kind !== 'late');
  kept.push(
    ...holdLengths(bench, late, takenByFindings(bench, control)).filter(
      (hold) => !isLates(bench, hold, late) && !isPushs(bench, hold, control),
    ),
  );
  kept.sort((a, b) => a.startS - b.startS || rank(a.kind) - rank(b.kind));
  return {
    findings: kept.map((one) => plain(withHoldLost(bench, one), null)),
    consequences: owed.map(({ of, to }) => plain(of, kept.indexOf(to))),
  };
}

function plain(one: Candidate, because: number | null): ComputedFinding {
  const { reachS: _reachS, ...finding } = one;
  return { ...finding, because };
}

/** Spans that are other findings' time in a hold: only what keeps the kiln out of its band or cannot be seen. */
function takenByFindings(bench: Bench, control: readonly Candidate[]): Span[] {
  const kinds: readonly FindingKind[] = [
    'power-cut',
    'opened',
    'overshoot',
    'undershoot',
    'gap',
    'sensor-open',
    'sensor-stuck',
  ];
  return control.filter((one) => kinds.includes(one.kind) && one.startS < bench.runEndS).map(reachOf);
}

/** On a programmer that runs by the clock, a hold that was short because the kiln came late. */
function isLates(bench: Bench, hold: Candidate, late: readonly Candidate[]): boolean {
  return (
    hold.kind === 'hold-short' &&
    bench.input.waitBandC === null &&
    late.some((l) => l.segment === hold.segment)
  );
}

/** A hold that was long only because a push along its ramp brought the kiln there early. */
function isPushs(bench: Bench, hold: Candidate, control: readonly Candidate[]): boolean {
  const one = bench.fired[hold.segment];
  if (hold.kind !== 'hold-long' || !one || one.arrivedS === null) return false;
  if (!control.some(({ kind, segment }) => kind === 'too-steep' && segment === hold.segment)) return false;
  const earlyS = (plannedArrivalS(one) ?? one.arrivedS) - one.arrivedS;
  return (hold.byS ?? 0) - earlyS <= holdToleranceS(bench, one.leg.holdS);
}

/** Whether `cause`, kept already, accounts for `one`. */
function explains(bench: Bench, cause: Candidate, one: Candidate): boolean {
  const reach = reachOf(cause);
  const share = one.endS > one.startS ? sharedS(reach, one) / (one.endS - one.startS) : 0;
  const onControl = cause.channelId === bench.input.controlChannelId;
  if (one.kind === 'channels-disagree') {
    return (BLIND.includes(cause.kind) || cause.kind === 'opened') && share >= MOSTLY;
  }
  if (one.kind === 'gap' || one.kind === 'clock-jump' || one.kind.startsWith('sensor-')) return false;
  if (!onControl) return false;
  if (one.kind === 'ended-early') return cause.remarks.includes('open-ended');
  if (one.kind === 'late') return explainsLate(bench, cause, one);
  if (SET_BACK.includes(cause.kind)) {
    const swing = one.startS >= cause.startS && one.startS <= cause.reachS + SWING_S;
    const isExcursion = one.kind === 'overshoot' || one.kind === 'undershoot';
    return share >= (one.kind === 'stalled' ? 0.3 : MOSTLY) || (isExcursion && swing);
  }
  return BLIND.includes(cause.kind) && share >= MOSTLY;
}

/** Lateness that is gone once the time which causes took on that ramp is taken off, or that nobody saw. */
function explainsLate(bench: Bench, cause: Candidate, late: Candidate): boolean {
  const one = bench.fired[late.segment];
  if (!one) return false;
  const ramp = { startS: one.startS, endS: late.endS };
  const limitS = Math.max(bench.limits.lateMinS, bench.limits.lateShare * (one.leg.rampS ?? 0));
  const byS = late.byS ?? 0;
  if (SET_BACK.includes(cause.kind)) return byS - coveredS(ramp, [reachOf(cause)]) <= limitS;
  const unseen = BLIND.includes(cause.kind) && cause.startS <= late.endS && cause.endS >= late.endS - 60;
  return unseen && cause.startS - late.startS <= limitS;
}

/** Time in the hold's band that a finding cost, where it is not known yet. */
function withHoldLost(bench: Bench, one: Candidate): Candidate {
  if (one.holdLostS !== null || !['power-cut', 'opened'].includes(one.kind)) return one;
  const fired = bench.fired[one.segment];
  if (!fired || fired.arrivedS === null) return one;
  const hold = { startS: fired.arrivedS, endS: fired.endS ?? bench.logEndS };
  return { ...one, holdLostS: coveredS(hold, [reachOf(one)]) };
}
