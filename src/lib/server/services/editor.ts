import type { Me } from '~/lib/contracts/auth';
import type { Kiln } from '~/lib/contracts/equipment';
import { isOnlyStudent, type Actor } from '../auth/actor';
import { HoldfastError } from '../errors';
import { studioRules } from '../repositories/studio-rules';
import { listFurnaces } from './furnaces';
import { getKiln, listKilns } from './kilns';
import { getProfile } from './profiles';
import { figuresInForce } from './studio-figures';
import { listTariffs } from './tariffs';
import { listThermocouples } from './thermocouples';
import { getVersion } from './versions';

const IN_USE = { limit: 200, archived: 'no' } as const;

/** What the editor of a version is given: the version, and all that its person may choose among. */
export async function editorProps(actor: Actor, me: Me, profileId: string, number: number) {
  const [version, profile, kilns, furnaces, thermocouples, tariffs, rules, studioFigures] = await Promise.all(
    [
      getVersion(actor, profileId, number),
      getProfile(actor, profileId),
      listKilns(actor, IN_USE),
      listFurnaces(actor, IN_USE),
      listThermocouples(actor, IN_USE),
      isOnlyStudent(actor) ? null : listTariffs(actor, IN_USE),
      studioRules(actor.studioId),
      figuresInForce(actor),
    ],
  );
  const own = await kilnOfVersion(actor, version.kilnId, kilns.items);
  const { id, name, revision, author } = profile;
  return {
    profile: { id, name, revision, authorId: author.id },
    version,
    kilns: own ? [...kilns.items, own] : kilns.items,
    furnaces: furnaces.items,
    thermocouples: thermocouples.items,
    tariffs: tariffs?.items ?? [],
    studioFigures,
    me,
    mayApproveOwn: rules.authorsApprove,
    attendedHours: { fromMinute: rules.attendedFromMinute, toMinute: rules.attendedUntilMinute },
  };
}

/** The version's own kiln where it is not among those in use: archived since, or not visible any more. */
async function kilnOfVersion(
  actor: Actor,
  kilnId: string | null,
  inUse: readonly Kiln[],
): Promise<Kiln | null> {
  if (kilnId === null || inUse.some((kiln) => kiln.id === kilnId)) return null;
  try {
    return await getKiln(actor, kilnId);
  } catch (error) {
    if (error instanceof HoldfastError && error.code === 'not-found') return null;
    throw error;
  }
}
