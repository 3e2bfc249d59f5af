import type { Confidence } from './schema';

/**
 * Molar heat capacity of one phase between two temperatures, J/(mol·K), in the form of Shomate:
 * Cp = A + B·t + C·t² + D·t³ + E/t², t = T/1000, T in kelvin.
 */
export interface HeatCapacityRange {
  readonly fromK: number;
  readonly toK: number;
  /** A, B, C, D, E. */
  readonly coefficients: readonly [number, number, number, number, number];
  /** Heat of the change of phase at `fromK`, J/mol; 0 where the phase goes on. */
  readonly changeJPerMol: number;
}

/** A chemical element as the melt model knows it: its enthalpy from 25 °C on, solid and liquid. */
export interface Element {
  readonly symbol: string;
  readonly name: string;
  readonly molarMassKgPerMol: number;
  readonly solid: readonly HeatCapacityRange[];
  /** Null: it dissolves and does not melt here (graphite). The change at the first range is its heat of fusion. */
  readonly liquid: readonly HeatCapacityRange[] | null;
  readonly source: string;
  readonly confidence: Confidence;
}

const BOILING_FAR_OFF_K = 3000;
const FROM_K = 298.15;

const range = (
  fromK: number,
  toK: number,
  coefficients: HeatCapacityRange['coefficients'],
  changeJPerMol = 0,
): HeatCapacityRange => ({ fromK, toK, coefficients, changeJPerMol });

const steady = (capacity: number): HeatCapacityRange['coefficients'] => [capacity, 0, 0, 0, 0];

/** An element of which only mean heat capacities and the heat of fusion are at hand. */
function plain(
  symbol: string,
  name: string,
  molarMassKgPerMol: number,
  [solid, meltsK, fusion, liquid]: readonly [number, number, number, number],
): Element {
  return {
    symbol,
    name,
    molarMassKgPerMol,
    solid: [range(FROM_K, meltsK, steady(solid))],
    liquid: [range(meltsK, BOILING_FAR_OFF_K, steady(liquid), fusion)],
    source: 'CRC handbook, recalled: mean heat capacity of solid and liquid, heat of fusion',
    confidence: 'memory',
  };
}

const WEBBOOK = 'NIST WebBook (Chase 1998), Shomate equation';
const SGTE = 'SGTE data for pure elements (Dinsdale 1991)';

/**
 * The elements that studio alloys are made of. Where SGTE gives the Gibbs energy
 * a + bT + cT·ln T + dT² + eT³ + f/T, the heat capacity is −c − 2dT − 6eT² − 2f/T².
 */
export const elements: readonly Element[] = [
  {
    symbol: 'Cu',
    name: 'Copper',
    molarMassKgPerMol: 0.063546,
    solid: [range(FROM_K, 1358, [17.72891, 28.0987, -31.25289, 13.97243, 0.068611])],
    liquid: [range(1358, BOILING_FAR_OFF_K, steady(32.8444), 13_138)],
    source: `${WEBBOOK}; fusion: JANAF Cu-004`,
    confidence: 'published',
  },
  {
    symbol: 'Sn',
    name: 'Tin',
    molarMassKgPerMol: 0.11871,
    solid: [range(FROM_K, 505.078, [15.961, 37.7404, -18.727002, 0, 0.12392])],
    liquid: [
      range(505.078, 800, [8.2590486, 33.628858, -15.738786, 0, 2.162488], 7029.1),
      range(800, BOILING_FAR_OFF_K, steady(28.4512)),
    ],
    source: SGTE,
    confidence: 'published',
  },
  {
    symbol: 'Zn',
    name: 'Zinc',
    molarMassKgPerMol: 0.06538,
    solid: [range(FROM_K, 692.73, [25.60123, -4.405292, 20.42206, -7.399697, -0.045801])],
    liquid: [range(692.73, BOILING_FAR_OFF_K, steady(31.3998), 7300)],
    source: `${WEBBOOK}; fusion and liquid: NASA TM-4513`,
    confidence: 'published',
  },
  {
    symbol: 'Al',
    name: 'Aluminium',
    molarMassKgPerMol: 0.0269815386,
    solid: [range(FROM_K, 933.45, [28.0892, -5.414849, 8.560423, 3.42737, -0.277375])],
    liquid: [range(933.45, 2790, steady(31.75104), 10_711)],
    source: `${WEBBOOK}; fusion: JANAF Al-004, liquid at 933.45 K less the crystal of the WebBook`,
    confidence: 'published',
  },
  {
    symbol: 'Si',
    name: 'Silicon',
    molarMassKgPerMol: 0.0280855,
    solid: [range(FROM_K, 1685, [22.81719, 3.89951, -0.082885, 0.042111, -0.354063])],
    liquid: [range(1685, BOILING_FAR_OFF_K, steady(27.2), 50_210)],
    source: `${WEBBOOK}; fusion: CRC handbook; liquid recalled`,
    confidence: 'published',
  },
  {
    symbol: 'Fe',
    name: 'Iron',
    molarMassKgPerMol: 0.055845,
    solid: [
      range(FROM_K, 700, [18.42868, 24.64301, -8.91372, 9.664706, -0.012643]),
      range(700, 1042, [-57_767.65, 137_919.7, -122_773.2, 38_682.42, 3993.08]),
      range(1042, 1100, [-325.8859, 28.92876, 0, 0, 411.9629]),
      range(1100, 1184, [-776.7387, 919.4005, -383.7184, 57.08148, 242.1369]),
      range(1184, 1665, [23.97449, 8.36775, 0.000277, -0.000086, -0.000005], 900),
      range(1665, 1809, steady(41), 837),
    ],
    liquid: [range(1809, BOILING_FAR_OFF_K, steady(46.024), 13_807)],
    source: `${WEBBOOK}; changes of phase: NASA TM-4513; delta and liquid recalled`,
    confidence: 'published',
  },
  {
    symbol: 'Ag',
    name: 'Silver',
    molarMassKgPerMol: 0.1078682,
    solid: [range(FROM_K, 1234.93, [23.8463314, 3.58117, 2.391522, 0, 0.024022])],
    liquid: [range(1234.93, 2400, steady(33.472), 11_296.8)],
    source: SGTE,
    confidence: 'published',
  },
  {
    symbol: 'Au',
    name: 'Gold',
    molarMassKgPerMol: 0.19696657,
    solid: [
      range(FROM_K, 929.4, [22.75455, 7.71848, -2.27775, 0, 0.050194]),
      range(929.4, 1337.33, [155.706745, -175.1203, 69.1112278, 0, -21.27442]),
    ],
    liquid: [
      range(1337.33, 1735.8, [-263.252259, 236.433656, -53.343064, 0, 135.999664], 12_552),
      range(1735.8, BOILING_FAR_OFF_K, steady(30.96)),
    ],
    source: `${SGTE}, recalled`,
    confidence: 'memory',
  },
  plain('Pb', 'Lead', 0.2072, [27.7, 600.6, 4782, 30]),
  plain('Mn', 'Manganese', 0.054938, [33.5, 1519, 12_910, 46]),
  plain('Mg', 'Magnesium', 0.024305, [28, 923, 8480, 34.3]),
  plain('Ni', 'Nickel', 0.0586934, [32, 1728, 17_480, 43.1]),
  {
    symbol: 'C',
    name: 'Carbon',
    molarMassKgPerMol: 0.012011,
    solid: [range(FROM_K, BOILING_FAR_OFF_K, steady(19.5))],
    liquid: null,
    source: 'Graphite, mean of 25-1300 °C; CRC handbook, recalled',
    confidence: 'memory',
  },
];

const bySymbol = new Map(elements.map((element) => [element.symbol, element]));

/** The element of that symbol, or undefined. */
export function findElement(symbol: string): Element | undefined {
  return bySymbol.get(symbol);
}
