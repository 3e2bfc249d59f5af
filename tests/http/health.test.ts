import { describe, expect, it } from 'vitest';
import { startServer, testApp, visitorOf } from '../helpers/app';

const app = await testApp();

describe('health', () => {
  it('says that the service and its database are up, to anyone', async () => {
    const answer = await app.visitor().get('/api/health').expect(200);
    expect(answer.body).toMatchObject({ status: 'ok', database: 'ok' });
  });

  it('is 503 while the database is away, and so is every other call, as a problem', async () => {
    const away = new URL(app.db.appUrl);
    away.port = '1';
    const server = await startServer({ DATABASE_APP_URL: away.href });
    try {
      const visitor = visitorOf(server.url);
      const health = await visitor.get('/api/health').expect(503);
      expect(health.body).toMatchObject({ status: 'unavailable', database: 'away' });
      const credentials = { email: 'tech@quarrylane.example', password: 'x' };
      const answer = await visitor.post('/api/auth/sign-in', credentials).expect(503);
      expect(answer.headers['content-type']).toBe('application/problem+json');
      expect(answer.headers['retry-after']).toBe('5');
      expect(JSON.stringify(answer.body)).not.toMatch(/127\.0\.0\.1|ECONNREFUSED|\\n\s+at /);
    } finally {
      await server.stop();
    }
  });

  it('serves from two processes side by side: a session of one holds in the other', async () => {
    const second = await startServer();
    try {
      const first = await app.as('tech');
      const { body } = await first.get('/api/account/sessions').expect(200);
      expect(body.items).toHaveLength(1);
      const visitor = visitorOf(second.url);
      const jar = first.agent.jar.getCookies({
        domain: '127.0.0.1',
        path: '/',
        secure: false,
        script: false,
      });
      await visitor.get('/api/auth/me').set('Cookie', jar.toValueString()).expect(200);
    } finally {
      await second.stop();
    }
  });
});
