import type { Finding } from '~/lib/contracts/runs';
import type { StripScales } from '../strip/scales';
import { useTimeSelection } from '../strip/useTimeSelection';
import type { TimeWindow } from '../strip/window';
import { FindingMarks } from './FindingMarks';

/** What lies over the curves: the stretches of the findings, and the ground that is dragged over to mark one more. */
export function MarkGround(props: {
  readonly scales: StripScales;
  readonly findings: readonly Finding[];
  readonly selected: Finding | null;
  readonly onSelect: (id: string) => void;
  readonly onMark: ((stretch: TimeWindow) => void) | null;
}) {
  const { scales } = props;
  const { selecting, ground } = useTimeSelection(scales, (stretch) => props.onMark?.(stretch));
  const { box } = scales;
  const area = selecting && {
    from: scales.timePx(selecting.fromS),
    length: (selecting.toS - selecting.fromS) * scales.pxPerS,
  };
  return (
    <>
      {props.onMark ? (
        <rect
          className="strip-ground"
          x={box.leftPx}
          y={box.topPx}
          width={box.widthPx}
          height={box.heightPx}
          {...ground}
        />
      ) : null}
      <FindingMarks
        scales={scales}
        findings={props.findings}
        selected={props.selected?.id ?? null}
        onSelect={props.onSelect}
      />
      {area ? (
        <rect
          className="strip-selection"
          x={scales.flow === 'across' ? area.from : box.leftPx}
          y={scales.flow === 'across' ? box.topPx : area.from}
          width={scales.flow === 'across' ? area.length : box.widthPx}
          height={scales.flow === 'across' ? box.heightPx : area.length}
        />
      ) : null}
    </>
  );
}
