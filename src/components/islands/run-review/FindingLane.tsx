import type { Finding, Series } from '~/lib/contracts/runs';
import { placeCards } from '../strip/card-layout';
import { leader, leaderDown, pathOf } from '../strip/leader';
import type { StripScales } from '../strip/scales';
import type { TimeWindow } from '../strip/window';
import { FindingCard, type FindingCardProps } from './FindingCard';
import { anchorOf } from './view';

const CARD = { widthPx: 196, gapPx: 10, heightPx: 128 };
const LEADER_PX = 34;

/** Length of strip that the cards of so many findings need. */
export const findingsNeedPx = (count: number, flow: 'across' | 'down'): number =>
  flow === 'across' ? count * (CARD.widthPx + CARD.gapPx) : count * (CARD.heightPx + CARD.gapPx);

/** The findings that reach into a stretch of time. */
export const findingsWithin = (findings: readonly Finding[], { fromS, toS }: TimeWindow): Finding[] =>
  findings.filter((finding) => finding.endS >= fromS && finding.startS <= toS);

interface FindingLaneProps {
  readonly scales: StripScales;
  readonly findings: readonly Finding[];
  readonly control: Series['channels'][number] | null;
  readonly selected: string | null;
  readonly cardOf: (finding: Finding) => Omit<FindingCardProps, 'finding' | 'place'>;
}

/** The findings as cards in order of time, each hanging from its moment of the measured curve. */
export function FindingLane({ scales, findings, control, selected, cardOf }: FindingLaneProps) {
  const shown = findingsWithin(findings, scales.view);
  if (shown.length === 0) return null;
  const down = scales.flow === 'down';
  const middles = shown.map((finding) => scales.timePx(anchorOf(finding, control).timeS));
  const sizes = shown.map(() => (down ? CARD.heightPx : CARD.widthPx));
  const bounds = down
    ? { fromPx: scales.box.topPx - 8, toPx: scales.box.topPx + scales.box.heightPx, gapPx: CARD.gapPx }
    : { fromPx: scales.box.leftPx - 40, toPx: scales.box.leftPx + scales.box.widthPx + 8, gapPx: CARD.gapPx };
  const placed = placeCards(middles, sizes, bounds);
  const leaders = placed.map((card, index) => {
    const to = card.startPx + card.sizePx / 2;
    const points = down
      ? leaderDown(middles[index] ?? 0, to, 0, 18)
      : leader(middles[index] ?? 0, to, 0, LEADER_PX);
    return (
      <path
        key={index}
        className="strip-leader"
        data-selected={shown[index]?.id === selected || undefined}
        d={pathOf(points)}
      />
    );
  });
  const cards = shown.map((finding, index) => {
    const card = placed[index];
    if (!card) return null;
    const previous = placed[index - 1];
    const place = down
      ? { top: card.startPx, height: card.sizePx }
      : {
          width: card.sizePx,
          marginLeft: card.startPx - (previous ? previous.startPx + previous.sizePx : 0),
        };
    return <FindingCard key={finding.id} finding={finding} place={place} {...cardOf(finding)} />;
  });
  if (down) {
    const heightPx = scales.box.topPx + scales.box.heightPx;
    return (
      <div
        className="finding-lane-down"
        style={{ left: scales.box.leftPx + scales.box.widthPx + 6, height: heightPx }}
      >
        <svg className="finding-leaders" width="18" height={heightPx} aria-hidden="true">
          {leaders}
        </svg>
        {cards}
      </div>
    );
  }
  return (
    <div className="finding-lane">
      <svg className="finding-leaders" width="100%" height={LEADER_PX} aria-hidden="true">
        {leaders}
      </svg>
      <div className="finding-row">{cards}</div>
    </div>
  );
}
