import type { Confidence, Mineral } from './schema';

/** A change of crystal on heating and cooling that moves a mould by much in a narrow range. */
export type Inversion = {
  mineral: Mineral;
  name: string;
  fromC: number;
  toC: number;
  /** Linear change on heating, as a share. */
  linearStrainShare: number;
  source: string;
  confidence: Confidence;
};

export const inversions: Inversion[] = [
  {
    mineral: 'quartz',
    name: 'quartz inversion',
    fromC: 560,
    toC: 585,
    linearStrainShare: 0.0045,
    source: 'Quartz inversion at 573 °C, +0.45 % linear, public mineralogy page',
    confidence: 'published',
  },
  {
    mineral: 'cristobalite',
    name: 'cristobalite inversion',
    fromC: 200,
    toC: 275,
    linearStrainShare: 0.0115,
    source: 'Cristobalite α-β at 200-275 °C, 1-1.3 % linear, recalled',
    confidence: 'memory',
  },
];

/** Inversions that a mould has, by what it contains. */
export const inversionsOf = (contains: readonly Mineral[]): Inversion[] =>
  inversions.filter((inversion) => contains.includes(inversion.mineral));
