import { expect, it } from 'vitest';
import { testApp } from '../helpers/app';
import { FIRING, KILN, SHELLS } from '../helpers/studio';

const app = await testApp();

it('an approved version goes to a class, whose student reads it, sees its kiln and acknowledges its cautions', async () => {
  const tech = await app.as('tech');
  const teacher = await app.as('teacher');
  const student = await app.as('student');
  const { student: learner } = app.db.people;

  const kiln = (await tech.post('/api/kilns', KILN).expect(201)).body;
  const made = { name: 'House shell', kilnId: kiln.id, profile: FIRING, load: SHELLS };
  const profile = (await tech.post('/api/profiles', made).expect(201)).body;
  const version = `/api/profiles/${profile.id}/versions/1`;
  await tech.post(`${version}/submit`, {}).expect(200);
  await teacher.post(`${version}/approve`, { overrides: [] }).expect(200);
  await student.get(version).expect(404);

  const group = (
    await teacher.post('/api/classes', { name: 'Year one', memberIds: [learner.id] }).expect(201)
  ).body;
  const now = Date.now();
  const body = {
    profileVersionId: profile.version.id,
    kilnId: kiln.id,
    classId: group.id,
    fromAt: new Date(now - 3_600_000).toISOString(),
    untilAt: new Date(now + 86_400_000).toISOString(),
  };
  await tech.post('/api/handouts', body).expect(403);
  const handout = (await teacher.post('/api/handouts', body).expect(201)).body;

  const seen = (await student.get('/api/handouts').expect(200)).body.items;
  expect(seen).toHaveLength(1);
  expect(seen[0]).toMatchObject({ id: handout.id, state: 'in-force', people: [{ id: learner.id }] });
  expect((await student.get(version).expect(200)).body.sha256).toBe(profile.version.sha256);
  expect((await student.get(`/api/kilns/${kiln.id}`).expect(200)).body.tariffId).toBeNull();
  expect((await student.get('/api/classes').expect(200)).body.items).toHaveLength(1);
  const estimate = (await student.post('/api/estimates', { profile: FIRING, kilnId: kiln.id }).expect(200))
    .body;
  expect(estimate.cost).toBeNull();

  const acknowledge = `/api/handouts/${handout.id}/acknowledge`;
  await student.post(acknowledge, { cautions: handout.cautions.length + 1 }).expect(409);
  const read = await student.post(acknowledge, { cautions: handout.cautions.length }).expect(200);
  expect(read.body.people[0].acknowledgedAt).toMatch(/Z$/);
  expect(JSON.stringify(read.body)).not.toContain('@');

  await teacher.post(`/api/handouts/${handout.id}/withdraw`, {}).expect(422);
  await teacher.post(`/api/handouts/${handout.id}/withdraw`, { reason: 'Elements broke' }).expect(200);
  await student.get(version).expect(404);
  await student.get(`/api/kilns/${kiln.id}`).expect(404);
  const gone = (await student.get(`/api/handouts/${handout.id}`).expect(200)).body;
  expect(gone).toMatchObject({ state: 'withdrawn', withdrawnReason: 'Elements broke' });
});

it('the materials table comes with unit, source and confidence on every value', async () => {
  const student = await app.as('student');
  const { body } = await student.get('/api/materials').expect(200);
  const ids = Object.values(body as Record<string, { id: string }[]>).flatMap((kind) =>
    kind.map((one) => one.id),
  );
  expect(ids).toEqual(
    expect.arrayContaining([
      ...['fused-silica-shell', 'aluminosilicate-shell', 'zircon-shell', 'gypsum-investment'],
      ...[
        'phosphate-investment',
        'pla',
        'pattern-wax',
        'filled-wax',
        'paraffin',
        'beeswax',
        'castable-resin',
      ],
      ...['eps-foam', 'pvb', 'tin-bronze-90-10', 'cordierite'],
    ]),
  );
  const values = (body.moulds as { properties: Record<string, Record<string, unknown>> }[]).flatMap((mould) =>
    Object.values(mould.properties),
  );
  for (const value of values) {
    expect(value).toHaveProperty('unit');
    expect(value['source']).not.toBe('');
    expect(value).toHaveProperty('confidence');
  }
  await app.visitor().get('/api/materials').expect(401);
});
