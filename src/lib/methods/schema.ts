/** How one model works, for whoever wants to know what a figure rests on. */
export interface Method {
  /** Anchor of the page. */
  readonly id: string;
  readonly name: string;
  /** What it answers, in a sentence or two. */
  readonly says: string;
  /** Equations in plain characters, one a line. */
  readonly equations: readonly string[];
  /** Symbols with their units. */
  readonly symbols: readonly (readonly [symbol: string, meaning: string])[];
  readonly validity: string;
  /** What its tests found, and against what. */
  readonly accuracy: string;
  readonly leavesOut: string;
  readonly sources: readonly string[];
}
