import { tariffInputSchema, type Tariff } from '~/lib/contracts/equipment';
import { requireRole, type Actor } from '../auth/actor';
import type { Tx } from '../database';
import type { Issue } from '../errors';
import { isUuid } from '../repositories/row';
import { tariffs } from '../repositories/tariffs';
import { equipmentService, type EquipmentQuery } from './equipment';

const service = equipmentService({
  noun: 'tariff',
  repository: tariffs,
  input: tariffInputSchema,
  idsForPerson: () => Promise.resolve([]),
  forStudent: (tariff) => tariff,
  onlyWithEnergy: {},
  check: (_actor, { plan }) => {
    const issues: Issue[] = [];
    if (plan.energy === 'electricity' && plan.per !== 'kWh')
      issues.push({ path: 'plan.per', message: 'electricity is metered in kWh' });
    if (plan.energy !== 'electricity' && plan.bands.length > 0)
      issues.push({ path: 'plan.bands', message: 'only electricity has prices by time of use' });
    plan.bands.forEach((band, index) => {
      if (band.fromMinute === band.toMinute)
        issues.push({
          path: `plan.bands.${index}.toMinute`,
          message: 'must differ from fromMinute',
        });
    });
    return Promise.resolve(issues);
  },
});

export async function listTariffs(actor: Actor, query: EquipmentQuery) {
  requireRole(actor, 'technician', 'teacher', 'owner');
  return service.list(actor, query);
}
export async function getTariff(actor: Actor, id: string): Promise<Tariff> {
  requireRole(actor, 'technician', 'teacher', 'owner');
  return service.get(actor, id);
}
export const createTariff = service.create;
export const updateTariff = service.update;

/** A tariff to compute a cost with; null for a student, to whom costs are not shown, and where there is none. */
export async function tariffFor(actor: Actor, id: string | null, tx?: Tx): Promise<Tariff | null> {
  if (id === null || !isUuid(id)) return null;
  return tariffs.find(actor.studioId, id, tx);
}
