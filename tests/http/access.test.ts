import { describe, expect, it } from 'vitest';
import { allRoutes } from '~/lib/contracts';
import type { Method } from '~/lib/contracts/route';
import { testApp, type Visitor } from '../helpers/app';
import { BODIES, logText, makeWorld, type World } from '../helpers/world';

const app = await testApp();
const world: World = await makeWorld(app);

/** o owner, t technician, e teacher, s student who has been given nothing: who may, as the written contract has it. */
interface Call {
  readonly call: `${Method} /api/${string}`;
  readonly may: string;
  /** Whom the contract leaves open. */
  readonly open?: string;
  readonly body?: object;
  readonly upload?: string;
}

const run = {
  kilnId: world.kilnId,
  profileVersionId: world.approvedVersionId,
  plannedStartAt: '2026-04-01T08:00:00Z',
};
const handout = {
  profileVersionId: world.approvedVersionId,
  kilnId: world.kilnId,
  classId: world.classId,
  fromAt: '2026-01-01T00:00:00Z',
  untilAt: '2030-01-01T00:00:00Z',
};
const finding = { kind: 'other', startS: 10, endS: 20, remark: 'seen' };

const CALLS: readonly Call[] = [
  { call: 'GET /api/auth/me', may: 'otes' },
  { call: 'PATCH /api/account', may: 'otes', body: { theme: 'auto' } },
  {
    call: 'POST /api/account/password',
    may: 'otes',
    body: { currentPassword: 'wrong', newPassword: 'long enough now' },
  },
  { call: 'GET /api/account/sessions', may: 'otes' },
  { call: 'GET /api/people', may: 'ote' },
  { call: 'GET /api/materials', may: 'otes' },
  { call: 'GET /api/kilns', may: 'otes' },
  { call: 'POST /api/kilns', may: 'ot', body: BODIES.kiln },
  { call: 'GET /api/kilns/{kilnId}', may: 'ote' },
  { call: 'PATCH /api/kilns/{kilnId}', may: 'ot', body: { note: 'x' } },
  { call: 'GET /api/furnaces', may: 'otes' },
  { call: 'POST /api/furnaces', may: 'ot', body: BODIES.furnace },
  { call: 'GET /api/furnaces/{furnaceId}', may: 'ote' },
  { call: 'PATCH /api/furnaces/{furnaceId}', may: 'ot', body: { note: 'x' } },
  { call: 'GET /api/thermocouples', may: 'otes' },
  { call: 'POST /api/thermocouples', may: 'ot', body: BODIES.thermocouple },
  { call: 'GET /api/thermocouples/{thermocoupleId}', may: 'ote' },
  { call: 'PATCH /api/thermocouples/{thermocoupleId}', may: 'ot', body: { note: 'x' } },
  { call: 'GET /api/tariffs', may: 'ote' },
  { call: 'POST /api/tariffs', may: 'ot', body: BODIES.tariff },
  { call: 'GET /api/tariffs/{tariffId}', may: 'ote' },
  { call: 'PATCH /api/tariffs/{tariffId}', may: 'ot', body: { note: 'x' } },
  {
    call: 'POST /api/drafts',
    may: 'ote',
    body: { load: { moulds: [{ material: 'fused-silica-shell', massKg: 1 }] }, kilnId: world.kilnId },
  },
  { call: 'POST /api/estimates', may: 'ote', body: { profile: BODIES.profile, kilnId: world.kilnId } },
  { call: 'GET /api/profiles', may: 'otes' },
  { call: 'POST /api/profiles', may: 'otes', body: { name: 'Own', profile: BODIES.profile } },
  { call: 'GET /api/profiles/{profileId}', may: 'ote' },
  { call: 'PATCH /api/profiles/{profileId}', may: 't', body: { name: 'Shell' } },
  { call: 'POST /api/profiles/{profileId}/duplicate', may: 'ote', body: {} },
  { call: 'POST /api/profiles/{profileId}/versions', may: 't', body: { from: 1 } },
  { call: 'GET /api/profiles/{profileId}/versions/1', may: 'ote' },
  { call: 'PUT /api/profiles/{profileId}/versions/2', may: 't', body: { profile: BODIES.profile } },
  { call: 'POST /api/profiles/{profileId}/versions/2/submit', may: 't', body: {} },
  { call: 'POST /api/profiles/{profileId}/versions/2/approve', may: 'oe', body: {} },
  { call: 'POST /api/profiles/{profileId}/versions/2/return', may: 'oe', body: { remark: 'slower' } },
  { call: 'GET /api/classes', may: 'oes', open: 't' },
  { call: 'POST /api/classes', may: 'oe', body: { name: 'Another' } },
  { call: 'GET /api/classes/{classId}', may: 'oe', open: 't' },
  { call: 'PATCH /api/classes/{classId}', may: 'oe', body: { term: 'Spring' } },
  { call: 'GET /api/handouts', may: 'otes' },
  { call: 'POST /api/handouts', may: 'oe', body: handout },
  { call: 'GET /api/handouts/{handoutId}', may: 'oe', open: 't' },
  { call: 'POST /api/handouts/{handoutId}/acknowledge', may: '', open: 'ote', body: { cautions: 0 } },
  { call: 'POST /api/handouts/{handoutId}/withdraw', may: 'oe', body: { reason: 'test' } },
  { call: 'GET /api/runs', may: 'otes' },
  { call: 'POST /api/runs', may: 't', open: 'oe', body: run },
  { call: 'GET /api/runs/{runId}', may: 'ote' },
  { call: 'PATCH /api/runs/{runId}', may: 't', body: { note: 'x' } },
  { call: 'GET /api/runs/{runId}/series', may: 'ote' },
  { call: 'GET /api/runs/{runId}/review', may: 'ote' },
  { call: 'GET /api/runs/{runId}/findings', may: 'ote' },
  { call: 'POST /api/runs/{runId}/findings', may: 'te', body: finding },
  { call: 'PATCH /api/runs/{runId}/findings/{findingId}', may: 'te', body: { remark: 'x' } },
  { call: 'POST /api/runs/{runId}/logs', may: 't', upload: logText() },
  { call: 'GET /api/runs/{runId}/logs/{logId}', may: 'ote' },
  { call: 'PATCH /api/runs/{runId}/logs/{logId}', may: 't', body: { alignment: { method: 'auto' } } },
  { call: 'GET /api/runs/{runId}/logs/{logId}/original', may: 'ote' },
  { call: 'POST /api/runs/{runId}/logs/{logId}/answers', may: 't', body: { mapping: {} } },
  { call: 'POST /api/runs/{runId}/start', may: 't', body: {} },
  { call: 'POST /api/runs/{runId}/finish', may: 't', body: {} },
  { call: 'POST /api/runs/{runId}/sign-off', may: 'te', body: {} },
  { call: 'POST /api/runs/{runId}/abandon', may: 't', body: { reason: 'test' } },
  { call: 'POST /api/profiles/{profileId}/versions/1/retire', may: 'ote', body: { reason: 'test' } },
];

const ROLES = { o: 'owner', t: 'tech', e: 'teacher', s: 'student' } as const;
const pathOf = (call: Call) =>
  call.call.split(' ')[1]?.replace(/\{(\w+)\}/g, (_, name: string) => world[name as keyof World]) ?? '';
/** What a call is in the contract: the ids of this test stand where the contract has its parameters. */
const inContract = (call: Call) =>
  call.call.replace(/\/versions\/\d+/, '/versions/{n}').replace(/\{(?!findingId|logId|n\})\w+\}/, '{id}');

const send = (visitor: Visitor, call: Call) => {
  const method = call.call.split(' ')[0]?.toLowerCase() as 'get' | 'post' | 'put' | 'patch';
  const request = visitor.agent[method](pathOf(call));
  if (method === 'put' || method === 'patch') void request.set('If-Match', '"1"');
  if (call.upload)
    return request.attach('file', Buffer.from(call.upload), { filename: 'k.csv', contentType: 'text/csv' });
  return call.body ? request.send(call.body) : request;
};

describe('the walk over every call', () => {
  it('leaves out no call of the contract but the door', () => {
    const walked = new Set(CALLS.map(inContract));
    const left = allRoutes
      .map((route) => `${route.method} ${route.path}`)
      .filter((name) => !walked.has(name as Call['call']));
    // Each of these has tests of its own.
    expect(left.sort()).toEqual([
      'DELETE /api/account/sessions/{id}',
      'GET /api/health',
      'POST /api/auth/sign-in',
      'POST /api/auth/sign-out',
      'POST /api/materials/{kind}/{id}/figures',
      'POST /api/setup',
    ]);
  });

  it.each(CALLS.map((call) => [call.call, call] as const))('%s without a session is 401', async (_, call) => {
    const answer = await send(app.visitor(), call).expect(401);
    expect(answer.headers['content-type']).toBe('application/problem+json');
    expect(answer.body.code).toBe('not-signed-in');
  });
});

describe('another studio', () => {
  it.each(CALLS.filter((call) => call.call.includes('{')).map((call) => [call.call, call] as const))(
    'cannot tell that it is there: %s is 404, whatever their roles',
    async (_, call) => {
      await app.db.query(
        `update memberships set roles = '{owner,technician,teacher,student}' where user_id = $1`,
        [app.db.people.otherOwner.id],
      );
      const answer = await send(await app.as('otherOwner'), call);
      expect({ status: answer.status, body: answer.body }).toMatchObject({
        status: 404,
        body: { code: 'not-found' },
      });
    },
  );

  it('cannot bring in a thing by naming it in a body', async () => {
    const other = await app.as('otherOwner');
    for (const [path, body] of [
      ['/api/kilns', { ...BODIES.kiln, thermocoupleId: world.thermocoupleId }],
      ['/api/kilns', { ...BODIES.kiln, tariffId: world.tariffId }],
      ['/api/profiles', { name: 'x', kilnId: world.kilnId, profile: BODIES.profile }],
      ['/api/estimates', { kilnId: world.kilnId, profile: BODIES.profile }],
      ['/api/classes', { name: 'x', memberIds: [app.db.people.student.id] }],
      ['/api/handouts', handout],
      ['/api/runs', run],
    ] as const) {
      const answer = await other.post(path, body);
      expect({ path, refused: [404, 422].includes(answer.status) }).toEqual({ path, refused: true });
    }
  });

  it('sees none of it in its lists', async () => {
    const other = await app.as('otherOwner');
    for (const noun of [
      'kilns',
      'furnaces',
      'thermocouples',
      'tariffs',
      'profiles',
      'classes',
      'handouts',
      'runs',
    ]) {
      const { body } = await other.get(`/api/${noun}`).expect(200);
      expect({ noun, items: body.items }).toEqual({ noun, items: [] });
    }
    const { body } = await other.get('/api/people').expect(200);
    expect(body.items.map((person: { id: string }) => person.id).sort()).toEqual(
      [app.db.people.otherOwner.id, app.db.people.otherTech.id].sort(),
    );
  });
});

describe.each(Object.entries(ROLES))('role %s', (letter, person) => {
  it.each(CALLS.filter((call) => !call.open?.includes(letter)).map((call) => [call.call, call] as const))(
    `${person}: %s`,
    async (_, call) => {
      const answer = await send(await app.as(person), call);
      const refused = [401, 403, 404].includes(answer.status);
      const told = { status: answer.status, detail: answer.body.detail as unknown };
      expect({ refused, ...(refused === call.may.includes(letter) ? told : {}) }).toEqual({
        refused: !call.may.includes(letter),
      });
      expect(answer.status).toBeLessThan(500);
    },
  );
});

describe('pages', () => {
  it('send a visitor to the door, and back to where they wanted to go', async () => {
    const answer = await app.visitor().get('/runs?state=closed').expect(302);
    expect(answer.headers['location']).toBe('/sign-in?next=%2Fruns%3Fstate%3Dclosed');
  });

  it('of another studio are 404, drawn as a page', async () => {
    const other = await app.as('otherOwner');
    for (const path of [
      `/kilns/${world.kilnId}`,
      `/profiles/${world.profileId}`,
      `/runs/${world.runId}`,
      `/classes/${world.classId}`,
      `/handouts/${world.handoutId}`,
    ]) {
      const answer = await other.get(path);
      expect({ path, status: answer.status }).toEqual({ path, status: 404 });
      expect(answer.headers['content-type']).toMatch(/text\/html/);
    }
  });

  it('that a role may not see are 403', async () => {
    const student = await app.as('student');
    for (const path of ['/kilns/new', '/tariffs', '/classes', '/handouts/new']) {
      const { status } = await student.get(path);
      expect({ path, status }).toEqual({ path, status: 403 });
    }
  });

  it('carry a policy against foreign scripts and frames, and tell no other site where they are', async () => {
    const { headers } = await (await app.as('tech')).get('/kilns').expect(200);
    expect(headers['content-security-policy']).toMatch(/default-src 'self'/);
    expect(headers['content-security-policy']).toMatch(/script-src 'self' 'sha256-/);
    expect(headers['content-security-policy']).not.toMatch(/unsafe-(inline|eval)/);
    expect(headers['content-security-policy']).toMatch(/frame-ancestors 'none'/);
    expect(headers['x-content-type-options']).toBe('nosniff');
    expect(headers['referrer-policy']).toBe('same-origin');
    expect(headers['cache-control']).toBe('no-store');
  });
});
