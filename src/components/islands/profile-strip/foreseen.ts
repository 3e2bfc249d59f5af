import type { Estimate } from '~/lib/thermal/estimate-schema';
import { clockTime } from '../strip/clock';
import { durationText } from '../strip/duration';

/**
 * One line for a segment's card: a stop or caution that lies in it, else that the moulds become ready in it. The
 * gravest first; the whole sentence stands beneath the strip.
 */
export function foreseenAt(
  index: number,
  estimate: Estimate | null,
  startMs: number | null,
  zone: string,
): { text: string; hot: boolean } | null {
  if (!estimate) return null;
  const here = estimate.cautions.filter((caution) => caution.segment === index);
  const stops = here.filter((caution) => caution.severity === 'stop').length;
  const warnings = here.filter((caution) => caution.severity === 'warn').length;
  if (stops > 0) return { text: stops === 1 ? 'a stop, see below' : `${stops} stops, see below`, hot: true };
  if (warnings > 0)
    return { text: warnings === 1 ? 'a caution, see below' : `${warnings} cautions, see below`, hot: false };
  const timed = estimate.segments[index];
  const { readyS } = estimate;
  if (timed && readyS !== null && readyS >= timed.startS && readyS <= timed.endS)
    return {
      text: `ready to pour from ${startMs === null ? `+${durationText(readyS)}` : clockTime(startMs + readyS * 1000, zone)}`,
      hot: false,
    };
  return null;
}
