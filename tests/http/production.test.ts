import { describe, expect, it } from 'vitest';
import supertest from 'supertest';
import { firstOwnerLink, refuseDemoAccounts } from '../../db/up/first-owner.mjs';
import { modeOf } from '../../db/up/environment.mjs';
import { testApp } from '../helpers/app';

const ORIGIN = 'https://firing.example';
const app = await testApp({ HOLDFAST_MODE: 'production', HOLDFAST_ORIGIN: ORIGIN });
const call = (method: 'get' | 'post', path: string) =>
  supertest(app.url)[method](path).set('Host', 'firing.example').set('Origin', ORIGIN);

const owner = {
  studioName: 'Lime Kiln Lane',
  timeZone: 'Europe/Berlin',
  name: 'First Owner',
  email: 'owner@limekiln.example',
  password: 'a password of my own',
};

describe('a production start', () => {
  it('is refused where the demo accounts are', async () => {
    await expect(refuseDemoAccounts(app.db.ownerUrl)).rejects.toThrow(/owner@quarrylane\.example/);
  });

  it('is refused without a secret and without an https origin, with both named', () => {
    expect(() => modeOf({ HOLDFAST_MODE: 'production' })).toThrow(/HOLDFAST_SECRET[\s\S]*HOLDFAST_ORIGIN/);
    const secret = 's'.repeat(32);
    expect(() =>
      modeOf({ HOLDFAST_MODE: 'production', HOLDFAST_SECRET: secret, HOLDFAST_ORIGIN: 'http://x' }),
    ).toThrow(/https/);
    expect(modeOf({ HOLDFAST_MODE: 'production', HOLDFAST_SECRET: secret, HOLDFAST_ORIGIN: ORIGIN })).toBe(
      'production',
    );
  });
});

describe('the first owner', () => {
  it('is made once, with the link of the latest start, and is signed in by it', async () => {
    await app.db.query('truncate memberships, credentials, users, sessions, audit_events, studios cascade');
    await refuseDemoAccounts(app.db.ownerUrl);
    const old = await firstOwnerLink(app.db.ownerUrl, ORIGIN);
    const link = await firstOwnerLink(app.db.ownerUrl, ORIGIN);
    expect(link).toMatch(/^https:\/\/firing\.example\/set-up\?token=[\w-]{43}$/);
    const tokenOf = (text: string | null) => new URL(text ?? '').searchParams.get('token') ?? '';

    await call('post', '/api/setup')
      .send({ ...owner, token: tokenOf(old) })
      .expect(404);
    await call('post', '/api/setup')
      .send({ ...owner, token: 'x'.repeat(43) })
      .expect(404);
    const wrongZone = { ...owner, token: tokenOf(link), timeZone: 'Nowhere/Else' };
    await call('post', '/api/setup').send(wrongZone).expect(422);
    const made = await call('post', '/api/setup')
      .send({ ...owner, token: tokenOf(link) })
      .expect(201);
    expect(made.body).toMatchObject({
      user: { email: owner.email },
      studio: { name: owner.studioName },
      roles: ['owner'],
    });
    const cookie = String(made.headers['set-cookie']);
    expect(cookie).toMatch(/__Host-holdfast_session=[^;]+;[^,]*Secure/);
    await call('post', '/api/setup')
      .send({ ...owner, email: 'b@limekiln.example', token: tokenOf(link) })
      .expect(409);
    expect(await firstOwnerLink(app.db.ownerUrl, ORIGIN)).toBeNull();
  });

  it('cannot be made with a link that ran out, nor found in the database', async () => {
    await app.db.query('truncate memberships, credentials, users, sessions, audit_events, studios cascade');
    const link = await firstOwnerLink(app.db.ownerUrl, ORIGIN);
    const token = new URL(link ?? '').searchParams.get('token') ?? '';
    const [row] = await app.db.query('select token_hash from setup_tokens where used_at is null');
    expect(row?.['token_hash']).not.toContain(token);
    await app.db.query("update setup_tokens set expires_at = now() - interval '1 second'");
    await call('post', '/api/setup')
      .send({ ...owner, token })
      .expect(404);
  });
});

describe('in production', () => {
  it('only the https origin and its host are the site', async () => {
    await supertest(app.url).get('/api/auth/me').expect(400);
    await supertest(app.url)
      .post('/api/auth/sign-in')
      .set('Host', 'firing.example')
      .set('Origin', 'http://firing.example')
      .send({})
      .expect(403);
    const answer = await call('get', '/sign-in').expect(200);
    expect(answer.headers['strict-transport-security']).toMatch(/max-age=31536000/);
    expect(answer.text).not.toMatch(/burnout-demo|quarrylane/);
  });
});
