import supertest from 'supertest';
import { describe, expect, it } from 'vitest';
import { demoAccounts } from '../../db/seeds/people';
import { testApp } from '../helpers/app';

const app = await testApp();
const credentials = { email: 'tech@quarrylane.example', password: demoAccounts.password };
const signIn = () => supertest(app.url).post('/api/auth/sign-in');

describe('calls that change something', () => {
  it('are refused without an Origin, sign-in included', async () => {
    const answer = await signIn().send(credentials).expect(403);
    expect(answer.headers['content-type']).toBe('application/problem+json');
    expect(answer.body.code).toBe('foreign-origin');
  });

  it.each(['http://evil.example', 'null', 'http://127.0.0.1:1', 'https://127.0.0.1'])(
    'are refused from %s, whatever the content type',
    async (origin) => {
      for (const type of [
        'application/json',
        'text/plain',
        'application/x-www-form-urlencoded',
        'multipart/form-data',
      ])
        await signIn().set('Origin', origin).set('Content-Type', type).send('{}').expect(403);
    },
  );

  it('are let through from the site’s own address, also by its other name', async () => {
    await signIn().set('Origin', app.url).send(credentials).expect(200);
    const port = new URL(app.url).port;
    await signIn()
      .set('Host', `localhost:${port}`)
      .set('Origin', `http://localhost:${port}`)
      .send(credentials)
      .expect(200);
  });

  it('are refused under a name that only points at this machine', async () => {
    const answer = await signIn()
      .set('Host', 'evil.example')
      .set('Origin', 'http://evil.example')
      .send(credentials);
    expect(answer.status).toBe(400);
    expect(answer.headers['set-cookie']).toBeUndefined();
  });

  it('believe no forwarded host, protocol or address', async () => {
    await signIn()
      .set('X-Forwarded-Host', 'evil.example')
      .set('X-Forwarded-Proto', 'https')
      .set('Origin', 'https://evil.example')
      .send(credentials)
      .expect(403);
  });
});

describe('the framework’s own routes', () => {
  it.each(['/_image?href=/favicon.svg', '/_server-islands/x', '/%5Fimage'])(
    'are closed: %s',
    async (path) => {
      await supertest(app.url).get(path).expect(404);
    },
  );

  it('an address that cannot be decoded is 400', async () => {
    await supertest(app.url).get('/%E0%A4%A').expect(400);
  });
});
