import { createHash } from 'node:crypto';
import { once } from 'node:events';
import { chmodSync, mkdtempSync, rmSync } from 'node:fs';
import { connect } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout as sleep } from 'node:timers/promises';
import pg from 'pg';
import { afterAll, describe, expect, it } from 'vitest';
import { runningPort } from '../../db/up/cluster.mjs';
import { keptKey } from '../../db/up/keys.mjs';
import { demoAccounts } from '../../db/seeds/people';
import { visitorOf, type Visitor } from '../helpers/app';
import { familyOf, isAlive, serverPid, wholeStart, type WholeStart } from '../helpers/whole-start';
import { BODIES, logText } from '../helpers/world';

const data = mkdtempSync(join(tmpdir(), 'holdfast-killed-'));
chmodSync(data, 0o711);
let start: WholeStart = await wholeStart(data);
afterAll(async () => {
  if (start.child.exitCode === null && start.child.signalCode === null) {
    start.child.kill('SIGINT');
    await once(start.child, 'exit');
  }
  rmSync(data, { recursive: true, force: true });
});

async function technician(): Promise<Visitor> {
  const visitor = visitorOf(start.url);
  const body = { email: 'tech@quarrylane.example', password: demoAccounts.password };
  await visitor.post('/api/auth/sign-in', body).expect(200);
  return visitor;
}

async function plannedRun(tech: Visitor): Promise<string> {
  const kiln = await tech.post('/api/kilns', BODIES.kiln).expect(201);
  const profile = await tech
    .post('/api/profiles', { name: 'Killed', kilnId: kiln.body.id, profile: BODIES.profile })
    .expect(201);
  const run = {
    kilnId: kiln.body.id,
    profileVersionId: profile.body.version.id,
    plannedStartAt: '2026-03-02T08:00:00Z',
  };
  return (await tech.post('/api/runs', run).expect(201)).body.id as string;
}

/** Sends the head of an upload and half of its file, and leaves it there. */
async function halfAnUpload(tech: Visitor, runId: string, text: string): Promise<void> {
  const { hostname, port } = new URL(start.url);
  const cookie = tech.agent.jar
    .getCookies({ domain: hostname, path: '/', secure: false, script: false })
    .toValueString();
  const part = 'Content-Disposition: form-data; name="file"; filename="half.csv"\r\nContent-Type: text/csv';
  const body = `--half\r\n${part}\r\n\r\n${text}\r\n--half--\r\n`;
  const head = [
    `POST /api/runs/${runId}/logs HTTP/1.1`,
    `Host: ${hostname}:${port}`,
    `Origin: ${start.url}`,
    `Cookie: ${cookie}`,
    'Content-Type: multipart/form-data; boundary=half',
    `Content-Length: ${body.length}`,
  ];
  const socket = connect(Number(port), hostname);
  socket.on('error', () => undefined);
  socket.write(`${head.join('\r\n')}\r\n\r\n${body.slice(0, body.length / 2)}`);
  await sleep(1500);
}

/** Rows of the tables that a log is kept in, for one run. */
async function keptOf(runId: string): Promise<Record<string, number>> {
  const client = new pg.Client(ownerUrl());
  await client.connect();
  const count = async (from: string) =>
    Number((await client.query<{ n: string }>(`select count(*) as n from ${from}`, [runId])).rows[0]?.n);
  try {
    return {
      uploads: await count('uploads where run_id = $1'),
      logs: await count('logs where run_id = $1'),
      strayParts: await count(
        'upload_parts p where not exists (select 1 from uploads u where u.id = p.upload_id) and $1::uuid is not null',
      ),
      strayChunks: await count(
        'sample_chunks c where not exists (select 1 from logs l where l.id = c.log_id) and $1::uuid is not null',
      ),
      strayChannels: await count(
        'log_channels c where not exists (select 1 from logs l where l.id = c.log_id) and $1::uuid is not null',
      ),
    };
  } finally {
    await client.end();
  }
}

function ownerUrl(): string {
  const port = runningPort({ folder: join(data, 'database') });
  return `postgres://holdfast_owner:${keptKey(data, 'database-owner')}@127.0.0.1:${port}/holdfast`;
}

async function killEverything(): Promise<void> {
  const postmaster = serverPid(data);
  const all = [...familyOf(start.child.pid ?? 0), ...(postmaster ? familyOf(postmaster) : [])];
  const gone = once(start.child, 'exit');
  for (const pid of new Set(all)) if (isAlive(pid)) process.kill(pid, 'SIGKILL');
  await gone;
  for (let tries = 0; tries < 100 && all.some(isAlive); tries++) await sleep(50);
  expect(all.filter(isAlive)).toEqual([]);
}

describe('everything killed outright during an upload', () => {
  it('loses no log that was acknowledged, and keeps no half of one that was not', async () => {
    const tech = await technician();
    const kept = await plannedRun(tech);
    const text = logText();
    await tech.agent
      .post(`/api/runs/${kept}/logs`)
      .attach('file', Buffer.from(text), { filename: 'whole.csv', contentType: 'text/csv' })
      .expect(201);
    const broken = await plannedRun(tech);
    await halfAnUpload(tech, broken, text.repeat(20));
    await killEverything();

    start = await wholeStart(data);
    const again = await technician();
    const run = await again.get(`/api/runs/${kept}`).expect(200);
    expect(run.body.logs).toHaveLength(1);
    const log = run.body.logs[0] as { id: string };
    const original = await again.agent
      .get(`/api/runs/${kept}/logs/${log.id}/original`)
      .responseType('blob')
      .expect(200);
    const sha256 = (bytes: string | Buffer) => createHash('sha256').update(bytes).digest('hex');
    expect(sha256(original.body as Buffer)).toBe(sha256(text));
    const findings = await again.get(`/api/runs/${kept}/findings`).expect(200);
    expect(findings.body.items.length).toBeGreaterThan(0);

    const none = await again.get(`/api/runs/${broken}`).expect(200);
    expect(none.body.logs).toEqual([]);
    expect(await keptOf(broken)).toEqual({
      uploads: 0,
      logs: 0,
      strayParts: 0,
      strayChunks: 0,
      strayChannels: 0,
    });
    // And the same file is taken whole when it is sent again.
    await again.agent
      .post(`/api/runs/${broken}/logs`)
      .attach('file', Buffer.from(text), { filename: 'half.csv', contentType: 'text/csv' })
      .expect(201);
  });

  it('leaves no process behind when only the start is killed', async () => {
    const postmaster = serverPid(data) ?? 0;
    const all = [...familyOf(start.child.pid ?? 0), ...familyOf(postmaster)];
    start.child.kill('SIGKILL');
    await once(start.child, 'exit');
    for (let tries = 0; tries < 200 && all.some(isAlive); tries++) await sleep(50);
    expect(all.filter(isAlive)).toEqual([]);
  });

  it('stops in order at Ctrl-C, and leaves no process', async () => {
    start = await wholeStart(data);
    const all = [...familyOf(start.child.pid ?? 0), ...familyOf(serverPid(data) ?? 0)];
    start.child.kill('SIGINT');
    const [code] = (await once(start.child, 'exit')) as [number | null];
    expect(code).toBe(0);
    for (let tries = 0; tries < 100 && all.some(isAlive); tries++) await sleep(50);
    expect(all.filter(isAlive)).toEqual([]);
    expect(start.said()).not.toMatch(/left over/);
  });

  it('is said clearly when Holdfast runs already on the same data', async () => {
    start = await wholeStart(data);
    await expect(wholeStart(data)).rejects.toThrow(`Holdfast already runs at ${start.url}`);
  });
});
