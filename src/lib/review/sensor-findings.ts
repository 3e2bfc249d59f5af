import { candidate, segmentAt, type Bench, type Candidate } from './bench';
import { indexAt, timeAt, type Grid } from './grid';
import type { Sensor } from './sensors';
import { joined, stretches, type Stretch } from './spans';
import type { ClockEvent } from './types';

/** Findings about a channel's readings themselves: spiked, open, stuck. */
export function sensorFindings(bench: Bench, sensor: Sensor, stuck: readonly Stretch[]): Candidate[] {
  const runS = (sample: number) => sensor.timeS[sample]! - bench.startOffsetS;
  const at = (kind: 'sensor-spike' | 'sensor-open' | 'sensor-stuck', part: Stretch, byC: number | null) =>
    candidate({
      kind,
      channelId: sensor.channel.id,
      segment: segmentAt(bench.fired, runS(part.from)),
      startS: runS(part.from),
      endS: runS(part.to),
      byC,
    });
  return [
    ...sensor.spikes.map((spike) => ({
      ...at('sensor-spike', spike, Math.abs(spike.byC)),
      peakC: sensor.channel.value[spike.byC > 0 ? highest(sensor, spike) : lowest(sensor, spike)]!,
    })),
    ...sensor.open.map((part) => at('sensor-open', part, null)),
    ...stuck.map((part) => at('sensor-stuck', part, movedC(bench, runS(part.from), runS(part.to)))),
  ];
}

function highest(sensor: Sensor, part: Stretch): number {
  let best = part.from;
  for (let i = part.from; i <= part.to; i++)
    if (sensor.channel.value[i]! > sensor.channel.value[best]!) best = i;
  return best;
}

function lowest(sensor: Sensor, part: Stretch): number {
  let best = part.from;
  for (let i = part.from; i <= part.to; i++)
    if (sensor.channel.value[i]! < sensor.channel.value[best]!) best = i;
  return best;
}

/** How far the setpoint moved while a sensor stood still; null outside the run. */
function movedC(bench: Bench, fromS: number, toS: number): number | null {
  const moved = Math.abs(
    bench.setpoint[indexAt(bench.grid, toS)]! - bench.setpoint[indexAt(bench.grid, fromS)]!,
  );
  return moved === moved ? moved : null;
}

/** A second sensor may need so long after the start to come to its senses: no finding if it has agreed by then. */
const STARTING_UP_S = 1800;
const STARTED_BY_S = 3600;

/** `channels-disagree`: two chamber channels apart by more than `disagreeBands` × the band for `disagreeMinS`. */
export function disagreements(bench: Bench, other: Sensor, otherGrid: Grid): Candidate[] {
  const { smooth, limits } = bench;
  const limitC = limits.disagreeBands * limits.bandC;
  const apartC = (i: number) => {
    const j = indexAt(otherGrid, timeAt(smooth, i));
    const both = smooth.known[i] === 1 && otherGrid.known[j] === 1;
    return both ? Math.abs(smooth.value[i]! - otherGrid.value[j]!) : 0;
  };
  const from = indexAt(smooth, 0);
  const to = indexAt(smooth, bench.runEndS);
  const parts = joined(
    stretches(from, to, (i) => apartC(i) > limitC),
    Math.round(60 / smooth.stepS),
  );
  return parts.flatMap((part) => {
    const startS = timeAt(smooth, part.from);
    const endS = timeAt(smooth, part.to);
    const startingUp = startS < STARTING_UP_S && endS < STARTED_BY_S;
    if (endS - startS < limits.disagreeMinS || startingUp) return [];
    let byC = 0;
    for (let i = part.from; i <= part.to; i++) byC = Math.max(byC, apartC(i));
    const segment = segmentAt(bench.fired, startS);
    return [
      candidate({ kind: 'channels-disagree', channelId: other.channel.id, segment, startS, endS, byC }),
    ];
  });
}

/** `gap` and `clock-jump`: what the rows' own times tell. */
export function clockFindings(bench: Bench, events: readonly ClockEvent[], firstMs: number): Candidate[] {
  const channelId = bench.input.controlChannelId;
  const at = (kind: 'gap' | 'clock-jump', startS: number, endS: number, byS: number) =>
    candidate({ kind, channelId, segment: segmentAt(bench.fired, startS), startS, endS, byS });
  const { leaps, leapAtS } = bench.clock;
  return [
    ...bench.gaps.map((gap) => at('gap', gap.startS, gap.endS, gap.endS - gap.startS)),
    ...leapAtS.map((logS, k) =>
      at('clock-jump', logS - bench.startOffsetS, logS - bench.startOffsetS, leaps[k]?.shiftS ?? 0),
    ),
    ...events
      .filter((event) => event.kind === 'restart' || event.shiftS > bench.limits.clockStepMinS)
      .map((event) => {
        const before = leaps
          .filter((leap) => leap.atMs < event.atMs)
          .reduce((sum, leap) => sum + leap.shiftS, 0);
        const atS = (event.atMs - firstMs) / 1000 - before - bench.startOffsetS;
        return at('clock-jump', atS, atS, -event.shiftS);
      }),
  ];
}
