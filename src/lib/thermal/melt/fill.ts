import { valueAt } from '../../materials';
import { pouring, SUPERHEAT_BY_SECTION } from '../../materials/pouring';
import { type Alloy, alloyEnthalpyJPerKg, alloyTempC } from './alloy-heat';
import { flowsForS, type PourWall } from './pour-wall';

/** How a section is likely to fill. */
export type FillJudgement = 'likely-fills' | 'may-misrun' | 'likely-misruns';

/** What the models say of the thinnest section of a mould at the pour. */
export interface Fill {
  readonly judgement: FillJudgement;
  /** How long metal in that section goes on flowing, s: best guess, and the range it may well lie in. */
  readonly flowsS: number;
  readonly flowsFromS: number;
  readonly flowsToS: number;
  /** How long filling the mould is taken to last, s. */
  readonly fillS: number;
  /** Superheat of the metal as it enters, and what the trade pours such sections with, K. */
  readonly superheatK: number;
  readonly usualSuperheatK: readonly [number, number];
}

/** Factor, either way, by which the time of flow may be off: contact with the wall and when metal stops flowing are hardly known. */
const FLOW_UNCERTAINTY = 2;

/** What is poured into which wall. */
export interface FillInput {
  readonly alloy: Alloy;
  readonly liquidDensityKgPerM3: number;
  readonly metalC: number;
  readonly sectionM: number;
  /** Metal for one mould. */
  readonly castKg: number;
  readonly wall: PourWall;
  /** Through the wall at the pour, outer face first, °C. */
  readonly wallC: Float64Array;
}

/**
 * Whether the thinnest section fills: the time its metal (half the section to each face) takes to lose its superheat and
 * half its heat of fusion to the wall and through it, against the time that filling takes. It likely fills where it flows
 * twice as long even at the low end of its range, and likely misruns where by the best guess it stops before it is filled.
 * The flow of metal itself, gas in the mould and the head of the cup are not computed.
 */
export function fillOf(input: FillInput): Fill {
  const { alloy, metalC, sectionM, wall } = input;
  const massKgPerM2 = (input.liquidDensityKgPerM3 * sectionM) / 2;
  const stopsJPerKg = flowEndJPerKg(alloy);
  const flowsS =
    metalC <= alloy.solidusC
      ? 0
      : flowsForS(
          wall,
          input.wallC,
          {
            massKgPerM2,
            contactWPerM2K: valueAt(pouring.contactWPerM2K, 20),
            tempOf: meltTemperature(alloy, metalC),
          },
          alloyEnthalpyJPerKg(alloy, metalC),
          stopsJPerKg,
        );
  const fillS = Math.max(valueAt(pouring.leastFillS, 20), input.castKg / valueAt(pouring.pourKgPerS, 20));
  const flowsFromS = flowsS / FLOW_UNCERTAINTY;
  const flowsToS = flowsS * FLOW_UNCERTAINTY;
  return {
    judgement: flowsFromS >= 2 * fillS ? 'likely-fills' : flowsS < fillS ? 'likely-misruns' : 'may-misrun',
    flowsS,
    flowsFromS,
    flowsToS,
    fillS,
    superheatK: metalC - alloy.liquidusC,
    usualSuperheatK: usualSuperheatK(sectionM),
  };
}

/** Superheat that the trade pours a section with, K. Common practice, no source. */
export function usualSuperheatK(sectionM: number): readonly [number, number] {
  const row = SUPERHEAT_BY_SECTION.find(({ fromM }) => sectionM >= fromM) ?? SUPERHEAT_BY_SECTION[0];
  return [row.fromK, row.toK];
}

/** Enthalpy at which metal stops flowing: a share of its freezing heat given off. */
function flowEndJPerKg(alloy: Alloy): number {
  const liquid = alloyEnthalpyJPerKg(alloy, alloy.liquidusC + 1e-6);
  const solid = alloyEnthalpyJPerKg(alloy, alloy.solidusC);
  return liquid - valueAt(pouring.stopsFlowingShare, 20) * (liquid - solid);
}

/** Enthalpy to temperature between the solidus and the pour: straight above the liquidus and within the freezing range. */
function meltTemperature(alloy: Alloy, metalC: number): (enthalpyJPerKg: number) => number {
  const topC = Math.max(metalC, alloy.liquidusC + 1);
  const top = alloyEnthalpyJPerKg(alloy, topC);
  const liquid = alloyEnthalpyJPerKg(alloy, alloy.liquidusC + 1e-6);
  const solid = alloyEnthalpyJPerKg(alloy, alloy.solidusC);
  return (enthalpy) => {
    if (enthalpy >= liquid)
      return alloy.liquidusC + ((topC - alloy.liquidusC) * (enthalpy - liquid)) / (top - liquid);
    if (enthalpy <= solid) return alloyTempC(alloy, enthalpy);
    return alloy.solidusC + ((alloy.liquidusC - alloy.solidusC) * (enthalpy - solid)) / (liquid - solid);
  };
}
