import { show } from './command.mjs';
import { bringUp } from './database.mjs';
import { endOnSignals } from './ending.mjs';
import { secretOf } from './environment.mjs';
import { tryLock } from './lock.mjs';
import { needPackages } from './packages.mjs';
import { dataFolder } from './place.mjs';
import { ROOT } from './root.mjs';
import { run, Stop } from './say.mjs';

/** `npm run dev`: the demo database, and Astro's development server, which reloads as files change. */
async function main() {
  const data = dataFolder();
  if (!(await tryLock(`start ${data}`)))
    throw new Stop(
      `Holdfast runs with the data in ${data}. Stop it first, or set HOLDFAST_DATA to another folder.`,
    );
  const ending = endOnSignals();
  await needPackages();
  const secret = secretOf(data, 'demo');
  const onExit = () => void ending.end(1, 'The database server ended.');
  const database = await bringUp({ data, mode: 'demo', secret, onExit });
  ending.before(database.stop);
  const env = {
    ...process.env,
    ASTRO_TELEMETRY_DISABLED: '1',
    HOLDFAST_MODE: 'demo',
    HOLDFAST_SECRET: secret,
    DATABASE_APP_URL: database.appUrl,
    HOLDFAST_LOG: process.env.HOLDFAST_LOG || 'info',
  };
  delete env.DATABASE_URL;
  const port = process.env.PORT || '4321';
  const args = ['node_modules/astro/astro.js', 'dev', '--host', '127.0.0.1', '--port', port];
  await ending.end(await show(process.execPath, args, { cwd: ROOT, env }));
}

await run(main);
