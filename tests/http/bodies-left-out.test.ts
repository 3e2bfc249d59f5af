import { describe, expect, it } from 'vitest';
import { testApp, type Visitor } from '../helpers/app';
import { FIRING, KILN } from '../helpers/studio';

const app = await testApp();
const tech = await app.as('tech');
const teacher = await app.as('teacher');
const student = await app.as('student');

/** A POST as a program sends it that has nothing to say: no body, no content type. */
const bare = (visitor: Visitor, path: string) => visitor.agent.post(path);

const kilnId = (await tech.post('/api/kilns', KILN).expect(201)).body.id as string;
const begun = await tech.post('/api/profiles', { name: 'Shell', kilnId, profile: FIRING }).expect(201);
const version = `/api/profiles/${begun.body.id}/versions/1`;

describe('an action whose body may be left out', () => {
  it('is taken without one, from the draft to the run', async () => {
    await bare(tech, `${version}/submit`).expect(200);
    await bare(teacher, `${version}/approve`).expect(200);
    await bare(tech, `/api/profiles/${begun.body.id}/duplicate`).expect(201);
    const run = { kilnId, profileVersionId: begun.body.version.id, plannedStartAt: '2026-04-01T08:00:00Z' };
    const path = `/api/runs/${(await tech.post('/api/runs', run).expect(201)).body.id}`;
    expect((await bare(tech, `${path}/start`).expect(200)).body.state).toBe('under-way');
    expect((await bare(tech, `${path}/finish`).expect(200)).body.state).toBe('cooling-down');
    expect((await bare(tech, `${path}/sign-off`).expect(200)).body.state).toBe('closed');
  });

  it('takes an empty one of JSON for none', async () => {
    const { body } = await tech.post('/api/profiles', { name: 'x', kilnId, profile: FIRING }).expect(201);
    const path = `/api/profiles/${body.id}/versions/1/submit`;
    await tech.agent.post(path).set('Content-Type', 'application/json').send('').expect(200);
  });

  it('acknowledges all that a handout shows; a number that is sent must be theirs', async () => {
    const handout = await teacher
      .post('/api/handouts', {
        profileVersionId: begun.body.version.id,
        kilnId,
        personIds: [app.db.people.student.id],
        fromAt: '2026-01-01T00:00:00Z',
        untilAt: '2999-01-01T00:00:00Z',
      })
      .expect(201);
    const path = `/api/handouts/${handout.body.id}/acknowledge`;
    await student.post(path, { cautions: handout.body.cautions.length + 1 }).expect(409);
    const { body } = await bare(student, path).expect(200);
    expect(body.people[0].acknowledgedAt).toMatch(/Z$/);
    const [row] = await app.db.query('select cautions from handout_acknowledgements where handout_id = $1', [
      handout.body.id,
    ]);
    expect(row).toEqual({ cautions: handout.body.cautions.length });
  });
});

describe('a call that needs its body', () => {
  it('is 415 without one where it changes a thing', async () => {
    await tech.agent.patch(`/api/profiles/${begun.body.id}`).set('If-Match', '"1"').expect(415);
  });

  it('is 415 without one, and another type stays 415 everywhere', async () => {
    expect((await bare(tech, '/api/kilns').expect(415)).body.code).toBe('wrong-type');
    await bare(teacher, `${version}/retire`).expect(415);
    await tech.agent.post(`${version}/submit`).set('Content-Type', 'text/plain').send('{}').expect(415);
    await tech.agent.post(`${version}/submit`).set('Content-Type', 'text/plain').send('').expect(415);
  });
});
