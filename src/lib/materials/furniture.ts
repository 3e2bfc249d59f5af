import { constant, curve } from './property';
import type { FurnitureMaterial } from './schema';

const HANDBOOK = 'Handbook of refractories, recalled';

const ceramicHeatCapacity = curve(
  [
    [25, 780],
    [400, 1020],
    [800, 1130],
    [1200, 1190],
  ],
  'J/(kg·K)',
  `${HANDBOOK}: aluminosilicates`,
  'memory',
);
/** Mean over each stretch meets the enthalpies of the same polynomials. */
const mulliteHeatCapacity = curve(
  [
    [25, 766],
    [77, 849],
    [127, 916],
    [227, 1014],
    [327, 1080],
    [527, 1159],
    [727, 1205],
    [927, 1235],
    [1127, 1258],
    [1327, 1277],
  ],
  'J/(kg·K)',
  'NASA TM-4513 polynomials of mullite, 3Al2O3·2SiO2 (JANAF 9/67)',
  'published',
);
const ceramicEmissivity = constant(0.75, '1', HANDBOOK, 'memory');

export const furniture: FurnitureMaterial[] = [
  {
    id: 'cordierite',
    name: 'Cordierite shelf or prop',
    note: 'The usual shelf of studio kilns.',
    properties: {
      densityKgPerM3: constant(1950, 'kg/m³', HANDBOOK, 'memory'),
      conductivityWPerMK: constant(1.5, 'W/(m·K)', HANDBOOK, 'memory'),
      heatCapacityJPerKgK: ceramicHeatCapacity,
      emissivity: ceramicEmissivity,
      maxC: constant(1280, '°C', HANDBOOK, 'memory'),
    },
  },
  {
    id: 'mullite',
    name: 'Mullite shelf or prop',
    note: 'Heavier and hotter than cordierite.',
    properties: {
      densityKgPerM3: constant(2400, 'kg/m³', HANDBOOK, 'memory'),
      conductivityWPerMK: constant(1.9, 'W/(m·K)', HANDBOOK, 'memory'),
      heatCapacityJPerKgK: mulliteHeatCapacity,
      emissivity: ceramicEmissivity,
      maxC: constant(1400, '°C', HANDBOOK, 'memory'),
    },
  },
  {
    id: 'silicon-carbide',
    name: 'Silicon carbide shelf',
    note: 'Thin and stiff; conducts electricity and heat.',
    properties: {
      densityKgPerM3: constant(2700, 'kg/m³', HANDBOOK, 'memory'),
      conductivityWPerMK: curve(
        [
          [200, 25],
          [1000, 15],
        ],
        'W/(m·K)',
        `${HANDBOOK}: oxide- and nitride-bonded`,
        'memory',
      ),
      heatCapacityJPerKgK: curve(
        [
          [25, 690],
          [400, 1010],
          [800, 1160],
          [1200, 1240],
        ],
        'J/(kg·K)',
        HANDBOOK,
        'memory',
      ),
      emissivity: constant(0.9, '1', HANDBOOK, 'memory'),
      maxC: constant(1400, '°C', HANDBOOK, 'memory'),
    },
  },
  {
    id: 'insulating-firebrick',
    name: 'Loose insulating firebrick',
    note: 'Bricks set under or around the moulds.',
    properties: {
      densityKgPerM3: constant(
        585,
        'kg/m³',
        'ASTM C155 group 23, group table of a distributor: 520-650',
        'published',
      ),
      conductivityWPerMK: constant(
        0.21,
        'W/(m·K)',
        'Pressed group 23 brick at 600 °C, makers’ sheets, recalled',
        'memory',
      ),
      heatCapacityJPerKgK: constant(1050, 'J/(kg·K)', 'Makers’ sheets, recalled', 'memory'),
      emissivity: constant(0.8, '1', HANDBOOK, 'memory'),
      maxC: constant(1260, '°C', 'ASTM C155 group table of a distributor: 1230-1300', 'published'),
    },
  },
  {
    id: 'stainless-steel',
    name: 'Stainless steel tray, flask or grate',
    note: 'Drain trays and perforated flasks. Scales away above about 900 °C.',
    properties: {
      densityKgPerM3: constant(7900, 'kg/m³', 'Austenitic steel, handbook, recalled', 'memory'),
      conductivityWPerMK: curve(
        [
          [20, 15],
          [500, 21],
          [900, 27],
        ],
        'W/(m·K)',
        'Austenitic steel, handbook, recalled',
        'memory',
      ),
      heatCapacityJPerKgK: curve(
        [
          [20, 490],
          [500, 580],
          [900, 640],
        ],
        'J/(kg·K)',
        'Austenitic steel, handbook, recalled',
        'memory',
      ),
      emissivity: constant(0.8, '1', 'Oxidised steel, handbook, recalled', 'memory'),
      maxC: constant(925, '°C', 'Type 304 in intermittent service, handbook, recalled: 870-925 °C', 'memory'),
    },
  },
];
