import type { materialRoutes } from '~/lib/contracts/materials';
import { materials, type Materials } from '~/lib/materials';
import {
  figureIssues,
  figureKindSchema,
  withStudioFigures,
  type StudioFigures,
} from '~/lib/materials/studio-figures';
import type { Load } from '~/lib/thermal/load-schema';
import type { z } from '~/lib/zod';
import { requireRole, type Actor } from '../auth/actor';
import { inTransaction, isDuplicate, type Tx } from '../database';
import { HoldfastError, notFound, notValid } from '../errors';
import { lockedRevision, studioFigures, writeFigures } from '../repositories/studio-figures';

type Body = z.output<(typeof materialRoutes)['setFigures']['body']>;

/** The table, and what the person's studio holds otherwise. */
export async function materialsFor(actor: Actor): Promise<Materials & { studioFigures: StudioFigures[] }> {
  return { ...materials, studioFigures: await studioFigures(actor.studioId) };
}

export const figuresInForce = (actor: Actor, tx?: Tx): Promise<StudioFigures[]> =>
  studioFigures(actor.studioId, tx);

/** A load as the models take it in this studio. Never kept. */
export const loadInForce = async (actor: Actor, load: Load, tx?: Tx): Promise<Load> =>
  withStudioFigures(load, await studioFigures(actor.studioId, tx));

/** Puts a studio's own figures in place of the table's for one material; no figures: the table's again. */
export async function setFigures(
  actor: Actor,
  kindText: string,
  material: string,
  body: Body,
): Promise<StudioFigures> {
  requireRole(actor, 'technician', 'owner');
  const kind = figureKindSchema.safeParse(kindText);
  if (!kind.success) throw notFound('kind of material');
  const issues = figureIssues(kind.data, material, body.figures);
  if (issues.some(({ path }) => path === 'id')) throw notFound('material');
  if (issues[0])
    throw notValid(`These figures cannot be right. ${issues[0].path}: ${issues[0].message}.`, issues);
  try {
    return await inTransaction(async (tx) => {
      const revision = await lockedRevision(actor.studioId, kind.data, material, tx);
      if (revision !== body.revision) throw changedMeanwhile();
      const { figures, note } = body;
      const by = { userId: actor.userId, revision };
      return writeFigures(actor.studioId, { kind: kind.data, material, figures, note }, by, tx);
    });
  } catch (error) {
    if (isDuplicate(error)) throw changedMeanwhile();
    throw error;
  }
}

const changedMeanwhile = (): HoldfastError =>
  new HoldfastError(
    'wrong-state',
    'Somebody else changed these figures meanwhile. Look at theirs, then put yours in again.',
  );
