import type { Fault } from './firing-simulator';
import type { LoggerHabit } from './log-writer';
import type { KilnKey, LoadKey, ProfileKey } from './plans';

export interface DemoRun {
  readonly kiln: KilnKey;
  readonly profile: ProfileKey;
  readonly load: LoadKey;
  /** Days before the demo was made, and the local hour it began. */
  readonly daysAgo: number;
  readonly hour: number;
  readonly habit: LoggerHabit;
  readonly intervalS: number;
  readonly noiseC: number;
  readonly faults: readonly Fault[];
  readonly note: string;
}

/** Past runs, oldest first. What went wrong in each was put into its simulated log; the review has to find it. */
export const RUNS: readonly DemoRun[] = [
  {
    kiln: 'tall',
    profile: 'printedShell',
    load: 'printedShells',
    daysAgo: 62,
    hour: 6,
    habit: 'iso-comma',
    intervalS: 30,
    noiseC: 0.6,
    faults: [],
    note: 'First firing of the heron.',
  },
  {
    kiln: 'bench',
    profile: 'plasterFlask',
    load: 'flasks',
    daysAgo: 55,
    hour: 7,
    habit: 'local-semicolon',
    intervalS: 60,
    noiseC: 0.8,
    faults: [],
    note: '',
  },
  {
    kiln: 'tall',
    profile: 'printedShell',
    load: 'printedShells',
    daysAgo: 48,
    hour: 6,
    habit: 'iso-comma',
    intervalS: 30,
    noiseC: 0.7,
    faults: [{ kind: 'runs-high', fromS: 41_000, toS: 43_400, byC: 24 }],
    note: '',
  },
  {
    kiln: 'yard',
    profile: 'waxShell',
    load: 'waxShells',
    daysAgo: 41,
    hour: 8,
    habit: 'elapsed-tab',
    intervalS: 20,
    noiseC: 1.2,
    faults: [],
    note: 'Wind from the yard gate.',
  },
  {
    kiln: 'tall',
    profile: 'printedShell',
    load: 'printedShells',
    daysAgo: 34,
    hour: 5,
    habit: 'local-semicolon',
    intervalS: 30,
    noiseC: 0.6,
    faults: [{ kind: 'opened', fromS: 15_600, toS: 15_780 }],
    note: 'Tray drawn at the hold.',
  },
  {
    kiln: 'bench',
    profile: 'plasterFlask',
    load: 'flasks',
    daysAgo: 30,
    hour: 7,
    habit: 'local-semicolon',
    intervalS: 60,
    noiseC: 0.8,
    faults: [{ kind: 'power-cut', fromS: 21_000, toS: 22_500 }],
    note: '',
  },
  {
    kiln: 'tall',
    profile: 'printedShell',
    load: 'printedShells',
    daysAgo: 27,
    hour: 6,
    habit: 'iso-comma',
    intervalS: 30,
    noiseC: 0.7,
    faults: [{ kind: 'weak-elements', share: 0.3 }],
    note: 'One element row dark.',
  },
  {
    kiln: 'tall',
    profile: 'refire',
    load: 'emptyShells',
    daysAgo: 20,
    hour: 9,
    habit: 'iso-comma',
    intervalS: 30,
    noiseC: 0.6,
    faults: [{ kind: 'no-rows', fromS: 7200, toS: 8700 }],
    note: 'Elements renewed.',
  },
  {
    kiln: 'bench',
    profile: 'plasterFlask',
    load: 'flasks',
    daysAgo: 16,
    hour: 7,
    habit: 'elapsed-tab',
    intervalS: 60,
    noiseC: 0.4,
    faults: [{ kind: 'spike', atS: 12_000, byC: 90 }],
    note: '',
  },
  {
    kiln: 'tall',
    profile: 'printedShell',
    load: 'printedShells',
    daysAgo: 12,
    hour: 6,
    habit: 'iso-comma',
    intervalS: 30,
    noiseC: 0.7,
    faults: [{ kind: 'open-sensor', fromS: 30_000, toS: 30_900 }],
    note: '',
  },
  {
    kiln: 'tall',
    profile: 'printedShell',
    load: 'printedShells',
    daysAgo: 7,
    hour: 6,
    habit: 'local-semicolon',
    intervalS: 30,
    noiseC: 0.6,
    faults: [{ kind: 'runs-high', fromS: 41_200, toS: 42_800, byC: 31 }],
    note: 'Top shelf felt hot at the pour.',
  },
  {
    kiln: 'bench',
    profile: 'plasterFlask',
    load: 'flasks',
    daysAgo: 3,
    hour: 7,
    habit: 'local-semicolon',
    intervalS: 60,
    noiseC: 0.8,
    faults: [{ kind: 'log-stops', atS: 33_000 }],
    note: 'Logger battery.',
  },
];
