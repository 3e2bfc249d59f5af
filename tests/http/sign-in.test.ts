import { describe, expect, it } from 'vitest';
import { demoAccounts } from '../../db/seeds/people';
import { testApp } from '../helpers/app';

const app = await testApp();
const { password } = demoAccounts;
const tech = 'tech@quarrylane.example';

const cookieOf = (headers: Record<string, unknown>, name = 'holdfast_session'): string =>
  ([] as string[]).concat(headers['set-cookie'] as string[]).find((each) => each.startsWith(`${name}=`)) ??
  '';
const valueOf = (headers: Record<string, unknown>, name: string): string =>
  cookieOf(headers, name)
    .split(';')[0]
    ?.slice(name.length + 1) ?? '';

describe('signing in', () => {
  it('gives the person, their studio and their roles, and an HttpOnly session cookie', async () => {
    const visitor = app.visitor();
    const answer = await visitor
      .post('/api/auth/sign-in', { email: 'Tech@QuarryLane.example', password })
      .expect(200);
    expect(answer.body).toMatchObject({
      user: { email: tech, name: app.db.people.tech.name },
      studio: { id: app.db.people.tech.studioId, timeZone: 'Europe/London' },
      roles: ['technician'],
    });
    expect(JSON.stringify(answer.body)).not.toMatch(/hash|\$2b/);
    const cookie = cookieOf(answer.headers);
    expect(cookie).toMatch(/HttpOnly/i);
    expect(cookie).toMatch(/SameSite=Lax/i);
    const me = await visitor.get('/api/auth/me').expect(200);
    expect(me.body).toEqual(answer.body);
  });

  it('answers a wrong password and an unknown address in the same words', async () => {
    const wrong = await app
      .visitor()
      .post('/api/auth/sign-in', { email: tech, password: 'not the one' })
      .expect(401);
    const unknown = await app
      .visitor()
      .post('/api/auth/sign-in', { email: 'nobody@quarrylane.example', password: 'not the one' })
      .expect(401);
    expect(wrong.headers['content-type']).toBe('application/problem+json');
    expect(wrong.body).toEqual(unknown.body);
    expect(wrong.body).toMatchObject({ code: 'wrong-credentials', status: 401 });
  });

  it('refuses a forged and a foreign cookie', async () => {
    const forged = `eyJhbGciOiJub25lIn0.${Buffer.from(JSON.stringify({ aud: 'session', sub: app.db.people.tech.id })).toString('base64url')}.`;
    for (const value of [forged, 'x.y.z', 'a'.repeat(5000)])
      await app.visitor().get('/api/auth/me').set('Cookie', `holdfast_session=${value}`).expect(401);
  });

  it('does not take the cookie that remembers a browser for a session', async () => {
    const answer = await app.visitor().post('/api/auth/sign-in', { email: tech, password }).expect(200);
    const device = valueOf(answer.headers, 'holdfast_device');
    const [, claims = ''] = device.split('.');
    expect(JSON.parse(Buffer.from(claims, 'base64url').toString())).toMatchObject({
      aud: 'device',
      sub: app.db.people.tech.id,
    });
    const session = valueOf(answer.headers, 'holdfast_session');
    await app.visitor().get('/api/auth/me').set('Cookie', `holdfast_session=${session}`).expect(200);
    await app.visitor().get('/api/auth/me').set('Cookie', `holdfast_session=${device}`).expect(401);
  });
});

describe('sessions', () => {
  it('lists own sessions and ends one of them; its cookie is worth nothing from then on', async () => {
    const here = app.visitor();
    const there = app.visitor();
    for (const visitor of [here, there])
      await visitor
        .post('/api/auth/sign-in', { email: 'teacher@quarrylane.example', password })
        .set('User-Agent', 'Mozilla/5.0 (X11; Linux x86_64) Gecko/20100101 Firefox/128.0')
        .expect(200);
    const list = await here.get('/api/account/sessions').expect(200);
    expect(list.body.items).toHaveLength(2);
    expect(list.body.items[0].device).toBe('Firefox on Linux');
    const other = list.body.items.find((session: { current: boolean }) => !session.current);
    await here.delete(`/api/account/sessions/${other.id}`).expect(200);
    await there.get('/api/auth/me').expect(401);
    await here.get('/api/auth/me').expect(200);
  });

  it('cannot end the session of another person', async () => {
    const student = await app.as('student');
    const list = await student.get('/api/account/sessions').expect(200);
    const owner = await app.as('owner');
    await owner.delete(`/api/account/sessions/${list.body.items[0].id}`).expect(404);
    await student.get('/api/auth/me').expect(200);
  });

  it('ends at sign-out, in the database too', async () => {
    const visitor = app.visitor();
    const answer = await visitor.post('/api/auth/sign-in', { email: tech, password }).expect(200);
    const cookie = cookieOf(answer.headers).split(';')[0] ?? '';
    await visitor.post('/api/auth/sign-out').expect(200);
    await app.visitor().get('/api/auth/me').set('Cookie', cookie).expect(401);
  });

  it('ends when unused past its time, and moves its end on with use', async () => {
    const visitor = app.visitor();
    await visitor.post('/api/auth/sign-in', { email: 'owner@ferryroad.example', password }).expect(200);
    const mine = `user_id = '${app.db.people.otherOwner.id}'`;
    await app.db.query(
      `update sessions set last_seen_at = now() - interval '13 days', expires_at = now() + interval '1 day' where ${mine}`,
    );
    await visitor.get('/api/auth/me').expect(200);
    const [row] = await app.db.query(
      `select expires_at > now() + interval '13 days' as moved from sessions where ${mine}`,
    );
    expect(row).toEqual({ moved: true });
    await app.db.query(`update sessions set expires_at = now() - interval '1 second' where ${mine}`);
    await visitor.get('/api/auth/me').expect(401);
  });

  it('never lives past its longest life, however much it is used', async () => {
    const visitor = app.visitor();
    await visitor.post('/api/auth/sign-in', { email: 'owner@ferryroad.example', password }).expect(200);
    const mine = `user_id = '${app.db.people.otherOwner.id}' and created_at > now() - interval '1 hour'`;
    await app.db.query(
      `update sessions set created_at = now() - interval '89 days', last_seen_at = now() - interval '1 hour' where ${mine}`,
    );
    await visitor.get('/api/auth/me').expect(200);
    const [row] = await app.db.query(
      `select max(expires_at) < now() + interval '25 hours' as bounded from sessions where user_id = '${app.db.people.otherOwner.id}' and created_at < now() - interval '80 days'`,
    );
    expect(row).toEqual({ bounded: true });
  });

  it('is worth nothing once the person has left the studio', async () => {
    const visitor = app.visitor();
    await visitor.post('/api/auth/sign-in', { email: 'tech@ferryroad.example', password }).expect(200);
    await app.db.query(
      `update memberships set ended_at = now() where user_id = '${app.db.people.otherTech.id}'`,
    );
    await visitor.get('/api/auth/me').expect(401);
    await app.visitor().post('/api/auth/sign-in', { email: 'tech@ferryroad.example', password }).expect(403);
  });
});

describe('the account', () => {
  it('keeps a name, units and a theme of the person’s own, and goes back to the studio’s units', async () => {
    const visitor = await app.as('student');
    const units = { temperature: 'F', mass: 'lb', length: 'in' };
    const changed = await visitor
      .patch('/api/account', { name: 'Wren A.', units, theme: 'dark' })
      .expect(200);
    expect(changed.body.preferences).toEqual({ units, theme: 'dark' });
    expect(changed.body.user.name).toBe('Wren A.');
    const back = await visitor.patch('/api/account', { units: null }).expect(200);
    expect(back.body.preferences).toEqual({ units: null, theme: 'dark' });
  });

  it('changes the password, ends the other sessions, and keeps this one', async () => {
    const email = 'teacher@quarrylane.example';
    const here = app.visitor();
    const there = app.visitor();
    for (const visitor of [here, there])
      await visitor.post('/api/auth/sign-in', { email, password }).expect(200);
    await here
      .post('/api/account/password', { currentPassword: 'wrong', newPassword: 'a new password' })
      .expect(422);
    const tooLong = 'ä'.repeat(40);
    const refused = await here
      .post('/api/account/password', { currentPassword: password, newPassword: tooLong })
      .expect(422);
    expect(refused.body.detail).toMatch(/72 bytes/);
    await here
      .post('/api/account/password', { currentPassword: password, newPassword: 'a new password' })
      .expect(200);
    await there.get('/api/auth/me').expect(401);
    await here.get('/api/auth/me').expect(200);
    await app.visitor().post('/api/auth/sign-in', { email, password }).expect(401);
    await app.visitor().post('/api/auth/sign-in', { email, password: 'a new password' }).expect(200);
  });
});
