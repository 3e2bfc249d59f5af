import { useCallback, useMemo, useState, useSyncExternalStore } from 'react';
import { useUnits } from '~/lib/client/units';
import type { DraftedProfile } from '~/lib/contracts/drafts';
import type { Version } from '~/lib/contracts/profiles';
import { plannedCurve } from '~/lib/profile/planned';
import { SAFETY_NOTES, safetyNotesFor } from '~/lib/profile/safety';
import { issuesOf } from '~/lib/profile/validate';
import type { Caution } from '~/lib/thermal/estimate-schema';
import { nextClockHour } from '../strip/clock';
import { Actions } from './Actions';
import { Cautions } from './Cautions';
import { Conflict } from './Conflict';
import { DraftPanel, DraftReasons } from './DraftPanel';
import { kilnRampsOf } from './document';
import { EditorHeader, type Panel } from './EditorHeader';
import { useEstimates } from './estimate-work';
import { Figures } from './Figures';
import { UndoButtons } from './History';
import { keptOf, type Theirs } from './keep';
import { KilnPicker } from './KilnPicker';
import { availableLayers, FIRST_SHOWN, switchedLayers, type LayerId } from './layers-shown';
import { LayerSwitches } from './LayerSwitches';
import { LoadPanel } from './LoadPanel';
import { modelOf } from './model';
import { permissionsFor } from './permissions';
import { ProfileStrip } from './ProfileStrip';
import { Outcome } from './Outcome';
import type { ProfileEditorProps } from './props';
import { Returned, remarksOf } from './Returned';
import { SaveLine } from './SaveLine';
import { STATE_NAMES } from './shown';
import { StartPicker } from './StartPicker';
import { useEditor } from './useEditor';
import { useKeeping } from './useKeeping';

const START_HOUR = 6;

/** Why it cannot be changed here. */
const READ_WORDS = {
  draft: 'for you to read',
  'in-review': 'not to be changed meanwhile',
  approved: 'sealed',
  retired: 'sealed',
} as const;

/** The moment the firing is taken to begin: the next morning at six on the studio's clock, until one is chosen. */
function useStart(zone: string): [number | null, (startMs: number) => void] {
  const isInBrowser = useSyncExternalStore(
    () => () => undefined,
    () => true,
    () => false,
  );
  const [startMs, setStartMs] = useState(() => nextClockHour(Date.now(), zone, START_HOUR));
  return [isInBrowser ? startMs : null, setStartMs];
}

function useModel(props: ProfileEditorProps, startMs: number | null) {
  const units = useUnits();
  const { kilns, furnaces, tariffs, studioFigures, thermocouples, ambientC, attendedHours } = props;
  const zone = props.me.studio.timeZone;
  return useMemo(
    () =>
      modelOf({
        kilns,
        furnaces,
        tariffs,
        studioFigures,
        thermocouples,
        ambientC,
        attendedHours,
        startMs,
        zone,
        units,
      }),
    [kilns, furnaces, tariffs, studioFigures, thermocouples, ambientC, attendedHours, startMs, zone, units],
  );
}

function useLayers(): [ReadonlySet<LayerId>, (id: LayerId) => void] {
  const [shown, setShown] = useState<ReadonlySet<LayerId>>(() => new Set(FIRST_SHOWN));
  const toggle = useCallback((id: LayerId) => setShown((before) => switchedLayers(before, id)), []);
  return [shown, toggle];
}

/** The profile editor: what it is and comes to above, the strip, what the models warn of below, and what may be done. */
export function EditorPage(props: ProfileEditorProps) {
  const { me, kilns } = props;
  const zone = me.studio.timeZone;
  const [first] = useState(() => keptOf(props.profile, props.version));
  const [version, setVersion] = useState<Version>(props.version);
  const may = permissionsFor(
    { id: me.user.id, roles: me.roles },
    version,
    props.profile.authorId,
    props.mayApproveOwn,
  );
  const readOnly = !may.edit;
  const limits = useCallback(
    (kilnId: string | null) => kilns.find((kiln) => kiln.id === kilnId)?.maxC ?? null,
    [kilns],
  );
  const editor = useEditor(first.document, readOnly, limits);
  const { document } = editor;
  const kiln = kilns.find((candidate) => candidate.id === document.kilnId) ?? null;
  const keeping = useKeeping(document, first, (one, other) => {
    editor.change(one);
    editor.change(other);
  });
  const theirs = keeping.state.kind === 'conflict' ? (keeping.state.theirs as Theirs) : null;
  const [startMs, setStartMs] = useStart(zone);
  const { now, was } = useEstimates(document, editor.before, useModel(props, startMs));
  const estimate = now?.estimate ?? null;
  const kilnRampsS = useMemo(() => kilnRampsOf(document.profile, estimate), [document.profile, estimate]);
  const planned = useMemo(() => plannedCurve(document.profile, kilnRampsS), [document.profile, kilnRampsS]);
  const [shown, toggle] = useLayers();
  const [panel, setPanel] = useState<Panel>(null);
  const [drafted, setDrafted] = useState<DraftedProfile | null>(null);
  const [pointed, setPointed] = useState<Caution | null>(null);
  const onVersion = (next: Version): void => {
    keeping.adoptVersion(next);
    setVersion(next);
  };
  const goTo = (segment: number): void => {
    editor.select(segment);
    const card = window.document.querySelector<HTMLElement>(`[data-card="${segment}"]`);
    card?.focus();
    card?.scrollIntoView({ block: 'center', inline: 'nearest' });
  };
  const standing = `version ${version.number}, ${STATE_NAMES[version.state]}`;
  const saveLine = readOnly ? (
    READ_WORDS[version.state]
  ) : (
    <SaveLine state={keeping.state} zone={zone} onRetry={keeping.retry} />
  );
  return (
    <div className="editor">
      <EditorHeader
        document={document}
        kiln={kiln}
        readOnly={readOnly}
        standing={standing}
        saveLine={saveLine}
        panel={panel}
        onPanel={setPanel}
        onName={(name) => editor.change({ name }, 'name')}
        onNameDone={() => {
          if (document.name.trim() === '') editor.change({ name: keeping.keptName }, 'name');
          editor.endStep();
        }}
        figures={
          <Figures
            estimate={estimate}
            before={was?.estimate ?? null}
            plannedS={planned.durationS}
            hasKiln={kiln !== null}
            isAssumed={planned.legs.some((leg) => leg.slopeFrom === 'assumption')}
            startMs={startMs}
            zone={zone}
          />
        }
      />
      {theirs ? (
        <Conflict
          profileId={props.profile.id}
          mine={document}
          theirs={theirs}
          kilns={kilns}
          onChoose={(choice) => keeping.settle(choice, theirs)}
        />
      ) : null}
      <Returned version={version} zone={zone} />
      {issuesOf(document.profile).map((issue) => (
        <p key={issue.path} className="notice notice-hot" role="alert">
          {`It cannot be kept or computed as it stands: it ${issue.message}.`}
        </p>
      ))}
      {panel === null ? null : (
        <section
          id={`panel-${panel}`}
          className="editor-panel sheet"
          aria-label={panel === 'load' ? 'Load' : 'Kiln'}
        >
          <div className="dialog-head">
            <h2 className="section-title">{panel === 'load' ? 'What it fires' : 'In which kiln'}</h2>
            <button type="button" className="btn btn-quiet btn-small" onClick={() => setPanel(null)}>
              Close
            </button>
          </div>
          <fieldset disabled={readOnly} className="editor-panel-fields">
            {panel === 'load' ? (
              <LoadPanel
                load={document.load}
                furnaces={props.furnaces}
                onChange={(load, key) =>
                  editor.change({ load }, key === undefined ? undefined : `load.${key}`)
                }
              />
            ) : (
              <KilnPicker
                kilns={kilns}
                kilnId={document.kilnId}
                onChange={(kilnId) => editor.change({ kilnId })}
              />
            )}
          </fieldset>
          {readOnly || panel !== 'load' ? null : (
            <DraftPanel
              kilnId={document.kilnId}
              load={document.load}
              onUse={(profile, draft) => {
                editor.changeProfile(profile, undefined, 0);
                setDrafted(draft);
                setPanel(null);
              }}
            />
          )}
        </section>
      )}
      <div className="editor-bar">
        <LayerSwitches shown={shown} available={availableLayers(planned, estimate)} onToggle={toggle} />
        <div className="editor-bar-right">
          {readOnly ? null : <UndoButtons {...editor} onUndo={editor.undo} onRedo={editor.redo} />}
          {startMs === null ? null : <StartPicker startMs={startMs} zone={zone} onChange={setStartMs} />}
        </div>
      </div>
      <ProfileStrip
        editor={editor}
        planned={planned}
        kilnRampsS={kilnRampsS}
        estimate={estimate}
        kiln={kiln}
        shown={shown}
        pointed={pointed}
        startMs={startMs}
        zone={zone}
        readOnly={readOnly}
        remarks={remarksOf(version)}
      />
      {estimate ? (
        <section className="editor-cautions" aria-label="Cautions">
          <Cautions cautions={estimate.cautions} onPoint={setPointed} onGoTo={goTo} />
        </section>
      ) : null}
      {estimate ? <Outcome estimate={estimate} load={document.load} startMs={startMs} zone={zone} /> : null}
      {drafted ? (
        <details className="draft-why">
          <summary>Why the draft was made so</summary>
          <DraftReasons draft={drafted} />
        </details>
      ) : null}
      <div className="editor-foot">
        <Actions
          profileId={props.profile.id}
          version={version}
          may={may}
          segments={document.profile.segments}
          stops={estimate?.cautions.filter((caution) => caution.severity === 'stop') ?? []}
          canSubmit={document.kilnId !== null}
          flush={keeping.flush}
          onVersion={onVersion}
        />
        {readOnly ? null : (
          <p className="hint editor-keys">
            Arrow keys move between cards and fields · Enter adds a segment · Delete removes the card · Ctrl Z
            undoes
          </p>
        )}
      </div>
      <ul className="editor-safety hint">
        {safetyNotesFor(document.profile, document.load).map((note) => (
          <li key={note}>
            <strong>{SAFETY_NOTES[note].title}.</strong> {SAFETY_NOTES[note].text}
          </li>
        ))}
      </ul>
    </div>
  );
}
