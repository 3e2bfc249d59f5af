import type { Handout } from '~/lib/contracts/classes';
import type { ProfileSummary } from '~/lib/contracts/profiles';
import type { Run } from '~/lib/contracts/runs';
import { hasRole, type Actor } from '../auth/actor';
import { listHandouts } from '../services/handouts';
import { listProfiles } from '../services/profiles';
import { listRuns } from '../services/runs';

/** Most of a kind that one look reads; where there are more, the lists have the rest. */
const READ_AT_MOST = 50;
const WEEK_MS = 7 * 86_400_000;
/** No studio kiln stays too hot to open for longer. */
const COOLED_AFTER_MS = 2 * 86_400_000;

/** What the first page tells a person of their studio. */
export interface Today {
  readonly underWay: readonly Run[];
  readonly cooling: readonly Run[];
  /** Fired and cold, and nobody has signed the review yet. */
  readonly toSign: readonly Run[];
  /** Planned to start within a week, or already late; the next first. */
  readonly planned: readonly Run[];
  /** Runs with findings that nobody has judged yet. */
  readonly withFindings: readonly Run[];
  /** In review, and not by this person: theirs to approve or return. */
  readonly toReview: readonly ProfileSummary[];
  readonly ownDrafts: readonly ProfileSummary[];
  /** Handed to this person and not yet read. */
  readonly toRead: readonly Handout[];
  /** Handed to this person, read and in force. */
  readonly toFire: readonly Handout[];
  /** Of which there are more than {@link READ_AT_MOST}, of which only the newest were read. */
  readonly cut: Readonly<Record<'underWay' | 'cooling' | 'planned', boolean>>;
}

export async function todayOf(actor: Actor, now: Date): Promise<Today> {
  const reviews = hasRole(actor, 'teacher', 'owner');
  const decides = hasRole(actor, 'technician', 'teacher');
  const [underWay, cooling, planned, recent, inReview, drafts, handouts] = await Promise.all([
    listRuns(actor, { limit: READ_AT_MOST, state: 'under-way' }),
    listRuns(actor, { limit: READ_AT_MOST, state: 'cooling-down' }),
    listRuns(actor, { limit: READ_AT_MOST, state: 'planned' }),
    decides ? listRuns(actor, { limit: 100 }) : null,
    reviews ? listProfiles(actor, { limit: 50, archived: 'no', state: 'in-review' }) : null,
    listProfiles(actor, { limit: 50, archived: 'no', state: 'draft' }),
    listHandouts(actor, { limit: 100 }),
  ]);
  const mine = handouts.items.flatMap((handout) => {
    const own = handout.people.find((person) => person.id === actor.userId);
    return own ? [{ handout, read: own.acknowledgedAt !== null }] : [];
  });
  const isOpen = ({ state }: Handout) => state === 'in-force' || state === 'ahead';
  const isStillHot = (run: Run): boolean =>
    now.getTime() - Date.parse(run.finishedAt ?? run.startedAt ?? run.plannedStartAt) < COOLED_AFTER_MS;
  const stillHot = cooling.items.filter(isStillHot);
  return {
    underWay: underWay.items,
    cooling: stillHot,
    toSign: decides ? cooling.items.filter((run) => !isStillHot(run)) : [],
    planned: planned.items
      .filter((run) => Date.parse(run.plannedStartAt) < now.getTime() + WEEK_MS)
      .sort((a, b) => a.plannedStartAt.localeCompare(b.plannedStartAt)),
    withFindings: (recent?.items ?? []).filter((run) => run.openFindings > 0 && run.state !== 'broken-off'),
    toReview: (inReview?.items ?? []).filter((profile) => profile.latest.authorId !== actor.userId),
    ownDrafts: drafts.items.filter((profile) => profile.latest.authorId === actor.userId),
    toRead: mine.filter(({ handout, read }) => !read && isOpen(handout)).map(({ handout }) => handout),
    toFire: mine.filter(({ handout, read }) => read && isOpen(handout)).map(({ handout }) => handout),
    cut: {
      underWay: underWay.nextCursor !== null,
      cooling: cooling.nextCursor !== null && stillHot.length === cooling.items.length,
      planned: planned.nextCursor !== null,
    },
  };
}
