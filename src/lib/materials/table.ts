import { fuels } from './fuels';
import { furniture } from './furniture';
import { investments } from './investments';
import { linings } from './linings';
import { metals } from './metals';
import { polymers } from './patterns-polymers';
import { waxes } from './patterns-waxes';
import type { Materials } from './schema';
import { shells } from './shells';

/** Every material that Holdfast knows, by kind. The one place where default values come from. */
export const materials: Materials = {
  patterns: [...polymers, ...waxes],
  moulds: [...shells, ...investments],
  metals,
  linings,
  furniture,
  fuels,
};

export type MaterialKind = keyof Materials;
export type MaterialOf<K extends MaterialKind> = Materials[K][number];

type Named = Readonly<Record<string, unknown>>;
const byId = Object.fromEntries(
  Object.entries(materials).map(([kind, list]) => [
    kind,
    new Map(list.map((item) => [item.id, item as Named])),
  ]),
) as Record<MaterialKind, Map<string, Named>>;

/**
 * Looks a material up.
 *
 * @param kind `patterns`, `moulds`, `metals`, `linings`, `furniture` or `fuels`
 * @param id its name in kebab-case
 * @returns the material, or undefined if the table has none of that name
 */
export function findMaterial<K extends MaterialKind>(kind: K, id: string): MaterialOf<K> | undefined {
  return byId[kind].get(id) as MaterialOf<K> | undefined;
}
