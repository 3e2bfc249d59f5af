import { kilnInputSchema, type describedKilnSchema, type Kiln } from '~/lib/contracts/equipment';
import { findMaterial } from '~/lib/materials';
import { kilnPlateSchema, type KilnPlate } from '~/lib/thermal/kiln-schema';
import type { z } from '~/lib/zod';
import type { Actor } from '../auth/actor';
import type { Tx } from '../database';
import type { Issue } from '../errors';
import { KILN_COLUMNS_OF, kilns } from '../repositories/kilns';
import { tariffs } from '../repositories/tariffs';
import { thermocouples } from '../repositories/thermocouples';
import { kilnIdsFor } from '../repositories/visibility';
import { equipmentService } from './equipment';
import { requireReferences } from './references';

/** Throws 404 unless the thermocouple and the tariff that a kiln names are in the actor's studio. */
export function requireLinks(
  actor: Actor,
  kiln: { readonly thermocoupleId: string | null; readonly tariffId: string | null },
  tx?: Tx,
): Promise<void> {
  const { thermocoupleId, tariffId } = kiln;
  return requireReferences(
    [
      { path: 'thermocoupleId', id: thermocoupleId, noun: 'thermocouple', repository: thermocouples },
      { path: 'tariffId', id: tariffId, noun: 'tariff', repository: tariffs },
    ],
    actor,
    tx,
  );
}

/** Materials of a lining that the table does not have. */
export const liningIssues = ({ liningLayers }: Pick<KilnPlate, 'liningLayers'>): Issue[] =>
  liningLayers.flatMap(({ material }, index) =>
    findMaterial('linings', material)
      ? []
      : [{ path: `liningLayers.${index}.material`, message: `no lining is called '${material}'` }],
  );

const service = equipmentService({
  noun: 'kiln',
  repository: kilns,
  input: kilnInputSchema,
  idsForPerson: kilnIdsFor,
  forStudent: (kiln) => ({ ...kiln, tariffId: null }),
  onlyWithEnergy: KILN_COLUMNS_OF,
  check: async (actor, input, tx) => {
    await requireLinks(actor, input, tx);
    return liningIssues(input);
  },
});

export const listKilns = service.list;
export const getKiln = service.get;
export const createKiln = service.create;
export const updateKiln = service.update;

/** A kiln that the actor sees, or 404: what other services name a kiln through. */
export const kilnFor: typeof service.get = service.get;

const NOT_ON_THE_PLATE = new Set([
  ...['id', 'revision', 'createdAt', 'updatedAt', 'archivedAt'],
  ...['name', 'note', 'thermocoupleId', 'tariffId'],
]);

/** What the kiln model needs of a kiln, kept or described on the spot: all but its name, note and links. */
export function plateOf(kiln: Kiln | z.output<typeof describedKilnSchema>): KilnPlate {
  const plate = Object.entries(kiln).filter(([name]) => !NOT_ON_THE_PLATE.has(name));
  return kilnPlateSchema.parse(Object.fromEntries(plate));
}
