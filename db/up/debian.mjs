import { existsSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { capture, show } from './command.mjs';
import { say, Stop } from './say.mjs';

const SERVERS = '/usr/lib/postgresql';
const OLDEST = 14;

/** The folder of the newest PostgreSQL server's programs, or null. */
export function findPostgres() {
  const versions = existsSync(SERVERS)
    ? readdirSync(SERVERS)
        .map(Number)
        .filter((v) => v >= OLDEST)
    : [];
  const folders = versions.sort((a, b) => b - a).map((version) => join(SERVERS, String(version), 'bin'));
  return folders.find((bin) => existsSync(join(bin, 'initdb')) && existsSync(join(bin, 'postgres'))) ?? null;
}

/** As `findPostgres`; installs it from Debian's packages where it is missing. */
export async function needPostgres() {
  const found = findPostgres();
  if (found) return found;
  await install('PostgreSQL', 'postgresql', KEEP_DEBIAN_FROM_MAKING_A_CLUSTER);
  const bin = findPostgres();
  if (!bin)
    throw new Stop(
      `PostgreSQL was installed, but no server of version ${OLDEST} or later is under ${SERVERS}.`,
    );
  return bin;
}

/** Where Chromium is, or null. */
export function findChromium() {
  return ['/usr/bin/chromium', '/usr/bin/chromium-browser'].find((path) => existsSync(path)) ?? null;
}

export async function needChromium() {
  const found = findChromium();
  if (found) return found;
  await install('Chromium, which the browser tests drive,', 'chromium');
  const path = findChromium();
  if (!path) throw new Stop('Chromium was installed, but /usr/bin/chromium is not there.');
  return path;
}

/** Holdfast keeps a cluster of its own; Debian's package would otherwise start another one that nobody asked for. */
const KEEP_DEBIAN_FROM_MAKING_A_CLUSTER =
  'mkdir -p /etc/postgresql-common/createcluster.d && ' +
  "echo 'create_main_cluster = false' > /etc/postgresql-common/createcluster.d/holdfast.conf";

async function install(what, packageName, before = 'true') {
  if (!existsSync('/usr/bin/apt-get'))
    throw new Stop(
      `${what} is not here, and this is no Debian machine. Install ${packageName}, then start again.`,
    );
  const asRoot = process.getuid() === 0 ? [] : ['sudo', '-n'];
  if (asRoot.length > 0 && capture('sudo', ['-n', 'true']).code !== 0)
    throw new Stop(
      `${what} is not installed, and installing it needs root. Run this, then start again:\n\n` +
        `  sudo apt-get update && sudo apt-get install -y --no-install-recommends ${packageName}\n`,
    );
  say(`${what} is not installed. Installing it from Debian's packages (${packageName}).`);
  const env = { ...process.env, DEBIAN_FRONTEND: 'noninteractive' };
  const asked = `${before} && apt-get install -y --no-install-recommends ${packageName}`;
  const shell = (script) =>
    show(
      asRoot[0] ?? 'sh',
      [
        ...asRoot.slice(1),
        ...(asRoot.length ? ['sh'] : []),
        '-c',
        `export DEBIAN_FRONTEND=noninteractive; ${script}`,
      ],
      { env },
    );
  if ((await shell(asked)) === 0) return;
  say('That did not work. Fetching the list of packages and trying once more.');
  if ((await shell(`apt-get update && ${asked}`)) !== 0)
    throw new Stop(`Debian's package manager could not install ${packageName}; what it said stands above.`);
}
