import type { StripScales } from './scales';

/** A bracket over a stretch of the strip with a few words above it. */
export function Bracket(props: {
  readonly scales: StripScales;
  readonly fromS: number;
  readonly toS: number;
  /** Temperature that the bracket stands above. */
  readonly aboveC: number;
  readonly text: string;
  readonly hot?: boolean;
  /** Steps upwards, where brackets would meet. */
  readonly level?: number;
}) {
  const { scales, level = 0 } = props;
  const from = scales.timePx(props.fromS);
  const to = scales.timePx(props.toS);
  const { box } = scales;
  const className = props.hot ? 'strip-bracket strip-bracket-hot' : 'strip-bracket';
  if (scales.flow === 'down') {
    const right = Math.min(box.leftPx + box.widthPx - 4, scales.tempPx(props.aboveC) + 12);
    return (
      <g className={className}>
        <path d={`M${right - 5} ${from.toFixed(1)}h5V${to.toFixed(1)}h-5`} />
        <title>{props.text}</title>
      </g>
    );
  }
  const y = Math.max(box.topPx + 16, scales.tempPx(props.aboveC) - 24 - level * 30);
  const middle = Math.min(box.leftPx + box.widthPx - 70, Math.max(box.leftPx + 70, (from + to) / 2));
  return (
    <g className={className}>
      <path d={`M${from.toFixed(1)} ${y + 8}v-8H${to.toFixed(1)}v8`} />
      <text x={middle} y={y - 7} textAnchor="middle">
        {props.text}
      </text>
    </g>
  );
}
