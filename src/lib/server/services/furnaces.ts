import { furnaceInputSchema } from '~/lib/contracts/equipment';
import { FURNACE_COLUMNS_OF, furnaces } from '../repositories/furnaces';
import { tariffs } from '../repositories/tariffs';
import { furnaceIdsFor } from '../repositories/visibility';
import { equipmentService } from './equipment';
import { requireReferences } from './references';

const service = equipmentService({
  noun: 'furnace',
  repository: furnaces,
  input: furnaceInputSchema,
  idsForPerson: furnaceIdsFor,
  forStudent: (furnace) => ({ ...furnace, tariffId: null }),
  onlyWithEnergy: FURNACE_COLUMNS_OF,
  check: async (actor, { tariffId }, tx) => {
    const tariff = { path: 'tariffId', id: tariffId, noun: 'tariff', repository: tariffs };
    await requireReferences([tariff], actor, tx);
    return [];
  },
});

export const listFurnaces = service.list;
export const getFurnace = service.get;
export const createFurnace = service.create;
export const updateFurnace = service.update;
