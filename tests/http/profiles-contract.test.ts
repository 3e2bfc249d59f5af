import { createHash } from 'node:crypto';
import { beforeAll, describe, expect, it } from 'vitest';
import { canonicalJson } from '~/lib/profile/canonical';
import { testApp } from '../helpers/app';
import { FIRING, KILN, SHELLS } from '../helpers/studio';

const app = await testApp();
let kilnId = '';
beforeAll(async () => {
  const tech = await app.as('tech');
  kilnId = (await tech.post('/api/kilns', KILN).expect(201)).body.id;
});

async function begin(): Promise<{ id: string; path: string; version: { id: string; sha256: string } }> {
  const tech = await app.as('tech');
  const { body } = await tech
    .post('/api/profiles', { name: 'House shell', kilnId, profile: FIRING, load: SHELLS })
    .expect(201);
  return { id: body.id, path: `/api/profiles/${body.id}/versions/1`, version: body.version };
}

describe('from a draft to a sealed version, over HTTP', () => {
  it('goes by submit and approve, and the seal can be computed by anybody', async () => {
    const tech = await app.as('tech');
    const teacher = await app.as('teacher');
    const { path, version } = await begin();
    await tech.post(`${path}/submit`, {}).expect(200);
    const { body } = await teacher.post(`${path}/approve`, {}).expect(200);
    expect(body).toMatchObject({ id: version.id, state: 'approved', sha256: version.sha256 });
    const { profile, kilnId: sealedKiln, load } = body;
    const canonical = canonicalJson({ profile, kilnId: sealedKiln, load });
    expect(createHash('sha256').update(canonical).digest('hex')).toBe(body.sha256);
    await teacher.post(`${path}/approve`, {}).expect(409);
    await tech.put(path, { profile: FIRING }, body.revision).expect(409);
  });

  it('needs the revision that is saved over: 428 without, 412 with a stale one, 400 with nonsense', async () => {
    const tech = await app.as('tech');
    const { path } = await begin();
    const profile = { ...FIRING, startC: 25 };
    expect((await tech.put(path, { profile }).expect(428)).body.code).toBe('revision-missing');
    const saved = await tech.put(path, { profile }, 1).expect(200);
    expect(saved.headers['etag']).toBe('"2"');
    const stale = await tech.put(path, { profile: FIRING }, 1).expect(412);
    expect(stale.headers['content-type']).toBe('application/problem+json');
    expect(stale.body).toMatchObject({
      code: 'stale-revision',
      current: { revision: 2, profile: { startC: 25 } },
    });
    await tech.put(path, { profile }).set('If-Match', 'two').expect(400);
  });

  it('says where a body is wrong', async () => {
    const tech = await app.as('tech');
    const hot = { startC: 20, segments: [{ stage: 'burnout', toC: 3000, rateCPerH: 100, holdS: 0 }] };
    const { body } = await tech.post('/api/profiles', { name: 'Sun', kilnId, profile: hot }).expect(422);
    expect(body.errors[0].path).toBe('profile.segments.0.toC');
    await tech.post('/api/profiles', { name: 'Odd', kilnId, profile: FIRING, colour: 'red' }).expect(422);
  });

  it.each([
    ['a member that poisons prototypes', '{"name":"x","__proto__":{"admin":true}}'],
    ['a number beyond numbers', '{"name":"x","profile":{"startC":1e999,"segments":[]}}'],
    ['no number', '{"name":"x","profile":{"startC":NaN,"segments":[]}}'],
    ['a NUL in a name', String.raw`{"name":"a\u0000b","profile":${JSON.stringify(FIRING)}}`],
    ['half of a surrogate pair', String.raw`{"name":"\ud83d","profile":${JSON.stringify(FIRING)}}`],
    ['an abyss', '['.repeat(500_000)],
  ])('refuses %s as a problem', async (_what, text) => {
    const tech = await app.as('tech');
    const answer = await tech.agent.post('/api/profiles').set('Content-Type', 'application/json').send(text);
    expect([400, 422]).toContain(answer.status);
    expect(answer.headers['content-type']).toBe('application/problem+json');
    expect(answer.text).not.toMatch(/\n\s+at /);
  });

  it('offers what it offers and refuses other methods as a problem', async () => {
    const tech = await app.as('tech');
    const { path } = await begin();
    const answer = await tech.delete(path).expect(405);
    expect(answer.body.code).toBe('method-not-allowed');
  });
});

describe('what stays closed over HTTP', () => {
  it('is everything to nobody, and another studio’s things to everybody', async () => {
    const { id, path } = await begin();
    const gets = [`/api/profiles/${id}`, path, `/api/kilns/${kilnId}`];
    const nobody = app.visitor();
    const other = await app.as('otherTech');
    for (const each of gets) {
      await nobody.get(each).expect(401);
      const answer = await other.get(each).expect(404);
      expect(answer.body.code).toBe('not-found');
    }
    await other.put(path, { profile: FIRING }, 1).expect(404);
    await other.post(`${path}/submit`, {}).expect(404);
    await other.post('/api/estimates', { profile: FIRING, kilnId }).expect(404);
    await other.post('/api/profiles', { name: 'Ours?', kilnId, profile: FIRING }).expect(404);
    await other.patch(`/api/kilns/${kilnId}`, { name: 'Ours now' }, 1).expect(404);
  });

  it('is approving to technicians, tariffs to students, and 404 what is no id', async () => {
    const { path } = await begin();
    const tech = await app.as('tech');
    const student = await app.as('student');
    await tech.post(`${path}/submit`, {}).expect(200);
    await tech.post(`${path}/approve`, {}).expect(403);
    await student.get('/api/tariffs').expect(403);
    await student.get(path).expect(404);
    for (const odd of [
      '/api/profiles/x',
      `${path.slice(0, -1)}0`,
      `${path.slice(0, -1)}1e3`,
      '/api/kilns/%00',
    ])
      expect((await tech.get(odd)).status, odd).toBe(404);
    await tech.get('/api/profiles?q=%00').expect(400);
    await tech.get('/api/profiles?limit=201').expect(422);
  });
});
