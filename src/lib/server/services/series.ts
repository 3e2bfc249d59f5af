import type { z } from '~/lib/zod';
import type { reviewRoutes, Series } from '~/lib/contracts/runs';
import { toCelsius } from '~/lib/logs/celsius';
import { plannedCurve } from '~/lib/profile/planned';
import type { Actor } from '../auth/actor';
import { findLog, type LogRecord } from '../repositories/logs';
import type { RunRecord } from '../repositories/runs';
import { readWindow, type Window } from '../repositories/samples';
import { predictionOf } from './log-review';
import { readableRun } from './run-access';
import { emptyLoad, frozenNow } from './runs';
import { inTransaction } from '../database';

type Query = z.output<(typeof reviewRoutes)['series']['query']>;
type Polyline = Series['planned'];

/** Seconds shown before the run's start and after its end where a window is not asked for. */
const MARGIN_S = 900;

/** Plan, carried plan, prediction and measurement over a window of run time, at the resolution asked for. */
export async function getSeries(actor: Actor, runId: string, query: Query): Promise<Series> {
  const record = await readableRun(actor, runId);
  const frozen = record.frozen ?? (await inTransaction((tx) => frozenNow(actor, record, tx)));
  const prediction = predictionOf({ ...frozen, load: frozen.load ?? emptyLoad() });
  const planned = plannedCurve(
    frozen.profile,
    prediction.segments.map(
      ({ plannedStartS, plannedEndS }, index) =>
        plannedEndS - plannedStartS - (frozen.profile.segments[index]?.holdS ?? 0),
    ),
  );
  const log = record.currentLogId ? await findLog(actor.studioId, { id: record.currentLogId }) : null;
  const endS = Math.max(prediction.predictedS, prediction.plannedS, log ? lastSampleS(log) : 0);
  const fromS = query.fromS ?? Math.min(0, log ? firstSampleS(log) : 0);
  const toS = query.toS ?? endS + MARGIN_S;
  return {
    fromS,
    toS,
    planned: within(planned, fromS, toS),
    predicted: within({ timeS: prediction.curve.timeS, valueC: prediction.curve.chamberC }, fromS, toS),
    carried: log ? within(log.review.carried, fromS, toS) : null,
    ...(log
      ? await measured(record, log, fromS, toS, query.points)
      : { channels: [], samplesInWindow: 0, samplesPerPoint: 0 }),
  };
}

const firstSampleS = (log: LogRecord): number => -log.alignment.startOffsetS;

function lastSampleS(log: LogRecord): number {
  const last = log.report.lastAt ? Date.parse(log.report.lastAt) : log.alignment.startMs;
  return runSeconds(log, last);
}

/** Run time of a logged instant: forward leaps of the logger's clock are taken out. */
function runSeconds(log: LogRecord, timeMs: number): number {
  const leapt = log.alignment.leaps.reduce((sum, leap) => (timeMs > leap.atMs ? sum + leap.shiftS : sum), 0);
  return (timeMs - log.alignment.startMs) / 1000 - leapt;
}

/** The logged instant of a run time. */
function loggedMs(log: LogRecord, timeS: number): number {
  let ms = log.alignment.startMs + timeS * 1000;
  for (const leap of log.alignment.leaps) if (ms > leap.atMs) ms += leap.shiftS * 1000;
  return ms;
}

async function measured(record: RunRecord, log: LogRecord, fromS: number, toS: number, points: number) {
  const window = await readWindow(
    {
      studioId: record.studioId,
      logId: log.id,
      intervalS: log.report.intervalS ?? 1,
      channels: log.report.channels.length,
    },
    loggedMs(log, fromS),
    loggedMs(log, toS),
    points,
  );
  const timeS = Array.from(window.timeMs, (ms) => round(runSeconds(log, ms), 3));
  const [min, max, mean] = [window.min, window.max, window.mean].map((columns) =>
    toCelsius(log.report.channels, columns).map(
      (column, index) => column ?? columns[index] ?? new Float64Array(0),
    ),
  );
  const column = (columns: readonly Float64Array[] | undefined, index: number) =>
    Array.from(columns?.[index] ?? [], (value) => (Number.isNaN(value) ? null : round(value, 3)));
  return {
    channels: log.report.channels.map((channel, index) => ({
      id: channel.id,
      name: channel.name,
      role: channel.role,
      unit: channel.quantity === 'temperature' || channel.quantity === 'emf' ? 'C' : channel.unit,
      timeS,
      min: column(min, index),
      max: column(max, index),
      mean: column(mean, index),
    })),
    samplesInWindow: window.rowsInWindow * log.report.channels.length,
    samplesPerPoint: perPoint(window),
  };
}

const perPoint = (window: Window): number =>
  window.timeMs.length === 0 ? 0 : round(window.rowsInWindow / window.timeMs.length, 2);

function round(value: number, digits: number): number {
  const factor = 10 ** digits;
  return Math.round(value * factor) / factor;
}

/** The part of a polyline inside a window, with its value at the edges. */
function within(
  line: { timeS: ArrayLike<number>; valueC: ArrayLike<number> },
  fromS: number,
  toS: number,
): Polyline {
  const out: Polyline = { timeS: [], valueC: [] };
  const push = (timeS: number, valueC: number) => {
    out.timeS.push(round(timeS, 1));
    out.valueC.push(round(valueC, 2));
  };
  for (let index = 0; index < line.timeS.length; index++) {
    const timeS = line.timeS[index] as number;
    const before = line.timeS[index - 1];
    for (const edgeS of [fromS, toS])
      if (before !== undefined && before < edgeS && edgeS < timeS) push(edgeS, between(line, index, edgeS));
    if (timeS >= fromS && timeS <= toS) push(timeS, line.valueC[index] as number);
  }
  return out;
}

function between(
  line: { timeS: ArrayLike<number>; valueC: ArrayLike<number> },
  index: number,
  atS: number,
): number {
  const [t0, t1] = [line.timeS[index - 1] as number, line.timeS[index] as number];
  const [v0, v1] = [line.valueC[index - 1] as number, line.valueC[index] as number];
  return v0 + ((v1 - v0) * (atS - t0)) / (t1 - t0);
}
