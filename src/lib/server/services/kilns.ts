import { kilnInputSchema, type Kiln } from '~/lib/contracts/equipment';
import { findMaterial } from '~/lib/materials';
import { kilnPlateSchema, type KilnPlate } from '~/lib/thermal/kiln-schema';
import { KILN_COLUMNS_OF, kilns } from '../repositories/kilns';
import { tariffs } from '../repositories/tariffs';
import { thermocouples } from '../repositories/thermocouples';
import { kilnIdsFor } from '../repositories/visibility';
import { equipmentService } from './equipment';
import { requireReferences } from './references';

const service = equipmentService({
  noun: 'kiln',
  repository: kilns,
  input: kilnInputSchema,
  idsForPerson: kilnIdsFor,
  forStudent: (kiln) => ({ ...kiln, tariffId: null }),
  onlyWithEnergy: KILN_COLUMNS_OF,
  check: async (actor, input, tx) => {
    await requireReferences(
      [
        {
          path: 'thermocoupleId',
          id: input.thermocoupleId,
          noun: 'thermocouple',
          repository: thermocouples,
        },
        { path: 'tariffId', id: input.tariffId, noun: 'tariff', repository: tariffs },
      ],
      actor,
      tx,
    );
    return input.liningLayers.flatMap(({ material }, index) =>
      findMaterial('linings', material)
        ? []
        : [
            {
              path: `liningLayers.${index}.material`,
              message: `no lining material is called '${material}'`,
            },
          ],
    );
  },
});

export const listKilns = service.list;
export const getKiln = service.get;
export const createKiln = service.create;
export const updateKiln = service.update;

/** A kiln that the actor sees, or 404: what other services name a kiln through. */
export const kilnFor: typeof service.get = service.get;

/** What the kiln model needs of a kiln: the kiln without its name, note and links. */
export function plateOf(kiln: Kiln): KilnPlate {
  const {
    id: _id,
    name: _name,
    note: _note,
    thermocoupleId: _thermocoupleId,
    tariffId: _tariffId,
    revision: _revision,
    createdAt: _createdAt,
    updatedAt: _updatedAt,
    archivedAt: _archivedAt,
    ...plate
  } = kiln;
  return kilnPlateSchema.parse(plate);
}
