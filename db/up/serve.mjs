import { createServer } from 'node:http';
import { join } from 'node:path';
import { fileURLToPath, pathToFileURL } from 'node:url';
import { frontOf } from './front.mjs';

const HOUR_MS = 3_600_000;

/**
 * Serves a build. The application reads its settings from the environment. Resolves to `{ port, close() }`; with port 0
 * any free one is taken. `close` lets requests under way end, for at most three seconds.
 */
export async function serve({ build, host, port }) {
  process.env.ASTRO_NODE_AUTOSTART = 'disabled';
  const { handler } = await import(pathToFileURL(join(build, 'server/entry.mjs')).href);
  quickStrings();
  const trustedProxies = (process.env.HOLDFAST_TRUSTED_PROXIES ?? '').split(',').map((each) => each.trim());
  const https = process.env.HOLDFAST_MODE === 'production';
  const server = createServer(frontOf(handler, { trustedProxies: trustedProxies.filter(Boolean), https }));
  // A gigabyte over a slow line takes its time; headers do not.
  server.requestTimeout = 2 * HOUR_MS;
  server.headersTimeout = 30_000;
  server.keepAliveTimeout = 65_000;
  await new Promise((resolve, reject) => {
    server.once('error', reject);
    server.listen(port, host, resolve);
  });
  const close = () =>
    new Promise((resolve) => {
      server.close(() => resolve());
      server.closeIdleConnections();
      setTimeout(() => server.closeAllConnections(), 3000).unref();
    });
  return { port: server.address().port, close };
}

/**
 * The framework has a class that extends String. Making it turns String.prototype into a slow dictionary in V8 (Node 20), and
 * every `charCodeAt` of the process costs three times as much from then on: a log of a million rows takes 1.1 s to read
 * instead of 0.3 s. Property reads through an object that inherits from it make V8 lay it out for speed again.
 */
function quickStrings() {
  const wrapped = Object('x');
  for (let i = 0; i < 1000; i++) wrapped.charCodeAt(0);
}

/** As a program of its own (tests, several processes side by side): `node serve.mjs BUILD`, PORT and HOST from the environment. */
async function main() {
  const { port, close } = await serve({
    build: process.argv[2],
    host: process.env.HOST || '127.0.0.1',
    port: Number(process.env.PORT || 0),
  });
  process.send?.({ port });
  process.once('disconnect', () => process.exit(0));
  for (const signal of ['SIGINT', 'SIGTERM'])
    process.once(signal, () => void close().then(() => process.exit(0)));
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await main();
