import { useMemo } from 'react';
import { cIntervalToF, formatNumber } from '~/lib/units';
import { pathOf } from './leader';
import type { TemperatureUnit } from './Paper';
import { stripScales, type Point } from './scales';
import { ruleTime } from './ticks';
import type { TimeWindow } from './window';

interface DifferenceStripProps {
  readonly shown: TimeWindow;
  /** Same left edge and width as the strip above, so that moments stand beneath one another. */
  readonly leftPx: number;
  readonly widthPx: number;
  readonly heightPx?: number;
  readonly timeS: readonly number[] | Float64Array;
  /** Measured − carried plan, °C; null or NaN where there is none. */
  readonly differenceC: readonly (number | null)[] | Float64Array;
  readonly bandC: number;
  /** What is beyond this is drawn at the edge. */
  readonly limitC?: number;
  readonly temperature: TemperatureUnit;
}

/** Stretches of the line without a gap in them. */
function stretches(
  timeS: ArrayLike<number>,
  value: ArrayLike<number | null>,
  point: (t: number, v: number) => Point,
) {
  const found: Point[][] = [];
  let open: Point[] = [];
  for (let index = 0; index < timeS.length; index += 1) {
    const at = value[index];
    if (at === null || at === undefined || Number.isNaN(at)) {
      if (open.length > 0) found.push(open);
      open = [];
    } else open.push(point(timeS[index] ?? 0, at));
  }
  if (open.length > 0) found.push(open);
  return found;
}

/** Measured − plan beneath the strip, on the same axis of time, with the band within which a hold is held. */
export function DifferenceStrip(props: DifferenceStripProps) {
  const { shown, leftPx, widthPx, heightPx = 104, bandC, temperature, limitC = bandC * 3.2 } = props;
  const scales = useMemo(
    () =>
      stripScales(
        'across',
        { fromS: shown.fromS, toS: shown.toS, minC: -limitC, maxC: limitC },
        { leftPx, topPx: 0, widthPx, heightPx },
      ),
    [shown.fromS, shown.toS, limitC, leftPx, widthPx, heightPx],
  );
  const time = ruleTime(shown.fromS, shown.toS, widthPx);
  const path = stretches(props.timeS, props.differenceC, (timeS, value) =>
    scales.point(timeS, Math.max(-limitC, Math.min(limitC, value))),
  )
    .map(pathOf)
    .join('');
  const clip = `strip-difference-${Math.round(leftPx)}-${Math.round(widthPx)}`;
  const labels = [2 * bandC, 0, -2 * bandC];
  return (
    <div className="strip-difference" aria-hidden="true">
      <svg className="strip-layer" width={leftPx + widthPx + 10} height={heightPx}>
        <clipPath id={clip}>
          <rect x={leftPx} y="0" width={widthPx} height={heightPx} />
        </clipPath>
        <rect className="strip-sheet" x={leftPx} y="0" width={widthPx} height={heightPx} />
        <rect
          className="strip-band"
          x={leftPx}
          y={scales.tempPx(bandC)}
          width={widthPx}
          height={scales.tempPx(-bandC) - scales.tempPx(bandC)}
        />
        <path
          className="strip-coarse"
          d={time.coarse.map((timeS) => `M${Math.round(scales.timePx(timeS)) + 0.5} 0v${heightPx}`).join('')}
        />
        <path className="strip-zero" d={`M${leftPx} ${scales.tempPx(0)}h${widthPx}`} />
        <path className="strip-difference-line" d={path} clipPath={`url(#${clip})`} />
      </svg>
      <svg className="strip-axis strip-numbers" width={leftPx - 2} height={heightPx}>
        {labels.map((value) => {
          const degrees = temperature === 'F' ? cIntervalToF(value) : value;
          return (
            <text key={value} x={leftPx - 18} y={scales.tempPx(value) + 4} textAnchor="end">
              {`${value > 0 ? '+' : ''}${formatNumber(degrees)}`}
            </text>
          );
        })}
      </svg>
    </div>
  );
}
