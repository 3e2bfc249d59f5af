import {
  type DraftNeeds,
  type Figure,
  heatingLimit,
  highest,
  isFlask,
  isShellWax,
  isWet,
  lowest,
} from './needs';
import { type DraftStep, plainSegment, wholeMinutesS } from './step';

const PRACTICE = 'Common practice, no source';
const HOUR_S = 3600;
const SMALL_FLASK_M = 0.064;

/** Patterns are let out this far above the temperature they run at, K. */
const ABOVE_FLOW_C = 15;
/** A block mould dries through here: above boiling, below where its gypsum comes apart fast, °C. */
const BLOCK_DRYING_C = 150;
const DRYING_C = 95;
/** Waxes are melted out below where their vapour lights by itself, °C. */
const WAX_OUT_C = 180;
const PRINT_RATE = 150;
const BURN_RATE = 200;

const highestAllowedC = ({ kiln, moulds }: DraftNeeds): number =>
  Math.min(kiln.maxC, ...moulds.map(({ figure }) => figure('maxC')?.value ?? Infinity)) - 15;

/** Drives the free water out before the wall is above boiling; a block is dried and melted out in one. */
export function dryingStep(needs: DraftNeeds): DraftStep | null {
  const wet = needs.moulds.filter(isWet);
  if (wet.length === 0 || wet.some(isShellWax)) return null;
  const blocks = wet.some(isFlask);
  const toC = blocks ? BLOCK_DRYING_C : DRYING_C;
  const limit = heatingLimit(needs, 20, toC, { water: true, pattern: true });
  const flowsC = highest(needs.moulds.map(({ patternFigure }) => patternFigure('flowsC')))?.value ?? null;
  const drains = blocks && flowsC !== null && flowsC + ABOVE_FLOW_C <= toC;
  return {
    purpose: 'dry',
    segment: plainSegment({
      stage: 'drying',
      toC,
      rateCPerH: limit?.maxRateCPerH ?? 60,
      holdS: dryingHoldS(needs),
      vent: 'open',
      drain: drains,
      attended: drains,
      instruction: drains ? 'Vent open. See that the wax runs out; empty the tray.' : 'Vent open.',
    }),
    highC: toC,
    lowC: toC,
    reasons: ({ segment }, { words }) => [
      {
        text: `At ${words.rate(Number(segment.rateCPerH))} to ${words.temp(segment.toC)}: with water in it a mould is heated no faster.`,
        source: limit?.source ?? PRACTICE,
      },
      {
        text: `Held ${words.time(segment.holdS)}: ${blocks ? 'as blocks of this size are by custom, or longer where by the model water would be left above' : 'until by the model the wettest mould is dry before it comes to'} ${words.temp(blocks ? SOAK_C : 200)}.`,
        source: blocks
          ? SCHEDULE
          : 'Free water driven off by the heat that comes in, at a front that moves inwards',
      },
    ],
  };
}

/** Two hours for a flask of 64 mm, by its diameter to the power of 1.3: fitted to the schedule of three sizes. */
function dryingHoldS({ moulds }: DraftNeeds): number {
  const diametersM = moulds.filter(isFlask).map(({ mould }) => mould.diameterM ?? SMALL_FLASK_M);
  return wholeMinutesS(2 * HOUR_S * (Math.max(SMALL_FLASK_M, ...diametersM) / SMALL_FLASK_M) ** 1.3);
}

/** Lets out what runs: wax in shells fast, prints and foam at the temperature they run at. */
export function meltStep(needs: DraftNeeds, before: DraftStep | null): DraftStep | null {
  const melting = needs.moulds.filter(({ patternFigure }) => patternFigure('flowsC') !== null);
  const flows = highest(melting.map(({ patternFigure }) => patternFigure('flowsC')));
  if (flows === null) return null;
  if (before?.segment.drain && flows.value + ABOVE_FLOW_C <= before.segment.toC) return null;
  const drainS = highest(melting.map(({ patternFigure }) => patternFigure('drainTimeS')))?.value ?? 1800;
  const waxInShells = melting.length > 0 && melting.every(isShellWax);
  const highC = highestAllowedC(needs);
  const toC = Math.min(
    highC,
    waxInShells ? Math.max(WAX_OUT_C, flows.value + ABOVE_FLOW_C) : flows.value + ABOVE_FLOW_C,
  );
  const limit = heatingLimit(needs, 100, toC, { water: false, pattern: true });
  const hold = { holdS: drainS, attended: true, drain: true, vent: 'open' as const };
  const drained: DraftStep['reasons'] = ({ segment }, { words }) => [
    {
      text: `To ${words.temp(segment.toC)}: the pattern runs out above ${words.temp(flows.value)} at the mould core.`,
      source: flows.source,
    },
    {
      text: `Held ${words.time(segment.holdS)} with the drain open, for the core to come and the pattern to run.`,
      source: highest(melting.map(({ patternFigure }) => patternFigure('drainTimeS')))?.source ?? PRACTICE,
    },
  ];
  if (waxInShells)
    return {
      purpose: 'melt-wax',
      segment: plainSegment({
        stage: 'melt-out',
        toC,
        rateCPerH: 'flat-out',
        instruction: 'Cup down, tray beneath. Vent open to outdoors. Empty the tray before the kiln goes on.',
        ...hold,
      }),
      highC: toC,
      lowC: flows.value + ABOVE_FLOW_C,
      reasons: (step, said) => [
        {
          text: 'As fast as the kiln can: heated slowly the wax warms through and swells before its skin can run. A kiln that is hot already does it better still.',
          source: 'Richards and Mascreen, AFS 2003: expansion a main cause of cracked shells',
        },
        {
          text: `Not above ${said.words.temp(step.segment.toC)} while it runs: hotter, wax vapour lights by itself.`,
          source: 'Paraffin lights by itself from 200-250 °C, safety data sheets, recalled',
        },
        ...drained(step, said),
      ],
    };
  return {
    purpose: 'melt-print',
    segment: plainSegment({
      stage: 'melt-out',
      toC,
      rateCPerH: Math.min(PRINT_RATE, limit?.maxRateCPerH ?? PRINT_RATE),
      instruction: 'Cup down, tray beneath. Vent open to outdoors. Empty the tray before the kiln goes on.',
      ...hold,
    }),
    highC: toC,
    lowC: toC,
    reasons: (step, said) => [
      {
        text: `At ${said.words.rate(Number(step.segment.rateCPerH))}, so that all of the pattern comes to run at about the same time.`,
        source: limit !== null && limit.maxRateCPerH <= PRINT_RATE ? limit.source : PRACTICE,
      },
      ...drained(step, said),
    ],
  };
}

/** Burns the pattern out; in gypsum first below where carbon breaks the binder down, then what is left of it above. */
export function burnSteps(needs: DraftNeeds, fromC: number): DraftStep[] {
  const burning = needs.moulds.filter(({ pattern }) => pattern !== null);
  const clean = highest(burning.map(({ patternFigure }) => patternFigure('burnedOutC')));
  const carbon = lowest(needs.moulds.map(({ figure }) => figure('maxWithCarbonC')));
  const topC = highestAllowedC(needs);
  const phosphate = needs.moulds.find(({ material }) => material.binder === 'phosphate');
  const wantedC = Math.max(clean?.value ?? 0, phosphate ? 850 : 0, carbon ? 680 : 0);
  if (wantedC === 0) return [];
  const steps: DraftStep[] = [];
  let atC = fromC;
  if (needs.moulds.some(isFlask) && atC < 300) {
    steps.push(soakStep(needs, atC));
    atC = SOAK_C;
  }
  const firstC = Math.min(topC, carbon ? Math.min(wantedC, carbon.value - 15) : wantedC);
  steps.push(burnStep(needs, atC, firstC, { carbon, clean, phosphate: phosphate !== undefined }));
  const jewellery = needs.moulds.some(({ material }) => material.id === 'gypsum-investment');
  if (carbon && jewellery && topC > firstC + 20)
    steps.push(lastCarbonStep(needs, Math.min(topC, LAST_CARBON_C)));
  return steps;
}

const SOAK_C = 370;
const BLOCK_RATE = 100;
const LAST_CARBON_C = 732;
const PHOSPHATE = 'Burned out at 800-900 °C; Phillips’ Science of Dental Materials, recalled';
const SCHEDULE =
  'Maker’s schedule by flask size, as quoted on a jewellery page: holds at 149, 371 and 732 °C';

/** Blocks rest here while the bulk of the pattern goes and their inversion passes. */
function soakStep(needs: DraftNeeds, fromC: number): DraftStep {
  const limit = heatingLimit(needs, fromC, SOAK_C, { water: needs.moulds.some(isWet), pattern: true });
  return {
    purpose: 'rest',
    segment: plainSegment({
      stage: 'burnout',
      toC: SOAK_C,
      rateCPerH: Math.min(BLOCK_RATE, limit?.maxRateCPerH ?? BLOCK_RATE),
      holdS: HOUR_S,
      vent: 'open',
      instruction: 'Vent open to outdoors.',
    }),
    highC: SOAK_C,
    lowC: SOAK_C,
    reasons: ({ segment }, { words }) => [
      {
        text: `At ${words.rate(Number(segment.rateCPerH))}: through what the block contains, and while the pattern goes, no faster.`,
        source: limit?.source ?? PRACTICE,
      },
      {
        text: `Rests at ${words.temp(segment.toC)} while most of the pattern goes off as gas.`,
        source: SCHEDULE,
      },
    ],
  };
}

function burnStep(
  needs: DraftNeeds,
  fromC: number,
  toC: number,
  by: { carbon: Figure | null; clean: Figure | null; phosphate: boolean },
): DraftStep {
  const { carbon, clean, phosphate } = by;
  const limit = heatingLimit(needs, fromC, toC, { water: false, pattern: true });
  return {
    purpose: carbon ? 'char-below-limit' : 'burn',
    segment: plainSegment({
      stage: 'burnout',
      toC,
      rateCPerH: Math.min(BURN_RATE, limit?.maxRateCPerH ?? BURN_RATE),
      holdS: HOUR_S,
      vent: 'open',
      instruction: 'Vent open to outdoors; no smoke left before it closes.',
    }),
    highC: Math.min(highestAllowedC(needs), carbon ? carbon.value - 15 : phosphate ? 880 : 760),
    lowC: Math.min(toC, 550),
    reasons: ({ segment }, { words }) => [
      {
        text: `At ${words.rate(Number(segment.rateCPerH))}, with the vent open, so that what the pattern gives off finds air.`,
        source: limit !== null && limit.maxRateCPerH <= BURN_RATE ? limit.source : PRACTICE,
      },
      carbon
        ? {
            text: `To ${words.temp(segment.toC)}, below ${words.temp(carbon.value)}: above it, carbon breaks gypsum down.`,
            source: carbon.source,
          }
        : phosphate && segment.toC > 760
          ? {
              text: `To ${words.temp(segment.toC)}: phosphate moulds are burned out at 800-900 °C, and what is left of the pattern goes well before.`,
              source: PHOSPHATE,
            }
          : {
              text: `To ${words.temp(segment.toC)}: hot enough for what is left of the pattern to burn with air and time.`,
              source: clean?.source ?? PRACTICE,
            },
      {
        text: `Held ${words.time(segment.holdS)}, until by the model no more than half a per cent of the pattern is left beside its ash.`,
        source:
          'Decay of the pattern at the mould core, char limited by the air that comes through the wall; a fit, ±50 K or so',
      },
    ],
  };
}

function lastCarbonStep(needs: DraftNeeds, toC: number): DraftStep {
  const limit = heatingLimit(needs, 550, toC, { water: false, pattern: false });
  return {
    purpose: 'last-carbon',
    segment: plainSegment({
      stage: 'burnout',
      toC,
      rateCPerH: Math.min(BURN_RATE, limit?.maxRateCPerH ?? BURN_RATE),
      holdS: HOUR_S,
      vent: 'open',
    }),
    highC: toC,
    lowC: 650,
    reasons: ({ segment }, { words }) => [
      {
        text: `To ${words.temp(segment.toC)} for ${words.time(segment.holdS)}, once it is clean: whitens the mould, and stays below the working ceiling of the material.`,
        source: SCHEDULE,
      },
    ],
  };
}

/** Gives a silica-bonded shell its strength. */
export function vitrifyStep(needs: DraftNeeds): DraftStep | null {
  const shells = needs.moulds.filter(({ material }) => material.binder === 'silica');
  const reference = highest(shells.map(({ figure }) => figure('heatWorkReferenceC')));
  const target = highest(shells.map(({ figure }) => figure('heatWorkTargetH')));
  if (reference === null || target === null) return null;
  const topC = highestAllowedC(needs);
  const toC = Math.min(topC, Math.round((reference.value + 15) / 5) * 5);
  const limit = heatingLimit(needs, 700, toC, { water: false, pattern: false });
  return {
    purpose: 'vitrify',
    segment: plainSegment({
      stage: 'vitrification',
      toC,
      rateCPerH: Math.min(250, limit?.maxRateCPerH ?? 250),
      holdS: HOUR_S,
    }),
    highC: Math.min(topC, 980),
    lowC: Math.min(toC, 820),
    reasons: ({ segment }, { words }) => [
      {
        text: `${words.temp(segment.toC)} for ${words.time(segment.holdS)} sinters the binder: at least the work of ${target.value} h at ${words.temp(reference.value)}.`,
        source: target.source,
      },
    ],
  };
}
