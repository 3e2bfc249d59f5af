import { useMutation } from '@tanstack/react-query';
import { useUnits } from '~/lib/client/units';
import { call, sentenceFor } from '~/lib/client/api';
import { draftRoutes, type DraftedProfile } from '~/lib/contracts/drafts';
import type { Profile, Segment } from '~/lib/profile/schema';
import type { Load } from '~/lib/thermal/load-schema';
import { formatDuration, formatRate, formatTemperature } from '~/lib/units';
import { Dialog } from './Dialog';
import { STAGE_NAMES } from './shown';

/** What keeps a draft from being made; null: nothing. */
function lacking(kilnId: string | null, load: Load | null): string | null {
  if (kilnId === null) return 'Choose a kiln first.';
  return load === null || load.moulds.length === 0 ? 'Put a mould into the load first.' : null;
}

/** One segment in a line: "275 °C at 150 °C/h, held 30 min". */
function useSegmentLine(): (segment: Segment) => string {
  const units = useUnits();
  return ({ toC, rateCPerH, holdS }) => {
    const rates = { 'flat-out': 'flat out', coast: 'heating off' } as const;
    const rate =
      typeof rateCPerH === 'number' ? `at ${formatRate(rateCPerH, units.temperature)}` : rates[rateCPerH];
    const hold = holdS > 0 ? `, held ${formatDuration(holdS)}` : '';
    return `${formatTemperature(toC, units.temperature)} ${rate}${hold}`;
  };
}

/** The segments of a draft, each with its reasons and their sources. */
export function DraftReasons({ draft }: { readonly draft: DraftedProfile }) {
  const line = useSegmentLine();
  return (
    <ol className="draft-segments">
      {draft.profile.segments.map((segment, index) => (
        <li key={index}>
          <p>
            <strong>{STAGE_NAMES[segment.stage]}</strong> <span className="num">{line(segment)}</span>
          </p>
          <ul>
            {draft.because
              .filter((reason) => reason.segment === index)
              .map(({ text, source }) => (
                <li key={text}>
                  {text} <span className="caution-source">{source}</span>
                </li>
              ))}
          </ul>
        </li>
      ))}
    </ol>
  );
}

/** Drafts a profile for the load in the kiln: shown with its reasons first, taken only if the person says so. */
export function DraftPanel(props: {
  readonly kilnId: string | null;
  readonly load: Load | null;
  readonly onUse: (profile: Profile, draft: DraftedProfile) => void;
}) {
  const { kilnId, load, onUse } = props;
  const drafting = useMutation({
    mutationFn: (asked: { load: Load; kilnId: string }) => call(draftRoutes.draft, { body: asked }),
  });
  const lacks = lacking(kilnId, load);
  const draft = drafting.data;
  return (
    <div className="draft-ask">
      <button
        type="button"
        className="btn btn-small"
        disabled={lacks !== null || drafting.isPending}
        onClick={() => {
          if (kilnId !== null && load !== null) drafting.mutate({ load, kilnId });
        }}
      >
        {drafting.isPending ? 'Drafting' : 'Draft a profile for this load'}
      </button>
      {lacks === null ? null : <p className="hint">{lacks}</p>}
      {drafting.error ? (
        <p className="notice notice-hot" role="alert">
          {sentenceFor(drafting.error)}
        </p>
      ) : null}
      {draft ? (
        <Dialog title="A draft for this load" onClose={drafting.reset}>
          {draft.against.map(({ text, source }) => (
            <p key={text} className="notice notice-hot">
              {text} <span className="caution-source">{source}</span>
            </p>
          ))}
          <p className="hint">
            Estimates to begin from. Go through it, change it, and let the makers’ data sheets and your own
            practice come first.
          </p>
          <DraftReasons draft={draft} />
          <div className="draft-choice">
            <button
              type="button"
              className="btn btn-primary"
              onClick={() => {
                onUse(draft.profile, draft);
                drafting.reset();
              }}
            >
              Put it in place of the segments
            </button>
            <button type="button" className="btn btn-quiet" onClick={drafting.reset}>
              Leave it
            </button>
          </div>
        </Dialog>
      ) : null}
    </div>
  );
}
