import type { Review } from '~/lib/contracts/runs';
import type { Profile } from '~/lib/profile/schema';
import { STAGE_NAMES } from '~/components/words/names';
import { formatNumber, rate, temperature as asTemperature, type Quantity } from '~/lib/units';
import { useUnits } from '~/lib/client/units';
import { rampArrow } from '../profile-strip/shown';
import { durationText } from '../strip/duration';

type Went = Review['segments'][number];
type Scale = ReturnType<typeof useUnits>['temperature'];

const minutes = (seconds: number): string => formatNumber(seconds / 60);

function Amount({ quantity }: { readonly quantity: Quantity }) {
  return (
    <span className="num">
      {quantity.number}
      <span className="unit">{quantity.unit}</span>
    </span>
  );
}

/** Of the measured slope, its part in the direction of the plan: a fall of 99 °C/h is `99` where a fall was asked for. */
function Slope({ plan, index, went, scale }: { plan: Profile; index: number; went: Went; scale: Scale }) {
  const segment = plan.segments[index];
  if (!segment) return null;
  const fromC = plan.segments[index - 1]?.toC ?? plan.startC;
  const { rateCPerH } = went;
  const forwards = rateCPerH !== null && segment.toC < fromC ? -rateCPerH : rateCPerH;
  const asked =
    typeof segment.rateCPerH === 'number'
      ? ` of ${rate(segment.rateCPerH, scale).number}`
      : `, ${segment.rateCPerH.replace('-', ' ')}`;
  return (
    <p>
      <span aria-hidden="true">{rampArrow(fromC, segment.toC)} </span>
      {forwards === null ? '–' : <Amount quantity={rate(forwards, scale)} />}
      <span className="hint">{asked}</span>
    </p>
  );
}

function Hold({ went }: { readonly went: Went }) {
  const there =
    went.arrivedS === null ? null : (
      <>
        there after <span className="segments-time">{durationText(went.arrivedS - went.startS)}</span>
      </>
    );
  if (went.plannedHoldS === 0) return <p className="hint">{there ?? 'no hold planned'}</p>;
  return (
    <p>
      <span className="num">{minutes(Math.min(went.inBandS, went.holdS))}</span>{' '}
      <span className="hint">
        min of {minutes(went.plannedHoldS)} in band{there ? <>, {there}</> : null}
      </span>
    </p>
  );
}

/** Each segment as it really went, against the plan. In the order of the firing, like the curve above. */
export function SegmentsRow({
  plan,
  segments,
}: {
  readonly plan: Profile;
  readonly segments: Review['segments'];
}) {
  const { temperature } = useUnits();
  return (
    <ol className="segments-row" aria-label="Segments as they went">
      {plan.segments.map((segment, index) => {
        const went = segments[index];
        return (
          <li key={index}>
            <h2 className="segments-name">
              {STAGE_NAMES[segment.stage]} <Amount quantity={asTemperature(segment.toC, temperature)} />
            </h2>
            {went ? (
              <>
                <Slope plan={plan} index={index} went={went} scale={temperature} />
                <Hold went={went} />
                <p className={went.text.startsWith('as planned') ? 'hint' : 'segments-off'}>{went.text}</p>
              </>
            ) : (
              <p className="hint">not in this log</p>
            )}
          </li>
        );
      })}
    </ol>
  );
}
