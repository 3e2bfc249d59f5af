import { materials } from '~/lib/materials';
import type { Actor } from '../auth/actor';
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

/** The newest approved version of each profile in use, for handing out and for planning runs. */
export async function approvedVersions(actor: Actor) {
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
