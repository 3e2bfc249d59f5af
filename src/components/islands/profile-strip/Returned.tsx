import type { Version } from '~/lib/contracts/profiles';
import { clockTime, dayAndDate } from '../strip/clock';

type Event = Version['events'][number];

/** The last thing that happened to a version, where it was a return that its author has not answered yet. */
function openReturn(version: Version): Event | null {
  const last = version.events[version.events.length - 1];
  return version.state === 'draft' && last?.what === 'returned' ? last : null;
}

export function remarksOf(version: Version): ReadonlyMap<number, string> {
  const event = openReturn(version);
  return new Map(
    event?.segmentRemarks.map(({ segment, remark }) => [segment, `${event.by.name}: ${remark}`]),
  );
}

/** What the reviewer, or the author, said last. */
export function Returned({ version, zone }: { readonly version: Version; readonly zone: string }) {
  const last = version.events[version.events.length - 1];
  if (!last || (last.note === '' && last.overrides.length === 0)) return null;
  const atMs = Date.parse(last.at);
  const words = {
    submitted: 'Submitted',
    approved: 'Approved',
    returned: 'Returned',
    retired: 'Retired',
  } as const;
  return (
    <div className={openReturn(version) ? 'notice notice-hot' : 'notice'}>
      <p>
        <strong>{`${words[last.what]} by ${last.by.name}`}</strong>
        {`, ${dayAndDate(atMs, zone)} ${clockTime(atMs, zone)}. ${last.note}`}
      </p>
      {last.overrides.map((override) => (
        <p key={`${override.code} ${String(override.segment)}`}>
          {`${override.segment === null ? 'The whole firing' : `Segment ${override.segment + 1}`}, ${override.code.replaceAll('-', ' ')}: ${override.reason}`}
        </p>
      ))}
    </div>
  );
}
