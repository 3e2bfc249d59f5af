import { describe, expect, it } from 'vitest';
import { testApp } from '../helpers/app';

const app = await testApp();

describe('HEAD', () => {
  it.each(['/api/health', '/api/openapi.json'])('answers as GET does, without the body: %s', async (path) => {
    const asked = await app.visitor().agent.head(path).expect(200);
    expect(asked.headers['content-type']).toBe('application/json');
    expect(asked.text).toBeFalsy();
  });

  it('is let in as GET is, and carries the revision', async () => {
    const tech = await app.as('tech');
    const { body } = await tech.post('/api/thermocouples', { name: 'Chamber', type: 'K' }).expect(201);
    const path = `/api/thermocouples/${body.id}`;
    expect((await tech.agent.head(path).expect(200)).headers['etag']).toBe('"1"');
    await app.visitor().agent.head(path).expect(401);
    await (await app.as('otherTech')).agent.head(path).expect(404);
    await (await app.as('student')).agent.head('/api/tariffs').expect(403);
  });

  it('is not offered where GET is not', async () => {
    const answer = await (await app.as('tech')).agent.head('/api/auth/sign-out').expect(405);
    expect(answer.headers['allow']).toBe('POST');
  });
});

describe('a method that is not offered', () => {
  it('is 405 with those that are, also to a visitor where nobody need sign in', async () => {
    for (const [path, allow] of [
      ['/api/health', 'GET'],
      ['/api/auth/sign-in', 'POST'],
    ] as const) {
      const answer = await app.visitor().agent.options(path);
      expect({ path, status: answer.status, allow: answer.headers['allow'] }).toEqual({
        path,
        status: 405,
        allow,
      });
      expect(answer.headers['content-type']).toBe('application/problem+json');
    }
  });

  it('is 401 to a visitor where one must sign in first', async () => {
    await app.visitor().agent.options('/api/kilns').expect(401);
    await app.visitor().delete('/api/kilns').expect(401);
  });
});
