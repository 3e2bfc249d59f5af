import { createHash } from 'node:crypto';
import { describe, expect, it } from 'vitest';
import { canonicalJson } from '~/lib/profile/canonical';
import { testApp } from '../helpers/app';
import { FIRING, KILN } from '../helpers/studio';

const app = await testApp();
const tech = await app.as('tech');
const teacher = await app.as('teacher');
const kilnId = (await tech.post('/api/kilns', KILN).expect(201)).body.id as string;

const sealOf = ({ profile, kilnId: kiln, load }: Record<string, unknown>) =>
  createHash('sha256')
    .update(canonicalJson({ profile, kilnId: kiln, load }))
    .digest('hex');

describe('an id in capital letters', () => {
  // RFC 9562, section 4: in lower case on output, without regard to case on input.
  it('is the same id: the seal over what is answered holds', async () => {
    const body = { name: 'Shell', kilnId: kilnId.toUpperCase(), profile: FIRING };
    const { version } = (await tech.post('/api/profiles', body).expect(201)).body;
    expect(version.kilnId).toBe(kilnId);
    expect(sealOf(version)).toBe(version.sha256);
  });

  it('names the same person, once', async () => {
    const { id } = app.db.people.student;
    const body = { name: 'Year one', memberIds: [id, id.toUpperCase()] };
    const made = await teacher.post('/api/classes', body).expect(201);
    expect(made.body.members.map((one: { id: string }) => one.id)).toEqual([id]);
  });

  it('in an address opens to a student what it opens in small letters', async () => {
    const student = await app.as('student');
    const own = { name: 'Own', profile: FIRING };
    const { id } = (await student.post('/api/profiles', own).expect(201)).body;
    await app.db.query('update profile_versions set kiln_id = $1 where profile_id = $2', [kilnId, id]);
    await student.get(`/api/kilns/${kilnId}`).expect(200);
    await student.get(`/api/kilns/${kilnId.toUpperCase()}`).expect(200);
  });
});

describe('numbers and instants that the database does not have', () => {
  it.each([2147483648, Number.MAX_SAFE_INTEGER])('are not valid as a version: %d', async (number) => {
    const { id } = (await tech.post('/api/profiles', { name: 'x', profile: FIRING }).expect(201)).body;
    await tech.post(`/api/profiles/${id}/versions`, { from: number }).expect(422);
    await tech.post(`/api/profiles/${id}/duplicate`, { version: number }).expect(422);
  });

  it('are not valid as a start: there is no year 0', async () => {
    const { version } = (await tech.post('/api/profiles', { name: 'x', profile: FIRING }).expect(201)).body;
    const run = { kilnId, profileVersionId: version.id, plannedStartAt: '0000-01-01T00:00:00Z' };
    const { body } = await tech.post('/api/runs', run).expect(422);
    expect(body.errors[0].path).toBe('plannedStartAt');
  });

  it.each(['2020', 'Jan 1 2020 (x)', '+275760-09-13T00:00:00Z', -1])(
    'are malformed in a cursor of a list by time: %s',
    async (sort) => {
      const cursor = Buffer.from(JSON.stringify([sort, kilnId])).toString('base64url');
      for (const noun of ['profiles', 'handouts'])
        expect((await teacher.get(`/api/${noun}?cursor=${cursor}`)).status).toBe(400);
    },
  );
});

describe('a cursor that no list gave out', () => {
  const forged = (sort: unknown, id: string) => Buffer.from(JSON.stringify([sort, id])).toString('base64url');

  it.each([
    ['words for a run’s number', '/api/runs', 'x', '0'],
    ['a number beyond any run’s', '/api/runs', 2 ** 31, '0'],
    ['half a number', '/api/runs', 0.5, '0'],
    ['dashes for an id', '/api/kilns', 'a', '-'],
    ['dashes for an id', '/api/profiles', '2026-01-01T00:00:00Z', '-'],
  ])('is malformed: %s, %s', async (_what, path, sort, sign) => {
    const id = sign === '-' ? '-'.repeat(36) : kilnId;
    await tech.get(`${path}?cursor=${forged(sort, id)}`).expect(400);
  });
});

describe('an archived kiln', () => {
  it('takes no new run', async () => {
    const old = (await tech.post('/api/kilns', { ...KILN, name: 'Old' }).expect(201)).body;
    const { version } = (await tech.post('/api/profiles', { name: 'x', profile: FIRING }).expect(201)).body;
    const run = { kilnId, profileVersionId: version.id, plannedStartAt: '2026-03-02T08:00:00Z' };
    const planned = (await tech.post('/api/runs', run).expect(201)).body;
    await tech.patch(`/api/kilns/${old.id}`, { archived: true }, old.revision).expect(200);
    await tech.post('/api/runs', { ...run, kilnId: old.id }).expect(409);
    await tech.patch(`/api/runs/${planned.id}`, { kilnId: old.id }, planned.revision).expect(409);
  });
});

describe('a query that cannot be read', () => {
  it('is refused as a problem', async () => {
    const answer = await tech.get('/api/kilns?%').expect(400);
    expect(answer.headers['content-type']).toContain('application/problem+json');
  });
});

describe('a name', () => {
  it.each(['\u200b', '\u2060\u00ad', '\u202e', '\u0007', '\n'])(
    'that shows nothing is not valid: %j',
    async (name) => {
      await tech.post('/api/kilns', { ...KILN, name }).expect(422);
      await teacher.post('/api/classes', { name }).expect(422);
      await tech.post('/api/profiles', { name, profile: FIRING }).expect(422);
    },
  );

  it.each([
    ['Tall\nkiln\u0007', 'Tall kiln'],
    ['a\u202egnp.b', 'agnp.b'],
    ['  Öfen №3 👩‍🔧  ', 'Öfen №3 👩‍🔧'],
  ])('stands on one line and in its own order: %j', async (name, kept) => {
    expect((await tech.post('/api/kilns', { ...KILN, name }).expect(201)).body.name).toBe(kept);
  });
});

describe('an approval with a caution that would stop the firing', () => {
  it('needs a reason that can be read for each, and keeps it', async () => {
    const weak = (await tech.post('/api/kilns', { ...KILN, name: 'Low limit', maxC: 800 }).expect(201)).body;
    const made = { name: 'Too hot', kilnId: weak.id, profile: FIRING };
    const path = `/api/profiles/${(await tech.post('/api/profiles', made).expect(201)).body.id}/versions/1`;
    await tech.post(`${path}/submit`, {}).expect(200);
    const refused = await teacher.post(`${path}/approve`, {}).expect(422);
    const missing = refused.body.missing as { code: string; segment: number | null; severity: string }[];
    expect(missing.map((one) => one.code)).toContain('above-kiln-limit');
    const because = (reason: string) => ({
      overrides: missing.map(({ code, segment }) => ({ code, segment, reason })),
    });
    for (const reason of ['', '  ', '\u200b', '\u2060\n'])
      await teacher.post(`${path}/approve`, because(reason)).expect(422);
    const elsewhere = because('Measured.').overrides.map((one) => ({ ...one, segment: 60 }));
    await teacher.post(`${path}/approve`, { overrides: elsewhere }).expect(422);
    await tech.post(`${path}/approve`, because('Mine.')).expect(403);
    const approved = await teacher.post(`${path}/approve`, because('The plate is wrong.')).expect(200);
    expect(approved.body.events.at(-1).overrides).toEqual(because('The plate is wrong.').overrides);
  });
});

describe('a field that a body may not have', () => {
  it('is named by its path', async () => {
    const sent = await tech.post('/api/kilns', { ...KILN, studioId: kilnId }).expect(422);
    expect(sent.body.errors.map((one: { path: string }) => one.path)).toEqual(['studioId']);
    const changed = await tech.patch(`/api/kilns/${kilnId}`, { authorId: kilnId }, 1).expect(422);
    expect(changed.body.errors.map((one: { path: string }) => one.path)).toEqual(['authorId']);
    expect(changed.body.detail).not.toMatch(/\. :|undefined/);
  });
});
