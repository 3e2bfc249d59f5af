import { bringUp } from './database.mjs';
import { endOnSignals } from './ending.mjs';
import { modeOf, secretOf } from './environment.mjs';
import { demoAccounts, firstOwnerLink, refuseDemoAccounts } from './first-owner.mjs';
import { askHolder, tryLock } from './lock.mjs';
import { needPackages } from './packages.mjs';
import { dataFolder } from './place.mjs';
import { run, say, Stop } from './say.mjs';

const USUAL_PORT = 4321;
const PORTS_TRIED = 30;

/** `npm start`: from a bare clone to a site that answers. */
async function main() {
  const mode = modeOf();
  const data = dataFolder();
  const lock = await holdOrStop(data);
  const ending = endOnSignals();
  await needPackages();
  const { needBuild } = await import('./build.mjs');
  const secret = secretOf(data, mode);
  const onExit = () => void ending.end(1, 'The database server ended, so Holdfast stops. Start it again.');
  const database = await bringUp({ data, mode, secret, onExit });
  ending.before(database.stop);
  if (mode === 'production')
    await refuseDemoAccounts(database.ownerUrl).catch((error) => stopWith(ending, error));
  const build = await needBuild().catch((error) => stopWith(ending, error));
  const site = await serveSite({ build, mode, secret, appUrl: database.appUrl }).catch((error) =>
    stopWith(ending, error),
  );
  ending.before(site.close);
  lock.tell(site.origin);
  await welcome({ mode, site, ownerUrl: database.ownerUrl });
}

async function holdOrStop(data) {
  const lock = await tryLock(`start ${data}`);
  if (lock) return lock;
  const origin = await askHolder(`start ${data}`);
  throw new Stop(
    `Holdfast already ${origin ? `runs at ${origin}` : 'starts'} with the data in ${data}. ` +
      'Stop it first, or set HOLDFAST_DATA to another folder.',
  );
}

async function stopWith(ending, error) {
  process.stderr.write(`\n${error instanceof Stop ? error.message : error.stack}\n`);
  await ending.end(1);
}

async function serveSite({ build, mode, secret, appUrl }) {
  Object.assign(process.env, {
    NODE_ENV: 'production',
    HOLDFAST_MODE: mode,
    HOLDFAST_SECRET: secret,
    DATABASE_APP_URL: appUrl,
    HOLDFAST_LOG: process.env.HOLDFAST_LOG || (mode === 'demo' ? 'warn' : 'info'),
  });
  // The web server has no business with the migrating role.
  delete process.env.DATABASE_URL;
  const { serve } = await import('./serve.mjs');
  const host = mode === 'demo' ? '127.0.0.1' : process.env.HOST || '127.0.0.1';
  const asked = process.env.PORT ? Number(process.env.PORT) : null;
  if (asked !== null && !(Number.isInteger(asked) && asked >= 0 && asked < 65536))
    throw new Stop(`PORT is '${process.env.PORT}'; expected a number up to 65535.`);
  for (let port = asked ?? USUAL_PORT; ; port++) {
    try {
      const server = await serve({ build, host, port });
      if (asked === null && port !== USUAL_PORT)
        say(`Port ${USUAL_PORT} is taken by another program; using ${server.port}.`);
      const origin =
        mode === 'demo' ? `http://127.0.0.1:${server.port}` : new URL(process.env.HOLDFAST_ORIGIN).origin;
      return { ...server, host, origin };
    } catch (error) {
      if (error.code === 'EACCES')
        throw new Stop(`This user may not listen on port ${port}. Set PORT to 1024 or higher.`);
      if (error.code !== 'EADDRINUSE') throw error;
      if (asked !== null)
        throw new Stop(`Port ${asked} is taken by another program. Set PORT to a free one.`);
      if (port >= USUAL_PORT + PORTS_TRIED)
        throw new Stop(`Ports ${USUAL_PORT} to ${port} are all taken. Set PORT to a free one.`);
    }
  }
}

async function welcome({ mode, site, ownerUrl }) {
  say('');
  if (mode === 'production') {
    say(`Holdfast serves ${site.origin} from ${site.host}:${site.port}.`);
    const link = await firstOwnerLink(ownerUrl, site.origin);
    if (link)
      say(
        `\nNobody owns this installation yet. Make its first owner here, once, within 24 hours:\n\n  ${link}`,
      );
  } else {
    say(`Holdfast is at ${site.origin}`);
    say(`\nDemo accounts, all with the password ${demoAccounts.password}:`);
    for (const { email, roles, studio } of demoAccounts.people)
      say(`  ${email.padEnd(30)}${roles.join(', ').padEnd(12)}${demoAccounts.studios[studio].name}`);
  }
  say('\nCtrl-C stops it.');
}

await run(main);
