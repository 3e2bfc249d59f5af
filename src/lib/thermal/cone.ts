import { type Cone, cones } from '../materials/cones';
import { GAS_CONSTANT_J_PER_MOL_K, KELVIN_AT_0_C } from './constants';
import { type HeatWorkLaw, heatWorkOfStepH } from './heat-work';

/**
 * Cones that go by one activation energy: the apparent energy of their glass, fitted by least squares on the 60 and
 * 150 °C/h columns of the chart. Of what it was not fitted to it gives the 15 °C/h column within rms 8 K (the column's own
 * steps are that uneven: no single energy does better than 7 K), and small cones at 300 °C/h about 11 K low.
 */
export interface ConeRange {
  readonly activationKJPerMol: number;
  readonly cones: readonly Cone[];
}

const between = (first: string, last: string): readonly Cone[] =>
  cones.slice(
    cones.findIndex(({ name }) => name === first),
    cones.findIndex(({ name }) => name === last) + 1,
  );

export const CONE_RANGES: readonly ConeRange[] = [
  { activationKJPerMol: 335, cones: between('019', '013') },
  { activationKJPerMol: 580, cones: between('012', '010') },
  { activationKJPerMol: 830, cones: between('09', '10') },
];

/** Error of "about cone n", as a temperature at the end of a firing, K: the rms against the 15 °C/h column. */
export const CONE_ERROR_K = 8;

/**
 * ln ∫₀ᵀ exp(−Ea/RT) dT, K, by the fourth-degree rational approximation of Senum and Yang (1977), J. Thermal Analysis 11:445,
 * better than 1e-6 for Ea/RT above 10.
 */
export function lnTemperatureIntegral(activationKJPerMol: number, tempC: number): number {
  const energyK = (activationKJPerMol * 1000) / GAS_CONSTANT_J_PER_MOL_K;
  const x = energyK / (tempC + KELVIN_AT_0_C);
  const ratio = (x ** 3 + 18 * x ** 2 + 86 * x + 96) / (x ** 4 + 20 * x ** 3 + 120 * x ** 2 + 240 * x + 120);
  return Math.log(energyK) - x + Math.log(ratio / x);
}

/** ln of the heat work that brings a cone down, ln s: ∫exp(−Ea/RT)dt of a steady heating, the mean over the two columns fitted. */
export function lnConeWork({ activationKJPerMol }: ConeRange, cone: Cone): number {
  const ofColumn = (endC: number, rateCPerH: number): number =>
    lnTemperatureIntegral(activationKJPerMol, endC) - Math.log(rateCPerH / 3600);
  return (ofColumn(cone.at60C, 60) + ofColumn(cone.at150C, 150)) / 2;
}

/** Temperature at which the law has a cone down when heated at a steady rate, °C. */
export function coneDownC(range: ConeRange, cone: Cone, rateCPerH: number): number {
  const target = lnConeWork(range, cone) + Math.log(rateCPerH / 3600);
  let lowC = 300;
  let highC = 1600;
  while (highC - lowC > 0.01) {
    const middleC = (lowC + highC) / 2;
    if (lnTemperatureIntegral(range.activationKJPerMol, middleC) < target) lowC = middleC;
    else highC = middleC;
  }
  return (lowC + highC) / 2;
}

/** Temperature at which paces are set to 1, °C; it cancels out. */
const REFERENCE_C = 900;

/**
 * The highest cone that a firing brings down, "about cone n": of each range the work ∫exp(−Ea/RT)dt of the curve against
 * that of its cones.
 *
 * @param timeS rising moments, s
 * @param tempC temperature at each, °C, straight between them
 * @returns null where not even cone 019 is down
 */
export function lastConeDown(timeS: ArrayLike<number>, tempC: ArrayLike<number>): Cone | null {
  let last: Cone | null = null;
  for (const range of CONE_RANGES) {
    const work = lnWork(range, timeS, tempC);
    for (const cone of range.cones) if (lnConeWork(range, cone) <= work) last = cone;
  }
  return last;
}

function lnWork(
  { activationKJPerMol }: ConeRange,
  timeS: ArrayLike<number>,
  tempC: ArrayLike<number>,
): number {
  const law: HeatWorkLaw = { activationKJPerMol, referenceC: REFERENCE_C };
  let hours = 0;
  for (let i = 1; i < timeS.length; i++) {
    const stepS = (timeS[i] ?? 0) - (timeS[i - 1] ?? 0);
    hours += heatWorkOfStepH(law, tempC[i - 1] ?? 0, tempC[i] ?? 0, stepS);
  }
  const perK = (activationKJPerMol * 1000) / GAS_CONSTANT_J_PER_MOL_K;
  return Math.log(hours * 3600) - perK / (REFERENCE_C + KELVIN_AT_0_C);
}
