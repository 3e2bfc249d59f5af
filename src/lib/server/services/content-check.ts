import { findMaterial, type MaterialKind } from '~/lib/materials';
import type { SealedContent } from '~/lib/profile/seal';
import { issuesOf } from '~/lib/profile/validate';
import type { Load } from '~/lib/thermal/load-schema';
import { pourIssues } from '~/lib/thermal/melt/charge';
import type { Actor } from '../auth/actor';
import type { Tx } from '../database';
import { notValid, type Issue } from '../errors';
import { getFurnace } from './furnaces';
import { kilnFor } from './kilns';

/** Materials that a load names and that the table does not have. */
export function loadIssues(load: Load | null): Issue[] {
  if (!load) return [];
  const issues: Issue[] = [];
  const check = (kind: MaterialKind, id: string, path: string) => {
    if (!findMaterial(kind, id))
      issues.push({ path: `load.${path}`, message: `the materials table has no ${kind} '${id}'` });
  };
  load.moulds.forEach((mould, index) => {
    check('moulds', mould.material, `moulds.${index}.material`);
    if (mould.pattern) check('patterns', mould.pattern.material, `moulds.${index}.pattern.material`);
  });
  load.furniture.forEach((piece, index) => check('furniture', piece.material, `furniture.${index}.material`));
  if (load.pour) {
    check('metals', load.pour.metal, 'pour.metal');
    issues.push(...pourIssues(load.pour).map((issue) => ({ ...issue, path: `load.pour.${issue.path}` })));
  }
  return issues;
}

/** Throws 422 for a load of materials that the table does not have: nothing could be computed of it. */
export function requireKnownMaterials(load: Load | null | undefined): void {
  const issues = loadIssues(load ?? null);
  if (issues[0]) throw notValid(`The load is not valid. ${issues[0].path}: ${issues[0].message}.`, issues);
}

/**
 * Checks what the schema of a body cannot: the length of the profile as planned, the materials of the load, and that the
 * kiln and the furnace named are the actor's to see.
 *
 * @param before the content that it takes the place of: what it named already needs no second leave
 */
export async function requireSoundContent(
  actor: Actor,
  content: SealedContent,
  before: SealedContent | null,
  tx: Tx,
): Promise<void> {
  const issues = [
    ...issuesOf(content.profile).map((issue) => ({ ...issue, path: `profile.${issue.path}` })),
    ...loadIssues(content.load),
  ];
  if (issues[0]) throw notValid(`The content is not valid. ${issues[0].path}: ${issues[0].message}.`, issues);
  if (content.kilnId !== null && content.kilnId !== before?.kilnId) {
    const kiln = await kilnFor(actor, content.kilnId, tx);
    if (kiln.archivedAt !== null)
      throw notValid(`${kiln.name} is archived. Choose a kiln that is in use.`, [
        { path: 'kilnId', message: 'an archived kiln' },
      ]);
  }
  const furnaceId = content.load?.pour?.furnaceId ?? null;
  if (furnaceId !== null && furnaceId !== (before?.load?.pour?.furnaceId ?? null))
    await getFurnace(actor, furnaceId, tx);
}
