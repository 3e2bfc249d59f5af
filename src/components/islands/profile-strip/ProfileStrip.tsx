import { useMemo, useState } from 'react';
import { useUnits } from '~/lib/client/units';
import type { Kiln } from '~/lib/contracts/equipment';
import { setRampDuration, setSegment } from '~/lib/profile/edit';
import type { PlannedCurve } from '~/lib/profile/planned';
import type { Caution, Estimate } from '~/lib/thermal/estimate-schema';
import { celsiusOf, shownDegrees } from '../strip/Paper';
import type { StripView } from '../strip/scales';
import { Strip } from '../strip/Strip';
import { axisTop } from '../strip/ticks';
import { onCardKey } from './card-keys';
import { CardLane, cardsNeedPx, type CardMaker } from './CardLane';
import { layersOf, type LayerId } from './layers-shown';
import { PlanHandles } from './PlanHandles';
import { MarksOver, MarksUnder } from './PlanMarks';
import type { RampsAs } from './SegmentFields';
import { SegmentSheet } from './SegmentSheet';
import { stripSummary, stripTable } from './strip-words';
import { foreseenAt } from './foreseen';
import type { Editor } from './useEditor';

interface ProfileStripProps {
  readonly editor: Editor;
  readonly planned: PlannedCurve;
  readonly kilnRampsS: readonly (number | null)[];
  readonly estimate: Estimate | null;
  readonly kiln: Kiln | null;
  readonly shown: ReadonlySet<LayerId>;
  readonly pointed: Caution | null;
  readonly startMs: number | null;
  readonly zone: string;
  readonly readOnly: boolean;
  readonly remarks: ReadonlyMap<number, string>;
}

/** What the strip shows: the whole firing with a little beyond it, from 0 to the next full hundred above the peak. */
function useView(planned: PlannedCurve, estimate: Estimate | null, held: boolean): StripView {
  const scale = useUnits().temperature;
  const view = useMemo(() => {
    const endS = Math.max(planned.durationS, estimate?.predictedS ?? 0, 3600);
    const peakC = Math.max(...planned.valueC, estimate?.peakC ?? 0);
    const lowC = Math.min(0, ...planned.valueC);
    const stepShown = scale === 'F' ? 200 : 100;
    return {
      fromS: 0,
      toS: Math.ceil((endS * 1.04) / 900) * 900,
      minC: celsiusOf(
        scale === 'F'
          ? Math.min(0, Math.floor(shownDegrees(lowC, 'F') / 50) * 50)
          : Math.floor(lowC / 20) * 20,
        scale,
      ),
      maxC: celsiusOf(axisTop(shownDegrees(peakC, scale), stepShown), scale),
    };
  }, [planned, estimate, scale]);
  const [frozen, setFrozen] = useState<StripView | null>(null);
  if (held && frozen === null) setFrozen(view);
  if (!held && frozen !== null) setFrozen(null);
  return held ? (frozen ?? view) : view;
}

/** The strip of a profile with its handles and cards. While a corner is held the scales stay as they are. */
export function ProfileStrip(props: ProfileStripProps) {
  const { editor, planned, kilnRampsS, estimate, shown, pointed, readOnly, startMs, zone } = props;
  const { document, selected } = editor;
  const { profile } = document;
  const scale = useUnits().temperature;
  const [rampsAs, setRampsAs] = useState<RampsAs>('rate');
  const [held, setHeld] = useState(false);
  const [opened, setOpened] = useState<number | null>(null);
  const view = useView(planned, estimate, held);
  const layers = useMemo(() => layersOf(planned, estimate, shown), [planned, estimate, shown]);
  const marks = { planned, estimate, shown, selected, pointed };
  const count = profile.segments.length;

  const cardOf: CardMaker = (index) => {
    const segment = profile.segments[index];
    const leg = planned.legs[index];
    if (!segment || !leg) throw new RangeError(`the profile has no segment ${index}`);
    return {
      index,
      segment,
      leg,
      scale,
      rampsAs,
      kilnMaxC: editor.kilnMaxC,
      edits: {
        set: (change, key) => editor.changeProfile(setSegment(profile, index, change), key),
        setRampS: (rampS) => editor.changeProfile(setRampDuration(profile, index, rampS), `${index}.ramp`),
      },
      startMs,
      zone,
      selected: selected === index,
      readOnly,
      isFirst: index === 0,
      isLast: index === count - 1,
      isOnly: count === 1,
      foreseen: foreseenAt(index, estimate, startMs, zone),
      remark: props.remarks.get(index) ?? null,
      onSelect: editor.select,
      onRampsAs: setRampsAs,
      onAdd: editor.add,
      onRemove: editor.remove,
      onMove: editor.move,
    };
  };

  return (
    <>
      <Strip
        view={view}
        temperature={scale}
        zone={zone}
        startMs={startMs}
        layers={layers}
        summary={stripSummary(document, planned, estimate, scale)}
        table={stripTable(profile, planned, estimate, scale, startMs, zone)}
        neededPx={({ flow }) => cardsNeedPx(count, flow)}
        readout={!held}
        under={(scales) => <MarksUnder scales={scales} {...marks} />}
        over={(scales) => (
          <>
            <MarksOver scales={scales} {...marks} scale={scale} layers={layers} />
            {readOnly ? null : (
              <PlanHandles
                scales={scales}
                profile={profile}
                legs={planned.legs}
                kilnRampsS={kilnRampsS}
                kilnMaxC={editor.kilnMaxC}
                scale={scale}
                selected={selected}
                onSelect={editor.select}
                onGrab={() => setHeld(true)}
                onDrop={() => {
                  setHeld(false);
                  editor.endStep();
                }}
                onChange={editor.changeProfile}
                onAdd={editor.add}
                onRemove={editor.remove}
              />
            )}
          </>
        )}
        beside={(scales) => (
          <CardLane
            scales={scales}
            legs={planned.legs}
            cardOf={cardOf}
            selected={selected}
            onOpen={setOpened}
            onKey={(event) =>
              onCardKey(event, (key) => {
                if (key.ask === 'add') editor.add(key.index);
                else editor.remove(key.index);
              })
            }
          />
        )}
      />
      {opened !== null && opened < count ? (
        <SegmentSheet card={cardOf(opened)} onClose={() => setOpened(null)} />
      ) : null}
    </>
  );
}
