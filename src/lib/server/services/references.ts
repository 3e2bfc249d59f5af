import type { Actor } from '../auth/actor';
import type { Tx } from '../database';
import { HoldfastError } from '../errors';

interface Reference {
  /** Where in the body. */
  readonly path: string;
  readonly id: string | null;
  readonly noun: string;
  readonly repository: { find(studioId: string, id: string, tx?: Tx): Promise<unknown> };
}

/** Throws 404 for the first thing that a body names and that is not in the actor's studio: another studio's or nobody's. */
export async function requireReferences(
  references: readonly Reference[],
  actor: Actor,
  tx?: Tx,
): Promise<void> {
  for (const { path, id, noun, repository } of references) {
    if (id !== null && !(await repository.find(actor.studioId, id, tx)))
      throw new HoldfastError('not-found', `No such ${noun}, or it is not visible to you.`, {
        errors: [{ path, message: `no such ${noun}` }],
      });
  }
}
