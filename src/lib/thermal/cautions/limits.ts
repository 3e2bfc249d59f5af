import { defaultLayers, findMaterial, valueAt } from '../../materials';
import type { Caution } from '../estimate-schema';
import { thermocoupleLimit } from './thermocouple-limits';
import { type CautionRule, firstAbove, indexOfLargest, segmentsOf } from './view';

/** The solver's own tolerance: a target that lies on a limit is not above it. */
const TOLERANCE_C = 0.5;
/** How far the chamber may swing past the kiln's limit without being asked to before it is a matter of its own. */
const SWING_C = 5;
/** From here on a shell does not merely suffer. */
const FAR_ABOVE_C = 50;

export const aboveKilnLimit: CautionRule = (view) => {
  const { simulation, words } = view;
  const { maxC } = simulation.kiln;
  const asked: Caution[] = [];
  for (const { index, segment, moments } of segmentsOf(view)) {
    if (segment.toC > maxC)
      asked.push({
        code: 'above-kiln-limit',
        severity: 'stop',
        segment: index,
        atS: moments.startS,
        text: `Segment ${index + 1} asks for ${words.temp(segment.toC)}. The kiln's limit is ${words.temp(maxC)}.`,
        source: "The kiln's plate",
      });
  }
  const hottest = indexOfLargest(simulation.chamberC);
  const peakC = simulation.chamberC[hottest] ?? -Infinity;
  if (asked.length > 0 || peakC <= maxC + SWING_C) return asked;
  return [
    {
      code: 'above-kiln-limit',
      severity: 'warn',
      segment: simulation.segmentAt[hottest] ?? null,
      atS: simulation.timeS[hottest] ?? null,
      text: `The chamber comes to ${words.temp(peakC)}. The kiln's limit is ${words.temp(maxC)}.`,
      source: "The kiln's plate",
    },
  ];
};

export const aboveMaterialLimit: CautionRule = (view) => [
  ...mouldsAbove(view),
  ...furnitureAbove(view),
  ...liningAbove(view),
];

const mouldsAbove: CautionRule = ({ simulation, moulds, words }) =>
  moulds.flatMap(({ trace, material, name, value }): Caution[] => {
    const limit = value('maxC');
    if (limit === null) return [];
    const at = firstAbove(trace.surfaceC, limit.value + TOLERANCE_C);
    if (at === -1) return [];
    const peakC = trace.surfaceC[indexOfLargest(trace.surfaceC)] ?? NaN;
    const breaksDown = material.binder === 'gypsum' || peakC > limit.value + FAR_ABOVE_C;
    return [
      {
        code: 'above-material-limit',
        severity: breaksDown ? 'stop' : 'warn',
        segment: simulation.segmentAt[at] ?? null,
        atS: simulation.timeS[at] ?? null,
        text: `${name} comes to ${words.temp(peakC)}. Its material stands ${words.temp(limit.value)}.`,
        source: limit.source,
      },
    ];
  });

const furnitureAbove: CautionRule = ({ simulation, words }) =>
  simulation.load.furniture.flatMap((piece): Caution[] => {
    const material = findMaterial('furniture', piece.material);
    if (material === undefined) return [];
    const maxC = piece.overrides['maxC'] ?? valueAt(material.properties.maxC, 20);
    const at = firstAbove(simulation.chamberC, maxC + TOLERANCE_C);
    if (at === -1) return [];
    return [
      {
        code: 'above-material-limit',
        severity: 'warn',
        segment: simulation.segmentAt[at] ?? null,
        atS: simulation.timeS[at] ?? null,
        text: `Furniture of ${material.name.toLowerCase()} is heated above the ${words.temp(maxC)} that it stands.`,
        source: material.properties.maxC.source,
      },
    ];
  });

const liningAbove: CautionRule = ({ simulation, words }) => {
  const { kiln, chamberC } = simulation;
  const layers =
    kiln.liningLayers.length > 0 ? kiln.liningLayers : defaultLayers(kiln.lining, kiln.liningM, kiln.maxC);
  const hotFace = findMaterial('linings', layers[0]?.material ?? '');
  if (hotFace === undefined) return [];
  const maxC = valueAt(hotFace.properties.maxC, 20);
  const at = firstAbove(chamberC, maxC + TOLERANCE_C);
  if (at === -1) return [];
  return [
    {
      code: 'above-material-limit',
      severity: 'warn',
      segment: simulation.segmentAt[at] ?? null,
      atS: simulation.timeS[at] ?? null,
      text: `The kiln's lining is heated above ${words.temp(maxC)}, what ${hotFace.name.toLowerCase()} stands for long.`,
      source: hotFace.properties.maxC.source,
    },
  ];
};

export const aboveThermocoupleLimit: CautionRule = ({ simulation, context, words }) => {
  const limit = context.thermocouple === null ? null : thermocoupleLimit(context.thermocouple);
  if (context.thermocouple === null || limit === null) return [];
  const at = firstAbove(simulation.chamberC, limit.maxC + TOLERANCE_C);
  if (at === -1) return [];
  const peakC = simulation.chamberC[indexOfLargest(simulation.chamberC)] ?? NaN;
  return [
    {
      code: 'above-thermocouple-limit',
      severity: 'warn',
      segment: simulation.segmentAt[at] ?? null,
      atS: simulation.timeS[at] ?? null,
      text: `The chamber comes to ${words.temp(peakC)}. The type ${context.thermocouple.type} thermocouple is made for ${words.temp(limit.maxC)}: above it drifts and may fail.`,
      source: limit.source,
    },
  ];
};
