import { useRef, type KeyboardEvent } from 'react';
import type { PlannedLeg } from '~/lib/profile/planned';
import { cardSizes, placeCards } from '../strip/card-layout';
import { leader, leaderDown, pathOf } from '../strip/leader';
import type { StripScales } from '../strip/scales';
import { CardSummary, SegmentCard, type CardProps } from './SegmentCard';

export const CARD_LIMITS = { minPx: 176, maxPx: 248, gapPx: 12 };
const LEADER_PX = 40;
const UPRIGHT_CARD_PX = 92;
const UPRIGHT_GAP_PX = 10;

/** Length of strip that this many cards need beneath or beside it. */
export const cardsNeedPx = (count: number, flow: 'across' | 'down'): number =>
  flow === 'across'
    ? count * CARD_LIMITS.minPx + (count - 1) * CARD_LIMITS.gapPx
    : count * (UPRIGHT_CARD_PX + UPRIGHT_GAP_PX);

export type CardMaker = (index: number) => Omit<CardProps, 'place'>;

interface CardLaneProps {
  readonly scales: StripScales;
  readonly legs: readonly PlannedLeg[];
  readonly cardOf: CardMaker;
  readonly selected: number | null;
  readonly onOpen: (index: number) => void;
  readonly onKey: (event: KeyboardEvent<HTMLElement>) => void;
}

function layoutOf(scales: StripScales, legs: readonly PlannedLeg[]) {
  const stretches = legs.map((leg) => ({ fromPx: scales.timePx(leg.startS), toPx: scales.timePx(leg.endS) }));
  const middles = stretches.map((stretch) => (stretch.fromPx + stretch.toPx) / 2);
  if (scales.flow === 'down') {
    const sizes = stretches.map(() => UPRIGHT_CARD_PX);
    const { topPx, heightPx } = scales.box;
    const bounds = { fromPx: topPx - 8, toPx: topPx + heightPx, gapPx: UPRIGHT_GAP_PX };
    return { middles, placed: placeCards(middles, sizes, bounds) };
  }
  const fromPx = scales.box.leftPx - 40;
  const toPx = scales.box.leftPx + scales.box.widthPx + 8;
  const sizes = cardSizes(stretches, toPx - fromPx, CARD_LIMITS);
  return { middles, placed: placeCards(middles, sizes, { fromPx, toPx, gapPx: CARD_LIMITS.gapPx }) };
}

function Leaders(props: Pick<CardLaneProps, 'scales' | 'selected'> & ReturnType<typeof layoutOf>) {
  const { scales, middles, placed } = props;
  const down = scales.flow === 'down';
  return (
    <>
      {placed.map((card, index) => {
        const from = middles[index] ?? 0;
        const to = card.startPx + card.sizePx / 2;
        const points = down ? leaderDown(from, to, 0, 18) : leader(from, to, 0, LEADER_PX);
        return (
          <path
            key={index}
            className="strip-leader"
            data-selected={props.selected === index || undefined}
            d={pathOf(points)}
          />
        );
      })}
    </>
  );
}

/** The cards beneath the strip, each joined to its stretch; upright: beside it. */
export function CardLane(props: CardLaneProps) {
  const { scales, legs, cardOf, selected } = props;
  const lane = useRef<HTMLDivElement>(null);
  const { middles, placed } = layoutOf(scales, legs);
  if (scales.flow === 'down') {
    const heightPx = scales.box.topPx + scales.box.heightPx;
    const left = scales.box.leftPx + scales.box.widthPx + 6;
    return (
      <div className="card-lane-down" style={{ left, height: heightPx }}>
        <svg className="card-leaders" width="18" height={heightPx} aria-hidden="true">
          <Leaders scales={scales} selected={selected} middles={middles} placed={placed} />
        </svg>
        {placed.map((card, index) => (
          <CardSummary
            key={index}
            {...cardOf(index)}
            onOpen={props.onOpen}
            place={{ top: card.startPx, height: card.sizePx }}
          />
        ))}
      </div>
    );
  }
  return (
    <div ref={lane} className="card-lane" onKeyDown={props.onKey}>
      <svg className="card-leaders" width="100%" height={LEADER_PX} aria-hidden="true">
        <Leaders scales={scales} selected={selected} middles={middles} placed={placed} />
      </svg>
      <div className="card-row-of-cards">
        {placed.map((card, index) => {
          const previous = placed[index - 1];
          const marginLeft = card.startPx - (previous ? previous.startPx + previous.sizePx : 0);
          return <SegmentCard key={index} {...cardOf(index)} place={{ width: card.sizePx, marginLeft }} />;
        })}
      </div>
    </div>
  );
}
