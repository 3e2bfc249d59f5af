import { thermocoupleInputSchema } from '~/lib/contracts/equipment';
import { thermocouples } from '../repositories/thermocouples';
import { thermocoupleIdsFor } from '../repositories/visibility';
import { equipmentService } from './equipment';

const service = equipmentService({
  noun: 'thermocouple',
  repository: thermocouples,
  input: thermocoupleInputSchema,
  idsForPerson: thermocoupleIdsFor,
  forStudent: (thermocouple) => thermocouple,
  onlyWithEnergy: {},
  check: (_actor, { calibration }) => {
    const seen = new Set<number>();
    return Promise.resolve(
      calibration.flatMap(({ atC }, index) => {
        if (!seen.has(atC)) {
          seen.add(atC);
          return [];
        }
        return [{ path: `calibration.${index}.atC`, message: `${atC} °C stands in the table twice` }];
      }),
    );
  },
});

export const listThermocouples = service.list;
export const getThermocouple = service.get;
export const createThermocouple = service.create;
export const updateThermocouple = service.update;
