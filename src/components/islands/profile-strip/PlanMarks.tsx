import type { PlannedCurve } from '~/lib/profile/planned';
import type { Caution, Estimate } from '~/lib/thermal/estimate-schema';
import type { UnitPreferences } from '~/lib/units';
import { Bracket, placeBrackets, takenBy, UprightBracket } from '../strip/Bracket';
import { durationText } from '../strip/duration';
import { Hatch } from '../strip/Hatch';
import type { StripLayer } from '../strip/layers';
import type { StripScales } from '../strip/scales';
import { lateSegments } from './lateness';
import { hatchesOf, type LayerId } from './layers-shown';
import { HATCH_SHARE, placeNotes, textX } from './notes';

interface MarksProps {
  readonly scales: StripScales;
  readonly planned: PlannedCurve;
  readonly estimate: Estimate | null;
  readonly shown: ReadonlySet<LayerId>;
  readonly selected: number | null;
  readonly pointed: Caution | null;
}

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

/** Beneath the curves: the selected stretch, where a caution points, what is left of something, ends of segments. */
export function MarksUnder({ scales, planned, estimate, shown, selected, pointed }: MarksProps) {
  const leg = selected === null ? undefined : planned.legs[selected];
  const at = pointed?.segment === null || pointed === null ? undefined : planned.legs[pointed.segment];
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
      {hatchesOf(estimate, shown).map(({ id, timeS, share }) => (
        <Hatch key={id} scales={scales} timeS={timeS} share={share} heightShare={HATCH_SHARE} />
      ))}
      <Boundaries scales={scales} planned={planned} />
    </g>
  );
}

interface OverProps extends MarksProps {
  readonly scale: UnitPreferences['temperature'];
  readonly layers: readonly StripLayer[];
}

/** Over the curves: where the kiln is late, how far the mould core trails, what hatchings and asides stand for. */
export function MarksOver(props: OverProps) {
  const { scales, planned, estimate } = props;
  const late = lateSegments(planned, estimate).map((segment) => ({
    fromS: segment.plannedS,
    toS: segment.realS,
    aboveC: segment.targetC,
    text: `kiln ${durationText(segment.behindS)} behind`,
  }));
  if (scales.flow === 'down')
    return (
      <g aria-hidden="true">
        {late.map((plan) => (
          <UprightBracket key={plan.fromS} scales={scales} plan={plan} />
        ))}
      </g>
    );
  const brackets = placeBrackets(scales, late);
  return (
    <g aria-hidden="true">
      {brackets.map((bracket) => (
        <Bracket key={bracket.fromPx} bracket={bracket} hot />
      ))}
      <g className="strip-note">
        {placeNotes(props, brackets.flatMap(takenBy)).map((note) => (
          <g key={note.id}>
            {note.line ? <path d={note.line} /> : null}
            <text x={textX(note)} y={note.place.y + 12} textAnchor={note.anchor}>
              {note.text}
            </text>
          </g>
        ))}
      </g>
    </g>
  );
}
