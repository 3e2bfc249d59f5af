import { useMemo, useRef, useState, type KeyboardEvent, type WheelEvent } from 'react';
import type { Finding } from '~/lib/contracts/runs';
import { FINDING_TITLES } from '~/lib/review/words';
import { useUnits } from '~/lib/client/units';
import { formatTemperature } from '~/lib/units';
import { clockTime } from '../strip/clock';
import { DifferenceStrip } from '../strip/DifferenceStrip';
import { durationText } from '../strip/duration';
import { Overview } from '../strip/Overview';
import type { StripScales } from '../strip/scales';
import { Strip } from '../strip/Strip';
import { useTimeSelection } from '../strip/useTimeSelection';
import type { TimeWindowControl } from '../strip/useTimeWindow';
import type { TimeWindow } from '../strip/window';
import { spanText } from './FindingCard';
import { FindingLane, findingsNeedPx } from './FindingLane';
import { FindingMarks } from './FindingMarks';
import type { RunReviewProps } from './props';
import { controlOf, differenceOf, layersOf, viewOf } from './view';
import { useSeries } from './use-review';

const BAND_C = 10;

interface ReviewStripProps extends RunReviewProps {
  readonly window: TimeWindowControl;
  readonly shownFindings: readonly Finding[];
  readonly selected: Finding | null;
  readonly onSelect: (id: string | null) => void;
  readonly onStep: (by: number) => void;
  readonly onMark: (stretch: TimeWindow) => void;
  readonly onDecide: (state: Finding['state']) => void;
}

/** Plan, prediction and measurement on one strip, the difference beneath, findings hanging at their moments, and a magnifier. */
export function ReviewStrip(props: ReviewStripProps) {
  const { window: zoom, shownFindings, selected } = props;
  const { temperature } = useUnits();
  const { series, loading } = useSeries(props, zoom.shown, zoom.isZoomed);
  const [hidden, setHidden] = useState<ReadonlySet<string>>(
    new Set(['carried', ...props.series.channels.filter((one) => one.unit !== 'C').map((one) => one.id)]),
  );
  const control = useMemo(
    () => controlOf(series, props.findings[0]?.channelId ?? null),
    [series, props.findings],
  );
  const layers = useMemo(() => layersOf(series, control, hidden), [series, control, hidden]);
  const every = useMemo(
    () => layersOf(props.series, controlOf(props.series, null), new Set()),
    [props.series],
  );
  const view = useMemo(() => viewOf(layers, zoom.shown, zoom.isZoomed), [layers, zoom.shown, zoom.isZoomed]);
  const difference = useMemo(() => differenceOf(series, control), [series, control]);
  const startMs = Date.parse(props.review.startAt);
  const zone = props.me.studio.timeZone;
  const group = useRef<HTMLDivElement>(null);

  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>): void => {
    // Single keys act only while the strip itself has the focus, not from within its cards and fields.
    if (event.target !== group.current || event.ctrlKey || event.metaKey || event.altKey) return;
    const key = event.key.toLowerCase();
    if (key === 'j' || key === 'k') props.onStep(key === 'j' ? 1 : -1);
    else if (key === 'escape') props.onSelect(null);
    else if (key === 'c' && selected && props.mayDecide) props.onDecide('confirmed');
    else if (key === 'd' && selected && props.mayDecide) props.onDecide('dismissed');
    else if (key === 'm' && props.mayDecide) props.onMark(zoom.shown);
    else {
      zoom.key(event);
      return;
    }
    event.preventDefault();
  };
  const onWheel = (event: WheelEvent<HTMLDivElement>): void => {
    if (!event.ctrlKey) return;
    zoom.zoom(event.deltaY < 0 ? 1.25 : 0.8);
  };
  const summary = `Run ${props.run.number}: ${props.review.verdict}. ${shownFindings.length} findings.`;
  return (
    <div>
      <div className="review-bar">
        <div className="review-layers" role="group" aria-label="Curves shown">
          {every.map((layer) => (
            <button
              key={layer.id}
              type="button"
              className="chip"
              aria-pressed={!hidden.has(layer.id)}
              onClick={() => setHidden((before) => toggled(before, layer.id))}
            >
              {layer.name}
            </button>
          ))}
        </div>
        <div className="review-zoom" role="group" aria-label="Zoom">
          <button type="button" className="btn btn-small" onClick={() => zoom.zoom(1.6)} aria-label="Closer">
            +
          </button>
          <button
            type="button"
            className="btn btn-small"
            onClick={() => zoom.zoom(1 / 1.6)}
            disabled={!zoom.isZoomed}
            aria-label="Further"
          >
            −
          </button>
          <button type="button" className="btn btn-small" onClick={zoom.reset} disabled={!zoom.isZoomed}>
            Whole firing
          </button>
          <span className="hint" role="status">
            {loading ? 'Reading' : ''}
          </span>
        </div>
      </div>
      <div
        ref={group}
        className="review-strip"
        role="group"
        tabIndex={0}
        aria-label="Strip of the firing"
        aria-describedby="review-keys"
        data-testid="review-strip"
        onKeyDown={onKeyDown}
        onWheel={onWheel}
      >
        <Strip
          view={view}
          temperature={temperature}
          zone={zone}
          startMs={startMs}
          layers={layers}
          summary={summary}
          table={findingsTable(shownFindings, startMs, zone, temperature, props)}
          neededPx={({ flow }) => findingsNeedPx(shownFindings.length, flow)}
          readout={false}
          over={(scales) => (
            <Overlay
              scales={scales}
              selected={selected}
              findings={shownFindings}
              onSelect={props.onSelect}
              onMark={props.mayDecide ? props.onMark : null}
            />
          )}
          beside={(scales) => (
            <>
              <FindingLane
                scales={scales}
                findings={shownFindings}
                control={control}
                selected={selected?.id ?? null}
                cardOf={(finding) => ({
                  plan: props.run.plan,
                  startMs,
                  zone,
                  selected: finding.id === selected?.id,
                  onSelect: () => props.onSelect(finding.id === selected?.id ? null : finding.id),
                })}
              />
              {scales.flow === 'across' ? (
                <Beneath
                  scales={scales}
                  zoom={zoom}
                  layers={every}
                  difference={difference}
                  temperature={temperature}
                  startMs={startMs}
                  zone={zone}
                />
              ) : null}
            </>
          )}
        />
      </div>
    </div>
  );
}

function toggled(before: ReadonlySet<string>, id: string): ReadonlySet<string> {
  const after = new Set(before);
  if (!after.delete(id)) after.add(id);
  return after;
}

function Overlay(props: {
  readonly scales: StripScales;
  readonly findings: readonly Finding[];
  readonly selected: Finding | null;
  readonly onSelect: (id: string) => void;
  readonly onMark: ((stretch: TimeWindow) => void) | null;
}) {
  const { scales } = props;
  const { selecting, ground } = useTimeSelection(scales, (stretch) => props.onMark?.(stretch));
  const { box } = scales;
  const area = selecting && {
    from: scales.timePx(selecting.fromS),
    length: (selecting.toS - selecting.fromS) * scales.pxPerS,
  };
  return (
    <>
      {props.onMark ? (
        <rect
          className="strip-ground"
          x={box.leftPx}
          y={box.topPx}
          width={box.widthPx}
          height={box.heightPx}
          {...ground}
        />
      ) : null}
      <FindingMarks
        scales={scales}
        findings={props.findings}
        selected={props.selected?.id ?? null}
        onSelect={props.onSelect}
      />
      {area ? (
        <rect
          className="strip-selection"
          x={scales.flow === 'across' ? area.from : box.leftPx}
          y={scales.flow === 'across' ? box.topPx : area.from}
          width={scales.flow === 'across' ? area.length : box.widthPx}
          height={scales.flow === 'across' ? box.heightPx : area.length}
        />
      ) : null}
    </>
  );
}

function Beneath(props: {
  readonly scales: StripScales;
  readonly zoom: TimeWindowControl;
  readonly layers: ReturnType<typeof layersOf>;
  readonly difference: ReturnType<typeof differenceOf>;
  readonly temperature: 'C' | 'F';
  readonly startMs: number;
  readonly zone: string;
}) {
  const { scales, zoom, startMs, zone } = props;
  const { leftPx, widthPx } = scales.box;
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
      <p className="review-difference-name hint">
        measured − plan carried along, band ± {props.temperature === 'F' ? (BAND_C * 9) / 5 : BAND_C} °
        {props.temperature}
      </p>
      <Overview
        view={whole}
        layers={props.layers.filter((layer) => layer.kind === 'planned' || layer.kind === 'measured')}
        shown={zoom.shown}
        onShow={zoom.show}
        widthPx={widthPx}
        leftPx={leftPx}
        valueText={`${moment(zoom.shown.fromS)} to ${moment(zoom.shown.toS)}, ${durationText(zoom.shown.toS - zoom.shown.fromS)} of ${durationText(zoom.whole.toS - zoom.whole.fromS)}`}
      />
    </>
  );
}

function findingsTable(
  findings: readonly Finding[],
  startMs: number,
  zone: string,
  temperature: 'C' | 'F',
  props: RunReviewProps,
) {
  return {
    caption: `Findings of run ${props.run.number}`,
    columns: ['Finding', 'When', 'Segment', 'Peak', 'State'],
    rows: findings.map((finding) => [
      FINDING_TITLES[finding.kind],
      spanText(finding, startMs, zone),
      finding.segment === null ? '' : String(finding.segment + 1),
      finding.peakC === null ? '' : formatTemperature(finding.peakC, temperature),
      finding.state,
    ]),
  };
}
