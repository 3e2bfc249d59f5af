import { show } from './command.mjs';
import { needChromium, needPostgres } from './debian.mjs';
import { endOnSignals } from './ending.mjs';
import { needPackages } from './packages.mjs';
import { ROOT } from './root.mjs';
import { run, say, Stop } from './say.mjs';

const CHECKS = ['check:format', 'check:lint', 'check:types'];

/**
 * `npm test`: format, lint and types, then every test, in a database cluster of the tests' own. What stands behind `--`
 * goes to vitest, and the checks are left out where only some tests are asked for. `--long`: soaks and fuzzing in full.
 */
async function main() {
  const asked = process.argv.slice(2);
  const args = asked.filter((each) => each !== '--long');
  const isLong = args.length < asked.length;
  endOnSignals();
  await needPackages();
  await needPostgres();
  const chromium = await needChromium();
  const env = { ...process.env, ASTRO_TELEMETRY_DISABLED: '1', HOLDFAST_CHROMIUM: chromium };
  for (const name of ['PORT', 'HOST', 'DATABASE_URL', 'DATABASE_APP_URL', 'HOLDFAST_MODE', 'HOLDFAST_DATA'])
    delete env[name];
  if (isLong) env.HOLDFAST_LONG = '1';
  if (args.length === 0) await check(env);
  const { needBuild } = await import('./build.mjs');
  await needBuild();
  const vitest = await show(process.execPath, ['node_modules/vitest/vitest.mjs', 'run', ...args], {
    cwd: ROOT,
    env,
  });
  process.exitCode = vitest;
}

async function check(env) {
  for (const name of CHECKS) {
    say(`\n${name}`);
    if ((await show('npm', ['run', '--silent', name], { cwd: ROOT, env })) !== 0)
      throw new Stop(`${name} found faults; they stand above. The tests were not run.`);
  }
}

await run(main);
