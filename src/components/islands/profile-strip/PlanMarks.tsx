import type { PlannedCurve } from '~/lib/profile/planned';
import type { Caution, Estimate } from '~/lib/thermal/estimate-schema';
import { formatInterval, type UnitPreferences } from '~/lib/units';
import { Bracket } from '../strip/Bracket';
import { durationText } from '../strip/duration';
import { Hatch } from '../strip/Hatch';
import { ASIDE_SHARE, type StripLayer } from '../strip/layers';
import type { StripScales } from '../strip/scales';
import { asidePeaks, largestLag, lateSegments, type LayerId } from './layers-shown';

interface MarksProps {
  readonly scales: StripScales;
  readonly planned: PlannedCurve;
  readonly estimate: Estimate | null;
  readonly shown: ReadonlySet<LayerId>;
  readonly selected: number | null;
  readonly pointed: Caution | null;
}

/** Height of the hatching for all of the pattern, as a share of the strip. */
const PATTERN_SHARE = 0.2;

function Stretch(props: { scales: StripScales; fromS: number; toS: number; className: string }) {
  const { box, flow } = props.scales;
  const from = props.scales.timePx(props.fromS);
  const length = Math.max(2, props.scales.timePx(props.toS) - from);
  return flow === 'across' ? (
    <rect className={props.className} x={from} y={box.topPx} width={length} height={box.heightPx} />
  ) : (
    <rect className={props.className} x={box.leftPx} y={from} width={box.widthPx} height={length} />
  );
}

function Boundaries({ scales, planned }: Pick<MarksProps, 'scales' | 'planned'>) {
  const { box, flow } = scales;
  const d = planned.legs
    .map((leg) => {
      const px = Math.round(scales.timePx(leg.endS)) + 0.5;
      return flow === 'across'
        ? `M${px} ${box.topPx}v${box.heightPx}`
        : `M${box.leftPx} ${px}h${box.widthPx}`;
    })
    .join('');
  return <path className="strip-boundary" d={d} />;
}

/** Beneath the curves: the selected stretch, where a caution points, the pattern that is left, ends of segments. */
export function MarksUnder({ scales, planned, estimate, shown, selected, pointed }: MarksProps) {
  const leg = selected === null ? undefined : planned.legs[selected];
  const at = pointed?.segment === null || pointed === null ? undefined : planned.legs[pointed.segment];
  const { curve } = estimate ?? {};
  return (
    <g aria-hidden="true">
      {leg ? <Stretch scales={scales} fromS={leg.startS} toS={leg.endS} className="strip-stretch" /> : null}
      {at ? (
        <Stretch
          scales={scales}
          fromS={at.startS}
          toS={at.endS}
          className={pointed?.severity === 'stop' ? 'strip-stretch strip-stretch-hot' : 'strip-stretch'}
        />
      ) : null}
      {curve && shown.has('pattern') ? (
        <Hatch
          scales={scales}
          timeS={curve.timeS}
          share={curve.patternLeftShare}
          heightShare={PATTERN_SHARE}
          label="pattern left"
        />
      ) : null}
      <Boundaries scales={scales} planned={planned} />
    </g>
  );
}

function LagNote({
  scales,
  estimate,
  scale,
  hatched,
}: Pick<MarksProps, 'scales' | 'estimate'> & { scale: UnitPreferences['temperature']; hatched: boolean }) {
  const lag = largestLag(estimate);
  if (!lag || scales.flow === 'down') return null;
  const { x, y } = scales.point(lag.atS, lag.coreC);
  const { box } = scales;
  const right = x + 30 + 190 < box.leftPx + box.widthPx;
  // The hatching of the pattern and its name have the foot of the strip.
  const footPx = hatched ? box.heightPx * (PATTERN_SHARE + 0.12) : 0;
  const below = y + 40 < box.topPx + box.heightPx - footPx;
  const dx = right ? 1 : -1;
  const dy = below ? 1 : -1;
  return (
    <g className="strip-note">
      <path d={`M${x + dx * 3} ${y + dy * 2}l${dx * 18} ${dy * 14}`} />
      <text x={x + dx * 26} y={y + dy * 16 + 8} textAnchor={right ? 'start' : 'end'}>
        {`mould core, ${formatInterval(lag.lagC, scale)} behind`}
      </text>
    </g>
  );
}

/** What each aside comes to at its highest, written where that is. */
function AsidePeaks({
  scales,
  layers,
}: {
  readonly scales: StripScales;
  readonly layers: readonly StripLayer[];
}) {
  const { box, view, flow } = scales;
  if (flow === 'down') return null;
  const y = scales.tempPx(view.minC + (view.maxC - view.minC) * ASIDE_SHARE) - 7;
  const taken: number[] = [];
  return (
    <g className="strip-note">
      {asidePeaks(layers).map((peak) => {
        const x = scales.timePx(peak.atS);
        const level = taken.filter((other) => Math.abs(other - x) < 130).length;
        taken.push(x);
        const anchor = x < box.leftPx + 60 ? 'start' : x > box.leftPx + box.widthPx - 60 ? 'end' : 'middle';
        return (
          <text key={peak.id} x={anchor === 'start' ? x + 24 : x} y={y - level * 15} textAnchor={anchor}>
            {peak.text}
          </text>
        );
      })}
    </g>
  );
}

/** Over the curves: where the kiln is late, and how far the mould core trails. */
export function MarksOver(
  props: MarksProps & {
    readonly scale: UnitPreferences['temperature'];
    readonly layers: readonly StripLayer[];
  },
) {
  const { scales, planned, estimate, shown } = props;
  const late = lateSegments(planned, estimate);
  return (
    <g aria-hidden="true">
      {late.map((segment, order) => (
        <Bracket
          key={segment.index}
          scales={scales}
          fromS={segment.plannedS}
          toS={segment.realS}
          aboveC={segment.targetC}
          text={`kiln ${durationText(segment.behindS)} behind`}
          hot
          level={order > 0 && segment.plannedS - (late[order - 1]?.realS ?? 0) < 3600 ? 1 : 0}
        />
      ))}
      <AsidePeaks scales={scales} layers={props.layers} />
      {shown.has('core') ? (
        <LagNote scales={scales} estimate={estimate} scale={props.scale} hatched={shown.has('pattern')} />
      ) : null}
    </g>
  );
}
