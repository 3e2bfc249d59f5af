import { valueAt } from '../../materials';
import { type DraftNeeds, isFlask, lowest } from './needs';
import { type DraftStep, plainSegment } from './step';

const PRACTICE = 'Common practice, no source';
const KARAT = 'Page on casting karat gold: flasks at 593-704 °C for fine work, 427-538 °C for heavy';
const HALF_HOUR_S = 1800;
/**
 * Highest that moulds are poured at against the solidus of their metal, K: blocks stay hot and must be well below; a shell
 * loses 150-200 K in its first minute outside.
 */
const TO_SOLIDUS_C = { flask: -100, shell: 50 } as const;
/** The least that a mould is worth bringing to, °C: drier than the room, warm enough to keep its water out. */
const LEAST_C = 200;

/** Temperature that shells and flasks are poured at, by the thinnest section to be filled. */
function usualMouldC({ moulds }: DraftNeeds): { toC: number; source: string } {
  const sections = moulds.flatMap(({ mould }) => mould.thinnestSectionM ?? []);
  const thinnestM = sections.length === 0 ? null : Math.min(...sections);
  if (moulds.some(isFlask)) {
    if (thinnestM === null) return { toC: 540, source: KARAT };
    return { toC: thinnestM < 0.002 ? 640 : thinnestM < 0.005 ? 560 : 480, source: KARAT };
  }
  const source = `${PRACTICE}: shells are poured at 590-900 °C, hot for thin work, and below 2-3 mm at 870 °C or more`;
  if (thinnestM === null) return { toC: 760, source };
  return { toC: thinnestM < 0.003 ? 880 : thinnestM < 0.006 ? 800 : 680, source };
}

/** Brings the mould to what it is poured at and waits there for the metal. */
export function castingStep(needs: DraftNeeds): DraftStep | null {
  const { metal, load, kiln, moulds } = needs;
  if (load.pour === null) return null;
  const solidusC = load.pour.alloy?.solidusC ?? (metal ? valueAt(metal.properties.solidusC, 20) : Infinity);
  const maxC = lowest(moulds.map(({ figure }) => figure('maxC')))?.value ?? 1200;
  const carbonC = lowest(moulds.map(({ figure }) => figure('maxWithCarbonC')))?.value ?? Infinity;
  const cristobaliteC = lowest(moulds.map(({ figure }) => figure('cristobaliteFromC')))?.value ?? Infinity;
  const highC = Math.max(
    LEAST_C,
    Math.min(
      solidusC + TO_SOLIDUS_C[moulds.some(isFlask) ? 'flask' : 'shell'],
      maxC - 30,
      kiln.maxC - 15,
      carbonC - 15,
      cristobaliteC - 20,
    ),
  );
  const usual = usualMouldC(needs);
  const toC = Math.min(usual.toC, Math.round(highC / 5) * 5);
  return {
    purpose: 'cast',
    segment: plainSegment({
      stage: 'casting-hold',
      toC,
      rateCPerH: 'coast',
      holdS: HALF_HOUR_S,
      attended: true,
      instruction:
        'Wait for the metal. Face shield, gloves, clothing for molten metal; everything that touches metal preheated and dry.',
    }),
    highC,
    lowC: toC,
    reasons: ({ segment }, { words, needs: { load: asked } }) => [
      {
        text: `${words.temp(segment.toC)} for ${asked.pour ? (metal?.name.toLowerCase() ?? 'metal') : 'metal'}${segment.toC > usual.toC ? ', hotter than usual so that the thinnest section fills' : segment.toC < usual.toC ? `, as hot as may be: its metal is solid at ${words.temp(solidusC)}` : ''}.`,
        source: usual.source,
      },
      {
        text: `Held ${words.time(segment.holdS)}, until the mould core is within ${words.difference(10)} and the metal can come.`,
        source: 'Conduction through the wall, film outside included',
      },
    ],
  };
}

/** Lets the kiln come down by itself to where it may be opened. */
export function coolingStep({ kiln }: DraftNeeds): DraftStep {
  return {
    purpose: 'cool',
    segment: plainSegment({ stage: 'cooling', toC: kiln.openAtC, rateCPerH: 'coast', holdS: 0 }),
    highC: kiln.openAtC,
    lowC: kiln.openAtC,
    reasons: ({ segment }, { words }) => [
      {
        text: `Heating off, closed, down to ${words.temp(segment.toC)}: the kiln's opening temperature.`,
        source: "The kiln's opening temperature, as entered",
      },
    ],
  };
}

/** Stretches shorter than this are not worth a segment of their own, K. */
const LEAST_STRETCH_C = 15;

/**
 * A cooling that the kiln left alone would take too fast, cut where its moulds have limits and slowed there.
 *
 * @param fromC where it begins
 */
export function slowedCooling(step: DraftStep, fromC: number, needs: DraftNeeds): DraftStep[] {
  const limits = needs.moulds.flatMap(({ material }) =>
    material.rateLimits.filter(({ direction, onlyWith }) => direction === 'cooling' && onlyWith === null),
  );
  const endC = step.segment.toC;
  const edges = limits
    .flatMap((limit) => [limit.fromC, limit.toC])
    .filter((edgeC) => edgeC < fromC - LEAST_STRETCH_C && edgeC > endC + LEAST_STRETCH_C);
  const targets = [...new Set([...edges, endC])].sort((a, b) => b - a);
  let highC = fromC;
  return targets.map((toC) => {
    const here = limits.filter((limit) => limit.fromC < highC && limit.toC > toC);
    highC = toC;
    const slowest = here.reduce<(typeof here)[number] | null>(
      (best, limit) => (best === null || limit.maxRateCPerH < best.maxRateCPerH ? limit : best),
      null,
    );
    const rateCPerH = slowest?.maxRateCPerH ?? 'coast';
    if (toC === endC) return { ...step, segment: { ...step.segment, rateCPerH } };
    return slowedTo(toC, rateCPerH, slowest?.source ?? PRACTICE);
  });
}

const slowedTo = (toC: number, rateCPerH: number | 'coast', source: string): DraftStep => ({
  purpose: 'cool-slowly',
  segment: plainSegment({ stage: 'cooling', toC, rateCPerH, holdS: 0 }),
  highC: toC,
  lowC: toC,
  reasons: ({ segment }, { words }) => [
    {
      text:
        typeof segment.rateCPerH === 'number'
          ? `No faster than ${words.rate(segment.rateCPerH)} down to ${words.temp(segment.toC)}: what the mould contains shrinks much here.`
          : `Heating off down to ${words.temp(segment.toC)}.`,
      source,
    },
  ],
});
