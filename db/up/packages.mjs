import { existsSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { show } from './command.mjs';
import { waitForLock } from './lock.mjs';
import { ROOT } from './root.mjs';
import { say, Stop } from './say.mjs';

const [MAJOR, MINOR] = process.versions.node.split('.').map(Number);

export function refuseOtherNode() {
  if (MAJOR !== 20 || MINOR < 11)
    throw new Stop(`Holdfast runs on Node 20 (20.11 or later); this is Node ${process.versions.node}.`);
}

/** Installs the packages of the lock file where they are missing or others. */
export async function needPackages() {
  refuseOtherNode();
  if (areInstalled()) return;
  const lock = await waitForLock(`packages ${ROOT}`, 600, () => say('Waiting for another install to end.'));
  if (!lock) throw new Stop('Another install of packages in this folder does not end.');
  try {
    if (areInstalled()) return;
    say('Installing packages (npm ci).');
    const npm = process.env.npm_execpath ? [process.execPath, process.env.npm_execpath] : ['npm'];
    const code = await show(npm[0], [...npm.slice(1), 'ci', '--no-audit', '--no-fund', '--include=dev'], {
      cwd: ROOT,
    });
    if (code !== 0) throw new Stop('npm ci failed; what it said stands above.');
  } finally {
    await lock.release();
  }
}

/** Whether every package that this machine needs is there in the version of the lock file. */
function areInstalled() {
  const hidden = join(ROOT, 'node_modules/.package-lock.json');
  if (!existsSync(hidden)) return false;
  const wanted = Object.entries(packagesOf(join(ROOT, 'package-lock.json')));
  const there = packagesOf(hidden);
  return wanted.every(
    ([path, entry]) =>
      path === '' ||
      (there[path]
        ? there[path].version === entry.version
        : entry.optional === true || entry.devOptional === true || entry.peer === true),
  );
}

const packagesOf = (file) => JSON.parse(readFileSync(file, 'utf8')).packages ?? {};
