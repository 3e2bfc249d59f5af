import { randomUUID } from 'node:crypto';
import type { Finding } from '~/lib/contracts/runs';
import { review } from '~/lib/review/review';
import { describeFinding, describeSegment } from '~/lib/review/words';
import type { AlignmentRequest, ComputedFinding, ReviewChannel, ReviewResult } from '~/lib/review/types';
import { toCelsius } from '~/lib/logs/celsius';
import { sensorRangeC } from '~/lib/sensors/range';
import { toleranceC } from '~/lib/sensors/tolerance';
import { estimateOf } from '~/lib/thermal/estimate';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import type { StoredAlignment, StoredReport, StoredReview } from '../repositories/logs';
import type { NewFinding } from '../repositories/findings';
import type { Frozen } from '../repositories/runs';
import { simulated } from './firing';

/** The rows of a log as read, by channel of its report, in the file's own units. */
export interface LogSeries {
  readonly timeMs: Float64Array;
  readonly values: readonly Float64Array[];
  /** Rows whose text was an open sensor's, per channel. */
  readonly open: readonly number[][];
}

export interface Reviewed {
  readonly alignment: StoredAlignment;
  readonly review: StoredReview;
  readonly findings: readonly NewFinding[];
}

/** The prediction that a run is reviewed against: what its kiln and load should have done with its profile. */
export const predictionOf = (frozen: Frozen): Estimate =>
  estimateOf(simulated({ profile: frozen.profile, kiln: frozen.kiln, load: frozen.load, ambientC: 20 }), {
    mouldIndex: null,
    cautions: [],
    pour: null,
  });

/** Lays a log over its plan and finds the deviations. Pure: stores nothing. */
export function reviewLog(input: {
  frozen: Frozen;
  report: StoredReport;
  series: LogSeries;
  plannedStartMs: number;
  alignment: AlignmentRequest;
  logId: string;
}): Reviewed | null {
  const { frozen, report, series } = input;
  if (report.controlChannelId === null || series.timeMs.length === 0) return null;
  const prediction = predictionOf(frozen);
  const result = review({
    profile: frozen.profile,
    waitBandC: frozen.kiln.waitBandC,
    openAtC: frozen.kiln.openAtC,
    channels: reviewChannels(report, series),
    controlChannelId: report.controlChannelId,
    clockEvents: report.clockEvents.map((event) => ({ ...event, shiftS: Math.abs(event.shiftS) })),
    plannedStartMs: input.plannedStartMs,
    alignment: input.alignment,
    predicted: { timeS: prediction.curve.timeS, chamberC: prediction.curve.chamberC },
    cooling: null,
  });
  return {
    alignment: {
      method: result.alignment.method,
      confidence: result.alignment.confidence,
      startOffsetS: result.alignment.startOffsetS,
      startMs: result.alignment.runStartMs,
      leaps: result.leaps.map((leap) => ({ atMs: leap.atMs, shiftS: leap.shiftS })),
      clockEvents: report.clockEvents,
    },
    review: storedReview(frozen, report, result, prediction),
    findings: result.findings.map((finding) => newFinding(finding, frozen, input.logId)),
  };
}

function reviewChannels(report: StoredReport, series: LogSeries): ReviewChannel[] {
  const celsius = toCelsius(report.channels, series.values);
  return report.channels.map((channel, index) => ({
    id: channel.id,
    name: spokenName(channel.name),
    role: channel.role,
    quantity: channel.quantity === 'emf' ? 'temperature' : channel.quantity,
    timeMs: series.timeMs,
    value: celsius[index] ?? series.values[index] ?? new Float64Array(0),
    openIndexes: series.open[index] ?? [],
    rangeC: sensorRangeC(channel.thermocouple),
  }));
}

/** A channel as a sentence names it: `chamber °C` is `the chamber thermocouple`. */
function spokenName(name: string): string {
  const plain = name.replace(/\s*[([]?\s*(?:°\s*[CFK]?|[CFK]|%|kW|W|mV)\s*[)\]]?\s*$/i, '').trim();
  return `the ${plain || name} thermocouple`;
}

function storedReview(
  frozen: Frozen,
  report: StoredReport,
  result: ReviewResult,
  prediction: Estimate,
): StoredReview {
  const figures = result.figures;
  const control = report.channels.find((channel) => channel.id === report.controlChannelId);
  const perHour = energyPerPowerHour(frozen, report);
  const energyKWh = (powerHours: number | null) =>
    powerHours === null || perHour === null ? null : powerHours * perHour;
  const heldS = result.segments.reduce((sum, segment) => sum + (segment.holdS ?? 0), 0);
  return {
    verdict: result.verdict,
    runEndS: result.runEndS,
    endsAfterLastHold: result.segments.at(-1)?.endS != null,
    carried: { timeS: [...result.carried.timeS], valueC: [...result.carried.valueC] },
    segments: result.segments.map((segment, index) => ({
      startS: segment.startS,
      arrivedS: segment.arrivedS,
      endS: segment.endS ?? result.runEndS,
      rateCPerH: segment.rateCPerH,
      plannedRateCPerH: segment.plannedRateCPerH,
      holdS: segment.holdS ?? 0,
      plannedHoldS: segment.plannedHoldS,
      inBandS: segment.timeInBandS,
      peakC: segment.peakC,
      energyKWh: energyKWh(segment.powerHours),
      text: describeSegment(
        segment,
        result.findings.filter((finding) => finding.segment === index),
        words(frozen),
      ),
    })),
    figures: {
      peakC: figures.peakC,
      largestDeviationC: figures.largestDeviationC,
      rmsC: figures.rmsC,
      p95C: figures.p95C,
      inBandShare: heldS > 0 ? Math.min(1, figures.timeInBandS / heldS) : null,
      delayS: figures.delayS,
      heatWorkH: figures.heatWorkH,
      plannedHeatWorkH: figures.plannedHeatWorkH,
      energyKWh: energyKWh(figures.powerHours),
      estimatedKWh: prediction.energyKWh,
      toleranceC:
        control?.thermocouple && figures.peakC !== null
          ? toleranceC(control.thermocouple, '2', figures.peakC)
          : null,
      byStage: figures.stages.map((stage) => ({ stage: stage.stage, rmsC: stage.rmsC, p95C: stage.p95C })),
    },
  };
}

/** kWh in one unit of the power channel over one hour: kW as it is, W in thousandths, % of the kiln's full input. */
function energyPerPowerHour(frozen: Frozen, report: StoredReport): number | null {
  const unit = report.channels.find((channel) => channel.quantity === 'power')?.unit.toLowerCase();
  if (unit === 'kw') return 1;
  if (unit === 'w') return 0.001;
  if (unit !== '%') return null;
  const { kiln } = frozen;
  if (kiln.energy === 'gas') return kiln.burnerKW / 100;
  const supply = kiln.voltsV !== null && kiln.supplyV !== null ? (kiln.supplyV / kiln.voltsV) ** 2 : 1;
  return (kiln.ratedKW * kiln.ratedPowerShare * supply) / 100;
}

/** The texts kept with a review are in °C; screens in °F say the same from the figures. */
const words = (frozen: Frozen) => ({ profile: frozen.profile, temperature: 'C' as const });

function newFinding(finding: ComputedFinding, frozen: Frozen, logId: string): NewFinding {
  return {
    id: randomUUID(),
    logId,
    kind: finding.kind,
    severity: finding.severity,
    origin: 'computed',
    state: 'open',
    channelId: finding.channelId,
    segment: finding.segment,
    startS: finding.startS,
    endS: finding.endS,
    peakC: finding.peakC,
    byC: finding.byC,
    byS: finding.byS,
    byCPerH: finding.byCPerH,
    holdLostS: finding.holdLostS,
    expected: finding.expected,
    text: describeFinding(finding, words(frozen)),
    remark: '',
    followUp: null,
  };
}

/** A decision that somebody made stays with the same deviation when it is computed anew: same kind, overlapping in time. */
export function keepDecisions(
  before: readonly Finding[],
  after: readonly NewFinding[],
  decidedAt: (finding: Finding) => Date | null,
): NewFinding[] {
  const open = before.filter(
    (finding) =>
      finding.origin === 'computed' &&
      (finding.state !== 'open' || finding.remark !== '' || finding.followUp !== null),
  );
  return after.map((finding) => {
    const index = open.findIndex(
      (old) =>
        old.kind === finding.kind && old.startS <= finding.endS + 300 && old.endS >= finding.startS - 300,
    );
    if (index < 0) return finding;
    const [old] = open.splice(index, 1) as [Finding];
    return {
      ...finding,
      state: old.state,
      remark: old.remark,
      followUp: old.followUp,
      decidedBy: old.decidedBy?.id ?? null,
      decidedAt: decidedAt(old),
    };
  });
}
