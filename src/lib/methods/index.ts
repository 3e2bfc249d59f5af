import type { Caution } from '../thermal/estimate-schema';
import { kilnAndMould } from './kiln-and-mould';
import { patternAndMetal } from './pattern-and-metal';
import type { Method } from './schema';

export type { Method } from './schema';

/** Every model, in the order of the page. */
export const METHODS: readonly Method[] = [...kilnAndMould, ...patternAndMetal];

/** The method that explains each caution. */
export const METHOD_OF_CAUTION: Readonly<Record<Caution['code'], string>> = {
  'above-kiln-limit': 'limits',
  'above-material-limit': 'limits',
  'above-thermocouple-limit': 'limits',
  'kiln-cannot-follow': 'kiln',
  'steam-in-wall': 'water',
  'pattern-expands-first': 'pattern',
  'no-drain-step': 'pattern',
  'burnout-incomplete': 'pattern',
  'burnout-starved': 'air',
  'offgas-peak': 'air',
  'burning-heats-kiln': 'kiln',
  'too-steep-for-wall': 'stress',
  'inversion-too-fast': 'stress',
  'core-behind-at-hold-end': 'mould',
  'heat-work-short': 'heat-work',
  oversintered: 'heat-work',
  cristobalite: 'heat-work',
  'sulphur-risk': 'pattern',
  'cooling-too-fast': 'stress',
  'mould-cold-at-pour': 'melt',
  'metal-not-ready': 'melt',
  'attended-at-night': 'limits',
  'opens-hot': 'limits',
  'programmer-cannot-hold-it': 'limits',
};

/** Where a caution is explained. */
export const explanationOf = (code: Caution['code']): string => `/methods#${METHOD_OF_CAUTION[code]}`;
