/**
 * Importing a log on the server, from the first byte sent to findings answered and everything stored, against Papa Parse
 * alone in step mode on the same text in the same run; the server's memory while it does; and what a stored sample takes
 * on disk with its indexes and zoom levels. Run: npm run bench import
 */
import Papa from 'papaparse';
import pg from 'pg';
import { kilnLogBytes } from './kiln-log';
import { residentBytes, servedApp, type ServedApp } from './served-app';

const MILLION = 1_000_000;
const median = (values: number[]): number => [...values].sort((a, b) => a - b)[values.length >> 1] ?? NaN;

async function newRun(app: ServedApp): Promise<string> {
  const kiln = await app.call<{ id: string }>('POST', '/api/kilns', {
    name: 'Bench kiln',
    energy: 'electric',
    innerWidthM: 0.45,
    innerDepthM: 0.45,
    innerHeightM: 0.6,
    lining: 'brick',
    liningM: 0.12,
    ratedKW: 12,
    maxC: 1250,
  });
  const profile = {
    startC: 20,
    segments: [{ stage: 'vitrification', toC: 870, rateCPerH: 76.5, holdS: 20_000 }],
  };
  const made = await app.call<{ version: { id: string } }>('POST', '/api/profiles', {
    name: 'Bench',
    kilnId: kiln.id,
    profile,
  });
  const run = { kilnId: kiln.id, profileVersionId: made.version.id, plannedStartAt: '2026-02-14T07:00:00Z' };
  return (await app.call<{ id: string }>('POST', '/api/runs', run)).id;
}

/** Uploads and waits for the report; gives the time and the highest memory of the server meanwhile. */
async function imported(app: ServedApp, pieces: Iterable<Uint8Array>) {
  const runId = await newRun(app);
  const idle = residentBytes(app.pid);
  let peak = idle;
  const watch = setInterval(() => (peak = Math.max(peak, residentBytes(app.pid))), 20);
  const begin = performance.now();
  const { status, body } = await app.upload(`/api/runs/${runId}/logs`, pieces);
  const ms = performance.now() - begin;
  clearInterval(watch);
  if (status !== 201) throw new Error(`${status} ${body.slice(0, 500)}`);
  const report = JSON.parse(body) as { acceptedRows: number; channels: { samples: number }[] };
  const { items } = await app.call<{ items: unknown[] }>('GET', `/api/runs/${runId}/findings`);
  return { ms, overIdleMB: (peak - idle) / 1e6, report, findings: items.length };
}

async function sampleBytes(client: pg.Client): Promise<number> {
  const { rows } = await client.query<{ bytes: string }>(
    "select pg_total_relation_size('sample_chunks') as bytes",
  );
  return Number(rows[0]?.bytes);
}

const app = await servedApp();
const client = new pg.Client(process.env['DATABASE_APP_URL']);
await client.connect();
try {
  await imported(app, kilnLogBytes({ rows: 20_000, jitterShare: 0 }));

  const pieces = [...kilnLogBytes({ rows: MILLION, jitterShare: 0 })];
  const text = Buffer.concat(pieces).toString('utf8');
  const papaMs: number[] = [];
  const oursMs: number[] = [];
  let most = 0;
  let findings = 0;
  for (let round = 0; round < 3; round++) {
    const begin = performance.now();
    Papa.parse(text, { step: () => undefined });
    papaMs.push(performance.now() - begin);
    // A byte more each round: the same bytes again would be another log, but known to the run they are not.
    const done = await imported(app, [...pieces, Buffer.from('\n'.repeat(round))]);
    oursMs.push(done.ms);
    most = Math.max(most, done.overIdleMB);
    findings = done.findings;
  }
  const [papa, ours] = [median(papaMs), median(oursMs)];
  console.log(`Papa Parse in step mode, alone, 1,000,000 rows of 3 columns: ${papa.toFixed(0)} ms`);
  console.log(
    `import of the same on the server, to ${findings} findings, stored: ${ours.toFixed(0)} ms, ` +
      `${(ours / papa).toFixed(2)} of Papa alone (bar: 2.00)`,
  );
  console.log(`memory of the server over idle, 1,000,000 rows: ${most.toFixed(0)} MB (bar: 150 MB)`);
  const five = await imported(app, kilnLogBytes({ rows: 5 * MILLION, jitterShare: 0 }));
  console.log(
    `memory of the server over idle, 5,000,000 rows: ${five.overIdleMB.toFixed(0)} MB (bar: 150 MB)`,
  );

  const before = await sampleBytes(client);
  const { report } = await imported(app, kilnLogBytes({ rows: MILLION, jitterShare: 0.2 }));
  const samples = report.channels.reduce((sum, channel) => sum + channel.samples, 0);
  const perSample = ((await sampleBytes(client)) - before) / samples;
  console.log(
    `stored, with indexes and zoom levels, clock ±20 %: ${perSample.toFixed(2)} bytes a sample over ` +
      `${samples.toLocaleString('en')} samples (bar: 4)`,
  );
} finally {
  await client.end();
  await app.stop();
}
