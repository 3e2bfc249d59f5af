import type { Load } from '../thermal/load-schema';
import { findMaterial } from '../materials';
import type { Profile } from './schema';

/** Dangers of the work itself that no figure takes away. Texts are the trade's common practice, not advice of a code. */
export const SAFETY_NOTES = {
  fumes: {
    title: 'Fumes',
    text: 'Burning plastic, wax and resin gives off carbon monoxide and irritants. Vent to outdoors and keep a carbon monoxide alarm in the room.',
  },
  'hot-work': {
    title: 'Hot work',
    text: "Do not open the kiln above the studio's own limit without face shield, gloves and clothing made for it.",
  },
  'molten-metal': {
    title: 'Molten metal and water',
    text: 'Water under molten metal explodes into steam. Everything that touches metal is preheated and dry.',
  },
  'unknown-scrap': {
    title: 'Unknown scrap',
    text: 'It may hold zinc, lead or beryllium, whose fumes are poisonous. Melt only what you know.',
  },
  'zinc-and-lead': {
    title: 'Zinc and lead',
    text: 'The metal of this pour holds zinc or lead, and its fumes are poisonous. Do not overheat it, draw its fumes off, and wear a respirator made for metal fume.',
  },
  'silica-dust': {
    title: 'Silica dust',
    text: 'Mixing, sanding or knocking off a mould sets free silica dust. Wear a respirator and work wet.',
  },
  unattended: {
    title: 'Unattended firing',
    text: "Only as the studio's rules and the local fire code allow. The safety device is an independent over-temperature cut-out, not this software.",
  },
  estimates: {
    title: 'Estimates only',
    text: "All computed figures support a trained person's judgement. Local codes, the makers' data sheets and licensed practice come first.",
  },
} as const;
export type SafetyNote = keyof typeof SAFETY_NOTES;

/**
 * The dangers that a firing brings with it, most pressing first.
 *
 * Fumes: a pattern is in the load, or a stage melts or burns one out. Molten metal and scrap: metal is poured into it.
 * Zinc and lead: they are in the nominal composition of the metal that is named.
 * Silica dust: a mould is fired. Unattended: any segment is not marked as attended.
 *
 * @param profile the firing
 * @param load what stands in the kiln, null where it is not described
 */
export function safetyNotesFor(profile: Profile, load: Load | null): SafetyNote[] {
  const stages = new Set(profile.segments.map((segment) => segment.stage));
  const hasPattern = load?.moulds.some((mould) => mould.pattern !== null) ?? false;
  const isPoured = load?.pour != null || stages.has('casting-hold');
  const applies: Record<SafetyNote, boolean> = {
    fumes: hasPattern || stages.has('melt-out') || stages.has('burnout'),
    'hot-work': true,
    'molten-metal': isPoured,
    'unknown-scrap': isPoured,
    'zinc-and-lead': load?.pour != null && holdsZincOrLead(load.pour.metal),
    'silica-dust': load === null || load.moulds.length > 0,
    unattended: profile.segments.some((segment) => !segment.attended),
    estimates: true,
  };
  return (Object.keys(SAFETY_NOTES) as SafetyNote[]).filter((note) => applies[note]);
}

function holdsZincOrLead(metal: string): boolean {
  const composition = findMaterial('metals', metal)?.composition ?? {};
  return ['Zn', 'Pb'].some((element) => (composition[element] ?? 0) > 0);
}

/**
 * Those of a firing's dangers that are at hand in one segment: fumes while a pattern melts or burns, hot work where
 * somebody opens or attends to the kiln, metal at the casting hold, an unattended kiln where nobody is asked for.
 *
 * @param index segment, from 0; none of that index: no dangers
 */
export function safetyNotesAt(profile: Profile, load: Load | null, index: number): SafetyNote[] {
  const segment = profile.segments[index];
  if (segment === undefined) return [];
  const somebodyThere = segment.attended || segment.drain || segment.openedS !== undefined;
  const poured = segment.stage === 'casting-hold';
  const here: Record<SafetyNote, boolean> = {
    fumes: segment.stage === 'melt-out' || segment.stage === 'burnout',
    'hot-work': somebodyThere || poured,
    'molten-metal': poured,
    'unknown-scrap': poured,
    'zinc-and-lead': poured,
    'silica-dust': segment.stage === 'cooling' && somebodyThere,
    unattended: !somebodyThere,
    estimates: false,
  };
  return safetyNotesFor(profile, load).filter((note) => here[note]);
}
