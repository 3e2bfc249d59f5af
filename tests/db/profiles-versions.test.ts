import { createHash, randomUUID } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { database } from '~/lib/server/database';
import { createKiln } from '~/lib/server/services/kilns';
import {
  createProfile,
  createVersion,
  duplicateProfile,
  getProfile,
  getVersion,
  listProfiles,
  saveDraft,
  submitVersion,
  updateProfile,
} from '~/lib/server/services/profiles';
import { testDatabase } from '../helpers/database';
import { addPerson, firing, kilnInput, load, refusal, statementsOf, statusOf } from '../helpers/studio';

const db = await testDatabase();
const { tech, teacher, owner, otherTech } = db.people;
const all = { limit: 50, archived: 'no' } as const;
let kilnId = '';
beforeAll(async () => {
  kilnId = (await createKiln(tech.actor, kilnInput())).id;
});
const begin = (name = 'House shell', actor = tech.actor) =>
  createProfile(actor, { name, kilnId, profile: firing(), load: load() });

describe('a profile', () => {
  it('begins with a draft, number 1, by whoever began it', async () => {
    const { id, name, version } = await begin();
    expect(name).toBe('House shell');
    expect(version).toMatchObject({
      number: 1,
      state: 'draft',
      revision: 1,
      kilnId,
      authorId: tech.id,
      events: [],
    });
    expect(version.profile).toEqual(firing());
    expect(await getVersion(tech.actor, id, 1)).toEqual(version);
  });

  it('is listed with its latest version, its peak and its planned time', async () => {
    const { id } = await begin('Listed once');
    const profile = firing({ segments: [{ stage: 'burnout', toC: 720, rateCPerH: 100, holdS: 3600 }] });
    await createVersion(tech.actor, id, { profile });
    const { items } = await listProfiles(tech.actor, { ...all, q: 'listed once' });
    expect(items).toHaveLength(1);
    // 700 K at 100 K/h are 7 h, and an hour's hold.
    expect(items[0]).toMatchObject({ id, peakC: 720, plannedS: 8 * 3600, segments: 1, profile });
    expect(items[0]?.latest.number).toBe(2);
  });

  it('has no planned time where a segment leaves its time to the kiln', async () => {
    const { id } = await begin('Coasts at the end');
    expect(await getProfile(tech.actor, id)).toMatchObject({ peakC: 870, plannedS: null });
  });

  it('comes first in the list when one of its versions changes', async () => {
    const { id } = await begin('Older');
    await begin('Newer');
    await saveDraft(tech.actor, id, 1, 1, { profile: firing({ startC: 25 }) });
    expect((await listProfiles(tech.actor, all)).items[0]?.id).toBe(id);
  });

  it('is renamed and archived by its author and technicians, over its own revision', async () => {
    const { id } = await begin('Misnamed');
    expect(await statusOf(updateProfile(teacher.actor, id, 1, { name: 'Mine now' }))).toBe(403);
    const renamed = await updateProfile(tech.actor, id, 1, { name: 'Well named' });
    expect(renamed).toMatchObject({ name: 'Well named', revision: 2 });
    const stale = await refusal(updateProfile(tech.actor, id, 1, { archived: true }));
    expect([stale.status, stale.options.current]).toEqual([412, renamed]);
    await updateProfile(tech.actor, id, 2, { archived: true });
    expect((await listProfiles(tech.actor, { ...all, q: 'well named' })).items).toEqual([]);
    expect(await statusOf(createVersion(tech.actor, id, { from: 1 }))).toBe(409);
  });

  it('is copied into a profile of the one who copies', async () => {
    const { id, version } = await begin('Original');
    const copy = await duplicateProfile(owner.actor, id, {});
    expect(copy.name).toBe('Original (copy)');
    expect(copy.version).toMatchObject({
      number: 1,
      state: 'draft',
      authorId: owner.id,
      sha256: version.sha256,
    });
    expect(copy.id).not.toBe(id);
  });

  it('of another studio is not there on any call', async () => {
    const { id } = await begin();
    const { actor } = otherTech;
    const content = { profile: firing() };
    const calls = [
      getProfile(actor, id),
      getVersion(actor, id, 1),
      updateProfile(actor, id, 1, { name: 'Taken' }),
      duplicateProfile(actor, id, {}),
      createVersion(actor, id, content),
      saveDraft(actor, id, 1, 1, content),
      submitVersion(actor, id, 1, {}),
      createProfile(actor, { name: 'With their kiln', kilnId, profile: firing() }),
    ];
    for (const status of await Promise.all(calls.map(statusOf))) expect(status).toBe(404);
    expect((await listProfiles(actor, all)).items).toEqual([]);
  });
});

describe('the seal', () => {
  it('is the SHA-256 of the canonical JSON of profile, kiln and load', async () => {
    const { version } = await createProfile(tech.actor, {
      name: 'Sealed',
      kilnId,
      profile: firing({ segments: [{ stage: 'burnout', toC: 700.5, rateCPerH: 'flat-out', holdS: 0 }] }),
    });
    // Written out by hand after RFC 8785: members in order of their names, no white space.
    const canonical =
      `{"kilnId":"${kilnId}","load":null,"profile":{"segments":[{"attended":false,"drain":false,"holdS":0,` +
      `"instruction":"","rateCPerH":"flat-out","stage":"burnout","toC":700.5,"vent":"closed"}],"startC":20}}`;
    expect(version.sha256).toBe(createHash('sha256').update(canonical).digest('hex'));
  });

  it('changes with the content and comes back with it', async () => {
    const { id, version } = await begin();
    const hotter = await saveDraft(tech.actor, id, 1, 1, { profile: firing({ startC: 30 }) });
    expect(hotter.sha256).not.toBe(version.sha256);
    const back = await saveDraft(tech.actor, id, 1, 2, { profile: firing() });
    expect(back.sha256).toBe(version.sha256);
  });
});

describe('saving a draft', () => {
  it('counts the revision up and keeps kiln and load where none are named', async () => {
    const { id } = await begin();
    const saved = await saveDraft(tech.actor, id, 1, 1, { profile: firing({ startC: 15 }) });
    expect(saved).toMatchObject({ revision: 2, kilnId, load: load() });
    const without = await saveDraft(tech.actor, id, 1, 2, { profile: firing(), kilnId: null, load: null });
    expect(without).toMatchObject({ revision: 3, kilnId: null, load: null });
  });

  it('over a stale revision is refused with the newer draft', async () => {
    const { id } = await begin();
    const newer = await saveDraft(tech.actor, id, 1, 1, { profile: firing({ startC: 15 }) });
    const refused = await refusal(saveDraft(tech.actor, id, 1, 1, { profile: firing({ startC: 99 }) }));
    expect([refused.status, refused.options.current]).toEqual([412, newer]);
  });

  it('at the same moment from two places keeps exactly one of them', async () => {
    const { id } = await begin();
    const results = await Promise.allSettled(
      [31, 32, 33, 34, 35].map((startC) => saveDraft(tech.actor, id, 1, 1, { profile: firing({ startC }) })),
    );
    const kept = results.flatMap((result) => (result.status === 'fulfilled' ? [result.value] : []));
    expect(kept).toHaveLength(1);
    expect(await getVersion(tech.actor, id, 1)).toEqual(kept[0]);
  });

  it('is for its author and technicians', async () => {
    const student = await addPerson(db, tech.studioId, 'Ida Fenwick', 'student');
    const { id } = await createProfile(student, { name: 'Own try', profile: firing() });
    expect(await statusOf(saveDraft(teacher.actor, id, 1, 1, { profile: firing() }))).toBe(403);
    expect((await saveDraft(tech.actor, id, 1, 1, { profile: firing() })).revision).toBe(2);
    expect((await saveDraft(student, id, 1, 2, { profile: firing() })).revision).toBe(3);
  });

  it('refuses a plan of more than 14 days and materials that the table does not have', async () => {
    const { id } = await begin();
    const holdS = 7 * 86400;
    const long = firing({
      segments: [500, 600, 700].map((toC) => ({ stage: 'burnout', toC, rateCPerH: 100, holdS })),
    });
    expect(await statusOf(saveDraft(tech.actor, id, 1, 1, { profile: long }))).toBe(422);
    const strange = load({ moulds: [{ material: 'moon-dust', massKg: 1 }] });
    const refused = await refusal(saveDraft(tech.actor, id, 1, 1, { profile: firing(), load: strange }));
    expect(refused.options.errors?.[0]?.path).toBe('load.moulds.0.material');
  });

  it('refuses a kiln that is archived or not there', async () => {
    const { id } = await begin();
    const profile = firing();
    expect(await statusOf(saveDraft(tech.actor, id, 1, 1, { profile, kilnId: randomUUID() }))).toBe(404);
    const old = await createKiln(tech.actor, kilnInput({ name: 'Gone' }));
    await db.query('update kilns set archived_at = now() where id = $1', [old.id]);
    expect(await statusOf(saveDraft(tech.actor, id, 1, 1, { profile, kilnId: old.id }))).toBe(422);
  });
});

describe('new versions', () => {
  it('are numbered one after the other, however many are drafted at once', async () => {
    const { id } = await begin();
    const drafts = await Promise.all(
      [1, 2, 3, 4, 5].map(() => createVersion(tech.actor, id, { profile: firing() })),
    );
    expect(drafts.map((draft) => draft.number).sort()).toEqual([2, 3, 4, 5, 6]);
    expect((await getProfile(tech.actor, id)).versions.map((one) => one.number)).toEqual([1, 2, 3, 4, 5, 6]);
  });

  it('go on from the version named, or from the latest', async () => {
    const { id, version } = await begin();
    const second = await createVersion(tech.actor, id, { profile: firing({ startC: 40 }) });
    expect(second).toMatchObject({ number: 2, kilnId, load: load() });
    const third = await createVersion(tech.actor, id, { from: 1 });
    expect(third).toMatchObject({ number: 3, state: 'draft', sha256: version.sha256 });
    expect(await statusOf(createVersion(tech.actor, id, { from: 9 }))).toBe(404);
  });
});

describe('the lists', () => {
  it('give every profile once over pages, and take one statement a page however many there are', async () => {
    for (let n = 0; n < 6; n++) {
      const { id } = await begin('Paging');
      await createVersion(tech.actor, id, { from: 1 });
    }
    const seen: string[] = [];
    let cursor: string | undefined;
    do {
      const answer = await listProfiles(tech.actor, { ...all, limit: 4, cursor, q: 'paging' });
      seen.push(...answer.items.map((profile) => profile.id));
      cursor = answer.nextCursor ?? undefined;
    } while (cursor);
    expect([seen.length, new Set(seen).size]).toEqual([6, 6]);
    for (const limit of [1, 6])
      expect(await statementsOf(() => listProfiles(tech.actor, { ...all, limit }))).toBe(1);
  });

  it('can be narrowed to profiles that have a version in a state', async () => {
    const { id } = await begin('In somebody’s hands');
    await submitVersion(tech.actor, id, 1, {});
    await createVersion(tech.actor, id, { from: 1 });
    const q = 'somebody’s hands';
    const found = async (state: 'in-review' | 'approved') =>
      (await listProfiles(teacher.actor, { ...all, state, q })).items.length;
    expect([await found('in-review'), await found('approved')]).toEqual([1, 0]);
  });
});

describe('the database itself', () => {
  it('keeps the application from rewriting history', async () => {
    for (const statement of [
      'delete from profile_versions',
      'delete from version_states',
      'delete from version_events',
      "update version_events set note = 'never said'",
      'update profile_versions set author_id = edited_by_id',
      'update profile_versions set number = number + 1',
      'alter table profile_versions disable trigger all',
    ])
      await expect(database().query(statement), statement).rejects.toThrow(/permission denied|must be owner/);
  });

  it('lets a version begin only as a draft and move only along its states', async () => {
    const { version } = await begin();
    for (const state of ['approved', 'retired'])
      await expect(
        database().query(
          `update version_states set state = '${state}', revision = revision + 1 where version_id = '${version.id}'`,
        ),
      ).rejects.toThrow(/does not go from draft/);
  });
});
