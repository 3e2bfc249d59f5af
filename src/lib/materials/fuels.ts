import { constant } from './property';
import type { FuelMaterial } from './schema';

const RULE = '40 CFR 98, Table C-1, on the higher heating value';
const COMBUSTION =
  'Complete combustion with cold air, no dissociation; mixing of ideal gases; share of the higher heating value';

const flues = [300, 500, 700, 900, 1100, 1300];
const excess = [0, 0.1, 0.25, 0.5, 1];

/** Energy carriers that a studio pays for. CO2 of electricity differs by place and hour: the studio's own figure comes first. */
export const fuels: FuelMaterial[] = [
  {
    id: 'propane',
    name: 'Propane',
    note: 'Sold by mass or by liquid volume.',
    properties: {
      higherHeatingJPerKg: constant(50.3e6, 'J/kg', 'Handbook, recalled', 'memory'),
      lowerHeatingJPerKg: constant(46.3e6, 'J/kg', 'Handbook, recalled', 'memory'),
      gasDensityKgPerM3: constant(
        1.89,
        'kg/m³',
        'Real gas at 15 °C and 101.325 kPa, handbook, recalled',
        'memory',
      ),
      airKgPerKg: constant(15.6, 'kg/kg', 'Stoichiometry of C3H8', 'derived'),
      co2KgPerKWh: constant(0.2145, 'kg/kWh', `${RULE}: 62.87 kg per million Btu`, 'published'),
    },
    availableHeat: {
      fluesC: flues,
      excessAirShares: excess,
      shares: [
        [0.82, 0.81, 0.8, 0.77, 0.73],
        [0.74, 0.72, 0.7, 0.66, 0.59],
        [0.66, 0.64, 0.6, 0.55, 0.43],
        [0.57, 0.54, 0.5, 0.42, 0.28],
        [0.48, 0.45, 0.39, 0.3, 0.11],
        [0.39, 0.35, 0.28, 0.17, 0],
      ],
      source: COMBUSTION,
      confidence: 'derived',
    },
  },
  {
    id: 'natural-gas',
    name: 'Natural gas',
    note: 'Sold by volume or by energy; taken as methane where its make-up matters.',
    properties: {
      higherHeatingJPerKg: constant(
        53.1e6,
        'J/kg',
        'Pipeline gas, handbook, recalled: 52-54 MJ/kg',
        'memory',
      ),
      lowerHeatingJPerKg: constant(47.8e6, 'J/kg', '0.90 of the higher heating value', 'memory'),
      gasDensityKgPerM3: constant(
        0.72,
        'kg/m³',
        '38.2 MJ/m³ (40 CFR 98: 1.026 million Btu per 1000 ft³) over 53.1 MJ/kg; at 15 °C',
        'derived',
      ),
      airKgPerKg: constant(17.2, 'kg/kg', 'Stoichiometry of CH4', 'derived'),
      co2KgPerKWh: constant(0.181, 'kg/kWh', `${RULE}: 53.06 kg per million Btu`, 'published'),
    },
    availableHeat: {
      fluesC: flues,
      excessAirShares: excess,
      shares: [
        [0.8, 0.79, 0.78, 0.75, 0.71],
        [0.72, 0.7, 0.68, 0.64, 0.56],
        [0.64, 0.61, 0.58, 0.52, 0.41],
        [0.55, 0.52, 0.47, 0.4, 0.25],
        [0.46, 0.42, 0.37, 0.27, 0.09],
        [0.37, 0.32, 0.25, 0.14, 0],
      ],
      source: COMBUSTION,
      confidence: 'derived',
    },
  },
  {
    id: 'electricity',
    name: 'Electricity',
    note: 'Its CO2 depends on where and when: enter the studio’s own figure.',
    properties: {
      co2KgPerKWh: constant(0.4, 'kg/kWh', 'Mixed grids 0.35-0.50, recalled', 'memory'),
    },
    availableHeat: null,
  },
];
