import { LINE_PX, placeWords, wordsPx, type Rect } from './label-places';
import type { StripScales } from './scales';

interface BracketPlan {
  readonly fromS: number;
  readonly toS: number;
  /** Temperature that the bracket stands above. */
  readonly aboveC: number;
  readonly text: string;
}

/** A bracket as it is drawn: its two ends, its height, and the place of its words. */
export interface PlacedBracket {
  readonly text: string;
  readonly fromPx: number;
  readonly toPx: number;
  readonly yPx: number;
  readonly words: Rect;
}

/** Least room above a bracket, px: its words and a little paper above them. */
const HEAD_PX = 26;
const FOOT_PX = 8;

/** Places brackets over stretches of a strip that lies across, their words clear of one another and within the paper. */
export function placeBrackets(scales: StripScales, plans: readonly BracketPlan[]): PlacedBracket[] {
  const { box } = scales;
  const bounds = { x: box.leftPx + 4, y: box.topPx + 4, width: box.widthPx - 8, height: box.heightPx - 8 };
  const bare = plans.map(({ fromS, toS, aboveC, text }) => ({
    text,
    fromPx: scales.timePx(fromS),
    toPx: scales.timePx(toS),
    yPx: Math.max(box.topPx + HEAD_PX, scales.tempPx(aboveC) - 24),
  }));
  const placed: PlacedBracket[] = [];
  for (const bracket of bare) {
    const taken = [...bare.map(line), ...placed.map(({ words }) => words)];
    placed.push({ ...bracket, words: placeWords(wordsAbout(bracket), taken, bounds) });
  }
  return placed;
}

/** Where its words may stand: over it, under it, further under it; in its middle, to its end, from its beginning, after it. */
function wordsAbout({ text, fromPx, toPx, yPx }: Omit<PlacedBracket, 'words'>): Rect[] {
  const width = wordsPx(text, 13);
  const [above, below] = [yPx - LINE_PX - 4, yPx + FOOT_PX + 4];
  return [above, above - LINE_PX, below, below + LINE_PX + 2, below + 2 * LINE_PX + 4].flatMap((y) =>
    [(fromPx + toPx - width) / 2, toPx - width, fromPx, toPx + 8].map((x) => ({
      x,
      y,
      width,
      height: LINE_PX,
    })),
  );
}

const line = ({ fromPx, toPx, yPx }: Omit<PlacedBracket, 'words'>): Rect => ({
  x: fromPx,
  y: yPx - 1,
  width: toPx - fromPx,
  height: FOOT_PX + 2,
});

/** What a bracket takes of the paper. */
export const takenBy = (bracket: PlacedBracket): Rect[] => [bracket.words, line(bracket)];

/** A bracket over a stretch of the strip with a few words at it. */
export function Bracket({ bracket, hot }: { readonly bracket: PlacedBracket; readonly hot?: boolean }) {
  const { fromPx, toPx, yPx, words, text } = bracket;
  return (
    <g className={hot ? 'strip-bracket strip-bracket-hot' : 'strip-bracket'}>
      <path d={`M${fromPx.toFixed(1)} ${yPx + FOOT_PX}v-${FOOT_PX}H${toPx.toFixed(1)}v${FOOT_PX}`} />
      <text x={words.x + words.width / 2} y={words.y + 12} textAnchor="middle">
        {text}
      </text>
    </g>
  );
}

/** The same beside an upright strip: the stretch marked, the words in its title, since there is no room for them. */
export function UprightBracket({
  scales,
  plan,
}: {
  readonly scales: StripScales;
  readonly plan: BracketPlan;
}) {
  const { box } = scales;
  const right = Math.min(box.leftPx + box.widthPx - 4, scales.tempPx(plan.aboveC) + 12);
  const [from, to] = [scales.timePx(plan.fromS), scales.timePx(plan.toS)];
  return (
    <g className="strip-bracket strip-bracket-hot">
      <path d={`M${right - 5} ${from.toFixed(1)}h5V${to.toFixed(1)}h-5`} />
      <title>{plan.text}</title>
    </g>
  );
}
