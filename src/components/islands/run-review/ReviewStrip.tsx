import { useEffect, useMemo, useRef, useState, type KeyboardEvent, type RefObject } from 'react';
import type { Finding } from '~/lib/contracts/runs';
import { FINDING_TITLES } from '~/lib/review/words';
import { useUnits } from '~/lib/client/units';
import { formatTemperature } from '~/lib/units';
import { Strip } from '../strip/Strip';
import type { TimeWindowControl } from '../strip/useTimeWindow';
import type { TimeWindow } from '../strip/window';
import { Beneath } from './Beneath';
import { spanText } from './FindingCard';
import { FindingLane, findingsNeedPx, findingsWithin } from './FindingLane';
import { MarkGround } from './MarkGround';
import type { RunReviewProps } from './props';
import { ReviewBar } from './ReviewBar';
import { controlOf, differenceOf, layersOf, viewOf } from './view';
import { useSeries } from './use-review';

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
  const { series, loading, failed } = useSeries(props, zoom.shown, zoom.isZoomed);
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
  useWheelZoom(group, zoom);
  const standing = loading ? 'Reading' : failed ? 'It could not be read closer, and is shown as it was.' : '';
  const summary = `Run ${props.run.number}: ${props.review.verdict.replace(/\.*$/, '.')} ${shownFindings.length} ${shownFindings.length === 1 ? 'finding' : 'findings'}.`;
  return (
    <div>
      <ReviewBar
        layers={every}
        hidden={hidden}
        onToggle={(id) => setHidden((before) => toggled(before, id))}
        zoom={zoom}
        onMark={props.mayDecide ? props.onMark : null}
        standing={standing}
      />
      <div
        ref={group}
        className="review-strip"
        role="group"
        tabIndex={0}
        aria-label="Strip of the firing"
        aria-describedby="review-keys"
        data-testid="review-strip"
        onKeyDown={onKeyDown}
      >
        <Strip
          view={view}
          temperature={temperature}
          zone={zone}
          startMs={startMs}
          layers={layers}
          summary={summary}
          table={findingsTable(shownFindings, startMs, zone, temperature, props)}
          neededPx={({ flow }) => findingsNeedPx(findingsWithin(shownFindings, view).length, flow)}
          readout={false}
          over={(scales) => (
            <MarkGround
              scales={scales}
              selected={selected}
              findings={shownFindings}
              onSelect={props.onSelect}
              onMark={props.mayDecide ? props.onMark : null}
            />
          )}
          beside={(scales, roomPx) => (
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
              <Beneath
                scales={scales}
                roomPx={roomPx}
                zoom={zoom}
                layers={every}
                difference={difference}
                temperature={temperature}
                startMs={startMs}
                zone={zone}
              />
            </>
          )}
        />
      </div>
    </div>
  );
}

/** Ctrl and the wheel zoom the strip, not the page: the browser takes that as settled unless it is told at once. */
function useWheelZoom(area: RefObject<HTMLElement | null>, { zoom }: TimeWindowControl): void {
  useEffect(() => {
    const element = area.current;
    const onWheel = (event: WheelEvent): void => {
      if (!event.ctrlKey) return;
      event.preventDefault();
      zoom(event.deltaY < 0 ? 1.25 : 0.8);
    };
    element?.addEventListener('wheel', onWheel, { passive: false });
    return () => element?.removeEventListener('wheel', onWheel);
  }, [area, zoom]);
}

function toggled(before: ReadonlySet<string>, id: string): ReadonlySet<string> {
  const after = new Set(before);
  if (!after.delete(id)) after.add(id);
  return after;
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
