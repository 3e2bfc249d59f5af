import { useId, useMemo, useRef, useState, type ReactNode } from 'react';
import { Curves } from './Curves';
import type { StripLayer } from './layers';
import { Axis, Paper, type TemperatureUnit } from './Paper';
import { Readout } from './Readout';
import { stripScales, type Flow, type StripScales, type StripView } from './scales';
import { StripTable, type StripTableContent } from './StripTable';
import './strip.css';
import './touch.css';
import { useSize } from './useSize';

/** Narrower than this the strip stands upright. */
export const UPRIGHT_BELOW_PX = 640;

export interface StripPlan {
  readonly flow: Flow;
  /** Room that is there, px. */
  readonly widthPx: number;
}

export interface StripProps {
  readonly view: StripView;
  readonly temperature: TemperatureUnit;
  readonly zone: string;
  /** Instant of the run's start, ms; null where there is none: the strip then shows run time only. */
  readonly startMs: number | null;
  readonly layers: readonly StripLayer[];
  /** Name of the chart for those who do not see it, one sentence. */
  readonly summary: string;
  readonly table: StripTableContent;
  /** Length that the axis of time needs at least, px: the strip then scrolls like a roll. */
  readonly neededPx?: (plan: StripPlan) => number;
  /** Width of the curve when upright; what remains is for cards. */
  readonly uprightPlotPx?: number;
  readonly heightPx?: number;
  /** Overlays under the curves (hatching, marks), over them (handles, brackets), and beneath or beside (cards). */
  readonly under?: (scales: StripScales) => ReactNode;
  readonly over?: (scales: StripScales) => ReactNode;
  readonly beside?: (scales: StripScales, roomPx: number) => ReactNode;
  /** Shows moment and values under the pointer. */
  readonly readout?: boolean;
}

const MARGIN = { leftPx: 68, rightPx: 10, topPx: 30, bottomPx: 30 };
const UPRIGHT_MARGIN = { leftPx: 58, topPx: 34, bottomPx: 10 };

function useStripScales(props: StripProps, widthPx: number): StripScales {
  const { view, neededPx, heightPx = 370, uprightPlotPx = 96 } = props;
  const flow: Flow = widthPx < UPRIGHT_BELOW_PX ? 'down' : 'across';
  const needed = neededPx?.({ flow, widthPx }) ?? 0;
  return useMemo(() => {
    if (flow === 'down')
      return stripScales(flow, view, {
        leftPx: UPRIGHT_MARGIN.leftPx,
        topPx: UPRIGHT_MARGIN.topPx,
        widthPx: uprightPlotPx,
        heightPx: Math.max(420, needed),
      });
    return stripScales(flow, view, {
      leftPx: MARGIN.leftPx,
      topPx: MARGIN.topPx,
      widthPx: Math.max(200, widthPx - MARGIN.leftPx - MARGIN.rightPx, needed),
      heightPx,
    });
  }, [flow, view, widthPx, needed, heightPx, uprightPlotPx]);
}

function StripBody(props: StripProps & { readonly widthPx: number }) {
  const { widthPx, layers, temperature, zone, startMs } = props;
  const scales = useStripScales(props, widthPx);
  const [top, setTop] = useState<SVGGElement | null>(null);
  const { box, flow } = scales;
  const across = flow === 'across';
  const fullWidth = across ? box.leftPx + box.widthPx + MARGIN.rightPx : widthPx;
  const fullHeight = box.topPx + box.heightPx + (across ? MARGIN.bottomPx : UPRIGHT_MARGIN.bottomPx);
  const size = { width: fullWidth, height: fullHeight };
  const rolls = across && fullWidth > widthPx + 1;
  return (
    <div className="strip-roll" data-flow={flow} style={across ? { width: fullWidth } : undefined}>
      <div className="strip-chart" style={size}>
        <svg {...size} className="strip-layer" aria-hidden="true">
          <Paper scales={scales} temperature={temperature} startMs={startMs} zone={zone} axis={!rolls} />
          {props.under?.(scales)}
        </svg>
        <Curves scales={scales} layers={layers} />
        <svg {...size} className="strip-layer">
          {props.readout === false ? null : (
            <Readout
              scales={scales}
              layers={layers}
              temperature={temperature}
              startMs={startMs}
              zone={zone}
              top={top}
            />
          )}
          {props.over?.(scales)}
          <g ref={setTop} />
        </svg>
        {rolls ? (
          <svg className="strip-axis" width={box.leftPx - 2} height={fullHeight} aria-hidden="true">
            <Axis scales={scales} temperature={temperature} />
          </svg>
        ) : null}
      </div>
      {props.beside?.(scales, widthPx)}
    </div>
  );
}

/**
 * The strip: curves on recorder's paper with clock time above and run time below, and whatever hangs on them. It takes
 * the width it is given; below {@link UPRIGHT_BELOW_PX} it stands upright. Every chart carries its figures as a table.
 */
export function Strip(props: StripProps) {
  const frame = useRef<HTMLDivElement>(null);
  const size = useSize(frame);
  const id = useId();
  return (
    <figure className="strip" aria-labelledby={id}>
      <figcaption id={id} className="strip-hidden">
        {props.summary}
      </figcaption>
      <div ref={frame} className="strip-frame">
        {size === null ? (
          <noscript>
            <p className="notice">
              The strip is drawn by a script, which is switched off in this browser. Its figures stand below.
            </p>
          </noscript>
        ) : (
          <StripBody {...props} widthPx={size.widthPx} />
        )}
      </div>
      <StripTable content={props.table} />
    </figure>
  );
}
