import { useId } from 'react';
import { LINE_PX, wordsPx, type Rect } from './label-places';
import { pathOf } from './leader';
import type { StripScales } from './scales';

export interface HatchPlan {
  readonly scales: StripScales;
  readonly timeS: readonly number[];
  /** 0 to 1. */
  readonly share: readonly number[];
  /** Height for a share of 1, as a share of the strip. */
  readonly heightShare: number;
}

const heatOf = ({ scales: { view }, heightShare }: HatchPlan, share: number): number =>
  view.minC + (view.maxC - view.minC) * heightShare * share;

/** Where the name of a hatched area would stand best: above its beginning. */
export function hatchName(plan: HatchPlan, text: string): Rect {
  const { x, y } = plan.scales.point(plan.timeS[0] ?? 0, heatOf(plan, plan.share[0] ?? 1));
  return { x: x + 22, y: y - LINE_PX - 4, width: wordsPx(text), height: LINE_PX };
}

/** The area as rectangles that words must not cover. */
export function hatchRects(plan: HatchPlan): Rect[] {
  const { scales, timeS, share } = plan;
  return timeS.slice(1).flatMap((endS, index) => {
    const [from, to] = [scales.timePx(timeS[index] ?? 0), scales.timePx(endS)];
    const y = scales.tempPx(heatOf(plan, share[index] ?? 0));
    const height = scales.tempPx(scales.view.minC) - y;
    return height > 1 ? [{ x: from, y, width: to - from, height }] : [];
  });
}

/** A hatched area from the foot of the strip: what is left of something, its whole height standing for all of it. */
export function Hatch(plan: HatchPlan) {
  const id = useId();
  const { scales, timeS, share } = plan;
  const lastUsed = share.findLastIndex((value) => value > 0.002);
  if (lastUsed < 1) return null;
  const points = timeS
    .slice(0, lastUsed + 2)
    .map((t, index) => scales.point(t, heatOf(plan, share[index] ?? 0)));
  const start = scales.point(timeS[0] ?? 0, scales.view.minC);
  const end = scales.point(timeS[Math.min(lastUsed + 1, timeS.length - 1)] ?? 0, scales.view.minC);
  return (
    <g className="strip-hatch">
      <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <path d="M3 0v6" />
      </pattern>
      <path d={`${pathOf([start, ...points, end])}Z`} fill={`url(#${id})`} />
    </g>
  );
}
