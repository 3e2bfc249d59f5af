import type { Caution } from '../estimate-schema';
import { LEAST_SUPERHEAT_K } from '../melt/pour';
import { LONGEST_FLOW_S } from '../melt/pour-wall';
import { readySegment } from '../readiness';
import type { CautionRule, FiringView } from './view';
import { inSentence, twoDigits } from './words';

const SOURCE_MELT = 'Component sum of the charge and the furnace’s input and efficiency; good to a quarter';
/** Metal this much later than the mould costs heat and waiting, s. */
const LATE_S = 900;

type Said = Pick<Caution, 'severity' | 'text' | 'source'>;

/** The furnace cannot have the metal ready when the mould is, or not hot enough. */
export const metalNotReady: CautionRule = (view) => {
  const { simulation, pour } = view;
  const wanted = simulation.load.pour;
  if (wanted === null || pour === null) return [];
  const segment = readySegment(simulation.profile);
  const place = {
    code: 'metal-not-ready' as const,
    segment: segment < 0 ? null : segment,
    atS: pour.metalReadyS ?? pour.atS,
  };
  const said = [tooCool(view), beyondFurnace(view), tooLate(view)].find((each) => each !== null) ?? null;
  return said === null ? [] : [{ ...place, ...said }];
};

function tooCool({ simulation, pour, words }: FiringView): Said | null {
  const wanted = simulation.load.pour;
  if (wanted === null || pour === null) return null;
  const superheatC = pour.metalAtPourC - pour.liquidusC;
  if (superheatC >= LEAST_SUPERHEAT_K) return null;
  return {
    severity: superheatC <= 0 ? 'stop' : 'warn',
    text: `The metal leaves the furnace at ${words.temp(wanted.pourC)} and comes to the mould at ${words.temp(pour.metalAtPourC)} after ${words.time(wanted.carryS)}. It freezes from ${words.temp(pour.liquidusC)} on; pour with at least ${words.difference(LEAST_SUPERHEAT_K)} to spare.`,
    source: 'Heat lost by a filled crucible in the open; least superheat is common practice',
  };
}

function beyondFurnace({ simulation, context, words }: FiringView): Said | null {
  const wanted = simulation.load.pour;
  const furnace = context.furnace ?? null;
  if (wanted === null || furnace === null) return null;
  if (wanted.pourC > furnace.maxC)
    return {
      severity: 'stop',
      text: `${furnace.name} goes to ${words.temp(furnace.maxC)}. The metal is to be poured at ${words.temp(wanted.pourC)}.`,
      source: 'The furnace’s limit, as entered',
    };
  if (wanted.chargeKg > furnace.capacityKg)
    return {
      severity: 'stop',
      text: `${furnace.name} holds ${words.mass(furnace.capacityKg)}. The charge is ${words.mass(wanted.chargeKg)}.`,
      source: 'The furnace’s capacity, as entered',
    };
  return null;
}

/** Lit with the kiln at the earliest, the furnace is ready after the mould, or after the hold that waits for it. */
function tooLate({ simulation, pour, words }: FiringView): Said | null {
  if (pour === null || pour.metalReadyS === null || pour.mouldReadyS === null) return null;
  const lateS = pour.metalReadyS - pour.mouldReadyS;
  const holdEndS = simulation.segments[readySegment(simulation.profile)]?.endS ?? simulation.predictedS;
  const coldS = pour.metalReadyS - holdEndS;
  if (lateS <= LATE_S && coldS <= 0) return null;
  const meltS = pour.melting.durationS ?? 0;
  return {
    severity: coldS > 0 ? 'warn' : 'note',
    text: `Melting takes about ${words.time(meltS)}. Lit together with the kiln, the furnace has the metal ready ${words.time(lateS)} after the mould${coldS > 0 ? `, and ${words.time(coldS)} after the hold has ended` : ''}.`,
    source: SOURCE_MELT,
  };
}

/** The mould is not hot enough at its core for its thinnest section to fill. */
export const mouldColdAtPour: CautionRule = (view) => {
  const { simulation, pour, moulds, words } = view;
  if (pour === null) return [];
  const segment = readySegment(simulation.profile);
  const place = { code: 'mould-cold-at-pour' as const, segment: segment < 0 ? null : segment };
  if (pour.atS === null)
    return moulds.length === 0
      ? []
      : [
          {
            ...place,
            severity: 'warn',
            atS: null,
            text: 'The mould core never comes to the temperature it is to be poured at.',
            source: 'Conduction through the wall, film outside included',
          },
        ];
  return pour.moulds.flatMap(({ index, coreAtPourC, fill }): Caution[] => {
    const mould = moulds.find(({ trace }) => trace.index === index);
    const sectionM = mould?.mould.thinnestSectionM ?? null;
    if (mould === undefined || sectionM === null || fill === null || fill.judgement === 'likely-fills')
      return [];
    const misruns = fill.judgement === 'likely-misruns';
    return [
      {
        ...place,
        severity: misruns ? 'warn' : 'note',
        atS: pour.atS,
        text: `The ${words.length(sectionM)} section of ${inSentence(mould.name)} ${misruns ? 'likely misruns' : 'may misrun'}: its core is at ${words.temp(coreAtPourC)} when the metal comes with ${words.difference(fill.superheatK)} of superheat. Metal flows there for ${twoDigits(fill.flowsFromS)} to ${twoDigits(Math.min(fill.flowsToS, LONGEST_FLOW_S))} s; filling takes about ${twoDigits(fill.fillS)} s.`,
        source:
          'Time to lose superheat and half the heat of fusion to the wall; contact and flow are known to a factor of two',
      },
    ];
  });
};
