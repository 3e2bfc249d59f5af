import { randomUUID } from 'node:crypto';
import { beforeAll, expect, it } from 'vitest';
import { createHandout } from '~/lib/server/services/handouts';
import { createKiln } from '~/lib/server/services/kilns';
import { createRun } from '~/lib/server/services/runs';
import { testDatabase } from '../helpers/database';
import { approvedVersion, kilnInput, load, statusOf } from '../helpers/studio';

const db = await testDatabase();
const { tech, teacher, student } = db.people;
const plannedStartAt = '2026-03-02T07:00:00Z';
let kilnId = '';
let profileVersionId = '';
beforeAll(async () => {
  kilnId = (await createKiln(tech.actor, kilnInput())).id;
  profileVersionId = (await approvedVersion(db.people, kilnId)).version.id;
});

it('a technician plans a run under a handout of the version that is fired, and under no other', async () => {
  const other = (await approvedVersion(db.people, kilnId, 'Another')).version.id;
  const handout = (of: string) =>
    createHandout(teacher.actor, {
      profileVersionId: of,
      kilnId,
      classId: null,
      personIds: [student.id],
      fromAt: '2026-03-01T00:00:00Z',
      untilAt: '2026-03-08T00:00:00Z',
      note: '',
    });
  const plan = (handoutId: string) =>
    createRun(tech.actor, { kilnId, profileVersionId, plannedStartAt, handoutId });
  const { id } = await handout(profileVersionId);
  expect((await plan(id)).handoutId).toBe(id);
  expect(await statusOf(plan((await handout(other)).id))).toBe(409);
  expect(await statusOf(plan(randomUUID()))).toBe(404);
});

it('a run is not planned with a load that nothing could be computed of', async () => {
  const strange = load({ moulds: [{ material: 'wishful-thinking', massKg: 1 }] });
  const body = { kilnId, profileVersionId, plannedStartAt, load: strange };
  expect(await statusOf(createRun(tech.actor, body))).toBe(422);
});
