import { useId } from 'react';
import { pathOf } from './leader';
import type { StripScales } from './scales';

/** A hatched area from the foot of the strip: what is left of something, its whole height standing for all of it. */
export function Hatch(props: {
  readonly scales: StripScales;
  readonly timeS: readonly number[];
  readonly share: readonly number[];
  /** Height for a share of 1, as a share of the strip. */
  readonly heightShare: number;
  readonly label: string;
}) {
  const id = useId();
  const { scales, timeS, share, heightShare } = props;
  const { view } = scales;
  const heat = (value: number): number => view.minC + (view.maxC - view.minC) * heightShare * value;
  const lastUsed = share.findLastIndex((value) => value > 0.002);
  if (lastUsed < 1) return null;
  const points = timeS.slice(0, lastUsed + 2).map((t, index) => scales.point(t, heat(share[index] ?? 0)));
  const start = scales.point(timeS[0] ?? 0, view.minC);
  const end = scales.point(timeS[Math.min(lastUsed + 1, timeS.length - 1)] ?? 0, view.minC);
  const label = scales.point(timeS[0] ?? 0, heat(share[0] ?? 1));
  return (
    <g className="strip-hatch">
      <pattern id={id} width="6" height="6" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">
        <path d="M3 0v6" />
      </pattern>
      <path d={`${pathOf([start, ...points, end])}Z`} fill={`url(#${id})`} />
      {scales.flow === 'across' ? (
        <text className="strip-words" x={label.x + 24} y={label.y - 7}>
          {props.label}
        </text>
      ) : null}
    </g>
  );
}
