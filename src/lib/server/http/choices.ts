import { materials } from '~/lib/materials';
import { hasRole, type Actor } from '../auth/actor';
import { getHandout, listHandouts } from '../services/handouts';
import { listKilns } from '../services/kilns';
import { peopleOfStudio } from '../services/people';
import { getProfile, listProfiles } from '../services/profiles';
import { listTariffs } from '../services/tariffs';
import { listThermocouples } from '../services/thermocouples';

/** Most entries that a list of choices in a form holds. */
const MOST = 200;

interface Named {
  readonly id: string;
  readonly name: string;
}
const named = ({ id, name }: Named): { id: string; name: string } => ({ id, name });

/** A version that can be chosen, in words. */
interface VersionChoice {
  readonly id: string;
  readonly kilnId: string | null;
  readonly text: string;
}

/** Tariffs in use. */
export async function tariffChoices(actor: Actor) {
  const { items } = await listTariffs(actor, { limit: MOST, archived: 'no' });
  return items.map(named);
}

/** What a kiln's form offers to choose from. */
export async function kilnChoices(actor: Actor) {
  const [thermocouples, tariffs] = await Promise.all([
    listThermocouples(actor, { limit: MOST, archived: 'no' }),
    tariffChoices(actor),
  ]);
  return { thermocouples: thermocouples.items.map(named), tariffs, linings: materials.linings.map(named) };
}

/** The newest approved version of each profile in use, for handing out. */
export async function approvedVersions(actor: Actor): Promise<VersionChoice[]> {
  const { items } = await listProfiles(actor, { limit: MOST, archived: 'no', state: 'approved' });
  const found = await Promise.all(
    items.map(async ({ id, name, latest }) => {
      const versions = latest.state === 'approved' ? [latest] : (await getProfile(actor, id)).versions;
      const newest = versions
        .filter((version) => version.state === 'approved')
        .sort((a, b) => b.number - a.number)[0];
      return newest
        ? [{ id: newest.id, kilnId: newest.kilnId, text: `${name}, version ${newest.number}` }]
        : [];
    }),
  );
  return found.flat();
}

/** What a run can be planned from: any version that is not retired for a technician, else what was handed out. */
export async function runChoices(actor: Actor, handoutId: string | null) {
  const handout = handoutId === null ? null : await getHandout(actor, handoutId);
  if (!hasRole(actor, 'technician')) return { ...(await handedOut(actor, handout)), handout, people: [] };
  const [approved, others, kilns, people] = await Promise.all([
    approvedVersions(actor),
    unapprovedVersions(actor),
    listKilns(actor, { limit: MOST, archived: 'no' }),
    peopleOfStudio(actor, { limit: MOST }),
  ]);
  const versions = handout ? [choiceOf(handout)] : [...approved, ...others];
  return { versions, kilns: kilns.items.map(named), people: people.items, handout };
}

type Handout = Awaited<ReturnType<typeof getHandout>>;

const choiceOf = ({ version, profile, kiln }: Handout): VersionChoice => ({
  id: version.id,
  kilnId: kiln.id,
  text: `${profile.name}, version ${version.number}`,
});

async function handedOut(actor: Actor, handout: Handout | null) {
  const mayBeFired = ({ state, people }: Handout): boolean =>
    (state === 'in-force' || state === 'ahead') &&
    people.some((person) => person.id === actor.userId && person.acknowledgedAt !== null);
  const offered = handout ? [handout] : (await listHandouts(actor, { limit: MOST })).items;
  const open = offered.filter(mayBeFired);
  const kilns = new Map(open.map(({ kiln }) => [kiln.id, kiln]));
  const versions = new Map(open.map((one) => [one.version.id, choiceOf(one)]));
  return { versions: [...versions.values()], kilns: [...kilns.values()] };
}

/** Latest versions that are drafts or in review: a technician may fire them, to see how they do. */
async function unapprovedVersions(actor: Actor): Promise<VersionChoice[]> {
  const { items } = await listProfiles(actor, { limit: MOST, archived: 'no' });
  return items
    .filter(({ latest }) => latest.state === 'draft' || latest.state === 'in-review')
    .map(({ name, latest }) => ({
      id: latest.id,
      kilnId: latest.kilnId,
      text: `${name}, version ${latest.number}, ${latest.state === 'draft' ? 'a draft' : 'in review'}`,
    }));
}
