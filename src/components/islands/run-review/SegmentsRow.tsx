import type { Review } from '~/lib/contracts/runs';
import type { Profile } from '~/lib/profile/schema';
import { STAGE_NAMES } from '~/components/words/names';
import { formatNumber, formatRate, formatTemperature } from '~/lib/units';
import { useUnits } from '~/lib/client/units';
import { durationText } from '../strip/duration';

const minutes = (seconds: number): string => formatNumber(seconds / 60);

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
        const planned =
          typeof segment.rateCPerH === 'number'
            ? formatRate(segment.rateCPerH, temperature)
            : segment.rateCPerH.replace('-', ' ');
        const off = went !== undefined && went.text !== 'as planned' && !went.text.startsWith('as planned');
        return (
          <li key={index}>
            <h2 className="segments-name">
              {STAGE_NAMES[segment.stage]}{' '}
              <span className="num">{formatTemperature(segment.toC, temperature)}</span>
            </h2>
            {went ? (
              <>
                <p>
                  <span className="num">
                    {went.rateCPerH === null ? '–' : formatRate(went.rateCPerH, temperature)}
                  </span>{' '}
                  <span className="hint">of {planned}</span>
                </p>
                <p>
                  <span className="num">{minutes(Math.min(went.inBandS, went.holdS))}</span>{' '}
                  <span className="hint">
                    min of {minutes(went.plannedHoldS)} in band
                    {went.arrivedS === null
                      ? ''
                      : `, there after ${durationText(went.arrivedS - went.startS)}`}
                  </span>
                </p>
                <p className={off ? 'segments-off' : 'hint'}>{went.text}</p>
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
