import type { Kiln } from '~/lib/contracts/equipment';
import { diffProfiles, type FieldChange } from '~/lib/profile/diff';
import type { Rate } from '~/lib/profile/schema';
import { formatTemperature, type UnitPreferences } from '~/lib/units';
import { durationText } from '../strip/duration';
import type { ProfileDocument } from './document';
import { rateText, STAGE_NAMES } from './shown';

const FIELD_WORDS: Readonly<Record<FieldChange['field'], string>> = {
  stage: 'stage',
  toC: 'target',
  rateCPerH: 'rate',
  holdS: 'hold',
  attended: 'attended',
  drain: 'drain',
  vent: 'vent',
  openedS: 'stands open',
  openedShare: 'share open',
  instruction: 'instruction',
};

function valueText(field: FieldChange['field'], value: FieldChange['after'], units: UnitPreferences): string {
  if (field === 'stage') return STAGE_NAMES[value as keyof typeof STAGE_NAMES].toLowerCase();
  if (field === 'toC') return formatTemperature(Number(value), units.temperature);
  if (field === 'rateCPerH') return rateText(value as Rate, units.temperature);
  if (field === 'holdS') return durationText(Number(value));
  if (typeof value === 'boolean') return value ? 'yes' : 'no';
  return value === '' ? 'none' : `“${String(value)}”`;
}

/** How another document differs from one's own, one line each: what stands in mine, what in theirs. */
export function differencesOf(
  mine: ProfileDocument,
  theirs: ProfileDocument,
  kilns: readonly Kiln[],
  units: UnitPreferences,
): { what: string; mine: string; theirs: string }[] {
  const lines: { what: string; mine: string; theirs: string }[] = [];
  const kilnName = (id: string | null): string => kilns.find((kiln) => kiln.id === id)?.name ?? 'none';
  if (mine.name !== theirs.name) lines.push({ what: 'Name', mine: mine.name, theirs: theirs.name });
  if (mine.kilnId !== theirs.kilnId)
    lines.push({ what: 'Kiln', mine: kilnName(mine.kilnId), theirs: kilnName(theirs.kilnId) });
  if (JSON.stringify(mine.load) !== JSON.stringify(theirs.load))
    lines.push({ what: 'Load', mine: 'as you have it', theirs: 'another' });
  const diff = diffProfiles(mine.profile, theirs.profile);
  if (diff.startC)
    lines.push({
      what: 'Start',
      mine: formatTemperature(diff.startC.before, units.temperature),
      theirs: formatTemperature(diff.startC.after, units.temperature),
    });
  for (const segment of diff.segments) {
    const what = `Segment ${(segment.before ?? segment.after ?? 0) + 1}`;
    if (segment.kind === 'added') lines.push({ what, mine: 'not there', theirs: 'added' });
    if (segment.kind === 'removed') lines.push({ what, mine: 'there', theirs: 'removed' });
    for (const { field, before, after } of segment.fields)
      lines.push({
        what: `${what}, ${FIELD_WORDS[field]}`,
        mine: valueText(field, before, units),
        theirs: valueText(field, after, units),
      });
  }
  return lines;
}
