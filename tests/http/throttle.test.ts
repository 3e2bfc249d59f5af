import { describe, expect, it } from 'vitest';
import { demoAccounts } from '../../db/seeds/people';
import { testApp } from '../helpers/app';

const app = await testApp();
const { password } = demoAccounts;
const tryWrong = (email: string) => app.visitor().post('/api/auth/sign-in', { email, password: 'guess' });

describe('the throttle of sign-ins', () => {
  it('slows down guesses at one account, says how long to wait, and lets the right password in afterwards', async () => {
    const email = 'owner@quarrylane.example';
    for (let guess = 0; guess < 6; guess++) await tryWrong(email).expect(401);
    const refused = await app.visitor().post('/api/auth/sign-in', { email, password }).expect(429);
    const waitS = Number(refused.headers['retry-after']);
    expect(refused.body.code).toBe('too-many');
    expect(waitS).toBeGreaterThanOrEqual(1);
    expect(waitS).toBeLessThanOrEqual(2);
    await new Promise((resolve) => setTimeout(resolve, waitS * 1000));
    await app.visitor().post('/api/auth/sign-in', { email, password }).expect(200);
    // The failures are forgotten with the success.
    await tryWrong(email).expect(401);
  });

  it('never makes anybody wait longer than half a minute, however many guesses there were', async () => {
    const email = 'teacher@quarrylane.example';
    await tryWrong(email).expect(401);
    await app.db.query('update throttles set failures = 100000, opens_at = now()');
    await tryWrong(email).expect(401);
    const refused = await tryWrong(email).expect(429);
    expect(Number(refused.headers['retry-after'])).toBeLessThanOrEqual(30);
    await app.db.query('delete from throttles');
  });

  it('lets a browser that has signed in before go on while strangers guess', async () => {
    const email = 'tech@quarrylane.example';
    const own = app.visitor();
    await own.post('/api/auth/sign-in', { email, password }).expect(200);
    await own.post('/api/auth/sign-out').expect(200);
    for (let guess = 0; guess < 7; guess++) await tryWrong(email);
    await tryWrong(email).expect(429);
    await own.post('/api/auth/sign-in', { email, password }).expect(200);
    await app.db.query('delete from throttles');
  });

  it('counts guesses sent at once, so that they cannot outrun it', async () => {
    const email = 'student@quarrylane.example';
    const answers = await Promise.all(Array.from({ length: 20 }, () => tryWrong(email)));
    const looked = answers.filter((answer) => answer.status === 401).length;
    expect(looked).toBeLessThanOrEqual(7);
    await app.db.query('delete from throttles');
  });

  it('slows down one address that tries many accounts', async () => {
    for (let guess = 0; guess < 22; guess++) await tryWrong(`nobody${guess}@quarrylane.example`);
    await tryWrong('nobody-else@quarrylane.example').expect(429);
    await app.db.query('delete from throttles');
  });

  it('does not count sign-ins that succeed', async () => {
    for (let round = 0; round < 25; round++)
      await app
        .visitor()
        .post('/api/auth/sign-in', { email: 'tech@ferryroad.example', password })
        .expect(200);
  });

  it('keeps no address and no account name', async () => {
    await tryWrong('owner@ferryroad.example').expect(401);
    const rows = await app.db.query('select key from throttles');
    expect(rows.length).toBeGreaterThan(0);
    for (const row of rows) expect(row['key']).toMatch(/^[0-9a-f]{64}$/);
  });
});
