import { constant, curve } from './property';
import { gypsumLimits, phosphateLimits } from './rate-limits';
import { gypsumReactions, phosphateReactions } from './reactions';
import type { MouldMaterial } from './schema';

const HANDBOOK = 'Handbook range for block investments, recalled';
const CHECKLIST = 'Checklist on a jewellery-casting page';
const PHILLIPS = 'Phillips’ Science of Dental Materials, recalled';

const emissivity = constant(0.85, '1', 'Plaster and rough ceramics, handbook, recalled', 'memory');

/** kg of gypsum (dihydrate) in 1 kg of set dry mould: 30 % hemihydrate in the powder, recalled. */
const INVESTMENT_GYPSUM_SHARE = 0.34;
/** Half plaster, half silica by mass: 1 kg of plaster takes up 0.186 kg of water. */
const ART_GYPSUM_SHARE = 0.54;

const gypsumCommon = {
  emissivity,
  densityKgPerM3: constant(1100, 'kg/m³', `${HANDBOOK}: 1000-1200 dry`, 'memory'),
  conductivityWPerMK: curve(
    [
      [20, 0.35],
      [200, 0.25],
      [800, 0.3],
    ],
    'W/(m·K)',
    `${HANDBOOK}: 0.2-0.4 dry`,
    'memory',
  ),
  wetConductivityWPerMK: constant(0.75, 'W/(m·K)', `${HANDBOOK}: 0.6-0.9 wet`, 'memory'),
  heatCapacityJPerKgK: constant(1050, 'J/(kg·K)', `${HANDBOOK}: 1000-1100`, 'memory'),
  porosityShare: constant(0.55, '1', 'From its density and that of its powder', 'derived'),
  tortuosity: constant(3, '1', 'Vapour in porous ceramics: 2-4, handbook, recalled', 'memory'),
  maxC: constant(788, '°C', `${CHECKLIST}: work at 732-760 °C, do not exceed 788 °C (1450 °F)`, 'published'),
  maxWithCarbonC: constant(
    700,
    '°C',
    `${PHILLIPS}: carbon and calcium sulphate react from 700-750 °C`,
    'memory',
  ),
  greenStrengthPa: constant(2e6, 'Pa', HANDBOOK, 'memory'),
  firedStrengthPa: constant(1e6, 'Pa', HANDBOOK, 'memory'),
  youngPa: constant(4e9, 'Pa', HANDBOOK, 'memory'),
  poissonRatio: constant(0.2, '1', HANDBOOK, 'memory'),
  expansionPerK: constant(12e-6, '1/K', `${HANDBOOK}, outside the inversions`, 'memory'),
};

export const investments: MouldMaterial[] = [
  {
    id: 'gypsum-investment',
    name: 'Gypsum investment',
    note: 'Plaster with cristobalite and quartz, for flasks. Breaks down and gives off sulphur dioxide if too hot.',
    form: 'flask',
    binder: 'gypsum',
    contains: ['gypsum', 'cristobalite', 'quartz'],
    properties: {
      ...gypsumCommon,
      freshWaterShare: constant(
        0.33,
        'kg/kg',
        '0.25 kg of water in 1 kg of wet mould, from 38-40 g per 100 g powder',
        'derived',
      ),
    },
    rateLimits: gypsumLimits,
    reactions: gypsumReactions(INVESTMENT_GYPSUM_SHARE),
  },
  {
    id: 'plaster-silica',
    name: 'Plaster and silica, art mould',
    note: 'Half plaster, half silica flour or grog: large block moulds, fired for days at 480-650 °C.',
    form: 'flask',
    binder: 'gypsum',
    contains: ['gypsum', 'quartz'],
    properties: {
      ...gypsumCommon,
      freshWaterShare: constant(0.5, 'kg/kg', 'Mixed thinner than flask investment', 'common-practice'),
    },
    rateLimits: gypsumLimits.filter((limit) => limit.zone !== 'cristobalite'),
    reactions: gypsumReactions(ART_GYPSUM_SHARE),
  },
  {
    id: 'phosphate-investment',
    name: 'Phosphate investment',
    note: 'For hot metals. Gives off ammonia above 200 °C.',
    form: 'flask',
    binder: 'phosphate',
    contains: ['magnesium-phosphate', 'cristobalite', 'quartz'],
    properties: {
      emissivity,
      densityKgPerM3: constant(1700, 'kg/m³', HANDBOOK, 'memory'),
      conductivityWPerMK: constant(0.6, 'W/(m·K)', HANDBOOK, 'memory'),
      wetConductivityWPerMK: constant(1.0, 'W/(m·K)', HANDBOOK, 'memory'),
      heatCapacityJPerKgK: constant(1050, 'J/(kg·K)', HANDBOOK, 'memory'),
      porosityShare: constant(0.3, '1', HANDBOOK, 'memory'),
      tortuosity: constant(3, '1', 'Vapour in porous ceramics: 2-4, handbook, recalled', 'memory'),
      maxC: constant(1000, '°C', `${PHILLIPS}: burned out at 800-900 °C`, 'memory'),
      greenStrengthPa: constant(3e6, 'Pa', HANDBOOK, 'memory'),
      firedStrengthPa: constant(4e6, 'Pa', HANDBOOK, 'memory'),
      youngPa: constant(8e9, 'Pa', HANDBOOK, 'memory'),
      poissonRatio: constant(0.2, '1', HANDBOOK, 'memory'),
      expansionPerK: constant(11e-6, '1/K', `${HANDBOOK}, outside the inversions`, 'memory'),
      freshWaterShare: constant(
        0.15,
        'kg/kg',
        'Liquid to powder 0.16-0.25, part of it bound, recalled',
        'memory',
      ),
    },
    rateLimits: phosphateLimits,
    reactions: phosphateReactions(0.15),
  },
];
