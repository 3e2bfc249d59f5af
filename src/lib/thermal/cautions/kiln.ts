import type { Caution } from '../estimate-schema';
import { strayingOf } from './follow';
import { type CautionRule, type FiringView, segmentsOf } from './view';
import { seriesAt } from '../series';

/** A kiln that is this little behind follows well enough (the band within which a run is judged). */
const BEHIND_C = 10;
const LATE_S = 600;
const LATE_SHARE = 0.1;

const MODEL = "Kiln model: the plate's power against the heat that lining, load and vent take";

export const kilnCannotFollow: CautionRule = (view) => {
  const { simulation, words } = view;
  const cautions: Caution[] = [];
  for (const each of segmentsOf(view)) {
    const { index, segment, fromC, moments } = each;
    const base = { code: 'kiln-cannot-follow', segment: index, atS: moments.startS, source: MODEL } as const;
    const label = `Segment ${index + 1}`;
    if (!moments.arrived && segment.toC !== fromC) {
      const reachedC = seriesAt(simulation.timeS, simulation.chamberC, moments.endS);
      const upwards = segment.toC > fromC;
      const reason =
        segment.rateCPerH === 'coast' && upwards
          ? 'With its heating off the kiln cannot rise'
          : `The kiln does not get`;
      cautions.push({
        ...base,
        severity: upwards ? 'stop' : 'warn',
        text: `${label}: ${reason} to ${words.temp(segment.toC)}. It is at ${words.temp(reachedC)} when the segment ends.`,
      });
      continue;
    }
    if (typeof segment.rateCPerH !== 'number') continue;
    const plannedRampS = moments.plannedRampEndS - moments.plannedStartS;
    const lateS = moments.rampEndS - moments.startS - plannedRampS;
    const late = lateS > Math.max(LATE_S, LATE_SHARE * plannedRampS);
    if (!moments.kilnLimited) continue;
    const { behindC, behindAt } = strayingOf(view, each);
    if (behindC <= BEHIND_C && !late) continue;
    const verb = segment.toC >= fromC ? 'heat' : 'cool';
    cautions.push({
      ...base,
      severity: 'warn',
      text: `${label} asks for ${words.rate(segment.rateCPerH)}. The kiln cannot ${verb} that fast: it comes to be ${words.difference(behindC)} behind${late ? ` and arrives ${words.time(lateS)} late` : ''}.${whyBehind(view, behindAt)}`,
    });
  }
  return cautions;
};

/** Shares of its power below which a kiln is not at full fire. */
const FULL_SHARE = 0.98;

/** Where the kiln's power goes at a place of the series, where all of it is in use: why it is no faster. */
function whyBehind({ simulation, words }: FiringView, at: number): string {
  const powerKW = simulation.powerKW[at] ?? 0;
  if (at < 0 || powerKW < FULL_SHARE * simulation.fullPowerKW) return '';
  const chamber = words.temp(simulation.chamberC[at] ?? NaN);
  const liningKW = Math.max(0, simulation.liningKW[at] ?? 0);
  const kW = (value: number): string => `${value.toFixed(1)}\u202fkW`;
  if (simulation.kiln.energy === 'gas')
    return ` At ${chamber} its burner is at full fire, ${kW(powerKW)}; ${kW(liningKW)} go into the lining, the rest into the load, the air and up the flue.`;
  return ` At ${chamber} all of its ${kW(powerKW)} are in use: ${kW(liningKW)} go into the lining, ${kW(Math.max(0, powerKW - liningKW))} into the load, the air and the kiln itself.`;
}

export const programmerCannotHoldIt: CautionRule = (view) => {
  const { simulation, words } = view;
  const { programmerSegments, programmerMaxRateCPerH } = simulation.kiln;
  const count = simulation.profile.segments.length;
  const cautions: Caution[] = [];
  const base = {
    code: 'programmer-cannot-hold-it',
    severity: 'warn',
    source: "The kiln's programmer, as entered",
  } as const;
  if (programmerSegments !== null && count > programmerSegments)
    cautions.push({
      ...base,
      segment: programmerSegments,
      atS: simulation.segments[programmerSegments]?.startS ?? null,
      text: `The profile has ${count} segments. The kiln's programmer takes ${programmerSegments}.`,
    });
  if (programmerMaxRateCPerH === null) return cautions;
  for (const { index, segment, moments } of segmentsOf(view)) {
    if (typeof segment.rateCPerH !== 'number' || segment.rateCPerH <= programmerMaxRateCPerH) continue;
    cautions.push({
      ...base,
      segment: index,
      atS: moments.startS,
      text: `Segment ${index + 1} asks for ${words.rate(segment.rateCPerH)}. The kiln's programmer takes at most ${words.rate(programmerMaxRateCPerH)}.`,
    });
  }
  return cautions;
};

/** From here on opening a kiln may crack what is in it, whatever its own limit. */
const RISK_FROM_C = 200;

/** A last cooling segment that is attended is an opening of the kiln. */
export const opensHot: CautionRule = ({ simulation, words }) => {
  const index = simulation.profile.segments.length - 1;
  const last = simulation.profile.segments[index];
  const moments = simulation.segments[index];
  if (last === undefined || moments === undefined || last.stage !== 'cooling' || !last.attended) return [];
  const chamberC = seriesAt(simulation.timeS, simulation.chamberC, moments.endS);
  const { openAtC } = simulation.kiln;
  if (chamberC <= openAtC + 0.5) return [];
  const later =
    simulation.openableS === null
      ? ''
      : ` It comes down to that ${words.time(simulation.openableS - moments.endS)} later.`;
  return [
    {
      code: 'opens-hot',
      severity: chamberC > RISK_FROM_C ? 'stop' : 'warn',
      segment: index,
      atS: moments.endS,
      text: `The kiln is opened at ${words.temp(chamberC)}. Its opening temperature is ${words.temp(openAtC)}.${later}`,
      source: "The kiln's opening temperature, as entered; ceramic suppliers see a risk above 200 °C",
    },
  ];
};
