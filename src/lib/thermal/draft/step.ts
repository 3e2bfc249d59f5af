import type { Profile, Segment } from '../../profile/schema';
import type { Caution } from '../estimate-schema';
import type { Simulation } from '../simulation';
import type { Words } from '../cautions/view';
import type { DraftNeeds } from './needs';

/** Why a segment is as it is. */
export interface Reason {
  readonly text: string;
  readonly source: string;
}

/** What a segment of a draft is there for. */
export type Purpose =
  | 'dry'
  | 'melt-wax'
  | 'melt-print'
  | 'char-below-limit'
  | 'rest'
  | 'burn'
  | 'last-carbon'
  | 'vitrify'
  | 'cast'
  | 'cool'
  | 'cool-slowly';

/** A segment of a draft on its way to being settled. */
export interface DraftStep {
  readonly purpose: Purpose;
  segment: Segment;
  /** Hottest and coldest target it may be given, °C. */
  readonly highC: number;
  readonly lowC: number;
  /** Said of the segment as it is in the end. */
  readonly reasons: (step: DraftStep, said: Said) => readonly Reason[];
}

/** What the reasons may speak of. */
export interface Said {
  readonly needs: DraftNeeds;
  readonly words: Words;
  readonly simulation: Simulation;
  readonly cautions: readonly Caution[];
  readonly index: number;
}

/** A segment with everything but what is given left plain. */
export const plainSegment = (
  fields: Pick<Segment, 'stage' | 'toC' | 'rateCPerH' | 'holdS'> & Partial<Segment>,
): Segment => ({ attended: false, drain: false, vent: 'closed', instruction: '', ...fields });

export const profileOf = (steps: readonly DraftStep[], startC: number): Profile => ({
  startC,
  segments: steps.map(({ segment }) => segment),
});

/** To the next five minutes. */
export const wholeMinutesS = (durationS: number): number => Math.ceil(durationS / 300) * 300;
