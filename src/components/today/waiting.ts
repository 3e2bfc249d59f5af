import type { Handout } from '~/lib/contracts/classes';
import type { ProfileSummary } from '~/lib/contracts/profiles';
import type { Run } from '~/lib/contracts/runs';
import { count } from '../words/names';
import { near } from '../words/when';

/** Most of a kind on the first page; a link leads to the list that has the rest. */
export const MOST = 8;
const MOST_DRAFTS = 4;

/** One thing that waits for the person: when, what, and why. */
export interface WaitingItem {
  readonly when: string;
  readonly what: string;
  readonly why: string;
  readonly href: string;
  readonly hot?: boolean;
}
export interface MoreLink {
  readonly href: string;
  readonly text: string;
}

interface Work {
  readonly toRead: readonly Handout[];
  readonly planned: readonly Run[];
  readonly toReview: readonly ProfileSummary[];
  readonly toSign: readonly Run[];
  readonly withFindings: readonly Run[];
  readonly toFire: readonly Handout[];
  readonly ownDrafts: readonly ProfileSummary[];
}

/** What waits, the most pressing kind first, each kind cut at {@link MOST}; and the lists that hold what was cut. */
export function waitingOf(
  work: Work,
  timeZone: string,
  now: Date,
): { readonly items: WaitingItem[]; readonly more: MoreLink[] } {
  const at = (instant: string) => near(instant, timeZone, now);
  const judged = judgedOnce(work);
  const groups = [
    group(work.toRead, MOST, '/handouts', 'All that was handed to you', (one) => toRead(one, at)),
    group(work.planned, MOST, '/runs?state=planned', 'All planned runs', (run) => toStart(run, at, now)),
    group(work.toReview, MOST, '/profiles?state=in-review', 'All profiles in review', (one) =>
      toReview(one, at),
    ),
    group(judged, MOST, '/runs?state=cooling-down', 'All runs that nobody has signed', toJudge),
    group(work.toFire, MOST, '/handouts', 'All that was handed to you', (one) => toFire(one, at)),
    group(work.ownDrafts, MOST_DRAFTS, '/profiles?state=draft', 'All drafts', (one) => draft(one, at)),
  ];
  const more = new Map(groups.flatMap((one) => one.more).map((link) => [link.href, link]));
  return { items: groups.flatMap((one) => one.items), more: [...more.values()] };
}

/** Logs to judge and reviews to sign, each run once, the newest first. */
const judgedOnce = ({ toSign, withFindings }: Work): Run[] =>
  [...new Map([...toSign, ...withFindings].map((run) => [run.id, run])).values()].sort(
    (a, b) => b.number - a.number,
  );

function group<T>(
  things: readonly T[],
  most: number,
  href: string,
  text: string,
  itemOf: (thing: T) => WaitingItem,
): { items: WaitingItem[]; more: MoreLink[] } {
  return {
    items: things.slice(0, most).map(itemOf),
    more: things.length > most ? [{ href, text }] : [],
  };
}

type InWords = (instant: string) => string;

const toRead = (handout: Handout, at: InWords): WaitingItem => ({
  when: 'To be read first',
  what: `Read the cautions of ${handout.profile.name}`,
  why: `in ${handout.kiln.name}, from ${at(handout.fromAt)}`,
  href: `/handouts/${handout.id}`,
  hot: true,
});

function toStart(run: Run, at: InWords, now: Date): WaitingItem {
  const isLate = Date.parse(run.plannedStartAt) < now.getTime();
  return {
    when: `${isLate ? 'Was to start' : 'Starts'} ${at(run.plannedStartAt)}`,
    what: `Run ${run.number}: ${run.profile.name}`,
    why: `in ${run.kiln.name}${run.logs.length > 0 ? ', its log is here' : ''}`,
    href: `/runs/${run.id}`,
    hot: isLate && run.logs.length === 0,
  };
}

const toReview = (profile: ProfileSummary, at: InWords): WaitingItem => ({
  when: `Changed ${at(profile.updatedAt)}`,
  what: `Review: ${profile.name}, version ${profile.latest.number}`,
  why: `asked by ${profile.author.name}`,
  href: `/profiles/${profile.id}/versions/${profile.latest.number}`,
});

const toJudge = (run: Run): WaitingItem => ({
  when: run.openFindings > 0 ? count(run.openFindings, 'open finding') : 'Not signed yet',
  what: run.openFindings > 0 ? `Judge the log of run ${run.number}` : `Sign the review of run ${run.number}`,
  why: run.verdict ?? `${run.profile.name}, in ${run.kiln.name}`,
  href: `/runs/${run.id}`,
});

const toFire = (handout: Handout, at: InWords): WaitingItem => ({
  when: `Until ${at(handout.untilAt)}`,
  what: `Plan the firing of ${handout.profile.name}`,
  why: `in ${handout.kiln.name}, you have read its cautions`,
  href: `/handouts/${handout.id}`,
});

const draft = (profile: ProfileSummary, at: InWords): WaitingItem => ({
  when: `Draft, changed ${at(profile.updatedAt)}`,
  what: profile.name,
  why: `version ${profile.latest.number}, yours to go on with`,
  href: `/profiles/${profile.id}/versions/${profile.latest.number}`,
});
