import { useId, useMemo } from 'react';
import { clockTicks } from './clock';
import { cToF, fToC, type UnitPreferences } from '~/lib/units';
import { runTimeText } from './duration';
import { GLOW_STOPS } from './glow-stops';
import type { StripScales } from './scales';
import { ruleDegrees, ruleTime, type Ruling } from './ticks';

export type TemperatureUnit = UnitPreferences['temperature'];
export const shownDegrees = (tempC: number, unit: TemperatureUnit): number =>
  unit === 'F' ? cToF(tempC) : tempC;
export const celsiusOf = (shown: number, unit: TemperatureUnit): number =>
  unit === 'F' ? fToC(shown) : shown;

export interface PaperProps {
  readonly scales: StripScales;
  readonly temperature: TemperatureUnit;
  /** Instant of the run's start; null: run time only. */
  readonly startMs: number | null;
  readonly zone: string;
  /** False where the axis of temperature stands apart, because the strip scrolls under it. */
  readonly axis?: boolean;
}

const crisp = (px: number): number => Math.round(px) + 0.5;

function Lines(props: {
  scales: StripScales;
  time: readonly number[];
  heatC: readonly number[];
  className: string;
}) {
  const { scales } = props;
  const { leftPx, topPx, widthPx, heightPx } = scales.box;
  const across = scales.flow === 'across';
  const upright = (px: number): string => `M${crisp(px)} ${topPx}v${heightPx}`;
  const level = (px: number): string => `M${leftPx} ${crisp(px)}h${widthPx}`;
  const d = [
    ...props.time.map((timeS) => (across ? upright : level)(scales.timePx(timeS))),
    ...props.heatC.map((tempC) => (across ? level : upright)(scales.tempPx(tempC))),
  ].join('');
  return <path className={props.className} d={d} />;
}

/** The narrow strip at the axis of temperature, in the colours of heat. */
function Glow({ scales }: Pick<PaperProps, 'scales'>) {
  const id = useId();
  const { view, box, flow } = scales;
  const across = flow === 'across';
  const offset = (tempC: number): string =>
    `${(((tempC - view.minC) / (view.maxC - view.minC)) * 100).toFixed(2)}%`;
  const rect = across
    ? { x: box.leftPx - 11, y: box.topPx, width: 7, height: box.heightPx }
    : { x: box.leftPx, y: box.topPx - 11, width: box.widthPx, height: 7 };
  return (
    <g className="strip-glow">
      <linearGradient id={id} x1="0" x2={across ? '0' : '1'} y1={across ? '1' : '0'} y2="0">
        {GLOW_STOPS.map((stop) => (
          <stop
            key={stop.tempC}
            offset={offset(stop.tempC)}
            stopColor={stop.colour}
            stopOpacity={stop.opacity}
          />
        ))}
      </linearGradient>
      <rect {...rect} className="strip-glow-bed" />
      <rect {...rect} fill={`url(#${id})`} />
    </g>
  );
}

/** Temperatures that are ruled and labelled, in the unit shown. */
function useHeatRuling({ view, box, flow }: StripScales, temperature: TemperatureUnit): Ruling {
  const lengthPx = flow === 'across' ? box.heightPx : box.widthPx;
  return useMemo(
    () =>
      ruleDegrees(shownDegrees(view.minC, temperature), shownDegrees(view.maxC, temperature), lengthPx, 44),
    [view.minC, view.maxC, temperature, lengthPx],
  );
}

function HeatLabels({ scales, temperature }: Pick<PaperProps, 'scales' | 'temperature'>) {
  const { box, flow } = scales;
  const across = flow === 'across';
  const heat = useHeatRuling(scales, temperature);
  return (
    <g className="strip-numbers">
      {heat.labelled.map((shown) => {
        const px = scales.tempPx(celsiusOf(shown, temperature));
        return across ? (
          <text key={shown} x={box.leftPx - 18} y={px + 4} textAnchor="end">
            {shown}
          </text>
        ) : (
          <text key={shown} x={px} y={box.topPx - 16} textAnchor="middle">
            {shown}
          </text>
        );
      })}
      <text
        className="strip-words"
        x={across ? box.leftPx - 40 : box.leftPx - 18}
        y={across ? box.topPx - 12 : box.topPx - 16}
        textAnchor="end"
      >
        {temperature === 'F' ? '°F' : '°C'}
      </text>
    </g>
  );
}

function TimeLabels({
  scales,
  time,
  startMs,
  zone,
  axis,
}: Omit<PaperProps, 'temperature'> & { time: Ruling }) {
  const { box, flow, view } = scales;
  const across = flow === 'across';
  // A label at the very end would be cut off in its middle, one at the beginning would stand beneath the axis.
  const inside = (px: number) => {
    if (px + 22 > box.leftPx + box.widthPx + 10)
      return { x: box.leftPx + box.widthPx + 8, textAnchor: 'end' } as const;
    return axis === false && px - 20 < box.leftPx
      ? ({ x: box.leftPx + 2, textAnchor: 'start' } as const)
      : ({ x: px, textAnchor: 'middle' } as const);
  };
  const clock = useMemo(
    () =>
      startMs === null
        ? []
        : clockTicks(startMs, view.fromS, view.toS, Math.max(60, time.stepLabelled), zone),
    [startMs, view.fromS, view.toS, time.stepLabelled, zone],
  );
  return (
    <g className="strip-numbers">
      {clock.map((tick) => {
        const px = scales.timePx(tick.atS);
        const day = tick.day ? <tspan className="strip-words">{`${tick.day.slice(0, 3)} `}</tspan> : null;
        return across ? (
          <text key={tick.atS} className="strip-clock" y={box.topPx - 12} {...inside(px)}>
            {day}
            {tick.text}
          </text>
        ) : (
          <text key={tick.atS} className="strip-clock" x={box.leftPx - 10} y={px + 4} textAnchor="end">
            {tick.text}
          </text>
        );
      })}
      {(across || startMs === null) &&
        time.labelled.map((timeS) => {
          const px = scales.timePx(timeS);
          return (
            <text
              key={timeS}
              y={across ? box.topPx + box.heightPx + 19 : px + 4}
              {...(across ? inside(px) : { x: box.leftPx - 10, textAnchor: 'end' })}
            >
              {runTimeText(timeS, time.stepLabelled)}
            </text>
          );
        })}
    </g>
  );
}

/** The axis of temperature: its numbers, and the strip of glow. */
export function Axis({ scales, temperature }: Pick<PaperProps, 'scales' | 'temperature'>) {
  return (
    <>
      <Glow scales={scales} />
      <HeatLabels scales={scales} temperature={temperature} />
    </>
  );
}

/** The paper: sheet, fine and coarse ruling as on a recorder's roll, glow at the axis, clock above, run time below. */
export function Paper({ scales, temperature, startMs, zone, axis = true }: PaperProps) {
  const { box, flow, view } = scales;
  const across = flow === 'across';
  const time = useMemo(
    () => ruleTime(view.fromS, view.toS, across ? box.widthPx : box.heightPx, across ? 100 : 58),
    [view.fromS, view.toS, across, box.widthPx, box.heightPx],
  );
  const heat = useHeatRuling(scales, temperature);
  const inC = (shown: readonly number[]): number[] => shown.map((degrees) => celsiusOf(degrees, temperature));
  return (
    <g aria-hidden="true">
      <rect
        className="strip-sheet"
        x={box.leftPx}
        y={box.topPx}
        width={Math.max(0, box.widthPx)}
        height={Math.max(0, box.heightPx)}
      />
      <Lines scales={scales} time={time.fine} heatC={inC(heat.fine)} className="strip-fine" />
      <Lines scales={scales} time={time.coarse} heatC={inC(heat.coarse)} className="strip-coarse" />
      {axis ? <Axis scales={scales} temperature={temperature} /> : null}
      <TimeLabels scales={scales} time={time} startMs={startMs} zone={zone} axis={axis} />
    </g>
  );
}
