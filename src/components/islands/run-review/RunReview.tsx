import { islandProps } from '~/lib/client/island-props';
import { useCallback, useMemo, useState } from 'react';
import { ServerData } from '~/lib/client/query';
import { UnitsProvider } from '~/lib/client/units';
import { STAGE_NAMES } from '~/components/words/names';
import type { Finding } from '~/lib/contracts/runs';
import { FINDING_TITLES } from '~/lib/review/words';
import { useTimeWindow } from '../strip/useTimeWindow';
import type { TimeWindow } from '../strip/window';
import { AddFinding } from './AddFinding';
import { AlignmentPanel } from './AlignmentPanel';
import { STATE_WORDS } from './FindingCard';
import { FindingPanel } from './FindingPanel';
import { runReviewPropsSchema, type RunReviewProps } from './props';
import { ReviewFigures } from './ReviewFigures';
import { ReviewStrip } from './ReviewStrip';
import './run-review.css';
import './findings.css';
import { SegmentsRow } from './SegmentsRow';
import { useFindings, type NewFinding } from './use-review';
import { around } from './view';

/** The review of a run: verdict and figures, the strip, its findings and what is said of each. */
export default function RunReview(given: RunReviewProps) {
  const props = useMemo(() => islandProps(runReviewPropsSchema, given), [given]);
  return (
    <ServerData>
      <UnitsProvider units={props.me.preferences.units ?? props.me.studio.units}>
        <ReviewDesk {...props} />
      </UnitsProvider>
    </ServerData>
  );
}

function placeOf(finding: Finding, props: RunReviewProps): string {
  const segment = finding.segment === null ? null : props.run.plan.segments[finding.segment];
  const channel = props.series.channels.find((one) => one.id === finding.channelId)?.name;
  return [
    segment ? `${STAGE_NAMES[segment.stage]}, segment ${(finding.segment ?? 0) + 1}` : 'whole firing',
    channel,
  ]
    .filter(Boolean)
    .join(' · ');
}

function ReviewDesk(props: RunReviewProps) {
  const { fromS, toS } = props.series;
  const { findings, decide, add } = useFindings(props);
  const [selectedId, setSelectedId] = useState<string | null>(null);
  const [marking, setMarking] = useState<TimeWindow | null>(null);
  const selected = findings.find((finding) => finding.id === selectedId) ?? null;
  const mainS = selected && (selected.startS + selected.endS) / 2;
  const zoom = useTimeWindow(
    useMemo(() => ({ fromS, toS }), [fromS, toS]),
    mainS,
  );
  const { isZoomed, show } = zoom;

  const step = useCallback(
    (by: number): void => {
      const at = findings.findIndex((finding) => finding.id === selectedId);
      const next =
        at < 0 ? (by > 0 ? 0 : findings.length - 1) : (at + by + findings.length) % findings.length;
      const finding = findings[next];
      if (!finding) return;
      setSelectedId(finding.id);
      if (isZoomed) show(around(finding));
    },
    [findings, selectedId, isZoomed, show],
  );
  const change = (body: Partial<Pick<Finding, 'state' | 'remark' | 'followUp'>>): void => {
    if (selected) decide.mutate({ finding: selected, ...body });
  };
  const mark = (finding: NewFinding): void =>
    add.mutate(finding, {
      onSuccess: (made) => {
        setMarking(null);
        setSelectedId(made.id);
      },
    });
  return (
    <div className="run-review">
      <div className="review-head">
        <p className="review-verdict">{props.review.verdict.replace(/\.*$/, '.')}</p>
        <ReviewFigures figures={props.review.figures} />
      </div>
      <ReviewStrip
        {...props}
        window={zoom}
        shownFindings={findings}
        selected={selected}
        onSelect={setSelectedId}
        onStep={step}
        onMark={setMarking}
        onDecide={(state) => change({ state })}
      />
      {selected ? (
        <FindingPanel
          key={selected.id}
          finding={selected}
          place={placeOf(selected, props)}
          plan={props.run.plan}
          startMs={Date.parse(props.review.startAt)}
          zone={props.me.studio.timeZone}
          mayDecide={props.mayDecide}
          saving={decide.isPending}
          problem={decide.error}
          onChange={change}
          onStep={step}
          onClose={() => setSelectedId(null)}
        />
      ) : null}
      {findings.length === 0 ? (
        <p className="hint">The review found nothing to say against this firing.</p>
      ) : null}
      <p id="review-keys" className="hint review-keys">
        {findings.length === 0 ? '' : 'J and K step through findings, C confirms, D dismisses. '}+ and − zoom,
        0 shows the whole.{' '}
        {props.mayDecide ? 'Drag across the strip to mark a finding, or press M for what is shown.' : ''}
      </p>
      <p className="sr-only" role="status">
        {decide.isSuccess && selected
          ? `${FINDING_TITLES[selected.kind]}, ${STATE_WORDS[selected.state]}`
          : ''}
      </p>
      <SegmentsRow plan={props.run.plan} segments={props.review.segments} />
      <AlignmentPanel {...props} />
      {marking ? (
        <AddFinding
          stretch={marking}
          startMs={Date.parse(props.review.startAt)}
          zone={props.me.studio.timeZone}
          saving={add.isPending}
          problem={add.error}
          onAdd={mark}
          onClose={() => setMarking(null)}
        />
      ) : null}
    </div>
  );
}
