import { randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import type { Handout, StudioClass } from '~/lib/contracts/classes';
import type { Version } from '~/lib/contracts/profiles';
import type { Actor } from '~/lib/server/auth/actor';
import { database } from '~/lib/server/database';
import { createClass, getClass, listClasses, updateClass } from '~/lib/server/services/classes';
import {
  acknowledgeHandout,
  createHandout,
  getHandout,
  handoutForRun,
  listHandouts,
  withdrawHandout,
} from '~/lib/server/services/handouts';
import { createKiln } from '~/lib/server/services/kilns';
import { createProfile, retireVersion } from '~/lib/server/services/profiles';
import { createRun, startRun } from '~/lib/server/services/runs';
import { testDatabase } from '../helpers/database';
import {
  addPerson,
  approvedVersion,
  firing,
  kilnInput,
  refusal,
  statementsOf,
  statusOf,
} from '../helpers/studio';

const db = await testDatabase();
const { tech, teacher, student, owner, otherOwner } = db.people;
const query = { limit: 50 };
const day = (n: number) => new Date(Date.UTC(2026, 2, n, 12));
const MONDAY = day(2);

let version: Version;
let kilnId = '';
let mate: Actor;
let group: StudioClass;
beforeAll(async () => {
  kilnId = (await createKiln(tech.actor, kilnInput())).id;
  version = (await approvedVersion(db.people, kilnId)).version;
  mate = await addPerson(db, tech.studioId, 'Zora Quill', 'student');
  group = await createClass(teacher.actor, {
    name: 'Bronze, first year',
    term: 'Spring',
    memberIds: [student.id, mate.userId],
  });
});

const body = (fields: object = {}) => ({
  profileVersionId: version.id,
  kilnId,
  classId: group.id as string | null,
  personIds: [] as string[],
  fromAt: day(3).toISOString(),
  untilAt: day(9).toISOString(),
  note: 'In pairs.',
  ...fields,
});
const handOut = (fields: object = {}): Promise<Handout> => createHandout(teacher.actor, body(fields), MONDAY);

describe('a class', () => {
  it('has the teacher who began it and its members by name, without addresses', () => {
    expect(group).toMatchObject({ name: 'Bronze, first year', term: 'Spring', teacher: { id: teacher.id } });
    expect(group.members).toEqual([
      { id: student.id, name: student.name },
      { id: mate.userId, name: 'Zora Quill' },
    ]);
    expect(JSON.stringify(group)).not.toContain('@');
  });

  it('is seen by who is in it, without the others in it, and by no other student', async () => {
    expect((await getClass(student.actor, group.id)).members).toEqual([
      { id: student.id, name: student.name },
    ]);
    const stranger = await addPerson(db, tech.studioId, 'Nils Orme', 'student');
    expect(await statusOf(getClass(stranger, group.id))).toBe(404);
    expect((await listClasses(stranger, query)).items).toEqual([]);
    expect(await statusOf(getClass(otherOwner.actor, group.id))).toBe(404);
  });

  it('takes nobody from outside the studio, nor who has left it', async () => {
    const input = (memberIds: string[]) => ({ name: 'Mixed', term: '', memberIds });
    expect(await statusOf(createClass(teacher.actor, input([otherOwner.id])))).toBe(404);
    const left = await addPerson(db, tech.studioId, 'Gone Already', 'student');
    await db.query('update memberships set ended_at = now() where user_id = $1', [left.userId]);
    expect(await statusOf(createClass(teacher.actor, input([left.userId])))).toBe(404);
    expect(await statusOf(createClass(tech.actor, input([])))).toBe(403);
  });

  it('changes over its own revision', async () => {
    const one = await createClass(teacher.actor, { name: 'Wax', term: '', memberIds: [student.id] });
    const changed = await updateClass(owner.actor, one.id, 1, { memberIds: [], archived: true });
    expect(changed).toMatchObject({ name: 'Wax', members: [], revision: 2 });
    expect(changed.archivedAt).not.toBeNull();
    const stale = await refusal(updateClass(teacher.actor, one.id, 1, { name: 'Late' }));
    expect([stale.status, stale.options.current]).toEqual([412, changed]);
    expect(await statusOf(handOut({ classId: one.id }))).toBe(409);
  });

  it('is listed by name with one statement', async () => {
    await createClass(teacher.actor, { name: 'Aluminium', term: '', memberIds: [mate.userId] });
    expect((await listClasses(teacher.actor, { ...query, q: 'ALUM' })).items).toHaveLength(1);
    expect(await statementsOf(() => listClasses(teacher.actor, query))).toBe(1);
  });
});

describe('handing out', () => {
  it('gives an approved version to a class for a kiln and dates, with the cautions that apply', async () => {
    const handout = await handOut();
    expect(handout).toMatchObject({
      kiln: { id: kilnId },
      class: { id: group.id },
      version: { id: version.id, state: 'approved', sha256: version.sha256 },
      state: 'ahead',
      note: 'In pairs.',
    });
    expect(handout.people.map((person) => person.acknowledgedAt)).toEqual([null, null]);
    // A shell is fired, unattended: hot work, silica dust, unattended firing at least.
    const codes = handout.cautions.map((caution) => caution.code);
    expect(codes).toEqual(expect.arrayContaining(['hot-work', 'silica-dust', 'unattended', 'estimates']));
    // No pattern is burned out and nothing is poured.
    expect(codes).not.toContain('fumes');
    expect(codes).not.toContain('molten-metal');
  });

  it('is for teachers and owners', async () => {
    for (const actor of [tech.actor, student.actor])
      expect(await statusOf(createHandout(actor, body(), MONDAY))).toBe(403);
    expect(await statusOf(createHandout(otherOwner.actor, body(), MONDAY))).toBe(404);
  });

  it('takes only what is approved: no draft, nothing retired', async () => {
    const draft = await createProfile(tech.actor, { name: 'Draft', kilnId, profile: firing() });
    expect(await statusOf(handOut({ profileVersionId: draft.version.id }))).toBe(409);
    const old = await approvedVersion(db.people, kilnId, 'Old');
    await retireVersion(tech.actor, old.profileId, 1, { reason: 'Better one' });
    expect(await statusOf(handOut({ profileVersionId: old.version.id }))).toBe(409);
    const past = db.query(
      `insert into handouts (studio_id, id, profile_version_id, kiln_id, from_at, until_at, cautions, handed_out_by_id)
       values ($1, $2, $3, $4, now(), now() + interval '1 day', '[]', $5)`,
      [tech.studioId, randomUUID(), draft.version.id, kilnId, teacher.id],
    );
    await expect(past).rejects.toThrow(/only an approved one/);
  });

  it('needs somebody to hand it to, and an end after its beginning', async () => {
    expect(await statusOf(handOut({ classId: null }))).toBe(422);
    expect(await statusOf(handOut({ untilAt: day(3).toISOString() }))).toBe(422);
    expect(await statusOf(handOut({ kilnId: randomUUID() }))).toBe(404);
    expect(await statusOf(handOut({ classId: randomUUID() }))).toBe(404);
    expect(await statusOf(handOut({ personIds: [otherOwner.id] }))).toBe(404);
  });

  it('for a kiln in which it would not be safe is refused', async () => {
    const weak = await createKiln(tech.actor, kilnInput({ name: 'Low limit', maxC: 800 }));
    const refused = await refusal(handOut({ kilnId: weak.id }));
    expect(refused.status).toBe(409);
    expect(refused.message).toMatch(/Low limit/);
  });
});

describe('a handout', () => {
  it('is ahead, in force, over, or withdrawn, as of the moment it is looked at', async () => {
    const { id } = await handOut();
    const stateOn = async (now: Date) => (await getHandout(student.actor, id, now)).state;
    expect(await stateOn(MONDAY)).toBe('ahead');
    expect(await stateOn(day(3))).toBe('in-force');
    expect(await stateOn(day(9))).toBe('in-force');
    expect(await stateOn(new Date(day(9).getTime() + 1))).toBe('over');
    const withdrawn = await withdrawHandout(teacher.actor, id, 'Kiln under repair', day(4));
    expect(withdrawn).toMatchObject({ state: 'withdrawn', withdrawnReason: 'Kiln under repair' });
    expect(await stateOn(day(5))).toBe('withdrawn');
    expect(await statusOf(withdrawHandout(teacher.actor, id, 'Again', day(5)))).toBe(409);
  });

  it('shows a student their own entry and nobody else’s, and is nothing to other students', async () => {
    const { id } = await handOut();
    expect((await getHandout(teacher.actor, id)).people).toHaveLength(2);
    expect((await getHandout(student.actor, id)).people.map((person) => person.id)).toEqual([student.id]);
    const stranger = await addPerson(db, tech.studioId, 'Pim Solway', 'student');
    expect(await statusOf(getHandout(stranger, id))).toBe(404);
    expect(await statusOf(acknowledgeHandout(stranger, id, 1))).toBe(404);
    expect(await statusOf(getHandout(otherOwner.actor, id))).toBe(404);
  });

  it('reaches who joins the class later, and no longer who left it', async () => {
    const joiner = await addPerson(db, tech.studioId, 'Late Joiner', 'student');
    const small = await createClass(teacher.actor, { name: 'Small', term: '', memberIds: [mate.userId] });
    const { id } = await handOut({ classId: small.id });
    expect(await statusOf(getHandout(joiner, id))).toBe(404);
    await updateClass(teacher.actor, small.id, 1, { memberIds: [joiner.userId] });
    expect((await getHandout(joiner, id)).people).toHaveLength(1);
    expect(await statusOf(getHandout(mate, id))).toBe(404);
  });

  it('may name people beside the class', async () => {
    const single = await addPerson(db, tech.studioId, 'Single Handed', 'student');
    const { id, people } = await handOut({ classId: null, personIds: [single.userId, single.userId] });
    expect(people.map((person) => person.id)).toEqual([single.userId]);
    expect((await listHandouts(single, query)).items.map((one) => one.id)).toEqual([id]);
  });

  it('never changes, not even past the services', async () => {
    const { id } = await handOut();
    for (const change of ["note = 'other'", "cautions = '[]'", "until_at = until_at + interval '1 day'"])
      await expect(db.query(`update handouts set ${change} where id = $1`, [id]), change).rejects.toThrow(
        /never changes/,
      );
    for (const statement of [
      'delete from handouts',
      "update handouts set note = ''",
      'delete from handout_acknowledgements',
    ])
      await expect(database().query(statement), statement).rejects.toThrow(/permission denied/);
  });
});

describe('acknowledging', () => {
  it('is done by those it is for, of as many cautions as are shown', async () => {
    const { id, cautions } = await handOut();
    expect(await statusOf(acknowledgeHandout(student.actor, id, cautions.length - 1, day(3)))).toBe(409);
    const read = await acknowledgeHandout(student.actor, id, cautions.length, day(3));
    expect(read.people).toEqual([
      { id: student.id, name: student.name, acknowledgedAt: day(3).toISOString() },
    ]);
    const again = await acknowledgeHandout(student.actor, id, cautions.length, day(4));
    expect(again.people[0]?.acknowledgedAt).toBe(day(3).toISOString());
    expect(await statusOf(acknowledgeHandout(teacher.actor, id, cautions.length, day(3)))).toBe(403);
    const { people } = await getHandout(teacher.actor, id);
    expect(people.find((person) => person.id === mate.userId)?.acknowledgedAt).toBeNull();
  });

  it('ends with the handout', async () => {
    const { id, cautions } = await handOut();
    expect(await statusOf(acknowledgeHandout(student.actor, id, cautions.length, day(20)))).toBe(409);
    await withdrawHandout(owner.actor, id, 'Wrong kiln', day(3));
    expect(await statusOf(acknowledgeHandout(student.actor, id, cautions.length, day(3)))).toBe(409);
  });
});

describe('what a student may fire', () => {
  it('is nothing that was retired since, though handed out and acknowledged', async () => {
    const one = await approvedVersion(db.people, kilnId, 'Taken out of use');
    const { id, cautions } = await handOut({ profileVersionId: one.version.id });
    await acknowledgeHandout(student.actor, id, cautions.length, day(3));
    const run = await createRun(student.actor, {
      kilnId,
      profileVersionId: one.version.id,
      plannedStartAt: day(4).toISOString(),
    });
    await retireVersion(teacher.actor, one.profileId, 1, { reason: 'The shell cracked twice.' });
    const refused = await refusal(startRun(student.actor, run.id, {}, day(4)));
    expect([refused.status, refused.message]).toEqual([409, expect.stringMatching(/retired/)]);
  });

  it('is what was handed out for this kiln, within its dates, once its cautions are acknowledged', async () => {
    const one = await approvedVersion(db.people, kilnId, 'To be fired');
    const run = { versionId: one.version.id, kilnId, at: day(4) };
    expect(await statusOf(handoutForRun(student.actor, run))).toBe(403);
    const { id, cautions } = await handOut({ profileVersionId: one.version.id });
    expect(await statusOf(handoutForRun(student.actor, run))).toBe(409);
    await acknowledgeHandout(student.actor, id, cautions.length, day(3));
    expect(await handoutForRun(student.actor, run)).toBe(id);
    expect(await statusOf(handoutForRun(student.actor, { ...run, at: day(12) }))).toBe(409);
    expect(await statusOf(handoutForRun(student.actor, { ...run, kilnId: randomUUID() }))).toBe(403);
    expect(await statusOf(handoutForRun(mate, run))).toBe(409);
    await withdrawHandout(teacher.actor, id, 'No more', day(4));
    expect(await statusOf(handoutForRun(student.actor, run))).toBe(403);
  });
});

describe('a run that a technician plans under a handout', () => {
  it('names one that stands', async () => {
    const { id } = await handOut();
    const run = { kilnId, profileVersionId: version.id, plannedStartAt: day(4).toISOString(), handoutId: id };
    expect((await createRun(tech.actor, run)).handoutId).toBe(id);
    await withdrawHandout(teacher.actor, id, 'No more', day(4));
    expect(await statusOf(createRun(tech.actor, run))).toBe(409);
  });
});

describe('the list of handouts', () => {
  it('gives each once over pages, the newest first, with one statement a page', async () => {
    const seen: string[] = [];
    let cursor: string | undefined;
    do {
      const answer = await listHandouts(teacher.actor, { limit: 2, cursor });
      seen.push(...answer.items.map((handout) => handout.id));
      cursor = answer.nextCursor ?? undefined;
    } while (cursor);
    const [counted] = await db.query('select count(*)::int as n from handouts');
    expect([seen.length, new Set(seen).size]).toEqual([counted?.['n'], counted?.['n']]);
    for (const limit of [1, 50])
      expect(await statementsOf(() => listHandouts(teacher.actor, { limit }))).toBe(1);
    expect((await listHandouts(otherOwner.actor, query)).items).toEqual([]);
  });
});
