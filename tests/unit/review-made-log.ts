import { profileSchema, type Profile, type ProfileInput } from '~/lib/profile/schema';
import { review } from '~/lib/review/review';
import type { ReviewChannel, ReviewInput, ReviewResult } from '~/lib/review/types';

/** Corners of a curve: run time in seconds, °C. */
export type Corners = readonly (readonly [timeS: number, valueC: number])[];

/** 20 → 320 °C at 150/h, 1 h; → 920 °C at 240/h, 1 h 30; → 720 °C at 100/h, 1 h. */
export const PLAN: Profile = profileSchema.parse({
  startC: 20,
  segments: [
    { stage: 'melt-out', toC: 320, rateCPerH: 150, holdS: 3600 },
    { stage: 'vitrification', toC: 920, rateCPerH: 240, holdS: 5400 },
    { stage: 'casting-hold', toC: 720, rateCPerH: 100, holdS: 3600 },
  ],
} satisfies ProfileInput);

/** When the plan's ramps and holds end. */
export const AT = {
  firstHold: 7200,
  secondRamp: 10_800,
  secondHold: 19_800,
  thirdRamp: 25_200,
  thirdHold: 32_400,
  end: 36_000,
} as const;

/** The plan to the letter, then cooling at 200 °C/h for an hour and a half. */
export const ON_PLAN: Corners = [
  [0, 20],
  [AT.firstHold, 320],
  [AT.secondRamp, 320],
  [AT.secondHold, 920],
  [AT.thirdRamp, 920],
  [AT.thirdHold, 720],
  [AT.end, 720],
  [AT.end + 5400, 420],
];

/** Moves every corner from a time on by so many seconds. */
export const later = (corners: Corners, fromS: number, byS: number): Corners =>
  corners.map(([t, v]) => [t >= fromS ? t + byS : t, v]);

export function valueOn(corners: Corners, atS: number): number {
  const next = corners.findIndex(([t]) => t >= atS);
  const [t1, v1] = corners[next < 0 ? corners.length - 1 : next] ?? [0, 0];
  const [t0, v0] = corners[Math.max(0, (next < 0 ? corners.length : next) - 1)] ?? [t1, v1];
  return t1 > t0 && atS < t1 ? v0 + ((v1 - v0) * (atS - t0)) / (t1 - t0) : v1;
}

/** A bump that rises and falls over `edgeS` and is above half its height for `lastsS`. */
export const bump = (startS: number, lastsS: number, byC: number, edgeS: number) => (atS: number) =>
  byC *
  Math.max(0, Math.min(1, (atS - startS + edgeS / 2) / edgeS, (startS + lastsS + edgeS / 2 - atS) / edgeS));

export const START_MS = Date.UTC(2026, 4, 5, 6, 0, 0);

export interface Made {
  readonly corners?: Corners;
  readonly add?: (atS: number) => number;
  /** Last changes, sample by sample; NaN for a missing value, null to leave the row out. */
  readonly change?: (atS: number, valueC: number) => number | null;
  readonly intervalS?: number;
  readonly fromS?: number;
  readonly toS?: number;
}

/** A noiseless log. */
export function madeChannel(
  made: Made = {},
  id = 'chamber',
  role: ReviewChannel['role'] = 'chamber',
): ReviewChannel {
  const { corners = ON_PLAN, add = () => 0, change = (_, v) => v, intervalS = 10, fromS = 0 } = made;
  const toS = made.toS ?? corners[corners.length - 1]?.[0] ?? 0;
  const timeMs: number[] = [];
  const value: number[] = [];
  for (let atS = fromS; atS <= toS; atS += intervalS) {
    const changed = change(atS, valueOn(corners, atS) + add(atS));
    if (changed === null) continue;
    timeMs.push(START_MS + atS * 1000);
    value.push(changed);
  }
  return {
    id,
    name: id,
    role,
    quantity: 'temperature',
    timeMs: Float64Array.from(timeMs),
    value: Float64Array.from(value),
  };
}

/** Reviews a made log against the plan. */
export function reviewMade(made: Made = {}, input: Partial<ReviewInput> = {}): ReviewResult {
  return review({
    profile: PLAN,
    waitBandC: 18,
    openAtC: 120,
    channels: [madeChannel(made)],
    controlChannelId: 'chamber',
    clockEvents: [],
    plannedStartMs: START_MS,
    alignment: { method: 'auto' },
    predicted: null,
    cooling: null,
    ...input,
  });
}

export const kindsOf = (result: ReviewResult) => result.findings.map((finding) => finding.kind);
