import type { Finding } from '~/lib/contracts/runs';
import { FINDING_TITLES } from '~/lib/review/words';
import type { StripScales } from '../strip/scales';
import { findingsWithin } from './FindingLane';

interface FindingMarksProps {
  readonly scales: StripScales;
  readonly findings: readonly Finding[];
  readonly selected: string | null;
  readonly onSelect: (id: string) => void;
}

/** The stretch that each finding covers, shaded on the strip and bracketed at its head; a click chooses it. */
export function FindingMarks({ scales, findings, selected, onSelect }: FindingMarksProps) {
  const { box, view } = scales;
  return (
    <g>
      {findingsWithin(findings, view)
        .filter(({ state }) => state !== 'dismissed')
        .map((finding) => {
          const from = Math.max(scales.timePx(view.fromS), scales.timePx(finding.startS));
          const to = Math.max(from + 3, Math.min(scales.timePx(view.toS), scales.timePx(finding.endS)));
          const across = scales.flow === 'across';
          const area = across
            ? { x: from, y: box.topPx, width: to - from, height: box.heightPx }
            : { x: box.leftPx, y: from, width: box.widthPx, height: to - from };
          const head = across
            ? `M${from} ${box.topPx + 7}v-5H${to}v5`
            : `M${box.leftPx + box.widthPx - 7} ${from}h5V${to}h-5`;
          const hot = finding.severity !== 'note' && !finding.expected;
          return (
            <g
              key={finding.id}
              className="finding-mark"
              data-hot={hot || undefined}
              data-selected={selected === finding.id || undefined}
              onClick={() => onSelect(finding.id)}
            >
              <title>{FINDING_TITLES[finding.kind]}</title>
              <rect {...area} />
              <path d={head} />
            </g>
          );
        })}
    </g>
  );
}
