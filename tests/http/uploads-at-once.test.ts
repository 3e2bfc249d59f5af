import { request, type ClientRequest } from 'node:http';
import { setTimeout as sleep } from 'node:timers/promises';
import { expect, it } from 'vitest';
import { testApp, type Visitor } from '../helpers/app';
import { logText, makeWorld } from '../helpers/world';

// Five connections, of which three stay free: two uploads at once.
const app = await testApp({ HOLDFAST_DATABASE_CONNECTIONS: '5' });
const world = await makeWorld(app);

/** Begins an upload and sends no more of it. */
function stalled(visitor: Visitor): ClientRequest {
  const cookie = visitor.agent.jar
    .getCookies({ domain: '127.0.0.1', path: '/', secure: false, script: false })
    .toValueString();
  const sent = request(`${app.url}/api/runs/${world.runId}/logs`, {
    method: 'POST',
    headers: { Origin: app.url, Cookie: cookie, 'Content-Type': 'multipart/form-data; boundary=slow' },
  });
  sent.on('error', () => undefined);
  const part = 'Content-Disposition: form-data; name="file"; filename="slow.csv"\r\nContent-Type: text/csv';
  sent.write(`--slow\r\n${part}\r\n\r\n${logText().slice(0, 4000)}`);
  return sent;
}

const whole = (visitor: Visitor) =>
  visitor.agent
    .post(`/api/runs/${world.runId}/logs`)
    .attach('file', Buffer.from(`${logText()}\n`), { filename: 'log.csv', contentType: 'text/csv' });

it('uploads that stall leave the others their work, and one too many is asked to come again', async () => {
  const tech = await app.as('tech');
  const slow = [stalled(tech), stalled(tech)];
  await sleep(500);
  await Promise.all(Array.from({ length: 12 }, () => tech.get('/api/kilns').expect(200)));
  const refused = await whole(tech);
  expect(refused.status).toBe(429);
  expect(refused.body).toMatchObject({ code: 'too-many', status: 429 });
  expect(Number(refused.headers['retry-after'])).toBeGreaterThan(0);
  for (const one of slow) one.destroy();
  let taken = await whole(tech);
  for (let tries = 0; tries < 50 && taken.status === 429; tries++) {
    await sleep(100);
    taken = await whole(tech);
  }
  expect([200, 201]).toContain(taken.status);
});
