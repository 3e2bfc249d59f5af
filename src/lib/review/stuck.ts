import { indexAt, type Grid } from './grid';
import { release } from './sensor-stuck';
import type { Sensor } from './sensors';
import type { Stretch } from './spans';
import type { Thresholds } from './thresholds';

/**
 * Which frozen stretches are a stuck sensor: the plan, or another chamber channel, moves by more than the band within the
 * stretch, and the reading leaps when it is released (or never is). Without that leap the kiln may have rested in a hold
 * while a late plan moved on paper only, or the other sensor drifted.
 * @param planAt the plan at seconds from the control channel's first sample
 * @param others other chamber channels on a grid whose origin is that first sample
 */
export function stuckStretches(
  sensor: Sensor,
  planAt: (logS: number) => number,
  others: readonly Grid[],
  limits: Thresholds,
): Stretch[] {
  return sensor.frozen.filter((part) => {
    const fromS = sensor.timeS[part.from]!;
    const toS = sensor.timeS[part.to]!;
    const moved =
      sampled(planAt, fromS, toS) > limits.bandC ||
      others.some((grid) => rangeC(grid, fromS, toS) > limits.bandC);
    const leap = release(sensor.channel.value, part);
    return moved && (leap === null || leap.byC > Math.max(limits.bandC / 2, 2 * leap.thenC));
  });
}

function rangeC(grid: Grid, fromS: number, toS: number): number {
  let low = Infinity;
  let high = -Infinity;
  for (let i = indexAt(grid, fromS); i <= indexAt(grid, toS); i++) {
    if (!grid.known[i]) continue;
    low = Math.min(low, grid.value[i]!);
    high = Math.max(high, grid.value[i]!);
  }
  return high - low;
}

/** Range of a curve over a time, from a sample each minute. */
function sampled(planAt: (logS: number) => number, fromS: number, toS: number): number {
  let low = Infinity;
  let high = -Infinity;
  for (let atS = fromS; atS <= toS; atS += 60) {
    const value = planAt(atS);
    if (value !== value) continue;
    low = Math.min(low, value);
    high = Math.max(high, value);
  }
  return high - low;
}
