import { overshoots, undershoots } from './band-findings';
import type { Bench, Candidate } from './bench';
import { reachOf } from './causes';
import { openings, powerCuts } from './falls';
import type { Grid } from './grid';
import { endedEarly, lateLegs } from './hold-findings';
import { onGrid, shifted, type Measured } from './measured';
import type { Leg } from './plan';
import { stalls, steepRamps } from './rate-findings';
import { clockFindings, disagreements, sensorFindings } from './sensor-findings';
import { withoutStuck, type Sensor } from './sensors';
import type { Span, Stretch } from './spans';

/** The stuck stretches of each examined channel. */
export type StuckBy = ReadonlyMap<Sensor, readonly Stretch[]>;

/** Everything that any definition catches inside the run, before causes are sorted out. Holds are judged after that. */
export function allCandidates(
  bench: Bench,
  log: Measured,
  stuckBy: StuckBy,
  legs: readonly Leg[],
  power: Grid | null,
): Candidate[] {
  const sensors = [log.control, ...log.others].flatMap((s) => sensorFindings(bench, s, stuckBy.get(s) ?? []));
  const disagree = log.others
    .filter((s) => s.channel.role === 'chamber' && log.control.channel.role === 'chamber')
    .flatMap((s) => {
      const sound = withoutStuck(s, stuckBy.get(s) ?? []);
      return disagreements(bench, s, shifted(onGrid(sound, log.clock), bench.startOffsetS));
    });
  const opened = openings(bench);
  const cuts = powerCuts(bench, power, opened);
  const setBack: Span[] = [...opened, ...cuts].map(reachOf);
  const stalled = stalls(bench, setBack);
  const explained = [...setBack, ...stalled.map(reachOf)];
  const lastHold = [...legs].reverse().find((leg) => leg.holdS > 0) ?? null;
  return [
    ...sensors,
    ...clockFindings(bench, bench.input.clockEvents, log.firstMs),
    ...disagree,
    ...opened,
    ...cuts,
    ...stalled,
    ...lateLegs(bench),
    ...steepRamps(bench, explained),
    ...overshoots(bench),
    ...undershoots(bench),
    ...endedEarly(bench, legs.length, lastHold),
  ].filter((one) => one.endS >= 0 && one.startS <= bench.runEndS && (one.endS > 0 || one.startS >= 0));
}
