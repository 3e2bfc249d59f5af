import { explanationOf } from '~/lib/methods';
import type { Caution } from '~/lib/thermal/estimate-schema';

const ORDER = { stop: 0, warn: 1, note: 2 } as const;
const WORDS = { stop: 'Stops approval', warn: 'Caution', note: 'Note' } as const;

/** Stops first, then in the order of the firing. */
export const sortedCautions = (cautions: readonly Caution[]): Caution[] =>
  [...cautions].sort((a, b) => ORDER[a.severity] - ORDER[b.severity] || (a.atS ?? -1) - (b.atS ?? -1));

/** First sentence apart from the rest, so that the eye catches what it is about. */
export function headAndRest(text: string): [string, string] {
  const end = /[.:;](?=\s)/.exec(text);
  if (!end) return [text, ''];
  return [text.slice(0, end.index + (end[0] === '.' ? 1 : 1)), text.slice(end.index + 1)];
}

interface CautionsProps {
  readonly cautions: readonly Caution[];
  readonly onPoint: (caution: Caution | null) => void;
  readonly onGoTo: (segment: number) => void;
}

/** What the models warn of, each linked to its segment: pointing at it shows where on the strip. */
export function Cautions({ cautions, onPoint, onGoTo }: CautionsProps) {
  if (cautions.length === 0)
    return (
      <p className="notice">The models see nothing to warn of in this firing. They do not see everything.</p>
    );
  return (
    <ul className="cautions">
      {sortedCautions(cautions).map((caution) => {
        const [head, rest] = headAndRest(caution.text);
        const { segment } = caution;
        return (
          <li
            key={`${caution.code} ${String(segment)} ${String(caution.atS)}`}
            className={caution.severity === 'stop' ? 'notice notice-hot' : 'notice'}
            data-severity={caution.severity}
            onMouseEnter={() => onPoint(caution)}
            onMouseLeave={() => onPoint(null)}
            onFocus={() => onPoint(caution)}
            onBlur={() => onPoint(null)}
          >
            <p>
              <span className="strip-hidden">{`${WORDS[caution.severity]}: `}</span>
              {segment === null ? (
                <strong>{head}</strong>
              ) : (
                <a
                  className="caution-link"
                  href={`#segment-${segment + 1}`}
                  onClick={(event) => {
                    event.preventDefault();
                    onGoTo(segment);
                  }}
                >
                  {head}
                </a>
              )}
              {rest} <span className="caution-source">{caution.source}.</span>{' '}
              <a className="caution-how" href={explanationOf(caution.code)}>
                How this is worked out
                <span className="strip-hidden">{`: ${head}`}</span>
              </a>
            </p>
          </li>
        );
      })}
    </ul>
  );
}
