import { constant } from './property';
import type { Confidence, MetalMaterial } from './schema';

const RECALLED = 'CRC, Smithells and ASM handbooks, recalled';
const POURING = 'ASM Handbook 15, recalled';

type Row = {
  id: string;
  name: string;
  note: string;
  composition: Record<string, number>;
  solidusC: number;
  liquidusC: number;
  /** Where the solidus, liquidus and solid density were read. */
  data: [string, Confidence];
  densityKgPerM3: number;
  liquidDensityKgPerM3: number;
  heatCapacityJPerKgK: number;
  liquidHeatCapacityJPerKgK: number;
  heatOfFusionKJPerKg: number;
  pourLightC: [number, number];
  pourHeavyC: [number, number];
  pouring?: [string, Confidence];
};

const zincFume = constant(900, '°C', 'Zinc boils at 907 °C; brasses fume above 900-1000 °C', 'published');

function metal(row: Row): MetalMaterial {
  const [source, confidence] = row.data;
  const [pourSource, pourConfidence] = row.pouring ?? [POURING, 'memory'];
  const celsius = (value: number) => constant(value, '°C', source, confidence);
  const pour = (value: number) => constant(value, '°C', pourSource, pourConfidence);
  return {
    id: row.id,
    name: row.name,
    note: row.note,
    composition: row.composition,
    properties: {
      solidusC: celsius(row.solidusC),
      liquidusC: celsius(row.liquidusC),
      densityKgPerM3: constant(row.densityKgPerM3, 'kg/m³', source, confidence),
      liquidDensityKgPerM3: constant(row.liquidDensityKgPerM3, 'kg/m³', RECALLED, 'memory'),
      heatCapacityJPerKgK: constant(
        row.heatCapacityJPerKgK,
        'J/(kg·K)',
        `Mean to the solidus; ${RECALLED}`,
        'memory',
      ),
      liquidHeatCapacityJPerKgK: constant(row.liquidHeatCapacityJPerKgK, 'J/(kg·K)', RECALLED, 'memory'),
      heatOfFusionJPerKg: constant(row.heatOfFusionKJPerKg * 1000, 'J/kg', RECALLED, 'memory'),
      pourLightFromC: pour(row.pourLightC[0]),
      pourLightToC: pour(row.pourLightC[1]),
      pourHeavyFromC: pour(row.pourHeavyC[0]),
      pourHeavyToC: pour(row.pourHeavyC[1]),
      ...('Zn' in row.composition && { zincFumeFromC: zincFume }),
    },
  };
}

const ROWS: Row[] = [
  {
    id: 'tin-bronze-90-10',
    name: 'Tin bronze 90/10',
    note: 'Long freezing range: pour at the lowest temperature that fills.',
    composition: { Cu: 0.9, Sn: 0.1 },
    solidusC: 831,
    liquidusC: 999,
    data: ['Copper alloy data sheet (C90700)', 'published'],
    densityKgPerM3: 8770,
    liquidDensityKgPerM3: 8000,
    heatCapacityJPerKgK: 420,
    liquidHeatCapacityJPerKgK: 480,
    heatOfFusionKJPerKg: 190,
    pourLightC: [1040, 1095],
    pourHeavyC: [980, 1040],
  },
  {
    id: 'tin-bronze-g',
    name: 'Tin bronze with zinc, 88/8/4',
    note: 'C90300. Zinc fumes when overheated.',
    composition: { Cu: 0.88, Sn: 0.08, Zn: 0.04 },
    solidusC: 854,
    liquidusC: 1000,
    data: ['Copper alloy data sheet (C90300)', 'published'],
    densityKgPerM3: 8800,
    liquidDensityKgPerM3: 8000,
    heatCapacityJPerKgK: 420,
    liquidHeatCapacityJPerKgK: 480,
    heatOfFusionKJPerKg: 195,
    pourLightC: [1150, 1260],
    pourHeavyC: [1040, 1150],
  },
  {
    id: 'silicon-bronze',
    name: 'Silicon bronze',
    note: 'C87300: tough oxide skin, pour quietly and do not stir.',
    composition: { Cu: 0.95, Si: 0.04, Mn: 0.01 },
    solidusC: 821,
    liquidusC: 971,
    data: ['Copper alloy data sheet (C87300)', 'published'],
    densityKgPerM3: 8360,
    liquidDensityKgPerM3: 7600,
    heatCapacityJPerKgK: 440,
    liquidHeatCapacityJPerKgK: 500,
    heatOfFusionKJPerKg: 215,
    pourLightC: [1093, 1177],
    pourHeavyC: [1010, 1066],
    pouring: ['Maker’s ingot sheet', 'published'],
  },
  {
    id: 'aluminium-bronze',
    name: 'Aluminium bronze',
    note: 'C95400: narrow freezing range, tough oxide skin, never phosphor-copper.',
    composition: { Cu: 0.85, Al: 0.11, Fe: 0.04 },
    solidusC: 1027,
    liquidusC: 1038,
    data: ['Copper alloy data sheet (C95400)', 'published'],
    densityKgPerM3: 7450,
    liquidDensityKgPerM3: 6800,
    heatCapacityJPerKgK: 500,
    liquidHeatCapacityJPerKgK: 560,
    heatOfFusionKJPerKg: 230,
    pourLightC: [1150, 1230],
    pourHeavyC: [1095, 1175],
  },
  {
    id: 'red-brass',
    name: 'Red brass, leaded',
    note: 'C83600: 5 % lead and 5 % zinc, fumes of both.',
    composition: { Cu: 0.85, Sn: 0.05, Pb: 0.05, Zn: 0.05 },
    solidusC: 854,
    liquidusC: 1010,
    data: ['Copper alloy data sheet (C83600)', 'published'],
    densityKgPerM3: 8830,
    liquidDensityKgPerM3: 8000,
    heatCapacityJPerKgK: 420,
    liquidHeatCapacityJPerKgK: 480,
    heatOfFusionKJPerKg: 197,
    pourLightC: [1150, 1290],
    pourHeavyC: [1065, 1175],
  },
  {
    id: 'copper',
    name: 'Copper',
    note: 'Takes up hydrogen and oxygen: melt fast, deoxidise.',
    composition: { Cu: 1 },
    solidusC: 1084.6,
    liquidusC: 1084.6,
    data: ['CRC handbook, recalled', 'memory'],
    densityKgPerM3: 8960,
    liquidDensityKgPerM3: 8020,
    heatCapacityJPerKgK: 440,
    liquidHeatCapacityJPerKgK: 495,
    heatOfFusionKJPerKg: 207,
    pourLightC: [1230, 1290],
    pourHeavyC: [1150, 1230],
  },
  {
    id: 'aluminium-a356',
    name: 'Aluminium-silicon A356',
    note: 'Damp is its main source of hydrogen.',
    composition: { Al: 0.9265, Si: 0.07, Mg: 0.0035 },
    solidusC: 557,
    liquidusC: 613,
    data: ['Public alloy data page (A356)', 'published'],
    densityKgPerM3: 2680,
    liquidDensityKgPerM3: 2395,
    heatCapacityJPerKgK: 963,
    liquidHeatCapacityJPerKgK: 1170,
    heatOfFusionKJPerKg: 389,
    pourLightC: [700, 760],
    pourHeavyC: [670, 710],
  },
  {
    id: 'sterling-silver',
    name: 'Sterling silver',
    note: 'Takes up oxygen when molten.',
    composition: { Ag: 0.925, Cu: 0.075 },
    solidusC: 802,
    liquidusC: 893,
    data: ['Handbook, recalled', 'memory'],
    densityKgPerM3: 10300,
    liquidDensityKgPerM3: 9200,
    heatCapacityJPerKgK: 275,
    liquidHeatCapacityJPerKgK: 320,
    heatOfFusionKJPerKg: 112,
    pourLightC: [980, 1040],
    pourHeavyC: [960, 1000],
  },
  {
    id: 'fine-silver',
    name: 'Fine silver',
    note: 'Takes up oxygen when molten.',
    composition: { Ag: 1 },
    solidusC: 961.8,
    liquidusC: 961.8,
    data: ['Handbook, recalled', 'memory'],
    densityKgPerM3: 10500,
    liquidDensityKgPerM3: 9300,
    heatCapacityJPerKgK: 265,
    liquidHeatCapacityJPerKgK: 310,
    heatOfFusionKJPerKg: 105,
    pourLightC: [1020, 1060],
    pourHeavyC: [1000, 1040],
  },
  {
    id: 'gold',
    name: 'Fine gold',
    note: 'Poured 60-120 K above its melting point.',
    composition: { Au: 1 },
    solidusC: 1064.2,
    liquidusC: 1064.2,
    data: ['Handbook, recalled', 'memory'],
    densityKgPerM3: 19300,
    liquidDensityKgPerM3: 17300,
    heatCapacityJPerKgK: 143,
    liquidHeatCapacityJPerKgK: 150,
    heatOfFusionKJPerKg: 64,
    pourLightC: [1140, 1185],
    pourHeavyC: [1124, 1150],
    pouring: ['Liquidus plus 60-120 K', 'common-practice'],
  },
  {
    id: 'gold-14k',
    name: 'Gold, 14 carat yellow',
    note: 'Poured 60-120 K above its liquidus.',
    composition: { Au: 0.585, Ag: 0.15, Cu: 0.265 },
    solidusC: 830,
    liquidusC: 900,
    data: ['Handbook, recalled', 'memory'],
    densityKgPerM3: 13200,
    liquidDensityKgPerM3: 12000,
    heatCapacityJPerKgK: 210,
    liquidHeatCapacityJPerKgK: 240,
    heatOfFusionKJPerKg: 85,
    pourLightC: [980, 1020],
    pourHeavyC: [960, 1000],
    pouring: ['Liquidus plus 60-120 K', 'common-practice'],
  },
  {
    id: 'grey-iron',
    name: 'Grey iron',
    note: 'Carbon equivalent 4.3.',
    composition: { Fe: 0.935, C: 0.035, Si: 0.024, Mn: 0.006 },
    solidusC: 1150,
    liquidusC: 1200,
    data: ['Handbook, recalled', 'memory'],
    densityKgPerM3: 7200,
    liquidDensityKgPerM3: 6900,
    heatCapacityJPerKgK: 680,
    liquidHeatCapacityJPerKgK: 850,
    heatOfFusionKJPerKg: 240,
    pourLightC: [1370, 1450],
    pourHeavyC: [1290, 1360],
  },
];

export const metals: MetalMaterial[] = ROWS.map(metal);
