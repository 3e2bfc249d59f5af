import type { Load } from '../thermal/load-schema';
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
    'silica-dust': load === null || load.moulds.length > 0,
    unattended: profile.segments.some((segment) => !segment.attended),
    estimates: true,
  };
  return (Object.keys(SAFETY_NOTES) as SafetyNote[]).filter((note) => applies[note]);
}
