import { mkdirSync, renameSync, statSync } from 'node:fs';
import { dirname, join, resolve } from 'node:path';
import { DATABASE, reach, runTool } from './backup-files.mjs';
import { needPackages } from './packages.mjs';
import { dataFolder } from './place.mjs';
import { run, say } from './say.mjs';

/** `npm run backup [FILE]`: everything in one file, also while Holdfast runs. */
async function main() {
  await needPackages();
  const data = dataFolder();
  const stamp = new Date().toISOString().replace(/[:.]/g, '-');
  const file = resolve(process.argv[2] ?? join(data, 'backups', `holdfast-${stamp}.dump`));
  mkdirSync(dirname(file), { recursive: true, mode: 0o700 });
  const { bin, urlFor, stop } = await reach(data, { alone: false });
  try {
    const draft = `${file}.part`;
    runTool(bin, 'pg_dump', urlFor(DATABASE), ['--format=custom', '--no-owner', `--file=${draft}`]);
    renameSync(draft, file);
  } finally {
    await stop();
  }
  say(`Kept in ${file} (${(statSync(file).size / 1e6).toFixed(1)} MB).`);
}

await run(main);
