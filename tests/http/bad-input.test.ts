import { readFileSync } from 'node:fs';
import { connect } from 'node:net';
import { describe, expect, it } from 'vitest';
import { testApp } from '../helpers/app';

const app = await testApp();
const tech = await app.as('tech');

const KILN = {
  name: 'Test kiln',
  energy: 'electric',
  innerWidthM: 0.4,
  innerDepthM: 0.4,
  innerHeightM: 0.45,
  lining: 'brick',
  liningM: 0.114,
  ratedKW: 8,
  maxC: 1200,
};
const { body: kiln } = await tech.post('/api/kilns', KILN).expect(201);
const PROFILE = {
  startC: 20,
  segments: [
    { stage: 'burnout', toC: 700, rateCPerH: 120, holdS: 7200 },
    { stage: 'cooling', toC: 100, rateCPerH: 'coast', holdS: 0 },
  ],
};
const { body: profile } = await tech
  .post('/api/profiles', { name: 'Test', kilnId: kiln.id, profile: PROFILE })
  .expect(201);
const draft = `/api/profiles/${profile.id}/versions/1`;

/** Sends a body as it is, not as the client library would write it. */
const raw = (text: string, path = '/api/kilns') =>
  tech.agent.post(path).set('Content-Type', 'application/json').send(text);

const expectProblem = (
  answer: { status: number; headers: Record<string, unknown>; body: Record<string, unknown> },
  status: number,
) => {
  expect({ status: answer.status, body: answer.body }).toMatchObject({ status, body: { status } });
  expect(answer.headers['content-type']).toBe('application/problem+json');
  expect(answer.body['detail']).toMatch(/\w.*\.$/);
  expect(JSON.stringify(answer.body)).not.toMatch(/node_modules|\.ts:\d|\n\s+at /);
};

const residentMB = (): number =>
  Number(/VmRSS:\s+(\d+)/.exec(readFileSync(`/proc/${app.pid}/status`, 'utf8'))?.[1]) / 1024;

describe('a body that is not what it should be', () => {
  it('of 10 MB of nesting is refused as too large, and memory comes back to normal', async () => {
    const before = residentMB();
    const nested = '['.repeat(5_000_000) + ']'.repeat(5_000_000);
    for (let round = 0; round < 5; round++) expectProblem(await raw(nested), 413);
    await new Promise((resolve) => setTimeout(resolve, 500));
    expect(residentMB() - before).toBeLessThan(80);
  });

  it('of 10 MB without a length is refused while it streams', async () => {
    const { hostname, port } = new URL(app.url);
    const cookie = tech.agent.jar
      .getCookies({ domain: hostname, path: '/', secure: false, script: false })
      .toValueString();
    const answer = await new Promise<string>((resolve, reject) => {
      const socket = connect(Number(port), hostname);
      let heard = '';
      socket.on('data', (data) => (heard += String(data)));
      socket.on('error', reject);
      socket.on('close', () => resolve(heard));
      const head = [
        'POST /api/kilns HTTP/1.1',
        `Host: ${hostname}:${port}`,
        `Origin: ${app.url}`,
        `Cookie: ${cookie}`,
        'Content-Type: application/json',
        'Transfer-Encoding: chunked',
        'Connection: close',
      ];
      socket.write(`${head.join('\r\n')}\r\n\r\n`);
      const chunk = '['.repeat(100_000);
      for (let sent = 0; sent < 100; sent++) socket.write(`${chunk.length.toString(16)}\r\n${chunk}\r\n`);
      socket.write('0\r\n\r\n');
    });
    expect(answer).toMatch(/^HTTP\/1\.1 413 /);
    expect(answer).toContain('"code":"too-large"');
  });

  it('nested within the size is refused as unreadable or not valid, not by a crash', async () => {
    const nested = '['.repeat(400_000) + ']'.repeat(400_000);
    const answer = await raw(nested);
    expect([400, 422]).toContain(answer.status);
    await tech.get('/api/health').expect(200);
  });

  it.each([
    ['{"__proto__": {"roles": ["owner"]}, "name": "x"}', 400],
    ['{"name": NaN}', 400],
    ['{"name": Infinity}', 400],
    ['{', 400],
    ['', 400],
    ['"just text"', 422],
    ['null', 422],
    ['[]', 422],
    [JSON.stringify({ ...KILN, constructor: { prototype: {} } }), 422],
    [JSON.stringify({ ...KILN, maxC: 1e300 }), 422],
    [JSON.stringify(KILN).replace('1200', '1e999'), 422],
    [JSON.stringify(KILN).replace('1200', '-1e999'), 422],
    [JSON.stringify({ ...KILN, maxC: '1200' }), 422],
    [JSON.stringify({ ...KILN, unknown: 1 }), 422],
    [JSON.stringify({ ...KILN, name: 'a\u0000b' }), 400],
    [JSON.stringify({ ...KILN, name: '' }), 422],
    [JSON.stringify({ ...KILN, name: 'x'.repeat(121) }), 422],
  ])('is refused as a problem: %s', async (text, status) => {
    const before = await app.db.query('select count(*)::int as n from kilns');
    expectProblem(await raw(text), status);
    expect(await app.db.query('select count(*)::int as n from kilns')).toEqual(before);
  });

  it('of another type is 415', async () => {
    for (const type of ['text/plain', 'application/xml', 'multipart/form-data; boundary=x'])
      expectProblem(await tech.agent.post('/api/kilns').set('Content-Type', type).send('x'), 415);
  });

  it('that is no UTF-8 is 400', async () => {
    const bytes = Buffer.concat([Buffer.from('{"name":"'), Buffer.from([0xff, 0xfe]), Buffer.from('"}')]);
    const answer = await tech.agent
      .post('/api/kilns')
      .set('Content-Type', 'application/json')
      .serialize((x) => x as string)
      .send(bytes);
    expectProblem(answer, 400);
  });
});

describe('numbers of a profile', () => {
  const segment = (change: object) => ({
    profile: { ...PROFILE, segments: [{ ...PROFILE.segments[0], ...change }] },
  });

  it.each([
    [{ toC: 3000 }, 'profile.segments.0.toC'],
    [{ toC: -300 }, 'profile.segments.0.toC'],
    [{ rateCPerH: 0 }, 'profile.segments.0.rateCPerH'],
    [{ rateCPerH: 'fast' }, 'profile.segments.0.rateCPerH'],
    [{ holdS: -1 }, 'profile.segments.0.holdS'],
    [{ holdS: 8 * 86400 }, 'profile.segments.0.holdS'],
    [{ instruction: 'x'.repeat(501) }, 'profile.segments.0.instruction'],
  ])('out of their range are named: %j', async (change, path) => {
    const answer = await tech.put(draft, segment(change), 1);
    expectProblem(answer, 422);
    expect(answer.body.errors.map((each: { path: string }) => each.path)).toContain(path);
  });

  it('are refused for more segments than a profile may have', async () => {
    const many = { profile: { startC: 20, segments: Array.from({ length: 65 }, () => PROFILE.segments[0]) } };
    expectProblem(await tech.put(draft, many, 1), 422);
    expectProblem(await tech.put(draft, { profile: { startC: 20, segments: [] } }, 1), 422);
  });
});

describe('a revision', () => {
  it('that is missing is 428, and one that is no number 400', async () => {
    expectProblem(await tech.put(draft, { profile: PROFILE }), 428);
    expectProblem(await tech.agent.put(draft).set('If-Match', '*').send({ profile: PROFILE }), 400);
  });

  it('that is stale is 412 with the newer thing, and nothing is lost', async () => {
    const first = await tech.get(draft).expect(200);
    const newer = { ...PROFILE, startC: 25 };
    const saved = await tech.put(draft, { profile: newer }, first.body.revision).expect(200);
    const stale = await tech.put(draft, { profile: { ...PROFILE, startC: 30 } }, first.body.revision);
    expectProblem(stale, 412);
    expect(stale.body.current).toMatchObject({ revision: saved.body.revision, profile: { startC: 25 } });
    const kept = await tech.get(draft).expect(200);
    expect(kept.body.profile.startC).toBe(25);
  });

  it('is taken by one of two that save at once', async () => {
    const { body } = await tech.get(draft).expect(200);
    const answers = await Promise.all(
      [40, 41, 42, 43].map((startC) => tech.put(draft, { profile: { ...PROFILE, startC } }, body.revision)),
    );
    expect(answers.map((answer) => answer.status).sort()).toEqual([200, 412, 412, 412]);
  });
});

describe('an address that leads nowhere', () => {
  it.each([
    '/api/nowhere',
    '/api/kilns/not-an-id',
    '/api/kilns/00000000-0000-4000-8000-00000000ffff',
    '/api/profiles/x/versions/y',
    `/api/profiles/${profile.id}/versions/99`,
    `/api/profiles/${profile.id}/versions/1e9`,
  ])('is 404 as a problem: %s', async (path) => expectProblem(await tech.get(path), 404));

  it('is 405 for a method that is not offered, and says which are', async () => {
    const answer = await tech.delete(`/api/kilns/${kiln.id}`);
    expectProblem(answer, 405);
    expect(answer.headers['allow']).toBe('GET, PATCH');
  });

  it.each(['limit=0', 'limit=201', 'limit=x', 'cursor=forged', 'unknown=1', 'q='.padEnd(300, 'x')])(
    'is refused for a list asked wrongly: %s',
    async (query) => {
      const answer = await tech.get(`/api/kilns?${query}`);
      expect([400, 422]).toContain(answer.status);
      expectProblem(answer, answer.status);
    },
  );
});
