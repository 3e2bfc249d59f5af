import { constant, curve } from './property';
import type { LiningMaterial } from './schema';

const SHEETS = 'Makers’ data sheets, recalled, ±15 %';
const conductivity = (points: [number, number][], source: string) =>
  curve(points, 'W/(m·K)', source, 'memory');

export const linings: LiningMaterial[] = [
  {
    id: 'firebrick-23',
    name: 'Insulating firebrick, group 23',
    note: 'The usual brick of studio kilns.',
    properties: {
      densityKgPerM3: constant(585, 'kg/m³', 'ASTM C155 group table of a distributor: 520-650', 'published'),
      conductivityWPerMK: conductivity(
        [
          [200, 0.16],
          [400, 0.18],
          [600, 0.21],
          [800, 0.24],
          [1000, 0.28],
        ],
        `Pressed brick; ${SHEETS}`,
      ),
      heatCapacityJPerKgK: constant(1050, 'J/(kg·K)', SHEETS, 'memory'),
      emissivity: constant(0.8, '1', 'Rough firebrick, handbook, recalled', 'memory'),
      maxC: constant(1260, '°C', 'ASTM C155 group table of a distributor: 1230-1300', 'published'),
    },
  },
  {
    id: 'firebrick-26',
    name: 'Insulating firebrick, group 26',
    note: 'Hotter, heavier and less insulating than group 23.',
    properties: {
      densityKgPerM3: constant(810, 'kg/m³', 'ASTM C155 group table of a distributor: 615-1000', 'published'),
      conductivityWPerMK: conductivity(
        [
          [200, 0.23],
          [400, 0.25],
          [600, 0.27],
          [800, 0.3],
          [1000, 0.33],
          [1200, 0.36],
        ],
        SHEETS,
      ),
      heatCapacityJPerKgK: constant(1075, 'J/(kg·K)', SHEETS, 'memory'),
      emissivity: constant(0.8, '1', 'Rough firebrick, handbook, recalled', 'memory'),
      maxC: constant(1375, '°C', 'ASTM C155 group table of a distributor: 1350-1400', 'published'),
    },
  },
  {
    id: 'fibre-blanket',
    name: 'Ceramic fibre blanket, 128 kg/m³',
    note: 'Stores little heat: heats and cools fast.',
    properties: {
      densityKgPerM3: constant(128, 'kg/m³', 'Nominal density of the product class', 'published'),
      conductivityWPerMK: conductivity(
        [
          [200, 0.06],
          [400, 0.1],
          [600, 0.15],
          [800, 0.21],
          [1000, 0.28],
          [1200, 0.36],
        ],
        'Makers’ data sheets, recalled, ±25 % across makers; ASTM C892 allows 0.095 at 204 °C',
      ),
      heatCapacityJPerKgK: constant(1130, 'J/(kg·K)', SHEETS, 'memory'),
      emissivity: constant(0.75, '1', 'Handbook, recalled', 'memory'),
      maxC: constant(1200, '°C', 'Long-term limit of the 1260 °C class, recalled', 'memory'),
    },
  },
  {
    id: 'backing-board',
    name: 'Backing board, calcium silicate',
    note: 'Behind brick or blanket, never at the hot face.',
    properties: {
      densityKgPerM3: constant(240, 'kg/m³', SHEETS, 'memory'),
      conductivityWPerMK: conductivity(
        [
          [100, 0.057],
          [200, 0.065],
          [400, 0.085],
          [600, 0.11],
        ],
        SHEETS,
      ),
      heatCapacityJPerKgK: constant(1030, 'J/(kg·K)', SHEETS, 'memory'),
      emissivity: constant(0.9, '1', 'Handbook, recalled', 'memory'),
      maxC: constant(1000, '°C', SHEETS, 'memory'),
    },
  },
  {
    id: 'casing-steel',
    name: 'Steel casing',
    note: 'Painted sheet.',
    properties: {
      densityKgPerM3: constant(7850, 'kg/m³', 'Handbook, recalled', 'memory'),
      conductivityWPerMK: conductivity(
        [
          [20, 52],
          [200, 48],
          [400, 42],
          [600, 35],
        ],
        'Carbon steel, handbook, recalled',
      ),
      heatCapacityJPerKgK: curve(
        [
          [20, 460],
          [200, 520],
          [400, 600],
        ],
        'J/(kg·K)',
        'Carbon steel, handbook, recalled',
        'memory',
      ),
      emissivity: constant(0.9, '1', 'Paint, handbook, recalled', 'memory'),
      maxC: constant(400, '°C', 'Scales and loses its paint above', 'common-practice'),
    },
  },
];
