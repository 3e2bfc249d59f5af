import type { Confidence, KineticSet, KineticStep } from './schema';

const FITTED =
  'First-order step whose pre-exponential was set so that its peak at 10 K/min meets a remembered literature peak; a fit, not a measurement';

type StepFigures = Pick<KineticStep, 'name' | 'massShare' | 'activationKJPerMol' | 'preExponentialPerS'> &
  Partial<Pick<KineticStep, 'model' | 'source' | 'confidence'>>;

const step = (figures: StepFigures): KineticStep => ({
  model: 'first-order',
  follows: null,
  needsAir: false,
  source: FITTED,
  confidence: 'derived',
  ...figures,
});

/** Burning of the char or soot that an earlier step leaves; peak at 520 °C at 10 K/min in air. */
const charOf = (follows: string, massShare: number): KineticStep => ({
  name: 'char burns',
  massShare,
  activationKJPerMol: 140,
  preExponentialPerS: 7.4e6,
  model: 'first-order',
  follows,
  needsAir: true,
  source: `${FITTED}; a char share of 2-8 % is remembered`,
  confidence: 'derived',
});

const inAir = (name: string, ...steps: KineticStep[]): KineticSet => ({ name, atmosphere: 'air', steps });

export const plaInAir = inAir(
  'PLA in air',
  step({ name: 'polymer', massShare: 0.98, activationKJPerMol: 150, preExponentialPerS: 2.9e10 }),
  charOf('polymer', 0.02),
);

const published = (
  name: string,
  activationKJPerMol: number,
  preExponentialPerS: number,
  model: KineticStep['model'],
  source: string,
  confidence: Confidence,
): KineticSet => ({
  name,
  atmosphere: 'nitrogen',
  steps: [
    step({
      name: 'polymer',
      massShare: 1,
      activationKJPerMol,
      preExponentialPerS,
      model,
      source,
      confidence,
    }),
  ],
});

const PLLA_STUDY =
  'Pyrolysis kinetics of poly(L-lactide) with carboxyl and calcium salt end structures, abstract';

/** What other sources say of PLA in nitrogen; calcium left from the catalyst moves it by tens of kelvin. */
export const plaElsewhere: KineticSet[] = [
  published('PLLA, carboxyl ends', 176, 2.0e12, 'random-scission', PLLA_STUDY, 'published'),
  published('PLLA, calcium ends', 98, 8.4e5, 'first-order', PLLA_STUDY, 'published'),
  published('PLA, default in nitrogen', 180, 4.79e12, 'first-order', FITTED, 'derived'),
];

export const patternWaxInAir = inAir(
  'Pattern wax in air',
  step({ name: 'wax', massShare: 0.65, activationKJPerMol: 85, preExponentialPerS: 1.48e5 }),
  step({ name: 'resin', massShare: 0.33, activationKJPerMol: 200, preExponentialPerS: 3.51e12 }),
  charOf('resin', 0.02),
);

export const filledWaxInAir = inAir(
  'Filled wax in air',
  step({ name: 'wax', massShare: 0.6, activationKJPerMol: 85, preExponentialPerS: 1.48e5 }),
  step({ name: 'filler and resin', massShare: 0.36, activationKJPerMol: 200, preExponentialPerS: 3.51e12 }),
  charOf('filler and resin', 0.04),
);

export const paraffinInAir = inAir(
  'Paraffin in air',
  step({ name: 'paraffin', massShare: 0.98, activationKJPerMol: 80, preExponentialPerS: 9.53e4 }),
  charOf('paraffin', 0.02),
);

export const beeswaxInAir = inAir(
  'Beeswax in air',
  step({ name: 'wax', massShare: 0.98, activationKJPerMol: 130, preExponentialPerS: 7.03e7 }),
  charOf('wax', 0.02),
);

export const acrylateInAir = inAir(
  'Acrylate network in air',
  step({ name: 'side groups', massShare: 0.25, activationKJPerMol: 140, preExponentialPerS: 2.48e9 }),
  step({ name: 'network', massShare: 0.7, activationKJPerMol: 210, preExponentialPerS: 3.39e13 }),
  charOf('network', 0.05),
);

export const polystyreneInAir = inAir(
  'Polystyrene in air',
  step({ name: 'polymer', massShare: 0.96, activationKJPerMol: 120, preExponentialPerS: 3.24e7 }),
  charOf('polymer', 0.04),
);

export const polystyreneElsewhere: KineticSet[] = [
  published(
    'Polystyrene in nitrogen',
    168,
    2.56e10,
    'first-order',
    'Activation energy: single-step fit of a combustion calorimeter study of polystyrene, abstract; pre-exponential set to a peak at 425 °C at 10 K/min',
    'derived',
  ),
];

export const polyvinylButyralInAir = inAir(
  'Polyvinyl butyral in air',
  step({ name: 'polymer', massShare: 0.9, activationKJPerMol: 150, preExponentialPerS: 5.57e9 }),
  charOf('polymer', 0.1),
);
