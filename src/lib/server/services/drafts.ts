import type { z } from '~/lib/zod';
import type { DraftedProfile, draftRoutes } from '~/lib/contracts/drafts';
import { draftOf } from '~/lib/thermal/draft/draft';
import type { Actor } from '../auth/actor';
import { notValid } from '../errors';
import { requireKnownMaterials } from './content-check';
import { cautionContext } from './estimates';
import { computed } from './firing';
import { kilnFor, plateOf } from './kilns';
import { loadInForce } from './studio-figures';

type Request = z.output<(typeof draftRoutes)['draft']['body']>;

/** Drafts a profile for a load in one of the studio's kilns. Nothing is kept. */
export async function draftProfile(actor: Actor, request: Request): Promise<DraftedProfile> {
  const { load, kilnId, ambientC } = request;
  const kiln = await kilnFor(actor, kilnId);
  requireKnownMaterials(load);
  if (load.moulds.length === 0)
    throw notValid('A draft is made for moulds. Put at least one into the load.', [
      { path: 'load.moulds', message: 'at least one mould' },
    ]);
  const context = await cautionContext(actor, kiln, load, null);
  const inForce = await loadInForce(actor, load);
  const { profile, because, against } = computed(() =>
    draftOf({ load: inForce, kiln: plateOf(kiln), ambientC, context }),
  );
  return { profile, because, against };
}
