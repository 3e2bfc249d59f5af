import type { Words } from '../cautions/view';
import type { DraftNeeds, MouldNeeds } from './needs';

/** Why a load cannot be fired well as it is. */
export interface Objection {
  readonly text: string;
  readonly source: string;
}

/** Solid thermosets this much thicker than the table's limit crack what holds them at any rate. */
const FAR_TOO_THICK = 2;
/** A shell this wet with a pattern in it: steam and a swelling pattern at once, kg per kg. */
const WET_SHARE = 0.05;
/** Hotter metal breaks gypsum down where it touches. */
const GYPSUM_METAL_C = 1250;

const PRACTICE = 'Common practice, no source';

/**
 * The short list of moulds, patterns and metals that no profile fires well: what is wrong is the load. Everything else is
 * drafted without a caution that stops it.
 */
export function objectionsTo(needs: DraftNeeds, words: Words): Objection[] {
  return needs.moulds.flatMap((mould) =>
    [thickThermoset(mould, words), wetWithPattern(mould, words), gypsumTooCold(mould, needs, words)].filter(
      (objection): objection is Objection => objection !== null,
    ),
  );
}

function thickThermoset({ pattern, patternFigure }: MouldNeeds, words: Words): Objection | null {
  const limit = patternFigure('pushesAboveM');
  const thickM = pattern?.own.thickestM ?? null;
  if (pattern?.material.behaviour !== 'thermoset' || pattern.own.hollow || limit === null || thickM === null)
    return null;
  if (thickM <= FAR_TOO_THICK * limit.value) return null;
  return {
    text: `${pattern.material.name} ${words.length(thickM)} thick and solid never melts and pushes on its mould until it burns, whatever the rate. Build it hollow, or no thicker than ${words.length(limit.value)}.`,
    source: limit.source,
  };
}

function wetWithPattern({ mould, pattern, material }: MouldNeeds, words: Words): Objection | null {
  if (mould.form !== 'shell' || pattern === null || mould.waterKg <= WET_SHARE * mould.massKg) return null;
  if (pattern.material.behaviour !== 'melts') return null;
  return {
    text: `The ${material.name.toLowerCase()} holds ${words.mass(mould.waterKg)} of water. Its wax must be heated fast to run before it swells, and its water slowly. Dry the shell in moving air for a day or two first, then fire it.`,
    source: `${PRACTICE}; an under-dried shell is the usual one to crack`,
  };
}

function gypsumTooCold({ material }: MouldNeeds, { load }: DraftNeeds, words: Words): Objection | null {
  const pourC = load.pour?.pourC ?? 0;
  if (material.binder !== 'gypsum' || pourC <= GYPSUM_METAL_C) return null;
  return {
    text: `Metal at ${words.temp(pourC)} breaks ${material.name.toLowerCase()} down where it touches: gas, and a mould that gives way. Use a phosphate-bonded or a ceramic shell mould.`,
    source:
      'Calcium sulphate comes apart above about 1220-1250 °C (encyclopaedic note of an instrument maker)',
  };
}
