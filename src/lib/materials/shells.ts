import { constant, curve } from './property';
import { aluminosilicateLimits, shellLimits } from './rate-limits';
import type { MouldMaterial } from './schema';

const PRACTICE = 'Practice of shell foundries';
const HANDBOOK = 'Handbook range for shells, recalled';
const JONES_YUAN = 'Jones and Yuan, J. Mater. Process. Technol. 135, 258 (2003), recalled';
const XU_2016 = 'Xu, Lekakh and Richards, Int. J. Metalcasting 2016, doi 10.1007/s40962-016-0052-4';
const HEAT_WORK =
  'No published value exists for these binders; sound shells come from 820 °C for 2 h to 930 °C for 2 h';

const emissivity = curve(
  [
    [200, 0.8],
    [600, 0.7],
    [1000, 0.6],
  ],
  '1',
  'Total emissivity of silica ceramics, recalled: 0.8 cold, 0.45-0.6 at 1000 °C',
  'memory',
);

/** What every shell bonded with colloidal silica has in common. */
const shellCommon = {
  emissivity,
  porosityShare: constant(
    0.28,
    '1',
    `${XU_2016}: 10-30 % in steel foundries; 25-35 % usual by hand`,
    'published',
  ),
  tortuosity: constant(3, '1', 'Vapour in porous ceramics: 2-4, handbook, recalled', 'memory'),
  permeabilityM2: constant(2e-14, 'm²', `${HANDBOOK}: 1e-15 to 1e-13, weak`, 'memory'),
  greenStrengthPa: constant(3.5e6, 'Pa', `${JONES_YUAN}: modulus of rupture 2-6 MPa dry`, 'memory'),
  wetStrengthShare: constant(
    0.45,
    '1',
    `${JONES_YUAN}: 30-60 % of the dry strength when steam-wet`,
    'memory',
  ),
  firedStrengthPa: constant(5e6, 'Pa', `${JONES_YUAN}: 3-8 MPa fired and cold`, 'memory'),
  poissonRatio: constant(0.2, '1', HANDBOOK, 'memory'),
  typicalWallM: constant(0.008, 'm', 'Trade article: walls of 4.8-15.9 mm', 'published'),
  coatM: constant(0.0009, 'm', `${PRACTICE}: back-up coats of 0.7-1.2 mm`, 'common-practice'),
  freshWaterShare: constant(0.12, 'kg/kg', `${PRACTICE}: just coated, by weighing`, 'common-practice'),
  heatWorkReferenceC: constant(870, '°C', HEAT_WORK, 'common-practice'),
  heatWorkActivationKJPerMol: constant(
    300,
    'kJ/mol',
    `${HEAT_WORK}; silica gels lie at 300-500, weak`,
    'memory',
  ),
  heatWorkTargetH: constant(0.5, 'h', HEAT_WORK, 'common-practice'),
  heatWorkMostH: constant(
    150,
    'h',
    'What 1050 °C for 2 h comes to; full handling strength is had at 950-1050 °C in 0.5-1 h',
    'derived',
  ),
  cristobaliteFromC: constant(1100, '°C', `${PRACTICE}: cristobalite grows above 1100 °C`, 'common-practice'),
  cristobaliteAfterH: constant(1, 'h', `${PRACTICE}: more than 1-2 h above 1100 °C`, 'common-practice'),
};

const silicaHeatCapacity = curve(
  [
    [25, 740],
    [300, 960],
    [600, 1080],
    [900, 1170],
    [1100, 1220],
  ],
  'J/(kg·K)',
  'JANAF tables for fused silica, recalled',
  'memory',
);

export const shells: MouldMaterial[] = [
  {
    id: 'fused-silica-shell',
    name: 'Fused silica shell',
    note: 'Hardly expands: stands shock, but turns to cristobalite if held too hot.',
    form: 'shell',
    binder: 'silica',
    contains: ['fused-silica'],
    properties: {
      ...shellCommon,
      densityKgPerM3: constant(1650, 'kg/m³', `${HANDBOOK}: 1500-1750`, 'memory'),
      conductivityWPerMK: curve(
        [
          [20, 0.457],
          [1200, 0.87],
        ],
        'W/(m·K)',
        'Sabau; Jones and Yuan, recalled: 0.45 + 3.5e-4·T(°C)',
        'memory',
      ),
      heatCapacityJPerKgK: silicaHeatCapacity,
      maxC: constant(1200, '°C', `${PRACTICE}: cristobalite and sagging above`, 'common-practice'),
      youngPa: constant(20e9, 'Pa', HANDBOOK, 'memory'),
      expansionPerK: constant(0.6e-6, '1/K', 'Fused silica, handbook, recalled', 'memory'),
    },
    rateLimits: shellLimits,
    reactions: [],
  },
  {
    id: 'aluminosilicate-shell',
    name: 'Aluminosilicate shell',
    note: 'Calcined clay (mullite and glass) bonded with silica: stiffer when hot, expands more.',
    form: 'shell',
    binder: 'silica',
    contains: ['mullite', 'fused-silica'],
    properties: {
      ...shellCommon,
      densityKgPerM3: constant(1850, 'kg/m³', `${HANDBOOK}: 1750-2000`, 'memory'),
      conductivityWPerMK: curve(
        [
          [20, 0.804],
          [1200, 1.04],
        ],
        'W/(m·K)',
        `${HANDBOOK}: 0.8 + 2e-4·T(°C), between 0.7 and 1.2`,
        'memory',
      ),
      heatCapacityJPerKgK: curve(
        [
          [25, 760],
          [300, 980],
          [600, 1090],
          [1000, 1170],
        ],
        'J/(kg·K)',
        'Mullite and silica glass by mass, handbook, recalled',
        'memory',
      ),
      maxC: constant(1250, '°C', `${PRACTICE}: its silica binder sets the limit`, 'common-practice'),
      youngPa: constant(15e9, 'Pa', HANDBOOK, 'memory'),
      expansionPerK: constant(5e-6, '1/K', HANDBOOK, 'memory'),
    },
    rateLimits: aluminosilicateLimits,
    reactions: [],
  },
  {
    id: 'zircon-shell',
    name: 'Zircon shell',
    note: 'Zircon in the face coats or throughout: heavy, conducts better.',
    form: 'shell',
    binder: 'silica',
    contains: ['zircon', 'fused-silica'],
    properties: {
      ...shellCommon,
      densityKgPerM3: constant(2800, 'kg/m³', `${HANDBOOK}: 2500-3200`, 'memory'),
      conductivityWPerMK: curve(
        [
          [25, 0.68],
          [200, 0.72],
          [400, 0.81],
          [600, 0.92],
          [800, 1.05],
          [1000, 1.18],
        ],
        'W/(m·K)',
        'Trade page on unfired zirconia and silica shells, of low authority',
        'published',
      ),
      heatCapacityJPerKgK: curve(
        [
          [25, 550],
          [300, 670],
          [600, 730],
          [1000, 790],
        ],
        'J/(kg·K)',
        'Zircon with silica binder, handbook, recalled',
        'memory',
      ),
      maxC: constant(1250, '°C', `${PRACTICE}: its silica binder sets the limit`, 'common-practice'),
      youngPa: constant(20e9, 'Pa', HANDBOOK, 'memory'),
      expansionPerK: constant(4.5e-6, '1/K', 'Zircon, handbook, recalled', 'memory'),
    },
    rateLimits: shellLimits,
    reactions: [],
  },
];
