import type { z } from '~/lib/zod';
import type {
  furnaceInputSchema,
  kilnInputSchema,
  tariffInputSchema,
  thermocoupleInputSchema,
} from '~/lib/contracts/equipment';
import type { SimulatedKiln } from './firing-simulator';

type KilnInput = z.input<typeof kilnInputSchema>;

/** The kilns of the demo studios: what stands on the plate, and the lumped kiln that the demo's logs were made with. */
export interface DemoKiln {
  readonly plate: KilnInput;
  readonly simulated: SimulatedKiln;
}

export const TALL_KILN: DemoKiln = {
  plate: {
    name: 'Tall kiln',
    energy: 'electric',
    innerWidthM: 0.46,
    innerDepthM: 0.46,
    innerHeightM: 0.56,
    lining: 'brick',
    liningM: 0.114,
    ratedKW: 10.5,
    voltsV: 400,
    maxC: 1280,
    waitBandC: 15,
    programmerSegments: 16,
    note: 'Front loader by the north door. Vent plug in the roof.',
  },
  simulated: {
    fullW: 10_500,
    chamberJPerK: 16_000,
    innerLiningJPerK: 36_000,
    outerLiningJPerK: 42_000,
    loadJPerK: 14_000,
    throughLiningWPerK: 3.4,
    toRoomWPerK: 12,
    toLoadWPerK: 22,
    waitBandC: 15,
  },
};

export const BENCH_KILN: DemoKiln = {
  plate: {
    name: 'Bench kiln',
    energy: 'electric',
    innerWidthM: 0.3,
    innerDepthM: 0.3,
    innerHeightM: 0.32,
    lining: 'fibre',
    liningM: 0.1,
    ratedKW: 3.6,
    voltsV: 230,
    maxC: 1100,
    waitBandC: null,
    programmerSegments: 8,
    note: 'For flasks. Its programmer runs by the clock and does not wait.',
  },
  simulated: {
    fullW: 3600,
    chamberJPerK: 5200,
    innerLiningJPerK: 5200,
    outerLiningJPerK: 4800,
    loadJPerK: 4200,
    throughLiningWPerK: 1.5,
    toRoomWPerK: 5,
    toLoadWPerK: 9,
    waitBandC: null,
  },
};

export const YARD_KILN: DemoKiln = {
  plate: {
    name: 'Yard kiln',
    energy: 'gas',
    innerWidthM: 0.7,
    innerDepthM: 0.6,
    innerHeightM: 0.75,
    lining: 'brick-and-fibre',
    liningM: 0.18,
    burnerKW: 30,
    fuel: 'propane',
    maxC: 1250,
    waitBandC: 25,
    programmerSegments: 12,
    openAtC: 150,
    note: 'Under the yard roof. Outdoor propane store.',
  },
  simulated: {
    fullW: 24_000,
    chamberJPerK: 30_000,
    innerLiningJPerK: 60_000,
    outerLiningJPerK: 70_000,
    loadJPerK: 40_000,
    throughLiningWPerK: 4.4,
    toRoomWPerK: 20,
    toLoadWPerK: 45,
    waitBandC: 25,
  },
};

export const FERRY_KILN: DemoKiln = {
  plate: {
    name: 'Round kiln',
    energy: 'electric',
    innerWidthM: 0.4,
    innerDepthM: 0.4,
    innerHeightM: 0.4,
    lining: 'brick',
    liningM: 0.076,
    ratedKW: 6.2,
    voltsV: 240,
    maxC: 1230,
    waitBandC: 18,
  },
  simulated: {
    fullW: 6200,
    chamberJPerK: 10_000,
    innerLiningJPerK: 20_000,
    outerLiningJPerK: 20_000,
    loadJPerK: 8000,
    throughLiningWPerK: 3.2,
    toRoomWPerK: 9,
    toLoadWPerK: 14,
    waitBandC: 18,
  },
};

export const TARIFFS: Record<'power' | 'gas' | 'ferry', z.input<typeof tariffInputSchema>> = {
  power: {
    name: 'Workshop electricity',
    plan: {
      currency: 'GBP',
      energy: 'electricity',
      per: 'kWh',
      price: '0.2740',
      bands: [{ days: [1, 2, 3, 4, 5, 6, 7], fromMinute: 0, toMinute: 420, pricePerKWh: '0.1620' }],
    },
    note: 'Cheaper from midnight to seven.',
  },
  gas: { name: 'Bottled propane', plan: { currency: 'GBP', energy: 'propane', per: 'kg', price: '1.9500' } },
  ferry: {
    name: 'Building supply',
    plan: { currency: 'USD', energy: 'electricity', per: 'kWh', price: '0.1890' },
  },
};

export const FURNACE: z.input<typeof furnaceInputSchema> = {
  name: 'Pot furnace in the yard',
  energy: 'gas',
  burnerKW: 32,
  fuel: 'propane',
  capacityKg: 18,
  maxC: 1300,
  note: 'Takes one pot at a time; lit with the lid off.',
};

export const THERMOCOUPLES: readonly z.input<typeof thermocoupleInputSchema>[] = [
  {
    name: 'K1, tall kiln',
    type: 'K',
    toleranceClass: '2',
    sheathM: 0.006,
    calibration: [
      { atC: 500, offsetC: -1.5 },
      { atC: 900, offsetC: -3 },
    ],
  },
  { name: 'K2, bench kiln', type: 'K', toleranceClass: '2', sheathM: 0.003 },
  { name: 'N1, yard kiln', type: 'N', toleranceClass: '1', sheathM: 0.008 },
];
