import { createHash } from 'node:crypto';
import {
  existsSync,
  mkdirSync,
  readdirSync,
  readFileSync,
  rmSync,
  statSync,
  utimesSync,
  writeFileSync,
} from 'node:fs';
import { join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { show } from './command.mjs';
import { waitForLock } from './lock.mjs';
import { ROOT } from './root.mjs';
import { run, say, Stop } from './say.mjs';

const SOURCES = [
  'src',
  'public',
  'package.json',
  'package-lock.json',
  'astro.config.mjs',
  'tailwind.config.mjs',
  'tsconfig.json',
];
const DIST = join(ROOT, 'dist');
/** Builds that are kept: one that serves, one that tests, and one to spare. */
const KEPT = 3;

/**
 * The folder of a build of the source as it is now, built first where there is none. Each state of the source has a
 * folder of its own, so that a build never pulls the files away under a server that runs.
 */
export async function needBuild() {
  const found = finished(join(DIST, sourceHash()));
  if (found) return found;
  const lock = await waitForLock(`build ${ROOT}`, 600, () => say('Waiting for another build to end.'));
  if (!lock) throw new Stop('Another build in this folder does not end.');
  try {
    return finished(join(DIST, sourceHash())) ?? (await build());
  } finally {
    await lock.release();
  }
}

function finished(folder) {
  if (!existsSync(join(folder, 'built'))) return null;
  const now = new Date();
  utimesSync(join(folder, 'built'), now, now);
  return folder;
}

async function build() {
  const hash = sourceHash();
  const folder = join(DIST, hash);
  say('Building.');
  rmSync(folder, { recursive: true, force: true });
  const env = { ...process.env, ASTRO_TELEMETRY_DISABLED: '1', NODE_ENV: 'production' };
  const astro = join(ROOT, 'node_modules/astro/astro.js');
  const code = await show(process.execPath, [astro, 'build', '--outDir', folder, '--silent'], {
    cwd: ROOT,
    env,
  });
  if (code !== 0) throw new Stop('The build failed; what it said stands above.');
  writeFileSync(join(folder, 'built'), `${hash}\n`);
  removeOld();
  return folder;
}

/** SHA-256 over the names and contents of everything the build reads. */
export function sourceHash() {
  const hash = createHash('sha256').update(process.versions.node);
  for (const file of SOURCES.flatMap((name) => filesUnder(join(ROOT, name))))
    hash.update(`\0${file.slice(ROOT.length)}\0`).update(readFileSync(file));
  return hash.digest('hex').slice(0, 16);
}

function filesUnder(path) {
  if (!existsSync(path)) return [];
  if (!statSync(path).isDirectory()) return [path];
  return readdirSync(path)
    .sort()
    .flatMap((name) => filesUnder(join(path, name)));
}

function removeOld() {
  const age = (folder) => (existsSync(join(folder, 'built')) ? statSync(join(folder, 'built')).mtimeMs : 0);
  mkdirSync(DIST, { recursive: true });
  const folders = readdirSync(DIST).map((name) => join(DIST, name));
  for (const folder of folders.sort((a, b) => age(b) - age(a)).slice(KEPT))
    rmSync(folder, { recursive: true, force: true });
}

if (process.argv[1] === fileURLToPath(import.meta.url)) await run(async () => say(await needBuild()));
