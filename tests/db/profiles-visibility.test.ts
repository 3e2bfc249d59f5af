import { beforeAll, describe, expect, it } from 'vitest';
import { tariffInputSchema, thermocoupleInputSchema } from '~/lib/contracts/equipment';
import type { Version } from '~/lib/contracts/profiles';
import type { Actor } from '~/lib/server/auth/actor';
import { createHandout, withdrawHandout } from '~/lib/server/services/handouts';
import { createKiln, getKiln, listKilns } from '~/lib/server/services/kilns';
import {
  approveVersion,
  createProfile,
  createVersion,
  duplicateProfile,
  getProfile,
  getVersion,
  listProfiles,
  saveDraft,
  submitVersion,
  versionForRun,
} from '~/lib/server/services/profiles';
import { createTariff, getTariff, listTariffs } from '~/lib/server/services/tariffs';
import { createThermocouple, getThermocouple, listThermocouples } from '~/lib/server/services/thermocouples';
import { testDatabase } from '../helpers/database';
import { addPerson, approvedVersion, firing, kilnInput, statementsOf, statusOf } from '../helpers/studio';

const db = await testDatabase();
const { tech, teacher, owner } = db.people;
const all = { limit: 50, archived: 'no' } as const;
const DAY_MS = 86_400_000;
const inDays = (days: number) => new Date(Date.now() + days * DAY_MS).toISOString();

let kilnId = '';
let otherKilnId = '';
let thermocoupleId = '';
let tariffId = '';
let profileId = '';
let version: Version;
let student: Actor;
beforeAll(async () => {
  const plan = { currency: 'GBP', energy: 'electricity', per: 'kWh', price: '0.28' };
  tariffId = (await createTariff(tech.actor, tariffInputSchema.parse({ name: 'Day', plan }))).id;
  const couple = thermocoupleInputSchema.parse({ name: 'Rear wall', type: 'N' });
  thermocoupleId = (await createThermocouple(tech.actor, couple)).id;
  kilnId = (await createKiln(tech.actor, kilnInput({ tariffId, thermocoupleId }))).id;
  otherKilnId = (await createKiln(tech.actor, kilnInput({ name: 'Not theirs' }))).id;
  ({ profileId, version } = await approvedVersion(db.people, kilnId));
  await createVersion(tech.actor, profileId, { profile: firing({ startC: 33 }) });
  student = await addPerson(db, tech.studioId, 'Emi Harrow', 'student');
});

const handOut = (to: Actor) =>
  createHandout(teacher.actor, {
    profileVersionId: version.id,
    kilnId,
    classId: null,
    personIds: [to.userId],
    fromAt: inDays(1),
    untilAt: inDays(8),
    note: '',
  });

describe('a student', () => {
  it('sees nothing of the studio before something is handed out to them', async () => {
    expect((await listProfiles(student, all)).items).toEqual([]);
    expect((await listKilns(student, all)).items).toEqual([]);
    expect((await listThermocouples(student, all)).items).toEqual([]);
    const calls = [
      getProfile(student, profileId),
      getVersion(student, profileId, 1),
      duplicateProfile(student, profileId, {}),
      versionForRun(student, version.id),
      getKiln(student, kilnId),
      getThermocouple(student, thermocoupleId),
      createVersion(student, profileId, { from: 1 }),
      submitVersion(student, profileId, 2, {}),
      createProfile(student, { name: 'On a kiln unseen', kilnId, profile: firing() }),
    ];
    for (const status of await Promise.all(calls.map(statusOf))) expect(status).toBe(404);
  });

  it('sees the version and the kiln that were handed out, and no other version and no tariff', async () => {
    const handout = await handOut(student);
    const profile = await getProfile(student, profileId);
    expect(profile.versions.map((one) => one.number)).toEqual([1]);
    expect(profile.latest.number).toBe(1);
    expect((await listProfiles(student, all)).items.map((one) => one.latest.id)).toEqual([version.id]);
    expect(await statusOf(getVersion(student, profileId, 2))).toBe(404);
    expect((await versionForRun(student, version.id)).profileName).toBe('Approved shell');

    expect(await getKiln(student, kilnId)).toMatchObject({ id: kilnId, tariffId: null });
    expect((await listKilns(student, all)).items.map((kiln) => [kiln.id, kiln.tariffId])).toEqual([
      [kilnId, null],
    ]);
    expect((await getThermocouple(student, thermocoupleId)).name).toBe('Rear wall');
    expect(await statusOf(getKiln(student, otherKilnId))).toBe(404);
    expect(await statusOf(getTariff(student, tariffId))).toBe(403);
    expect(await statusOf(listTariffs(student, all))).toBe(403);

    await withdrawHandout(teacher.actor, handout.id, 'Not this week');
    expect(await statusOf(getProfile(student, profileId))).toBe(404);
    expect(await statusOf(getKiln(student, kilnId))).toBe(404);
  });

  it('may not alter, submit or version what was handed out', async () => {
    const handout = await handOut(student);
    expect(await statusOf(saveDraft(student, profileId, 1, 3, { profile: firing() }))).toBe(403);
    expect(await statusOf(createVersion(student, profileId, { from: 1 }))).toBe(403);
    expect(await statusOf(submitVersion(student, profileId, 1, {}))).toBe(403);
    expect(await statusOf(approveVersion(student, profileId, 1, { overrides: [] }))).toBe(403);
    await withdrawHandout(teacher.actor, handout.id, 'Done');
  });

  it('drafts a profile of their own, which other students do not see and the studio does', async () => {
    const { id } = await createProfile(student, { name: 'Medal', profile: firing() });
    expect((await listProfiles(student, all)).items.map((one) => one.id)).toEqual([id]);
    const other = await addPerson(db, tech.studioId, 'Bo Tarn', 'student');
    expect(await statusOf(getProfile(other, id))).toBe(404);
    for (const actor of [tech.actor, teacher.actor, owner.actor])
      expect((await getProfile(actor, id)).author.name).toBe('Emi Harrow');
  });

  it('keeps seeing the kiln that their own draft is for', async () => {
    const maker = await addPerson(db, tech.studioId, 'Ola Finch', 'student');
    const handout = await handOut(maker);
    const copy = await duplicateProfile(maker, profileId, { name: 'My take' });
    expect(copy.version).toMatchObject({ kilnId, authorId: maker.userId, sha256: version.sha256 });
    await withdrawHandout(teacher.actor, handout.id, 'Over');
    expect((await getKiln(maker, kilnId)).id).toBe(kilnId);
    expect(await statusOf(getProfile(maker, profileId))).toBe(404);
  });

  it('gets no kiln by copying what was handed out for another one', async () => {
    const maker = await addPerson(db, tech.studioId, 'Tove Lark', 'student');
    await createHandout(teacher.actor, {
      profileVersionId: version.id,
      kilnId: otherKilnId,
      classId: null,
      personIds: [maker.userId],
      fromAt: inDays(0),
      untilAt: inDays(2),
      note: '',
    });
    expect((await duplicateProfile(maker, profileId, {})).version.kilnId).toBeNull();
    expect(await statusOf(getKiln(maker, kilnId))).toBe(404);
  });

  it('is found out with as many statements for one profile as for many', async () => {
    const before = await statementsOf(() => listProfiles(student, all));
    for (let n = 0; n < 5; n++) await createProfile(student, { name: `Try ${n}`, profile: firing() });
    expect(await statementsOf(() => listProfiles(student, all))).toBe(before);
    expect(before).toBe(1);
  });
});

describe('a teacher who is a student too', () => {
  it('sees the studio as a teacher does', async () => {
    const both = await addPerson(db, tech.studioId, 'Ebba Rowan', 'teacher', 'student');
    expect((await getProfile(both, profileId)).versions).toHaveLength(2);
  });
});
