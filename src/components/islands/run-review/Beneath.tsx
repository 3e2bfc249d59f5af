import { useMemo } from 'react';
import { clockTime } from '../strip/clock';
import { DifferenceStrip } from '../strip/DifferenceStrip';
import { durationText } from '../strip/duration';
import { Overview } from '../strip/Overview';
import type { StripScales } from '../strip/scales';
import type { TimeWindowControl } from '../strip/useTimeWindow';
import { viewOf, type differenceOf, type layersOf } from './view';

const BAND_C = 10;
/** Room for the figures of the difference beneath an upright strip, px. */
const UPRIGHT_LEFT_PX = 46;

/** Beneath the strip: how far the measured curve was from the plan, and the whole firing in small. */
export function Beneath(props: {
  readonly scales: StripScales;
  /** Width that is in sight, px: the strip may be longer and roll. */
  readonly roomPx: number;
  readonly zoom: TimeWindowControl;
  readonly layers: ReturnType<typeof layersOf>;
  readonly difference: ReturnType<typeof differenceOf>;
  readonly temperature: 'C' | 'F';
  readonly startMs: number;
  readonly zone: string;
}) {
  const { scales, roomPx, zoom, startMs, zone } = props;
  const across = scales.flow === 'across';
  const { leftPx, widthPx } = across
    ? scales.box
    : { leftPx: UPRIGHT_LEFT_PX, widthPx: roomPx - UPRIGHT_LEFT_PX - 10 };
  const whole = useMemo(() => viewOf(props.layers, zoom.whole, false), [props.layers, zoom.whole]);
  const moment = (timeS: number) => clockTime(startMs + timeS * 1000, zone);
  return (
    <>
      <DifferenceStrip
        shown={zoom.shown}
        leftPx={leftPx}
        widthPx={widthPx}
        timeS={props.difference.timeS}
        differenceC={props.difference.differenceC}
        bandC={BAND_C}
        temperature={props.temperature}
      />
      <p className="review-difference-name hint" style={{ paddingLeft: leftPx }}>
        measured − plan carried along, band ± {props.temperature === 'F' ? (BAND_C * 9) / 5 : BAND_C} °
        {props.temperature}
      </p>
      <div className="review-overview" style={{ width: roomPx }}>
        <Overview
          view={whole}
          layers={props.layers.filter((layer) => layer.kind === 'planned' || layer.kind === 'measured')}
          shown={zoom.shown}
          onShow={zoom.show}
          widthPx={roomPx - leftPx - 10}
          leftPx={leftPx}
          valueText={`${moment(zoom.shown.fromS)} to ${moment(zoom.shown.toS)}, ${durationText(zoom.shown.toS - zoom.shown.fromS)} of ${durationText(zoom.whole.toS - zoom.whole.fromS)}`}
        />
      </div>
    </>
  );
}
