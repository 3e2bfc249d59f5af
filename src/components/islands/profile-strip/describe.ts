import type { Kiln } from '~/lib/contracts/equipment';
import { findMaterial } from '~/lib/materials';
import type { Load, Mould } from '~/lib/thermal/load-schema';
import { formatLength, formatMass, formatNumber, THIN_SPACE, type UnitPreferences } from '~/lib/units';

const counted = (count: number, one: string, many: string): string => `${count} ${count === 1 ? one : many}`;
const lowerFirst = (text: string): string =>
  /^[A-Z][a-z]/.test(text) ? text.charAt(0).toLowerCase() + text.slice(1) : text;

/** `PLA, printed` in a sentence: `printed PLA`. */
const inSentence = (name: string): string => lowerFirst(name).replace(/^([^,]+), ([^,]+)$/, '$2 $1');

export const mouldName = (id: string): string => inSentence(findMaterial('moulds', id)?.name ?? id);
export const patternName = (id: string): string => inSentence(findMaterial('patterns', id)?.name ?? id);

function sizeOf(mould: Mould, units: UnitPreferences): string {
  if (mould.form === 'shell')
    return mould.wallM === null ? '' : `${formatLength(mould.wallM, units.length)} `;
  return mould.diameterM === null ? '' : `${formatLength(mould.diameterM, units.length)} across, `;
}

/** `4 shells, 8 mm fused silica shell`; several kinds of mould: how many of each form. */
export function mouldsText(load: Load | null, units: UnitPreferences): string {
  const moulds = load?.moulds ?? [];
  const first = moulds[0];
  if (!first) return 'an empty kiln';
  const total = moulds.reduce((sum, mould) => sum + mould.count, 0);
  const alike = moulds.every((mould) => mould.material === first.material && mould.form === first.form);
  const shells = moulds
    .filter((mould) => mould.form === 'shell')
    .reduce((sum, mould) => sum + mould.count, 0);
  if (alike) {
    const noun =
      first.form === 'shell' ? counted(total, 'shell', 'shells') : counted(total, 'flask', 'flasks');
    return `${noun}, ${sizeOf(first, units)}${mouldName(first.material).replace(/ shell$/, '')}`;
  }
  return [
    shells > 0 ? counted(shells, 'shell', 'shells') : '',
    total - shells > 0 ? counted(total - shells, 'flask', 'flasks') : '',
  ]
    .filter(Boolean)
    .join(' and ');
}

/** `350 g PLA`: all patterns of the load together; null where there is none. */
export function patternsText(load: Load | null, units: UnitPreferences): string | null {
  const patterns = (load?.moulds ?? []).flatMap((mould) =>
    mould.pattern ? [{ material: mould.pattern.material, massKg: mould.pattern.massKg * mould.count }] : [],
  );
  const first = patterns[0];
  if (!first) return null;
  const massKg = patterns.reduce((sum, pattern) => sum + pattern.massKg, 0);
  const alike = patterns.every((pattern) => pattern.material === first.material);
  return `${formatMass(massKg, units.mass)} ${alike ? patternName(first.material) : 'of patterns'}`;
}

const LINING_WORDS = { brick: 'brick', fibre: 'fibre', 'brick-and-fibre': 'brick and fibre' } as const;

/** `Kiln 2, 6 kW brick` */
export function kilnText(kiln: Kiln): string {
  const powerKW = kiln.energy === 'electric' ? kiln.ratedKW : kiln.burnerKW;
  const power = `${formatNumber(powerKW, Number.isInteger(powerKW) ? 0 : 1)}${THIN_SPACE}kW`;
  return `${kiln.name}, ${power} ${kiln.energy === 'gas' ? 'gas, ' : ''}${LINING_WORDS[kiln.lining]}`;
}
